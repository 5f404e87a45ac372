"""Whatever was done, a session that comes after a kill has the same schedule."""

from __future__ import annotations

import contextlib
import random

import pytest

from schedtui.errors import AmountError, FileError
from schedtui.schedule.document import Row
from schedtui.schedule.edit import DeleteRow, InsertRow, MoveRow, SetAccepted, Together
from schedtui.schedule.load import load
from schedtui.schedule.save import source_text
from schedtui.schedule.typed import Typed
from schedtui.session.recovery import replayed, told
from tests.session.conftest import EVERYTHING

KEYS = ("supply_airflow", "cool_total", "serves", "mcc", "fan_power")


def one_step(session, chance, number):
    """Do something to a session, as a person might."""
    units = session.document.rows("unit")
    if not units:
        session.undo()
        return
    row = chance.choice(units)
    match chance.randrange(10):
        case 0:
            session.do(DeleteRow("unit", row.row_id), "delete")
        case 1:
            session.do(MoveRow("unit", row.row_id, chance.randrange(len(units))), "move")
        case 2:
            made = Row(session.document.next_id, row.cells, row.origin)
            session.do(InsertRow("unit", made, chance.randrange(len(units) + 1)), "copy")
        case 3:
            session.do(SetAccepted(row.row_id, row.accepted[1:]), "acceptances")
        case 4:
            cell = Typed(str(number), float(number), str(number))
            new = Row(session.document.next_id + 1, {"fan_power": cell})
            edits = (InsertRow("unit", new, 0), DeleteRow("unit", row.row_id))
            session.do(Together(edits), "together")
        case 5 | 6:
            session.undo()
        case 7:
            session.redo()
        case _:
            text = chance.choice(("", str(number), f"{number}.0"))
            key = chance.choice(KEYS)
            with contextlib.suppress(AmountError):
                session.set_cell("unit", row.row_id, key, text)


@pytest.mark.parametrize("seed", range(25))
def test_after_a_kill_everything_is_brought_back(machine, seed):
    chance = random.Random(seed)  # noqa: S311  a walk that can be taken again
    session = machine.open()
    for number in range(40):
        one_step(session, chance, number + 100)
        if chance.random() < 0.06:
            session.save()
        if chance.random() < 0.12:
            wanted, unsaved = source_text(session.document), session.unsaved
            machine.kill(session)
            session = machine.open()
            if session.offered:
                session.bring_back(session.offered)
            else:
                assert not unsaved
            assert source_text(session.document) == wanted
    wanted = source_text(session.document)
    count = 0
    while session.undo():
        count += 1
    for _ in range(count):
        session.redo()
    assert source_text(session.document) == wanted
    session.save()
    assert machine.text == wanted
    session.close(keep=True)
    assert machine.journals == []


def test_the_history_comes_back_with_the_names(machine):
    session = machine.open()
    first = next(iter(session.review.units))
    session.set_cell("unit", first, "cool_total", "400")
    session.set_cell("unit", first, "supply_airflow", "9650")
    session.undo()
    machine.kill(session)
    again = machine.open()
    assert told(again.offered.edits()) == [
        "AHU-1 total 100 → 400".replace("total", again.field("unit", "cool_total").label.lower()),
        "AHU-1 supply airflow 9440 → 9650",
        "AHU-1 supply airflow 9440 → 9650, taken back",
    ]
    again.bring_back(again.offered)
    assert again.unsaved
    step, _ = again.redo()
    assert step.name == "AHU-1 supply airflow 9440 → 9650"
    assert [again.undo() is not None for _ in range(3)] == [True, True, False]
    assert not again.unsaved


@pytest.mark.parametrize(
    "step",
    [
        {},
        {"n": 1, "name": "x"},
        {"n": 1, "name": "x", "do": {"delete": "unit", "at": 9}},
        {"n": 1, "name": "x", "undo": None},
        {"n": None, "name": "x", "do": {"delete": "unit", "at": 0}},
        {"n": 1, "name": "x", "do": {"set": "unit", "at": 0, "key": "tag", "cell": 3}},
    ],
)
def test_a_journal_that_cannot_be_read_says_so(step):
    with pytest.raises(FileError, match="edit 1 of 1"):
        replayed(load(EVERYTHING), [step])
