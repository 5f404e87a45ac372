"""Contrast after the definition in WCAG 2.1, https://www.w3.org/TR/WCAG21/#dfn-contrast-ratio."""

from __future__ import annotations

from itertools import combinations, product
from typing import TYPE_CHECKING

import pytest

from schedtui.screen import looks
from schedtui.screen.looks import Look

if TYPE_CHECKING:
    from rich.color import Color
    from rich.style import Style


def _luminance(colour: Color | None) -> float:
    assert colour is not None
    parts = [part / 255 for part in colour.get_truecolor()]
    linear = [p / 12.92 if p <= 0.03928 else ((p + 0.055) / 1.055) ** 2.4 for p in parts]
    return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2]


STYLES = [
    *(looks.style_of(look) for look in Look),
    *(looks.marked(looks.style_of(look)) for look in Look),
    *(looks.HEADING, looks.GROUP, looks.UNIT, looks.EDIT, looks.CARET, looks.REFUSED),
]


@pytest.mark.parametrize("style", STYLES, ids=str)
def test_contrast_is_4_5_or_more(style: Style) -> None:
    light, dark = sorted((_luminance(style.color), _luminance(style.bgcolor)), reverse=True)
    assert (light + 0.05) / (dark + 0.05) >= 4.5


# Numbers 16 to 255 of xterm: a cube of six steps each way, and greys.
XTERM = {
    *product((0, 95, 135, 175, 215, 255), repeat=3),
    *((grey, grey, grey) for grey in range(8, 248, 10)),
}


@pytest.mark.parametrize("style", STYLES, ids=str)
def test_colours_are_among_the_256(style: Style) -> None:
    for colour in (style.color, style.bgcolor):
        assert colour is not None
        assert tuple(colour.get_truecolor()) in XTERM


def test_nothing_is_told_by_colour_alone() -> None:
    telling = [look for look in Look if look not in {Look.TYPED, Look.BLANK, Look.SUBDUED}]
    signs = {look: (looks.sign_of(look), looks.mark_of(look)) for look in telling}
    assert all(signs[one] != signs[other] for one, other in combinations(telling, 2))
    assert signs.pop(Look.MARK_CLEAR) == (" ", "")
    assert (" ", "") not in signs.values()


def test_severity_marks_are_plain_ascii() -> None:
    marks = [looks.mark_of(look) for look in Look if look.name.startswith("MARK_")]
    assert all(mark.isascii() and len(mark) <= looks.MARK_WIDTH for mark in marks)
    assert len(set(marks)) == len(marks) == 7


def test_cursor_is_seen_without_colour() -> None:
    for look in Look:
        style = looks.style_of(look)
        assert looks.under_cursor(style).reverse != bool(style.reverse)
