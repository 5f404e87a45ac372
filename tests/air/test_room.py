"""Rooms: what supply air meets; a published room stands in test_published.py."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.air.room import heat_met, moisture_to_add, room_met, supply_for
from schedtui.air.state import Air
from schedtui.errors import AirError

IP = Air("IP", 14.696)
SI = Air("SI", 101.325)


@pytest.mark.parametrize("air", [IP, SI])
@settings(deadline=None)
@given(data=st.data())
def test_a_room_keeps_energy_and_moisture(air, data) -> None:
    low, high = (50, 70) if air.system == "IP" else (10, 21)
    supply = air.by_relative_humidity(data.draw(st.floats(low, high)), data.draw(st.floats(5, 100)))
    room = air.by_relative_humidity(high + 5, data.draw(st.floats(10, 90)))
    mass = data.draw(st.floats(1, 1e5))
    met = room_met(mass, supply, room)
    thousand, hour = (1000, 1) if air.system == "IP" else (1, 3600)
    enthalpy_in, enthalpy_out = (mass * air.enthalpy(s.db, s.w) / thousand for s in (supply, room))
    scale = abs(enthalpy_in) + abs(enthalpy_out)
    assert abs(met.sensible + met.latent - (enthalpy_out - enthalpy_in)) <= 1e-9 * scale
    gained = mass * (room.w - supply.w)
    assert abs(met.moisture / hour - gained) <= 1e-9 * mass * (room.w + supply.w)
    again = supply_for(mass, room, met.sensible, supply.w)
    assert again.db == pytest.approx(supply.db, abs=1e-7)


def test_the_customary_factors() -> None:
    # Common practice, standard air: 1.10 · cfm · °F sensible, 4 840 · cfm · ΔW latent,
    # within 2 % (Fundamentals, ch. 18).
    supply, room = IP.by_wet_bulb(57, 54.5), IP.by_relative_humidity(75, 50)
    met = room_met(45_000, supply, room)
    assert met.sensible == pytest.approx(1.10 * 10_000 * 18 / 1000, rel=0.02)
    assert met.latent == pytest.approx(4.840 * 10_000 * (room.w - supply.w), rel=0.02)


def test_the_same_room_in_both_systems() -> None:
    ip = room_met(45_000, IP.by_wet_bulb(57, 54), IP.by_relative_humidity(75, 50))
    supply = SI.by_wet_bulb((57 - 32) / 1.8, (54 - 32) / 1.8)
    mass = 10_000 * 0.47194745 / 1000 * 1.2
    si = room_met(mass, supply, SI.by_relative_humidity((75 - 32) / 1.8, 50))
    assert si.sensible / 0.29307107 == pytest.approx(ip.sensible, rel=4e-3)
    assert si.latent / 0.29307107 == pytest.approx(ip.latent, rel=4e-3)


def test_air_drier_than_needed_is_a_negative_load_and_no_error() -> None:
    met = room_met(1, SI.by_wet_bulb(30, 25), SI.by_relative_humidity(24, 50))
    assert met.sensible < 0
    assert met.latent < 0


def test_heat_met() -> None:
    # Common practice, standard air: 1.08 · cfm · °F for dry air (Fundamentals, ch. 18).
    supply = IP.by_relative_humidity(90, 5)
    assert heat_met(45_000, supply, 70) == pytest.approx(1.08 * 10_000 * 20 / 1000, rel=0.01)


def test_moisture_to_add_is_never_taken_out() -> None:
    dry, room = SI.by_humidity_ratio(5, 0.0027), SI.by_humidity_ratio(21, 0.0062)
    assert moisture_to_add(1, dry, room) == pytest.approx(12.6)  # 3.5 g/s, in kg/h
    assert moisture_to_add(1, room, dry) == 0
    with pytest.raises(AirError):
        supply_for(0, room, 1, 0.005)
