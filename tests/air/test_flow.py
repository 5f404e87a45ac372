"""Streams: mass in a volume, heat and moisture in a mass."""

import pytest

from schedtui.air.flow import (
    dry_air_mass,
    enthalpy_difference,
    heat_flow,
    moisture_flow,
    volume_flow,
)
from schedtui.air.state import Air
from schedtui.errors import AirError

IP = Air("IP", 14.696)
SI = Air("SI", 101.325)


def test_the_customary_factors_hold_at_standard_density() -> None:
    # Common practice (Fundamentals, ch. 18): 4.5 cfm·Btu/lb, 1.2 L/s·kJ/kg, 1.08 to 1.10 and 1.23.
    assert heat_flow(dry_air_mass(1, "standard", IP), 1, "IP") == pytest.approx(4.5 / 1000)
    assert heat_flow(dry_air_mass(1, "standard", SI), 1, "SI") == pytest.approx(1.2 / 1000)
    per_degree = IP.enthalpy(71, 0.01) - IP.enthalpy(70, 0.01)
    factor = heat_flow(dry_air_mass(1, "standard", IP), per_degree, "IP") * 1000
    assert factor == pytest.approx(1.10, abs=5e-3)
    per_kelvin = SI.enthalpy(21, 0.01) - SI.enthalpy(20, 0.01)
    factor = heat_flow(dry_air_mass(1, "standard", SI), per_kelvin, "SI") * 1000
    assert factor == pytest.approx(1.23, abs=5e-3)


def test_the_latent_factor() -> None:
    # Common practice: 4 840 Btu/h for a cfm and a pound of moisture a pound, 3 010 W for a L/s.
    at_room = IP.enthalpy(75, 1) - IP.enthalpy(75, 0)
    assert 4.5 * at_room == pytest.approx(4840, rel=0.02)
    at_room = SI.enthalpy(24, 1) - SI.enthalpy(24, 0)
    assert 1.2 * at_room == pytest.approx(3010, rel=0.02)


def test_site_air_is_thinner_by_the_pressure_alone() -> None:
    # Published altitude-correction table at constant temperature: 0.801 at 6 000 ft.
    air = Air.at_altitude("IP", 6_000)
    assert dry_air_mass(10_000, "site", air) == pytest.approx(45_000 * 0.801, rel=1e-3)
    assert dry_air_mass(10_000, "standard", air) == pytest.approx(45_000)


def test_actual_air_by_its_own_volume() -> None:
    # Handbook ch. 1, cooling example (older IP edition): 10 000 cfm at 14.01 ft³/lb.
    assert dry_air_mass(10_000, "actual", IP, 14.01) == pytest.approx(42_827, rel=1e-4)
    with pytest.raises(AirError, match="needs the state of its air"):
        dry_air_mass(10_000, "actual", IP)


@pytest.mark.parametrize("air", [IP, SI, Air.at_altitude("IP", 5_280)])
@pytest.mark.parametrize("basis", ["standard", "site", "actual"])
def test_volume_is_the_way_back(air, basis) -> None:
    mass = dry_air_mass(9_440, basis, air, 0.9)
    assert volume_flow(mass, basis, air, 0.9) == pytest.approx(9_440, rel=1e-12)


def test_heat_and_moisture_in_the_trades_units() -> None:
    assert heat_flow(45_000, 10, "IP") == 450  # MBH
    assert heat_flow(6, 10, "SI") == 60  # kW
    assert enthalpy_difference(45_000, 450, "IP") == 10
    assert enthalpy_difference(6, 60, "SI") == 10
    assert moisture_flow(45_000, 0.004, "IP") == pytest.approx(180)  # lb/h
    assert moisture_flow(2, 0.001, "SI") == pytest.approx(7.2)  # kg/h
    with pytest.raises(AirError, match="no air flows"):
        enthalpy_difference(0, 10, "IP")
