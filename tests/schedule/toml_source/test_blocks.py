"""Elements of an array in a new order, with the exact characters that must come out."""

from __future__ import annotations

import pytest

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source import Append, Arrange, Piece, Put, Remove, read_source, splice
from schedtui.schedule.toml_source.blocks import longest_run

A = "# A\n[[unit]]\ntag = 'A' # a\n\n[[unit.accepted]]\ncheck = 'x'\n\n"
B = "[[unit]]\ntag = 'B'\n# free\n\n"
C = "# C\n# too\n[[unit]]\ntag = 'C'\n"
TOP = "[project]\ntitle = 't'\n\n"


def arranged(text, *pieces, array="unit", order=(), more=()):
    return splice(read_source(text), [Arrange(array, pieces), *more], order=order)


def test_the_same_order_changes_nothing():
    assert arranged(TOP + A + B + C, Piece(0), Piece(1), Piece(2)) == TOP + A + B + C


@pytest.mark.parametrize(
    ("order", "expected"),
    [
        ((2, 0, 1), TOP + C + "\n" + A + B.rstrip("\n") + "\n"),
        ((1, 0, 2), TOP + B + A + C),
        ((1, 2, 0), TOP + B + C + "\n" + A.rstrip("\n") + "\n"),
        ((0, 2), TOP + A + C),
        ((0, 1), TOP + A + B.rstrip("\n") + "\n"),
        ((2,), TOP + C),
        ((), TOP.rstrip("\n") + "\n"),
        ((0, 0, 1, 2), TOP + A + A + B + C),
    ],
)
def test_blocks_move_with_their_comments_and_sub_tables(order, expected):
    assert arranged(TOP + A + B + C, *map(Piece, order)) == expected


def test_a_file_without_blank_lines_stays_so():
    text = "[a]\n[[unit]]\nn = 1\n[[unit]]\nn = 2"
    assert arranged(text, Piece(1), Piece(0)) == "[a]\n[[unit]]\nn = 2\n[[unit]]\nn = 1\n"


def test_crlf_stays():
    text = (TOP + A + B + C).replace("\n", "\r\n")
    new = Piece(None, "[[unit]]\ntag = 'N'\n")
    expected = (TOP + A + "[[unit]]\ntag = 'N'\n\n" + B + C).replace("\n", "\r\n")
    assert arranged(text, Piece(0), new, Piece(1), Piece(2)) == expected


def test_elements_change_where_they_stay_where_they_go_and_as_copies():
    def rename(tag):
        return (Put(("tag",), tag),)

    result = arranged(
        TOP + A + B + C,
        Piece(1, None, rename("'B2'")),
        Piece(0, None, (*rename("'A2'"), Put(("accepted", 0, "by"), "'me'"))),
        Piece(0, None, (*rename("'A3'"), Remove(("accepted", 0)))),
        Piece(2, None, rename("'C2'")),
    )
    a2 = A.replace("'A'", "'A2'").replace("check = 'x'\n", "check = 'x'\nby = 'me'\n")
    a3 = "# A\n[[unit]]\ntag = 'A3' # a\n\n"
    assert result == TOP + B.replace("'B'", "'B2'") + a2 + a3 + C.replace("'C'", "'C2'")


def test_changes_by_whole_path_go_with_the_element():
    put = Put(("unit", 2, "tag"), "'C2'")
    result = arranged(TOP + A + B + C, Piece(2), Piece(0), Piece(1), more=[put])
    assert result.startswith(TOP + C.replace("'C'", "'C2'"))
    with pytest.raises(SpliceError, match="leaves it out"):
        arranged(TOP + A + B + C, Piece(0), Piece(1), more=[put])


def test_a_new_element_is_indented_like_its_likes():
    text = "[[unit]]\n  a = 1\n"
    new = Piece(None, None, (Put(("tag",), '"N"'), Put(("b",), "2")))
    assert arranged(text, Piece(0), new) == (
        '[[unit]]\n  a = 1\n\n[[unit]]\n  tag = "N"\n  b = 2\n'
    )


def test_a_new_element_with_all_that_an_element_can_have():
    new = Piece(None, None, (Put(("tag",), "1"), Append(("accepted",), (("check", "'y'"),))))
    assert (
        arranged(TOP + B, Piece(0), new)
        == (TOP + B + "[[unit]]\ntag = 1\n\n[[unit.accepted]]\ncheck = 'y'\n").rstrip("\n") + "\n"
    )


def test_a_first_element_takes_its_place_in_the_order_given():
    new = Piece(None, None, (Put(("name",), "1"),))
    text = TOP + B.replace("# free\n\n", "")
    result = arranged(text, new, array="condition", order=("project", "condition", "unit"))
    assert result == TOP + "[[condition]]\nname = 1\n\n" + B.replace("# free\n\n", "")
    assert arranged(text, new, array="condition") == text + "\n[[condition]]\nname = 1\n"


def test_an_element_interrupted_by_another_table_moves_whole():
    text = "[[unit]]\nn = 1\n\n[limits]\nx = 1\n\n[unit.sub]\nm = 1\n\n[[unit]]\nn = 2\n"
    result = arranged(text, Piece(1), Piece(0))
    assert read_source(result).values == {
        "unit": [{"n": 2}, {"n": 1, "sub": {"m": 1}}],
        "limits": {"x": 1},
    }
    new = Piece(None, "[[unit]]\nn = 3\n")
    assert arranged(text, Piece(0), new, Piece(1)) == (
        "[[unit]]\nn = 1\n\n[limits]\nx = 1\n\n[unit.sub]\nm = 1\n\n"
        "[[unit]]\nn = 3\n\n[[unit]]\nn = 2\n"
    )


def test_as_few_blocks_move_as_can_be():
    assert longest_run([]) == set()
    assert longest_run([4, 0, 1, 2, 3]) == {0, 1, 2, 3}
    assert longest_run([1, 2, 3, 0]) == {1, 2, 3}
    assert len(longest_run([2, 1, 0])) == 1


@pytest.mark.parametrize(
    "pieces",
    [
        [Piece(3)],
        [Piece(-1)],
        [Piece(None, "[[unit]]\n[[unit]]\n")],
        [Piece(None, "[[plant]]\n")],
        [Piece(None, "[[unit]]\n[limits]\n")],
        [Piece(None, "[[unit]\n")],
        [Piece(None, "tag = 1\n")],
        [Piece(None, "")],
        [Piece(None, "{ tag = 1 }")],
        [Piece(None, "5")],
    ],
)
def test_what_is_no_element_is_refused(pieces):
    with pytest.raises(SpliceError):
        arranged(TOP + A + B + C, *pieces)
