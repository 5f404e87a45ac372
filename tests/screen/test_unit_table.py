from __future__ import annotations

import pytest

from schedtui.screen.looks import Look
from schedtui.screen.unit_table import MARK, UnitTable
from schedtui.session.session import Session

TEXT = """\
[project]
title = "Works"
units = "IP"

[defaults]
room_db = 75.0

[[column]]
key = "mcc"
heading = "Fed from"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[unit]]
tag = "AHU-1"
supply_airflow = 9440
cool_lat_db = 53.0
cool_lat_wb = 55.0
mcc = "MCC-2"

[[unit]]
tag = "AHU-2"
supply_airflow = 9,440
"""


@pytest.fixture
def session(tmp_path):
    file = tmp_path / "works.toml"
    file.write_text(TEXT, encoding="utf-8")
    return Session.open(file)


def test_mark_and_tag_stay_and_computed_columns_stand_behind_their_fields(session):
    columns = list(UnitTable(session.review).columns)
    keys = [column.key for column in columns]
    assert [column.key for column in columns if column.frozen] == [MARK, "tag"]
    assert keys.index("total_required") == keys.index("cool_total") + 1
    assert columns[keys.index("total_required")].computed
    assert not columns[keys.index("cool_total")].computed
    assert "mcc" in keys
    assert "cool_rows" not in keys  # no unit states it


def test_looks_tell_what_a_cell_is(session):
    table = UnitTable(session.review)
    first, second = table.row_keys
    looks = {
        (first, MARK): Look.MARK_CONFLICT,
        (first, "supply_airflow"): Look.TYPED,
        (first, "room_db"): Look.INHERITED,
        (first, "cool_lat_wb"): Look.BLAMED,
        (first, "total_required"): Look.COMPUTED,
        (first, "mcc"): Look.TYPED,
        (second, MARK): Look.MARK_UNREADABLE,
        (second, "supply_airflow"): Look.BAD,
        (second, "serves"): Look.BLANK,
    }
    assert {place: table.cell(*place).look for place in looks} == looks
    assert table.cell(second, "supply_airflow").text == "9,440"


def test_columns_are_made_anew_only_when_one_has_to_be_wider(session):
    table = UnitTable(session.review)
    first, second = table.row_keys
    before = table.columns
    changed = session.set_cell("unit", first, "supply_airflow", "9500")
    assert not table.show(session.review, changed)
    assert table.columns is before
    assert (table.version(first), table.version(second)) == (1, 0)
    changed = session.set_cell("unit", first, "cool_rows", "6")
    assert table.show(session.review, changed)
    assert "cool_rows" in [column.key for column in table.columns]
    changed = session.set_cell("unit", first, "cool_rows", "")
    assert not table.show(session.review, changed)  # the table does not jump back


def test_a_long_text_makes_a_wider_column_within_reason(session):
    table = UnitTable(session.review)
    first, _ = table.row_keys

    def width():
        return next(column.width for column in table.columns if column.key == "serves")

    def put(text):
        changed = session.set_cell("unit", first, "serves", text)
        table.show(session.review, changed)
        return width()

    assert put("Offices") < put("Offices, north") < put("Offices " * 20) == 24
