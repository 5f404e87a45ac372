"""Whole rows, made by someone who did not know the checks (rows/make_rows.py).

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
MISTAKES = sorted((ROWS / "mistakes").glob("*.toml"))
EXPECTED = tomllib.loads((ROWS / "expected.toml").read_text(encoding="utf-8"))


def reviewed(path):
    document = load(path.read_text(encoding="utf-8"))
    assert not document.problems
    return review(view(document))


@pytest.mark.parametrize("path", CAREFUL, ids=lambda path: path.stem)
def test_careful_rows_are_neither_short_nor_in_conflict(path):
    found = reviewed(path)
    worse = [
        (one.subject.label, one.check, one.message)
        for one in found.all_findings
        if one.severity >= Severity.CONFLICT
    ]
    assert worse == []


def test_there_are_enough_careful_rows():
    rows = [unit for path in CAREFUL for unit in reviewed(path).units]
    assert len(rows) >= 55


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
