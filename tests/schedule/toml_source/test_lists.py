"""Arrays of inline tables, with the exact characters that must come out."""

from __future__ import annotations

import pytest

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source import Append, Arrange, Piece, Put, Remove, read_source, splice

LINES = "unit = [\n  # a\n  {n = 1}, # one\n  {n = 2}, # two\n  # c\n  {n = 3} # three\n]\n"
ONE = "unit = [ {n = 1}, {n = 2} , {n = 3}, ] # all\n"


def arranged(text, *pieces):
    return splice(read_source(text), [Arrange("unit", pieces)])


def test_elements_on_lines_move_with_their_comments():
    assert arranged(LINES, Piece(2), Piece(0)) == (
        "unit = [\n  # c\n  {n = 3}, # three\n  # a\n  {n = 1}, # one\n]\n"
    )
    new = Piece(None, None, (Put(("n",), "4"),))
    changed = Piece(1, None, (Put(("m",), "0"),))
    assert arranged(LINES, Piece(0), new, changed, Piece(2)) == LINES.replace(
        "  {n = 2}, # two\n", "  { n = 4 },\n  {n = 2, m = 0}, # two\n"
    )


def test_elements_on_one_line_move():
    assert arranged(ONE, Piece(2), Piece(0), Piece(0)) == (
        "unit = [ {n = 3}, {n = 1}, {n = 1} ] # all\n"
    )
    assert arranged(ONE) == "unit = [  ] # all\n"
    block = read_source(ONE).block("unit", 1)
    assert arranged("unit = []", Piece(None, block)) == "unit = [{n = 2}]"


def test_elements_that_stay_change_in_their_place():
    pieces = (Piece(0), Piece(1, None, (Put(("n",), "5"),)), Piece(2))
    assert arranged(LINES, *pieces) == LINES.replace("n = 2", "n = 5")


def test_elements_go_and_come_at_the_end():
    def edited(text, *changes):
        return splice(read_source(text), changes)

    append = Append(("unit",), (("n", "4"),))
    assert edited(LINES, Remove(("unit", 1))) == LINES.replace("  {n = 2}, # two\n", "")
    assert edited(LINES, append) == LINES.replace(
        "{n = 3} # three\n", "{n = 3}, # three\n  { n = 4 }\n"
    )
    assert edited(ONE, Remove(("unit", 0)), append) == (
        "unit = [ {n = 2} , {n = 3}, { n = 4 }, ] # all\n"
    )
    removed = [Remove(("unit", place)) for place in range(3)]
    assert edited(ONE, *removed, append) == "unit = [{ n = 4 }] # all\n"


def test_what_would_lose_a_comment_or_mix_forms_is_refused():
    text = "unit = [ {n = 1}, # one\n {n = 2} ]\n"
    with pytest.raises(SpliceError, match="comments among its elements"):
        arranged(text, Piece(1), Piece(0))
    with pytest.raises(SpliceError, match="cannot be put among"):
        arranged(ONE, Piece(None, "[[unit]]\nn = 1\n"))
    with pytest.raises(SpliceError):
        arranged("unit = [1, 2]\n", Piece(1), Piece(0))
    with pytest.raises(SpliceError):
        arranged("unit = 5\n", Piece(None, None))
