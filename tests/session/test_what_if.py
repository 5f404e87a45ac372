"""Edits tried on a copy: what would turn, and that nothing does by asking."""

from schedtui.review.reviewed import review
from schedtui.schedule.edit import DeleteRow, SetCell
from schedtui.schedule.load import load
from schedtui.schedule.typed import Typed
from schedtui.schedule.view import view
from schedtui.session.what_if import what_if

TEXT = """[project]
title = "Tried"
units = "IP"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95
outdoor_wb = 75
[[unit]]
tag = "AHU-1"
supply_airflow = 1000
outdoor_airflow = 1200
[[unit]]
tag = "AHU-2"
supply_airflow = 1000
outdoor_airflow = 500
"""


def cell(text):
    return Typed(text, float(text), text)


def test_what_turns_is_told_and_nothing_has_turned():
    now = review(view(load(TEXT)))
    first, second = now.units
    edits = [
        SetCell("unit", first, "outdoor_airflow", cell("900")),
        SetCell("unit", second, "outdoor_airflow", cell("400")),
    ]
    (turned,) = what_if(now, edits)
    assert (turned.label, turned.before, turned.after) == ("AHU-1", "conflict", "clear")
    assert (turned.came, turned.went) == ((), ("outdoor-above-supply",))
    assert now.units[first].status == "conflict"


def test_a_unit_that_goes_has_no_verdict_then():
    now = review(view(load(TEXT)))
    (turned,) = what_if(now, [DeleteRow("unit", next(iter(now.units)))])
    assert (turned.label, turned.after) == ("AHU-1", "")
