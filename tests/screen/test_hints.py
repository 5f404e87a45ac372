from __future__ import annotations

from dataclasses import replace

import pytest

from schedtui.review.quantities import COLUMNS
from schedtui.review.remedy import Change, Remedy
from schedtui.review.reviewed import review
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.load import load
from schedtui.schedule.view import view
from schedtui.screen import hints
from schedtui.screen.looks import Look
from schedtui.screen.unit_table import UnitTable

TEXT = """\
[project]
title = "Works"
units = "IP"

[defaults]
room_db = 75.0

[[unit]]
tag = "AHU-1"
supply_airflow = 9,440
cool_lat_db = 53.0
cool_lat_wb = 55.0
"""


@pytest.fixture
def table():
    return UnitTable(review(view(load(TEXT))))


@pytest.mark.parametrize(
    ("field", "begins"),
    [
        (Unit.cool_lat_wb, "< wet-above-dry. Leaving air wet bulb: "),
        (Unit.supply_airflow, "? is no TOML value"),
        (Unit.room_db, "^ from the defaults. Room dry bulb: "),
        (Unit.tag, "Tag: "),
    ],
    ids=lambda value: getattr(value, "key", ""),
)
def test_a_scheduled_cell_says_what_its_sign_means(table, field, begins):
    (row,) = table.row_keys
    reviewed = table._review.units[row]
    said = hints.about_scheduled(reviewed, field, table.cell(row, field.key))
    assert said.startswith(begins[:2])
    assert begins.split(". ")[-1].strip("? ") in said or field is Unit.supply_airflow
    assert said.endswith(field.doc)


def test_a_computed_cell_says_from_what_and_that_it_falls_short(table):
    (row,) = table.row_keys
    column = next(one for one in COLUMNS if one.key == "total_margin")
    cell = table.cell(row, "total_margin")
    assert hints.about_computed(column, cell).endswith(f": computed from {column.of}")
    falls = type(cell)("-3", Look.FALLS_SHORT)
    assert hints.about_computed(column, falls).startswith("- Cooling total margin: falls short,")


def test_an_edit_says_the_range_and_what_judges_the_value():
    said = hints.about_edit(Unit.cool_total, "IP")
    assert said.startswith("Cooling total: 0 or more MBH. Judged by ")
    assert "cool-total-short" in said
    assert "kW" in hints.about_edit(Unit.cool_total, "SI")


def test_the_mark_is_explained(table):
    (reviewed,) = table._review.units.values()
    assert hints.about_mark(reviewed) == "AHU-1 is unreadable: a cell cannot be read"


def test_an_answer():
    assert hints.answer("AHU-1", "short", "short") == "AHU-1 is still short"


def test_a_remedy_says_its_numbers_and_what_turns_worse():
    both = (Change("cool_total", "390", "MBH"), Change("cool_lat_wb", "52.4", "°F"))
    assert hints.about_remedy(Remedy(both, ())) == "cool_total 390 MBH with cool_lat_wb 52.4 °F"
    worse = Remedy(both[:1], ("shr-low", "motor-short"))
    assert hints.about_remedy(worse) == "cool_total 390 MBH; worse: shr-low, motor-short"


def test_findings_of_one_entry_are_named_once_with_their_condition(table):
    (reviewed,) = table._review.units.values()
    first = reviewed.findings[0]
    peak = replace(first, check="a-check", condition="summer peak")
    twice = (peak, peak, replace(peak, check="another"))
    assert hints.about_findings(twice) == "a-check, another at summer peak"
    accepted = replace(peak, condition=None, accepted=True)
    assert hints.about_findings((accepted,)) == "a-check (accepted)"
