from __future__ import annotations

import tomllib

import pytest
from hypothesis import given
from hypothesis import strategies as st

from schedtui.schedule.typed import Typed, toml_text, toml_texts


def test_cells_are_equal_when_they_read_the_same_and_digits_count():
    assert Typed("a", "a", "'a'") == Typed("a", "a", '"a"')
    assert Typed("66", 66.0, "66") != Typed("66.0", 66.0, "66.0")
    assert Typed("66", 66.0, "66") != Typed("66", None, '"66"', "is not a number")


def test_a_cell_with_a_problem_is_bad():
    assert Typed("x", None, "x", "is not a number").bad
    assert not Typed("x", None, '"x"').bad


@given(st.text())
def test_any_text_is_written_on_one_line_and_reads_back(text):
    written = toml_text(text)
    assert "\n" not in written
    assert tomllib.loads(f"a = {written}")["a"] == text


@given(st.lists(st.text(), max_size=4))
def test_any_texts_are_written_on_one_line_and_read_back(texts):
    written = toml_texts(tuple(texts))
    assert "\n" not in written
    assert tomllib.loads(f"a = {written}")["a"] == texts


@pytest.mark.parametrize("text", ["°F − ½", "冷水", "\x7f", "'''", '"""', "\\", "\ud7ff\ue000"])
def test_a_text_of_odd_characters_reads_back(text):
    assert tomllib.loads(f"a = {toml_text(text)}")["a"] == text
