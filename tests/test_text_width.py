"""Widths are held against wcwidth by way of pyte, which advances as terminals do."""

from __future__ import annotations

import unicodedata

import pyte
import pytest
from hypothesis import given
from hypothesis import strategies as st

from schedtui.text_width import cut, fill, visible, width_of


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("AHU-1 [b]x[/b]", "AHU-1 [b]x[/b]"),
        ("\x1b]0;title\x07", "␛]0;title␇"),
        ("a\tb\nc\x7f", "a␉b␊c␡"),
        ("\x9b31m", "¤31m"),  # the one-byte form of ESC [
        ("ab\u202ecd", "ab¤cd"),  # would turn the writing direction
        ("\u0301e", "◌\u0301e"),  # a mark with nothing to stand on
        ("\ud800", "¤"),
    ],
)
def test_what_would_act_is_shown(text: str, shown: str) -> None:
    assert visible(text) == shown


@pytest.mark.parametrize("text", ["9440", "冷水 coil", "e\u0301te\u0301", "±0.5 °F", "한글", "ﾊﾝ"])
def test_width_is_what_a_terminal_advances(text: str) -> None:
    screen = pyte.Screen(40, 1)
    pyte.Stream(screen).feed(text)
    assert width_of(text) == screen.cursor.x


@given(st.text(max_size=30), st.integers(1, 20), st.sampled_from(["left", "right"]))
def test_filling_takes_exactly_the_width(text: str, width: int, align: str) -> None:
    filled = fill(text, width, align)  # type: ignore[arg-type]
    assert width_of(filled) == width
    assert not {unicodedata.category(character)[0] for character in filled} & {"C"}


def test_what_is_cut_has_a_sign() -> None:
    assert cut("supply", 6) == "supply"
    assert cut("supply", 5) == "supp…"
    assert fill("冷水機", 4) == "冷 …"
