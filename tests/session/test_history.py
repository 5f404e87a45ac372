from __future__ import annotations

from schedtui.schedule.edit import SetCell
from schedtui.schedule.load import load
from schedtui.schedule.typed import Typed
from schedtui.session.history import History

TEXT = """\
[project]
title = "Works"
units = "IP"

[[unit]]
tag = "AHU-1"
supply_airflow = 9440
"""


def _set(document, text):
    row = document.rows("unit")[0]
    return SetCell("unit", row.row_id, "supply_airflow", Typed(text, float(text), text))


def _airflow(document):
    return document.rows("unit")[0].text("supply_airflow")


def test_a_new_step_ends_what_could_be_redone():
    history, document = History(), load(TEXT)
    document = history.do(document, _set(document, "9650"), "first")
    document, _ = history.undo(document)
    assert _airflow(document) == "9440"
    document = history.do(document, _set(document, "9700"), "second")
    assert history.redo(document) is None
    assert [step.name for step in history.done] == ["second"]


def test_undo_and_redo_go_all_the_way():
    history, document = History(), load(TEXT)
    values = [str(9000 + number) for number in range(50)]
    for value in values:
        document = history.do(document, _set(document, value), value)
    names = []
    while (turned := history.undo(document)) is not None:
        document, step = turned
        names.append(step.name)
    assert names == values[::-1]
    assert [row.cells for row in document.rows("unit")] == [
        row.cells for row in load(TEXT).rows("unit")
    ]
    while (turned := history.redo(document)) is not None:
        document, step = turned
    assert _airflow(document) == values[-1]


def test_nothing_done_is_nothing_to_undo():
    history, document = History(), load(TEXT)
    assert history.last is None
    assert history.undo(document) is None
    assert history.redo(document) is None


def test_two_equal_steps_are_not_the_same_one():
    history, document = History(), load(TEXT)
    document = history.do(document, _set(document, "9650"), "same")
    first = history.last
    document, _ = history.undo(document)
    history.do(document, _set(document, "9650"), "same")
    assert history.last != first
