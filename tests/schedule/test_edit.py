from __future__ import annotations

from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from schedtui.schedule.document import Row
from schedtui.schedule.edit import DeleteRow, InsertRow, MoveRow, SetAccepted, SetCell, Together
from schedtui.schedule.load import load
from schedtui.schedule.typed import Typed

TEXT = """\
[project]
title = "Mill"
units = "IP"

[[unit]]
tag = "A"
supply_airflow = 9,440

[[unit]]
tag = "B"
serves = "hall"
quantity = 2

[[unit]]
tag = "C"
"""
START = load(TEXT)


def number(text):
    return Typed(text, float(text), text)


def tags(document):
    return [row.text("tag") for row in document.rows("unit")]


def units():
    return START.rows("unit")


def keys(document, place):
    return list(document.rows("unit")[place].cells)


def test_a_cell_is_set_and_the_document_before_stays_as_it_was():
    edit = SetCell("unit", units()[0].row_id, "supply_airflow", number("9440"))
    document, inverse = edit.apply(START)
    assert document.rows("unit")[0].text("supply_airflow") == "9440"
    assert START.rows("unit")[0].text("supply_airflow") == "9,440"
    assert inverse.apply(document)[0] == START
    assert edit.touches() == {("unit", units()[0].row_id)}


def test_a_new_key_stands_last_and_a_cleared_one_comes_back_to_its_place():
    row_id = units()[1].row_id
    document, _ = SetCell("unit", row_id, "cool_total", number("380")).apply(START)
    assert keys(document, 1) == ["tag", "serves", "quantity", "cool_total"]
    cleared, inverse = SetCell("unit", row_id, "serves", None).apply(START)
    assert keys(cleared, 1) == ["tag", "quantity"]
    assert keys(inverse.apply(cleared)[0], 1) == ["tag", "serves", "quantity"]


def test_a_table_that_stands_once_comes_to_be_with_its_first_key_and_goes_with_it():
    edit = SetCell("limits", START.next_id, "agreement", number("2"))
    document, inverse = edit.apply(START)
    assert document.single["limits"].text("agreement") == "2"
    assert document.next_id == START.next_id + 1
    again, _ = SetCell("limits", START.next_id, "oversize", number("50")).apply(document)
    assert list(again.single["limits"].cells) == ["agreement", "oversize"]
    assert "limits" not in inverse.apply(document)[0].single


def test_a_table_of_the_file_stays_when_its_last_key_goes():
    document = load(TEXT + "[limits]\nagreement = 2\n")
    cleared, _ = SetCell("limits", document.single["limits"].row_id, "agreement", None).apply(
        document
    )
    assert cleared.single["limits"].cells == {}


def test_a_row_is_inserted_deleted_and_moved_by_place():
    row = Row(START.next_id, {"tag": Typed("N", "N", '"N"')})
    inserted, undo = InsertRow("unit", row, 1).apply(START)
    assert tags(inserted) == ["A", "N", "B", "C"]
    assert inserted.next_id > row.row_id
    assert undo == DeleteRow("unit", row.row_id)
    deleted, undo = DeleteRow("unit", units()[1].row_id).apply(START)
    assert tags(deleted) == ["A", "C"]
    assert undo.apply(deleted)[0] == START
    moved, undo = MoveRow("unit", units()[0].row_id, 2).apply(START)
    assert tags(moved) == ["B", "C", "A"]
    assert undo.apply(moved)[0] == START


def test_an_edit_of_a_row_that_is_gone_is_an_error():
    row_id = units()[0].row_id
    document, _ = DeleteRow("unit", row_id).apply(START)
    for edit in (
        SetCell("unit", row_id, "serves", None),
        DeleteRow("unit", row_id),
        MoveRow("unit", row_id, 0),
    ):
        with pytest.raises(KeyError):
            edit.apply(document)


def test_acceptances_are_set_with_those_of_the_file_first():
    document = load(
        TEXT.replace('tag = "C"\n', 'tag = "C"\n[[unit.accepted]]\ncheck = "x"\nreason = "r"\n')
    )
    unit = document.rows("unit")[2]
    fresh = Row(document.next_id, {"check": Typed("y", "y", '"y"')})
    more, undo = SetAccepted(unit.row_id, (fresh, *unit.accepted)).apply(document)
    assert [one.text("check") for one in more.rows("unit")[2].accepted] == ["x", "y"]
    assert more.next_id == document.next_id + 1
    assert content(undo.apply(more)[0]) == content(document)
    none, undo = SetAccepted(unit.row_id, ()).apply(document)
    assert none.rows("unit")[2].accepted == ()
    assert undo.apply(none)[0] == document


def test_several_edits_are_one_step_and_are_taken_back_in_the_opposite_order():
    first, second, _ = units()
    step = Together(
        (
            SetCell("unit", first.row_id, "serves", Typed("x", "x", '"x"')),
            SetCell("unit", first.row_id, "serves", Typed("y", "y", '"y"')),
            DeleteRow("unit", second.row_id),
        )
    )
    document, inverse = step.apply(START)
    assert tags(document) == ["A", "C"]
    assert document.rows("unit")[0].text("serves") == "y"
    assert inverse.apply(document)[0] == START
    assert step.touches() == {("unit", first.row_id), ("unit", second.row_id)}


PLACES = st.integers(0, 9)
KEYS = st.sampled_from(["supply_airflow", "cool_total", "quantity"])
CELLS = st.none() | st.sampled_from(["1", "2.50", "9440"]).map(number)
DRAWN = st.tuples(
    st.sampled_from(["set", "limit", "insert", "delete", "move"]), PLACES, PLACES, KEYS, CELLS
)


def edit_of(document, drawn):
    """Return an edit that the document can bear, by what was drawn."""
    what, one, other, key, cell = drawn
    rows = document.rows("unit")
    if what == "limit":
        there = document.rows("limits")
        return SetCell("limits", there[0].row_id if there else document.next_id, key, cell)
    if what == "insert" or not rows:
        row = Row(document.next_id, {"tag": Typed("N", "N", '"N"')})
        return InsertRow("unit", row, one % (len(rows) + 1))
    row_id = rows[one % len(rows)].row_id
    if what == "set":
        return SetCell("unit", row_id, key, cell)
    return (
        DeleteRow("unit", row_id)
        if what == "delete"
        else MoveRow("unit", row_id, other % len(rows))
    )


def content(document):
    """Return a document without its next id, which never goes back, and with its keys in order."""
    rows = [
        [table, row.row_id, list(row.cells.items())]
        for table in ("project", "limits", "unit")
        for row in document.rows(table)
    ]
    return replace(document, next_id=0), rows


@given(st.lists(DRAWN, max_size=8))
def test_every_edit_is_taken_back_by_its_inverse_and_that_by_its_own(sequence):
    document, inverses = START, []
    for drawn in sequence:
        before = document
        document, inverse = edit_of(document, drawn).apply(document)
        back, again = inverse.apply(document)
        assert content(back) == content(before)
        assert content(again.apply(back)[0]) == content(document)
        inverses.append(inverse)
    for inverse in reversed(inverses):
        document, _ = inverse.apply(document)
    assert content(document) == content(START)
