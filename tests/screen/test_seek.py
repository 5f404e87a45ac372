from __future__ import annotations

from dataclasses import replace

import pytest

from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.view import view
from schedtui.screen import seek

HEAD = '[project]\ntitle = "Works"\nunits = "IP"\n'
CLEAR = '[[unit]]\ntag = "C-{}"\n'
WET = '[[unit]]\ntag = "W-{}"\ncool_lat_db = 53.0\ncool_lat_wb = 55.0\n'
BAD = '[[unit]]\ntag = "B-{}"\nsupply_airflow = 9,440\n'
COLUMNS = {"tag", "cool_lat_db", "cool_lat_wb", "supply_airflow"}


def units(*kinds):
    text = HEAD + "".join(kind.format(place) for place, kind in enumerate(kinds))
    reviewed = review(view(load(text)))
    return reviewed.units, list(reviewed.units)


def test_the_next_unit_goes_round():
    found, ids = units(CLEAR, WET, CLEAR, WET, CLEAR)
    assert seek.next_unit(found, ids[0], 1) == ids[1]
    assert seek.next_unit(found, ids[1], 1) == ids[3]
    assert seek.next_unit(found, ids[3], 1) == ids[1]
    assert seek.next_unit(found, ids[3], -1) == ids[1]
    assert seek.next_unit(found, ids[0], -1) == ids[3]


def test_no_other_unit_to_look_at():
    found, ids = units(CLEAR, WET)
    assert seek.next_unit(found, ids[1], 1) is None
    found, ids = units(CLEAR)
    assert seek.next_finding(found, ids[0], "tag", COLUMNS) is None
    assert seek.worst(found, COLUMNS) is None


def test_the_next_finding_stands_on_the_cell_to_blame():
    found, ids = units(CLEAR, WET, BAD)
    assert seek.next_finding(found, ids[0], "tag", COLUMNS) == (ids[1], "cool_lat_wb")
    assert seek.next_finding(found, ids[1], "tag", COLUMNS) == (ids[1], "cool_lat_wb")
    row, column = ids[1], "cool_lat_wb"
    walked = []
    for _ in range(8):
        row, column = seek.next_finding(found, row, column, COLUMNS)
        walked.append((row, column))
    assert (ids[2], "supply_airflow") in walked
    assert (ids[1], "cool_lat_wb") in walked  # round again


def test_a_finding_without_a_column_stands_at_the_tag():
    found, ids = units(WET)
    assert seek.next_finding(found, ids[0], "serves", {"tag"}) == (ids[0], "tag")


@pytest.mark.parametrize(
    ("kinds", "place", "column"),
    [((CLEAR, WET, BAD), 2, "supply_airflow"), ((CLEAR, WET, WET), 1, "cool_lat_wb")],
)
def test_the_worst_comes_first(kinds, place, column):
    found, ids = units(*kinds)
    assert seek.worst(found, COLUMNS) == (ids[place], column)


def test_a_finding_blames_its_first_cell_that_is_shown_or_stands_at_the_tag():
    found, ids = units(WET)
    wet = next(one for one in found[ids[0]].findings if one.check == "wet-above-dry")
    assert seek.blames(wet, "cool_lat_wb", COLUMNS)
    assert not seek.blames(wet, "cool_lat_db", COLUMNS)
    assert seek.blames(wet, "cool_lat_db", COLUMNS - {"cool_lat_wb"})
    assert seek.blames(wet, "tag", {"tag"})
    assert not seek.blames(replace(wet, accepted=True), "cool_lat_wb", COLUMNS)
