"""Acceptances: they stand while every input of their finding stands, and lapse with any of them."""

from dataclasses import replace

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.review.accept import basis, key_of
from schedtui.review.finding import Severity
from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.view import view

HEAD = """
[project]
title = "Accepted"
units = "IP"
altitude = 2460
airflow_basis = "standard"

[limits]
total_margin = 2

[defaults]
room_db = 75
room_rh = 50

[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95.0
outdoor_wb = 75.0

[[plant]]
name = "chilled water"
serves = "cooling"
capacity = 200
"""
UNIT = """
[[unit]]
tag = "AHU-1"
serves = "hall"
supply_airflow = 10000
outdoor_airflow = 2500
cool_lat_db = 55.0
cool_lat_wb = 54.0
cool_total = 300.0
fan_rise = 2.0
"""
ACCEPTED = """
[[unit.accepted]]
check = "cool-total-short"
condition = "summer"
by = "xy"
on = 2026-11-30
reason = "the owner accepts it"
"""


def reviewed(text):
    document = load(text)
    assert not document.problems
    return review(view(document))


def short_of(found):
    (unit,) = found.units.values()
    return next(one for one in unit.findings if one.check == "cool-total-short")


def accepted_text(head=HEAD, unit=UNIT, more=""):
    """Return a file whose short total is accepted in the numbers as they stand."""
    found = reviewed(HEAD + UNIT)
    digest = basis(short_of(found), found.schedule)
    return f'{head}{unit}{ACCEPTED}{more}basis = "{digest}"\n'


def test_an_acceptance_stands_while_its_inputs_do():
    found = reviewed(accepted_text())
    (unit,) = found.units.values()
    assert short_of(found).accepted
    assert unit.worst is not Severity.SHORT
    assert "acceptance-lapsed" not in [one.check for one in found.all_findings]
    assert found.counts()["accepted"] == 1
    assert found.counts()["short"] == 1  # the plant's own: 200 MBH for more than 300


@pytest.mark.parametrize(
    ("before", "after"),
    [
        ("cool_total = 300.0", "cool_total = 300.00"),  # typed otherwise
        ("supply_airflow = 10000", "supply_airflow = 10001"),
        ("outdoor_airflow = 2500", "outdoor_airflow = 2510"),
        ("cool_lat_wb = 54.0", "cool_lat_wb = 54"),
        ("room_db = 75", "room_db = 75.5"),
        ("altitude = 2460", "altitude = 2461"),
        ("outdoor_wb = 75.0", "outdoor_wb = 75.1"),
        ("total_margin = 2", "total_margin = 2.5"),
        ("total_margin = 2", "total_margin = 2\nagreement = 1.5"),  # stated where it was not
        ("fan_rise = 2.0", "fan_rise = 2.0\nbypass = 5"),
    ],
)
def test_an_acceptance_lapses_with_any_of_its_inputs(before, after):
    text = accepted_text()
    assert before in text
    found = reviewed(text.replace(before, after))
    assert not short_of(found).accepted
    assert "acceptance-lapsed" in [one.check for one in found.all_findings]


@pytest.mark.parametrize(
    ("before", "after"),
    [
        ('serves = "hall"', 'serves = "hall 2"'),
        ('title = "Accepted"', 'title = "Renamed"'),
        ("capacity = 200", "capacity = 900"),
        ('tag = "AHU-1"', 'tag = "AHU-1"\nlocation = "roof"'),
        ("fan_rise = 2.0", "fan_rise = 2.0\nmotor_power = 10\nheat_total = 90"),
        (
            "[[plant]]",
            (
                "[[condition]]\nname = 'dry'\nseason = 'cooling'\noutdoor_db = 99\n"
                "outdoor_wb = 62\n[[plant]]"
            ),
        ),
    ],
)  # fmt: skip
def test_an_acceptance_stands_whatever_else_changes(before, after):
    text = accepted_text()
    assert before in text
    assert short_of(reviewed(text.replace(before, after))).accepted


@given(st.sampled_from(["supply_airflow", "outdoor_airflow", "cool_lat_db", "cool_total"]),
       st.integers(1, 40))  # fmt: skip
@settings(deadline=None, max_examples=40)
def test_any_other_number_lapses_it(key, steps):
    line = next(line for line in UNIT.splitlines() if line.startswith(f"{key} ="))
    number = float(line.split("=")[1]) * (1 - steps / 1000)
    found = reviewed(accepted_text().replace(line, f"{key} = {number:.3f}"))
    assert not any(one.accepted for one in found.all_findings)


def test_fields_must_match_where_they_are_given():
    text = accepted_text(more='fields = ["cool_total"]\n')
    assert short_of(reviewed(text)).accepted
    text = accepted_text(more='fields = ["cool_sensible"]\n')
    assert not short_of(reviewed(text)).accepted


def test_what_is_of_no_unit_is_accepted_above():
    found = reviewed(HEAD + UNIT)
    (plant,) = found.plants
    (short,) = plant.findings
    assert short.check == "plant-capacity-short"
    digest = basis(short, found.schedule)
    row = (
        '[[accepted]]\nof = "plant chilled water"\ncheck = "plant-capacity-short"\n'
        f'condition = "summer"\nreason = "a second chiller follows"\nbasis = "{digest}"\n'
    )
    again = reviewed(HEAD + UNIT + row)
    assert [one.accepted for one in again.plants[0].findings] == [True]
    changed = reviewed(HEAD + UNIT.replace("10000", "9990") + row)
    assert [one.accepted for one in changed.plants[0].findings] == [False]
    assert "acceptance-lapsed" in [one.check for one in changed.findings]


def test_the_key_of_an_acceptance():
    found = short_of(reviewed(HEAD + UNIT))
    assert key_of(replace(found, accepted=True)) == (
        "cool-total-short", "summer", ("cool_total",),
    )  # fmt: skip
