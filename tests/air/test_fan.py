"""Fans: power, heat, rise."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.air.fan import after_fan, heat_of_rise, heat_to_air, rise, shaft_power
from schedtui.air.flow import dry_air_mass
from schedtui.air.state import Air
from schedtui.errors import AirError

IP = Air("IP", 14.696)
SI = Air("SI", 101.325)


def test_shaft_power() -> None:
    # Handbook—HVAC Systems and Equipment, fans: 6 356 cfm · in. wg to the air horsepower;
    # 1 m³/s against 1 kPa is 1 kW.
    assert shaft_power(6_356, 1, 100, "IP") == 1
    assert shaft_power(1_000, 1_000, 50, "SI") == pytest.approx(2)
    # One case in both: 1 hp = 0.74569987 kW, 1 in. wg = 249.08891 Pa, 1 cfm = 0.47194745 L/s.
    # 6 356 stands for a water column at room temperature, 0.2 % lighter than that inch.
    ip = shaft_power(10_000, 4, 65, "IP")
    si = shaft_power(4_719.4745, 4 * 249.08891, 65, "SI")
    assert si / 0.74569987 == pytest.approx(ip, rel=2.5e-3)


def test_heat_of_a_fan() -> None:
    # Fundamentals, ch. 18: 2 545 Btu/h to the horsepower; a motor in the airstream adds its loss.
    assert heat_to_air(1, "IP") == 2.545
    assert heat_to_air(10, "IP", 80) == pytest.approx(31.8125)
    assert heat_to_air(10, "SI", 80) == pytest.approx(12.5)


def test_the_rise_is_that_of_common_practice() -> None:
    # Common practice: draw-through, 0.5 to 0.6 °F for each in. wg of total pressure, with the
    # motor in the air (a fan of 70 %, a motor of 92 %, standard air).
    air_in = IP.by_wet_bulb(55, 54)
    heat = heat_to_air(shaft_power(10_000, 1, 70, "IP"), "IP", 92)
    assert 0.5 < rise(air_in, dry_air_mass(10_000, "standard", IP), heat) < 0.6


@pytest.mark.parametrize("air", [IP, SI])
@settings(deadline=None)
@given(data=st.data())
def test_a_fan_keeps_energy_and_moisture(air, data) -> None:
    db = data.draw(st.floats(5, 45))
    air_in = air.by_relative_humidity(db, data.draw(st.floats(5, 100)))
    mass, heat = data.draw(st.floats(1, 100)), data.draw(st.floats(0, 10))
    heat = heat * mass / (1000 if air.system == "IP" else 1)  # up to 10 Btu/lb, 10 kJ/kg
    air_out = after_fan(air_in, mass, heat)
    thousand = 1000 if air.system == "IP" else 1
    gained = mass * (air_out.h - air_in.h) / thousand
    scale = mass * abs(air_out.h) / thousand
    assert abs(gained - heat) <= 1e-9 * scale
    assert air_out.w == air_in.w
    again = heat_of_rise(air_in, mass, rise(air_in, mass, heat))
    assert abs(again - heat) <= 1e-9 * scale


def test_back_over_a_fan_is_the_same_rise() -> None:
    air_in = SI.by_wet_bulb(13, 12.5)
    air_out = after_fan(air_in, 5, 6)
    assert air_out.db - rise(air_out, 5, 6) == pytest.approx(13, rel=1e-12)


def test_what_cannot_be() -> None:
    with pytest.raises(AirError, match="fan efficiency 0 % is not above 0"):
        shaft_power(1, 1, 0, "IP")
    with pytest.raises(AirError, match="motor efficiency -5 % is not above 0"):
        heat_to_air(1, "SI", -5)
    with pytest.raises(AirError, match="no air flows"):
        rise(IP.by_wet_bulb(55, 54), 0, 10)
