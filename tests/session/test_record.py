from __future__ import annotations

import json

import pytest

from schedtui.schedule.document import Row
from schedtui.schedule.edit import DeleteRow, InsertRow, MoveRow, SetAccepted, SetCell, Together
from schedtui.schedule.load import load
from schedtui.schedule.rename import rename
from schedtui.schedule.save import saved, source_text
from schedtui.schedule.typed import Typed
from schedtui.session.record import Reader, written
from tests.session.conftest import EVERYTHING

CELL = Typed("9650", 9650.0, "9650")


def unit(document, place=0):
    return document.rows("unit")[place]


def of_unit(document, place=0):
    return unit(document, place).row_id


EDITS = {
    "set a cell": lambda d: SetCell("unit", of_unit(d), "supply_airflow", CELL),
    "set a new cell": lambda d: SetCell("unit", of_unit(d, 2), "fan_power", CELL),
    "clear a cell": lambda d: SetCell("unit", of_unit(d), "cool_total", None),
    "set a text": lambda d: SetCell(
        "unit", of_unit(d), "serves", Typed("冷水 \u2028 x", "冷水 \u2028 x", '"冷水 \\u2028 x"')
    ),
    "set a list": lambda d: SetCell(
        "unit", of_unit(d), "remarks", Typed("1, 3", ("1", "3"), '["1", "3"]')
    ),
    "set in a table that stands once": lambda d: SetCell(
        "project", d.single["project"].row_id, "altitude", CELL
    ),
    "set in a table that is not there": lambda d: SetCell(
        "record", d.next_id, "by", Typed("AB", "AB", '"AB"')
    ),
    "delete": lambda d: DeleteRow("unit", of_unit(d, 1)),
    "move": lambda d: MoveRow("unit", of_unit(d), 2),
    "insert": lambda d: InsertRow(
        "unit", Row(d.next_id, {"tag": Typed("AHU-9", "AHU-9", '"AHU-9"')}), 1
    ),
    "copy": lambda d: InsertRow(
        "unit", Row(d.next_id, unit(d).cells, unit(d).origin, ()), 1
    ),
    "drop an acceptance": lambda d: SetAccepted(of_unit(d), unit(d).accepted[1:]),
    "add an acceptance": lambda d: SetAccepted(
        of_unit(d), (*unit(d).accepted, Row(d.next_id, {"check": Typed("x", "x", '"x"')}))
    ),
    "rename": lambda d: rename(
        d, "condition", d.rows("condition")[0].row_id, Typed("July", "July", '"July"')
    ),
    "together": lambda d: Together(
        (
            DeleteRow("unit", of_unit(d)),
            MoveRow("unit", of_unit(d, 2), 0),
            SetCell("unit", of_unit(d, 1), "supply_airflow", CELL),
        )
    ),
}  # fmt: skip


def through_a_file(document, edit):
    return json.loads(json.dumps(written(document, edit)))


@pytest.mark.parametrize("name", EDITS)
def test_an_edit_read_back_and_what_takes_it_back_make_the_same_text(name):
    document = load(EVERYTHING)
    edit = EDITS[name](document)
    plain = through_a_file(document, edit)
    changed, inverse = edit.apply(document)
    back = through_a_file(changed, inverse)

    base = load(EVERYTHING)
    reader = Reader(base)
    again, _ = reader.edit(base, plain).apply(base)
    assert source_text(again) == source_text(changed) != EVERYTHING
    whole, _ = reader.edit(again, back).apply(again)
    assert source_text(whole) == EVERYTHING


@pytest.mark.parametrize("name", EDITS)
def test_it_holds_for_rows_of_a_text_that_is_on_no_disk_any_more(name):
    document = load(EVERYTHING)
    edit = EDITS[name](document)
    changed, inverse = edit.apply(document)
    text = source_text(changed)
    now = saved(changed, text)  # the inverse has rows of the text before
    plain = through_a_file(now, inverse)
    wanted = source_text(inverse.apply(now)[0])

    base = load(text)
    again, _ = Reader(base).edit(base, plain).apply(base)
    assert source_text(again) == wanted


@pytest.mark.parametrize(
    "plain",
    [
        {},
        {"set": "unit", "at": 99, "key": "tag", "cell": None},
        {"set": "unit", "at": -1, "key": "tag", "cell": None},
        {"set": "unit", "at": 0, "key": "tag", "cell": {"text": 1}},
        {"set": "unit", "at": "0", "key": "tag", "cell": None},
        {"insert": "unit", "at": 0, "row": {}},
        {"together": [{"delete": "unit", "at": 7}]},
        {"accepted": 0, "rows": [{"cells": {}, "now": 9}]},
    ],
)
def test_what_is_no_edit_is_refused(plain):
    base = load(EVERYTHING)
    with pytest.raises((LookupError, TypeError, ValueError)):
        Reader(base).edit(base, plain).apply(base)


def test_the_same_text_gives_the_same_ids():
    first, second = (load(EVERYTHING).rows("unit") for _ in range(2))
    assert [row.row_id for row in first] == [row.row_id for row in second]
    assert [one.row_id for one in first[0].accepted] == [one.row_id for one in second[0].accepted]
