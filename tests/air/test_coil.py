"""Coils: balances, the apparatus dew point, modes; published loads stand in test_published.py."""

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from schedtui.air.coil import (
    apparatus_dew_point,
    bypass_factor,
    coil_leaving,
    coil_load,
    heating_load,
    leaving_of,
)
from schedtui.air.state import Air, State
from schedtui.errors import AirError

IP = Air("IP", 14.696)
SI = Air("SI", 101.325)
BOTH = pytest.mark.parametrize("air", [IP, SI, Air.at_altitude("IP", 5_280)])


def degrees(air: Air, fahrenheit: float) -> float:
    return fahrenheit if air.system == "IP" else (fahrenheit - 32) / 1.8


@st.composite
def coils(draw, air: Air) -> tuple[State, State]:
    t_e = draw(st.floats(65, 110))
    t_l = draw(st.floats(38, t_e - 5))
    entering = air.by_relative_humidity(degrees(air, t_e), draw(st.floats(10, 90)))
    leaving = air.by_relative_humidity(degrees(air, t_l), draw(st.floats(50, 100)))
    return entering, coil_leaving(entering, leaving)[0]


@BOTH
@settings(deadline=None)
@given(data=st.data())
def test_a_coil_keeps_energy_and_moisture(air, data) -> None:
    entering, leaving = data.draw(coils(air))
    mass = data.draw(st.floats(1, 1e5))
    load = coil_load(mass, entering, leaving)
    thousand, hour = (1000, 1) if air.system == "IP" else (1, 3600)
    # What enters is what leaves, what the coil takes, and what drips off, told apart.
    enthalpy_in = mass * air.enthalpy(entering.db, entering.w)
    enthalpy_out = mass * air.enthalpy(leaving.db, leaving.w)
    scale = abs(enthalpy_in) + abs(enthalpy_out)
    assert abs(enthalpy_in - enthalpy_out - load.total * thousand) <= 1e-9 * scale
    assert load.condensate / hour == pytest.approx(mass * (entering.w - leaving.w), abs=1e-9 * mass)
    assert load.sensible + load.latent == pytest.approx(load.total, rel=1e-9)
    # Latent is the moisture's enthalpy at the entering dry bulb.
    vapour = air.enthalpy(entering.db, 1) - air.enthalpy(entering.db, 0)
    by_moisture = mass * (entering.w - leaving.w) * vapour / thousand
    assert load.latent == pytest.approx(by_moisture, abs=1e-9 * scale / thousand)


@BOTH
@settings(deadline=None)
@given(data=st.data())
def test_the_leaving_state_from_its_own_loads(air, data) -> None:
    entering, leaving = data.draw(coils(air))
    load = coil_load(100, entering, leaving)
    assume(load.latent >= 0)
    again = leaving_of(entering, 100, leaving.db, load.total, load.sensible)
    assert again.db == leaving.db
    assert again.w == pytest.approx(leaving.w, abs=1e-11)


def test_tons_in_both_systems() -> None:
    # A ton of refrigeration is 12 000 Btu/h, 3.5168528 kW.
    load = coil_load(1000, IP.by_humidity_ratio(80, 0.01), IP.by_humidity_ratio(30, 0.01))
    assert load.tons == pytest.approx(1000 * 50 * (0.240 + 0.00444) / 12_000)
    load = coil_load(1, SI.by_humidity_ratio(30, 0.01), SI.by_humidity_ratio(20, 0.01))
    assert load.tons == pytest.approx(10 * (1.006 + 0.0186) / 3.5168528)


def test_a_coil_that_does_nothing_has_no_ratio() -> None:
    air = IP.by_wet_bulb(80, 67)
    load = coil_load(1000, air, air)
    assert (load.total, load.shr, load.tons, load.condensate) == (0, None, 0, 0)


def test_a_dry_coil_is_all_sensible() -> None:
    entering = IP.by_relative_humidity(80, 20)
    load = coil_load(1000, entering, entering.heated_to(60))
    assert (load.shr, load.latent, load.condensate) == (1, 0, 0)


def test_the_same_coil_in_both_systems() -> None:
    # One case in two systems: 0.4 %, by which the two formula sets and 0.075 lb/ft³ and
    # 1.2 kg/m³ differ (engineering practice; 1 MBH = 0.29307107 kW, 1 cfm = 0.47194745 L/s).
    for t_e, wb_e, t_l, wb_l in [(80, 67, 55, 54), (95, 75, 52, 51.5), (78, 55, 60, 48)]:
        ip = coil_load(45_000, IP.by_wet_bulb(t_e, wb_e), IP.by_wet_bulb(t_l, wb_l))
        e, we, lv, wl = (degrees(SI, t) for t in (t_e, wb_e, t_l, wb_l))
        mass = 10_000 * 0.47194745 / 1000 * 1.2
        si = coil_load(mass, SI.by_wet_bulb(e, we), SI.by_wet_bulb(lv, wl))
        assert si.total / 0.29307107 == pytest.approx(ip.total, rel=4e-3)
        assert si.sensible / 0.29307107 == pytest.approx(ip.sensible, rel=4e-3)
        assert si.tons == pytest.approx(ip.tons, rel=4e-3)
        assert si.condensate / 0.45359237 == pytest.approx(ip.condensate, rel=6e-3, abs=1)


@BOTH
@settings(deadline=None)
@given(data=st.data())
def test_the_apparatus_dew_point_is_on_the_line_and_saturated(air, data) -> None:
    entering, leaving = data.draw(coils(air))
    assume(not leaving.supersaturated)
    adp = apparatus_dew_point(entering, leaving)
    slope = (entering.w - leaving.w) / (entering.db - leaving.db)

    def gap(t: float) -> float:
        return air.saturation_humidity_ratio(t) - (leaving.w + slope * (t - leaving.db))

    steps = 400
    if adp is None:
        bottom = max(leaving.db - 120, degrees(air, -140))
        below = [leaving.db - i / steps * (leaving.db - bottom) for i in range(1, steps)]
        assert slope * (entering.db - leaving.db) <= 1e-9 or all(gap(t) > -1e-7 for t in below)
    else:
        assert abs(gap(adp)) < 1e-9
        between = [leaving.db - i / steps * (leaving.db - adp) for i in range(1, steps)]
        assert all(gap(t) > -1e-9 for t in between)  # no crossing nearer to the leaving air
        assert -1e-9 <= bypass_factor(entering, leaving, adp) < 1


def test_apparatus_dew_point_of_the_line_through_a_known_one() -> None:
    # Drawn backwards: from saturated air at a chosen temperature through a bypass factor.
    cases = [(IP, 50.0, 0.1, 50), (SI, 9.0, 0.2, 50), (IP, 33.0, 0.05, 45), (IP, 28.0, 0.15, 40)]
    for air, adp, bf, rh in cases:
        entering = air.by_relative_humidity(degrees(air, 80), rh)
        w = air.saturation_humidity_ratio(adp)
        leaving = air.by_humidity_ratio(adp + bf * (entering.db - adp), w + bf * (entering.w - w))
        found = apparatus_dew_point(entering, leaving)
        assert found is not None
        assert found == pytest.approx(adp, abs=1e-7)
        assert bypass_factor(entering, leaving, found) == pytest.approx(bf, abs=1e-8)


def test_below_freezing_the_crossing_is_found_over_ice() -> None:
    entering, leaving = IP.by_relative_humidity(45, 75), IP.by_relative_humidity(28, 97)
    adp = apparatus_dew_point(entering, leaving)
    assert adp is not None
    assert adp < 28


def test_where_there_is_no_apparatus_dew_point() -> None:
    entering = IP.by_relative_humidity(80, 50)
    assert apparatus_dew_point(entering, entering.heated_to(65)) is None  # dry
    assert apparatus_dew_point(entering, IP.by_relative_humidity(90, 40)) is None  # warmer
    fog = IP.by_humidity_ratio(55, 0.0099)
    assert apparatus_dew_point(entering, fog) is None
    # All outdoor air, deeply cooled: the straight line falls faster than saturation does.
    assert apparatus_dew_point(IP.by_wet_bulb(95, 82), IP.by_wet_bulb(52, 51)) is None


@BOTH
def test_saturated_leaving_air_is_its_own_apparatus_dew_point(air) -> None:
    entering = air.by_relative_humidity(degrees(air, 80), 50)
    for fahrenheit in (52.0, 32.0, 20.0):
        t = degrees(air, fahrenheit)
        assert apparatus_dew_point(entering, air.by_wet_bulb(t, t)) == t
    with pytest.raises(AirError, match="no warmer than the apparatus dew point"):
        bypass_factor(entering, entering, entering.db)


def test_a_coil_never_moistens_and_never_heats() -> None:
    scheduled = IP.by_wet_bulb(55, 54)
    humid, dry, cold = (IP.by_wet_bulb(*bulbs) for bulbs in ((80, 67), (80, 55), (54, 50)))
    assert coil_leaving(humid, scheduled) == (scheduled, "wet")
    assert coil_leaving(dry, scheduled) == (dry.heated_to(55), "dry")
    assert coil_leaving(cold, scheduled) == (cold, "off")
    assert coil_leaving(humid.heated_to(55), scheduled)[1] == "off"


def test_no_leaving_state_follows() -> None:
    entering = IP.by_wet_bulb(80, 67)
    with pytest.raises(AirError, match="sensible load above the total"):
        leaving_of(entering, 45_000, 55, 300, 301)
    with pytest.raises(AirError, match="no amount of moisture"):
        leaving_of(entering, 45_000, 55, 2_000, 300)
    with pytest.raises(AirError, match="no air flows"):
        leaving_of(entering, 0, 55, 400, 300)


def test_heating_load_is_constant_moisture() -> None:
    # Fundamentals, ch. 1, sensible heating, at 4.5 · (0.240 + 0.444 W) Btu/h cfm °F.
    entering = IP.by_relative_humidity(50, 40)
    factor = 4.5 * (0.240 + 0.444 * entering.w)
    assert heating_load(45_000, entering, 90) == pytest.approx(factor * 10_000 * 40 / 1000)
