"""The pages of one unit: what was found in it, and the states of its air."""

import pytest

from schedtui.report.page import Entries, Heading, Paragraph, Table
from schedtui.report.unit import unit_air_page, unit_findings_page


@pytest.fixture
def units(works):
    return list(works.units.values())


def test_findings_stand_under_the_unit_s_name_and_status(units):
    page = unit_findings_page(units[0])
    assert page.blocks[0] == Heading("AHU-1: short", 2)
    (entries,) = [block for block in page.blocks if isinstance(block, Entries)]
    labels = [entry.label for entry in entries.entries]
    assert set(labels) == {one.severity.word for one in units[0].findings}


def test_nothing_found_is_said(units):
    assert units[2].findings == ()
    assert Paragraph("Nothing found.") in unit_findings_page(units[2]).blocks


def test_each_cooling_condition_has_its_states_and_figures(units):
    page = unit_air_page(units[0])
    headings = [block.text for block in page.blocks if isinstance(block, Heading)]
    assert headings[:2] == ["AHU-1 at summer peak", "AHU-1 at humid, governing"]
    states, figures = [block for block in page.blocks if isinstance(block, Table)][:2]
    rows = {row[0]: row[1:] for row in states.rows}
    assert list(rows) == [
        "outdoor", "return", "mixed", "coil entering", "coil leaving", "supply", "room",
    ]  # fmt: skip
    assert states.headings[1] == "DB °F"
    assert rows["outdoor"][:2] == ("96.0", "75.0")  # outdoors as scheduled
    assert rows["coil leaving"][:2] == ("55.0", "54.0")  # the coil's leaving air as scheduled
    assert ("Supply mass flow", "45000", "lb/h") in [row[:3] for row in figures.rows]


def test_a_unit_with_recovery_shows_the_recovered_air(reviewed):
    found = reviewed("""
[project]
title = "Recovery"
units = "IP"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95
outdoor_wb = 75
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 5000
room_db = 75
room_rh = 50
recovery_sensible = 70
cool_lat_db = 55
cool_lat_wb = 54
""")
    (unit,) = found.units.values()
    tables = [block for block in unit_air_page(unit).blocks if isinstance(block, Table)]
    assert "recovered" in [row[0] for row in tables[0].rows]


def test_a_heating_condition_has_its_states_and_figures(units):
    page = unit_air_page(units[1])
    assert page.blocks[0] == Heading("AHU-1 (2nd) at winter", 2)
    tables = [block for block in page.blocks if isinstance(block, Table)]
    assert "Supply mass flow" in [row[0] for row in tables[-1].rows]


def test_a_unit_at_no_condition_says_so(reviewed):
    found = reviewed("""
[project]
title = "Nowhere"
units = "IP"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95
outdoor_wb = 75
[[unit]]
tag = "AHU-1"
conditions = []
""")
    (unit,) = found.units.values()
    assert unit_air_page(unit).blocks == (Paragraph("AHU-1: no condition applies."),)


def test_what_keeps_a_coil_from_being_computed_is_said(reviewed):
    found = reviewed("""
[project]
title = "Gap"
units = "IP"
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
return_db = 80
return_wb = 67
cool_lat_wb = 54
""")
    (unit,) = found.units.values()
    last = unit_air_page(unit).blocks[-1]
    assert isinstance(last, Paragraph)
    assert "cool_lat_db" in last.text
