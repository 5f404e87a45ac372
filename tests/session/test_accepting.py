"""Findings accepted and taken back, as edits that save and undo like any other."""

from datetime import date

import pytest

from schedtui.errors import AmountError
from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.save import source_text
from schedtui.schedule.view import view
from schedtui.session.accepting import acceptance, taken_back

TEXT = """[project]
title = "Accepting"
units = "IP"

[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 70
outdoor_wb = 75   # above

[[unit]]
tag = "AHU-1"
supply_airflow = 1000
outdoor_airflow = 1200   # more than it supplies

[[unit]]
tag = "AHU-2"
"""
DAY = date(2026, 11, 30)


def reviewed(document):
    return review(view(document))


def found(review, check):
    return next(one for one in review.all_findings if one.check == check)


def accepted(document, check, reason="as agreed"):
    now = reviewed(document)
    return acceptance(now.schedule, found(now, check), "xy", reason, DAY).apply(document)


def test_a_finding_of_a_unit_is_accepted_in_its_row():
    document, inverse = accepted(load(TEXT), "outdoor-above-supply")
    assert found(reviewed(document), "outdoor-above-supply").accepted
    again = load(source_text(document))
    assert again.problems == ()
    assert found(reviewed(again), "outdoor-above-supply").accepted
    assert source_text(inverse.apply(document)[0]) == TEXT


def test_a_finding_of_no_unit_is_accepted_above():
    document, _ = accepted(load(TEXT), "wet-above-dry")
    text = source_text(document)
    assert 'of = "condition summer"' in text
    assert found(reviewed(load(text)), "wet-above-dry").accepted


@pytest.mark.parametrize("check", ["outdoor-above-supply", "wet-above-dry"])
def test_an_acceptance_is_taken_back(check):
    document, _ = accepted(load(TEXT), check)
    document = load(source_text(document))
    now = reviewed(document)
    edit = taken_back(now.schedule, found(now, check))
    document, _ = edit.apply(document)
    assert not found(reviewed(document), check).accepted
    assert source_text(document) == TEXT


def test_there_is_nothing_to_take_back_where_nothing_is_accepted():
    now = reviewed(load(TEXT))
    assert taken_back(now.schedule, found(now, "outdoor-above-supply")) is None


def test_a_reason_must_be_given():
    with pytest.raises(AmountError, match="blank"):
        accepted(load(TEXT), "outdoor-above-supply", reason=" ")
