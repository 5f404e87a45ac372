"""The limits' defaults against the engineering page, section 6, copied here by hand."""

from __future__ import annotations

import pytest

from schedtui.schedule.catalogue.limits import Limits

# IP and SI, with the unit in each.
EXPECTED = {
    "agreement": (1.0, 1.0, "%", "%"),
    "sensible_agreement": (2.0, 2.5, "%", "%"),
    "rounding_cap": (5, 5, "%", "%"),
    "total_margin": (0, 0, "%", "%"),
    "sensible_margin": (0, 0, "%", "%"),
    "oversize": (25, 25, "%", "%"),
    "entering_db": (1.0, 0.6, "°F", "K"),
    "entering_wb": (1.0, 0.6, "°F", "K"),
    "row_balance": (3, 3, "%", "%"),
    "row_excess": (10, 10, "%", "%"),
    "water_balance": (5, 5, "%", "%"),
    "airflow_balance": (5, 5, "%", "%"),
    "tons_balance": (1, 1, "%", "%"),
    "power_balance": (3, 3, "%", "%"),
    "electric_balance": (3, 3, "%", "%"),
    "steam_balance": (5, 5, "%", "%"),
    "face_velocity_cooling": (550, 2.8, "fpm", "m/s"),
    "face_velocity_heating": (800, 4.1, "fpm", "m/s"),
    "leaving_humidity_low": (85, 85, "%", "%"),
    "leaving_humidity_high": (100, 100, "%", "%"),
    "airflow_per_ton_low": (200, 27, "cfm/ton", "L/s per kW"),
    "airflow_per_ton_high": (500, 67, "cfm/ton", "L/s per kW"),
    "supply_difference": (30, 17, "°F", "K"),
    "shr_low": (0.5, 0.5, "", ""),
    "shr_high": (1.0, 1.0, "", ""),
    "water_rise_low": (8, 4.5, "°F", "K"),
    "water_rise_high": (24, 13, "°F", "K"),
    "approach": (5, 3, "°F", "K"),
    "motor_headroom": (10, 10, "%", "%"),
    "motor_efficiency": (90, 90, "%", "%"),
    "outdoor_share": (10, 10, "%", "%"),
    "freeze": (38, 3.3, "°F", "°C"),
}


def test_the_limits_are_those_of_the_engineering():
    assert set(Limits.catalogue) == {*EXPECTED, "rounding"}


@pytest.mark.parametrize("key", EXPECTED)
def test_a_limit_has_its_default_and_its_unit_in_each_system(key):
    field = Limits.catalogue[key]
    assert field.quantity is not None
    found = [getattr(Limits(0, system, {}), key) for system in ("IP", "SI")]
    assert (*found, field.quantity.unit("IP"), field.quantity.unit("SI")) == EXPECTED[key]


@pytest.mark.parametrize("system", ["IP", "SI"])
def test_every_default_would_be_accepted_if_it_were_typed(system):
    for key in EXPECTED:
        value = getattr(Limits(0, system, {}), key)
        assert not Limits.catalogue[key].kind.read(value, str(value), system).bad


def test_rounding_is_allowed_unless_a_project_is_strict():
    assert Limits(0, "IP", {}).rounding == "allow"
    assert Limits.rounding.kind.read("strict", '"strict"', "IP").value == "strict"


def test_a_stated_limit_wins():
    cell = Limits.agreement.kind.read(2.5, "2.5", "SI")
    assert Limits(0, "SI", {"agreement": cell}).agreement == 2.5
