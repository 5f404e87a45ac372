"""Mixing keeps energy and moisture; published mixtures stand in test_published.py."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.air.mixing import mix, unmix
from schedtui.air.state import Air, State
from schedtui.errors import AirError

IP = Air("IP", 14.696)
SI = Air("SI", 101.325)


@st.composite
def states(draw, air: Air) -> State:
    fahrenheit = draw(st.floats(0, 110))
    db = fahrenheit if air.system == "IP" else (fahrenheit - 32) / 1.8
    return air.by_relative_humidity(db, draw(st.floats(5, 100)))


def conserved(total: float, *parts: float) -> bool:
    scale = sum(abs(part) for part in parts)
    return abs(total - sum(parts)) <= 1e-9 * scale


@pytest.mark.parametrize("air", [IP, SI])
@settings(deadline=None)
@given(data=st.data())
def test_mixing_keeps_energy_and_moisture(air, data) -> None:
    a, b = data.draw(states(air)), data.draw(states(air))
    m_a, m_b = data.draw(st.floats(1, 1e5)), data.draw(st.floats(1, 1e5))
    mixed = mix(a, m_a, b, m_b)
    # The enthalpy anew from the dry bulb and the humidity ratio that came out.
    h = air.enthalpy(mixed.db, mixed.w)
    assert conserved((m_a + m_b) * h, m_a * a.h, m_b * b.h)
    assert conserved((m_a + m_b) * mixed.w, m_a * a.w, m_b * b.w)
    assert min(a.db, b.db) - 1 < mixed.db < max(a.db, b.db) + 1


@pytest.mark.parametrize("air", [IP, SI])
@settings(deadline=None)
@given(data=st.data())
def test_unmixing_keeps_energy_and_moisture(air, data) -> None:
    a, b = data.draw(states(air)), data.draw(states(air))
    m_a, m_b = data.draw(st.floats(1, 1e3)), data.draw(st.floats(1, 1e3))
    mixed = mix(a, m_a, b, m_b)
    other = unmix(mixed, m_a + m_b, a, m_a)
    h = air.enthalpy(other.db, other.w)
    assert conserved((m_a + m_b) * mixed.h, m_a * a.h, m_b * h)
    assert conserved((m_a + m_b) * mixed.w, m_a * a.w, m_b * other.w)
    assert other.db == pytest.approx(b.db, abs=1e-6)


def test_two_saturated_streams_make_fog() -> None:
    # Saturation is convex, so the chord between two saturated states lies above it
    # (Fundamentals, ch. 1, adiabatic mixing).
    mixed = mix(IP.by_wet_bulb(20, 20), 1, IP.by_wet_bulb(90, 90), 1)
    assert mixed.supersaturated
    assert mixed.rh > 100


def test_nothing_added_changes_nothing() -> None:
    a, b = IP.by_wet_bulb(80, 67), IP.by_wet_bulb(95, 75)
    assert mix(a, 5, b, 0) is a
    assert mix(a, 0, b, 5) is b
    assert unmix(a, 5, b, 0) is a


def test_what_cannot_be() -> None:
    a, b = IP.by_wet_bulb(80, 67), IP.by_wet_bulb(95, 75)
    with pytest.raises(AirError, match="no air flows"):
        mix(a, 0, b, 0)
    with pytest.raises(AirError, match="no air flows"):
        mix(a, -1, b, 3)
    with pytest.raises(AirError, match="no air is left"):
        unmix(a, 5, b, 5)
    with pytest.raises(AirError, match="no amount of moisture"):
        unmix(a, 100, IP.by_wet_bulb(95, 94), 99)
    with pytest.raises(AirError, match="two pressures or in two unit systems"):
        mix(a, 1, SI.by_wet_bulb(20, 15), 1)
