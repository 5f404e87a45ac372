"""The figures that are computed: those of the contract, each with its entry."""

import pytest

from schedtui.review.figure import known
from schedtui.review.quantities import COLUMNS, COOLING_FIGURES, COOLING_STATES
from schedtui.schedule.catalogue.unit import Unit

# The keys of a cooling condition in the JSON, as other programs read them.
CONTRACT = [
    "supply_mass", "outdoor_mass", "coil_mass", "outdoor_fraction", "coil_total", "coil_sensible",
    "coil_latent", "shr", "tons", "adp", "bypass_factor", "condensate", "fan_heat", "fan_rise",
    "room_sensible_met", "room_latent_met", "bypass",
]  # fmt: skip
STATES = [
    "outdoor", "recovered", "return", "mixed", "coil_entering", "coil_leaving", "supply", "room",
]  # fmt: skip

# 10 000 cfm of standard air, all of it returned at 80/67 °F, leaving at 55/54 °F, fan 2 °F.
TEXT = """\
[project]
title = "Figures"
units = "IP"
airflow_basis = "standard"
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
room_db = 75
room_rh = 50
return_db = 80
return_wb = 67
fan_rise = 2
cool_lat_db = 55
cool_lat_wb = 54
cool_total = 420
cool_sensible = 260
"""


@pytest.fixture(scope="module")
def case(one_unit):
    return one_unit(TEXT).case


def test_every_figure_of_the_contract_is_there_in_its_order():
    keys = [figure.key for figure in COOLING_FIGURES]
    assert [key for key in keys if key in CONTRACT] == CONTRACT


def test_every_state_of_the_contract_is_there_in_the_order_of_the_air():
    assert [name for name, _ in COOLING_STATES] == STATES


@pytest.mark.parametrize("entries", [COOLING_FIGURES, COLUMNS])
def test_keys_are_unique_and_entries_say_what_they_are(entries):
    assert len({one.key for one in entries}) == len(entries)
    assert all(one.label and one.of for one in entries)


def test_every_column_stands_behind_a_field():
    assert all(column.after in Unit.catalogue for column in COLUMNS)
    assert not {column.key for column in COLUMNS} & set(Unit.catalogue)


# Fundamentals 2017, ch. 1: enthalpies 31.45 and 22.57 Btu/lb, humidity ratios 0.01121 and 0.00866.
EXPECTED = {
    "supply_mass": 45_000,
    "outdoor_mass": 0,
    "coil_mass": 45_000,
    "outdoor_fraction": 0,
    "coil_total": 399.5,
    "coil_sensible": 274.3,
    "coil_latent": 125.2,
    "shr": 0.6866,
    "tons": 33.29,
    "fan_heat": 45 * 2 * (0.24 + 0.444 * 0.00866),
    "fan_rise": 2,
    "room_sensible_met": 45 * 18 * (0.24 + 0.444 * 0.00866),
    "bypass": 0,
}


@pytest.mark.parametrize("key", EXPECTED)
def test_figures_are_those_of_the_handbook_s_formulas(case, key):
    get = next(one.get for one in COOLING_FIGURES if one.key == key)
    assert get(case.governing) == pytest.approx(EXPECTED[key], rel=2e-3)


# By the real-gas model; to 0.7 % of the moisture that the entering air, or the room, holds.
MOISTURE = {"condensate": (114.96, 45_000 * 0.0112), "room_latent_met": (29.93, 45 * 0.0093 * 1094)}


@pytest.mark.parametrize("key", MOISTURE)
def test_moisture_is_that_of_the_real_gas_model(case, key):
    get = next(one.get for one in COOLING_FIGURES if one.key == key)
    expected, whole = MOISTURE[key]
    assert get(case.governing) == pytest.approx(expected, abs=0.007 * whole)


def test_the_bypass_factor_and_the_dew_point_are_of_one_line(case):
    at = case.governing
    found = {one.key: one.get(at) for one in COOLING_FIGURES if one.key in ("adp", "bypass_factor")}
    assert found["adp"] < 55
    assert found["bypass_factor"] == pytest.approx((55 - found["adp"]) / (80 - found["adp"]))


def test_margins_are_of_what_is_required(case):
    found = {column.key: known(column.get, case) for column in COLUMNS}
    assert found["total_required"] == pytest.approx(399.5, rel=1e-3)
    assert found["total_margin"] == pytest.approx(5.1, abs=0.1)
    assert found["sensible_required"] == pytest.approx(274.3, rel=1e-3)
    assert found["sensible_margin"] == pytest.approx(-5.2, abs=0.1)
    assert found["tons_required"] == pytest.approx(33.3, rel=1e-3)
    assert (found["entering_db"], found["entering_wb"]) == (80, pytest.approx(67))
