"""Whole rows, made by someone who did not know the checks.

rows/make_rows.py makes those of the air side, rows/make_whole_rows.py those with water, fan,
heating, humidifier and plants too.

Careful ones, with tenths, halves and whole degrees as schedules print them, raise nothing that is
short or in conflict; one mistake in such a row is named first.
"""

import tomllib
from pathlib import Path

import pytest

from schedtui.review.finding import Severity
from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.view import view

ROWS = Path(__file__).parent / "rows"
CAREFUL = sorted((ROWS / "careful").glob("*.toml"))
WHOLE = sorted((ROWS / "whole").glob("*.toml"))
MISTAKES = sorted((ROWS / "mistakes").glob("*.toml"))
WHOLE_MISTAKES = sorted((ROWS / "whole_mistakes").glob("*.toml"))
EXPECTED = tomllib.loads((ROWS / "expected.toml").read_text(encoding="utf-8"))
EXPECTED_WHOLE = tomllib.loads((ROWS / "expected_whole.toml").read_text(encoding="utf-8"))


def reviewed(path):
    document = load(path.read_text(encoding="utf-8"))
    assert not document.problems
    return review(view(document))


@pytest.mark.parametrize("path", CAREFUL + WHOLE, ids=lambda path: path.stem)
def test_careful_rows_are_neither_short_nor_in_conflict(path):
    found = reviewed(path)
    worse = [
        (one.subject.label, one.check, one.message)
        for one in found.all_findings
        if one.severity >= Severity.CONFLICT
    ]
    assert worse == []


@pytest.mark.parametrize(("paths", "number"), [(CAREFUL, 55), (WHOLE, 50)], ids=["air", "whole"])
def test_there_are_enough_careful_rows(paths, number):
    assert sum(len(reviewed(path).units) for path in paths) >= number


@pytest.mark.parametrize(
    ("path", "loads"),
    [
        ("w03-prairie-site", {"steam": 595, "hot water": 943}),
        ("w11-labs-actual-900ft", {"hot water": 1358, "hot glycol": 1514}),
    ],
)
def test_loads_go_to_the_plants_that_supply_them(path, loads):
    """The loads are the maker's, reckoned coil by coil (rows/make_whole_rows.py)."""
    plants = {one.case.name: one.case.load for one in reviewed(ROWS / f"whole/{path}.toml").plants}
    assert {name: plants[name] for name in loads} == pytest.approx(loads, rel=1e-3)


@pytest.mark.parametrize("path", MISTAKES, ids=lambda path: path.stem)
def test_a_mistake_is_named_first(path):
    found = [
        unit.findings[0].check
        for unit in reviewed(path).units.values()
        if unit.findings and unit.findings[0].severity > Severity.MISSING
    ]
    assert (found or [""])[0] == EXPECTED[path.stem[:2]]


def test_every_mistake_has_an_expectation():
    assert {path.stem[:2] for path in MISTAKES} == set(EXPECTED)


@pytest.mark.parametrize("path", WHOLE_MISTAKES, ids=lambda path: path.stem)
def test_a_mistake_in_a_whole_row_is_named_first(path):
    """Where no unit has a finding, a plant's counts."""
    found = reviewed(path)
    firsts = [
        one.findings[0].check
        for one in (*found.units.values(), *found.plants)
        if one.findings and one.findings[0].severity > Severity.MISSING
    ]
    assert (firsts or [""])[0] == EXPECTED_WHOLE[path.stem[:2]]


def test_every_mistake_in_a_whole_row_has_an_expectation():
    assert {path.stem[:2] for path in WHOLE_MISTAKES} == set(EXPECTED_WHOLE)
