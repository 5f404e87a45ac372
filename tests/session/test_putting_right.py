"""Findings cleared, accepted and taken back, each as one step of an open schedule."""

from __future__ import annotations

from datetime import date

import pytest

from schedtui.errors import AmountError
from schedtui.review.remedy import Change, Remedy, remedies_by_check
from schedtui.session.putting_right import accept, put_right, take_back
from schedtui.session.session import Session

TEXT = """\
[project]
title = "Works"
units = "IP"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[unit]]
tag = "AHU-1"
room_db = 75.0
room_rh = 50
supply_airflow = 9440
outdoor_airflow = 1800
cool_lat_db = 53.0
cool_lat_wb = 55.0
cool_total = 100    # far too small

[[unit]]
tag = "AHU-2"
room_db = 75.0
room_rh = 50
supply_airflow = 9440
outdoor_airflow = 1800
fan_rise = 0
cool_lat_db = 53.0
cool_lat_wb = 52.0
cool_total = 100
"""
DAY = date(2026, 11, 30)


@pytest.fixture
def file(tmp_path):
    path = tmp_path / "works.toml"
    path.write_text(TEXT, encoding="utf-8")
    return path


@pytest.fixture
def session(file):
    return Session.open(file)


def found(session, check, place=1):
    reviewed = list(session.review.units.values())[place]
    return tuple(one for one in reviewed.findings if one.check == check)


def test_a_remedy_is_one_step_with_a_name_and_clears(session):
    reviewed = list(session.review.units.values())[1]
    (finding,) = found(session, "cool-total-short")
    remedy = remedies_by_check(reviewed)["cool-total-short"][0]
    assert put_right(session, finding, remedy) == {reviewed.unit.row_id}
    assert not found(session, "cool-total-short")
    text = remedy.changes[0].text
    step = session.history.last
    assert step.name == f"AHU-2 cooling total 100 → {text} (clears cool-total-short)"
    assert session.cells_of(step) == ((reviewed.unit.row_id, "cool_total"),)
    session.undo()
    assert found(session, "cool-total-short") == (finding,)


def test_a_remedy_of_two_numbers_is_one_step(session):
    (finding,) = found(session, "cool-total-short")
    row_id = finding.subject.row_id
    changes = (Change("cool_total", "400", "MBH"), Change("cool_lat_wb", "52.5", "°F"))
    put_right(session, finding, Remedy(changes, ()))
    step = session.history.last
    assert step.name == (
        "AHU-2 cooling total 100 → 400, leaving air wet bulb 52.0 → 52.5 (clears cool-total-short)"
    )
    assert session.cells_of(step) == ((row_id, "cool_total"), (row_id, "cool_lat_wb"))
    session.undo()
    assert session.undo() is None
    assert found(session, "cool-total-short") == (finding,)


def test_a_number_that_cannot_be_accepted_changes_nothing(session):
    (finding,) = found(session, "cool-total-short")
    changes = (Change("cool_total", "400", "MBH"), Change("cool_lat_wb", "5000", "°F"))
    with pytest.raises(AmountError):
        put_right(session, finding, Remedy(changes, ()))
    assert not session.unsaved


def test_what_is_missing_for_one_reason_is_accepted_together_and_stays_so(session, file):
    first = next(iter(session.review.units.values()))
    missing = [one for one in first.findings if one.message.startswith("not judged: wet bulb")]
    assert len(missing) > 1
    accept(session, missing, "xy", "as agreed", DAY)
    session.save()
    again = Session.open(file)
    checks = {one.check for one in missing}
    kept = [one for one in next(iter(again.review.units.values())).findings if one.check in checks]
    assert [one.accepted for one in kept] == [True] * len(missing)
    take_back(again, kept)
    again.save()
    assert file.read_text(encoding="utf-8") == TEXT


def test_an_acceptance_in_other_numbers_takes_the_place_of_the_earlier_one(session, file):
    accept(session, found(session, "cool-total-short"), "xy", "as agreed", DAY)
    row_id = found(session, "cool-total-short")[0].subject.row_id
    session.set_cell("unit", row_id, "cool_total", "110")
    assert found(session, "acceptance-lapsed")
    assert not found(session, "cool-total-short")[0].accepted
    accept(session, found(session, "cool-total-short"), "xy", "agreed again", DAY)
    assert found(session, "cool-total-short")[0].accepted
    assert not found(session, "acceptance-lapsed")
    session.save()
    assert file.read_text(encoding="utf-8").count("[[unit.accepted]]") == 1


def test_only_the_acceptance_that_has_lapsed_is_taken_out(session):
    row_id = found(session, "cool-total-short")[0].subject.row_id
    accept(session, found(session, "cool-total-short"), "xy", "as agreed", DAY)
    session.set_cell("unit", row_id, "cool_total", "9999")  # the finding is gone
    over = next(one for one in list(session.review.units.values())[1].findings
                if one.check != "acceptance-lapsed")  # fmt: skip
    accept(session, (over,), "xy", "for later", DAY)
    take_back(session, found(session, "acceptance-lapsed"))
    assert session.history.last.name == "AHU-2 lapsed acceptance taken out"
    assert not found(session, "acceptance-lapsed")
    assert found(session, over.check)[0].accepted


def test_where_nothing_is_accepted_nothing_is_taken_back(session):
    assert take_back(session, found(session, "cool-total-short")) == frozenset()
    assert not session.unsaved


def test_a_blank_reason_is_refused(session):
    with pytest.raises(AmountError, match="blank"):
        accept(session, found(session, "cool-total-short"), "xy", " ", DAY)
    assert not session.unsaved


def test_what_was_done_comes_back_after_a_kill(machine):
    session = machine.open()
    unit = next(iter(session.review.units.values()))
    over = next(one for one in unit.findings if one.check == "fan-heat-unstated")
    accept(session, (over,), "xy", "as agreed", DAY)
    accept(session, (over,), "xy", "agreed again", DAY)
    machine.kill(session)
    again = machine.open()
    again.bring_back(again.offered)
    names = [step.name for step in again.history.done]
    assert names == ["AHU-1 fan-heat-unstated accepted"] * 2
    kept = next(iter(again.review.units.values())).findings
    assert next(one for one in kept if one.check == over.check).accepted
    again.save()
    assert machine.text.count("agreed") == 1
