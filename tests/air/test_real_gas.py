"""The handbook's ideal-gas formulas against the real-gas model (CoolProp's HumidAir, RP-1485).

The states and coils are drawn once from a fixed seed, so the largest differences are figures that
can be quoted; `pytest -s tests/air/test_real_gas.py` prints them. CoolProp speaks SI; what the
program computes in IP is converted here, by the factors below, and nowhere in the program.
"""

import random
import warnings
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache

import pytest

from schedtui.air.coil import apparatus_dew_point, coil_load
from schedtui.air.flow import dry_air_mass
from schedtui.air.mixing import mix
from schedtui.air.psychro import STANDARD_PRESSURE
from schedtui.air.state import Air, State
from schedtui.units import System

with warnings.catch_warnings():
    warnings.simplefilter("ignore", DeprecationWarning)  # of CoolProp's own wrapper
    from CoolProp.HumidAirProp import HAPropsSI

PA = {"IP": 6894.757293168, "SI": 1000.0}
M3_KG = {"IP": 0.0624279606, "SI": 1.0}
J_KG = {"IP": 2326.0, "SI": 1000.0}
ALTITUDES = {"IP": [0, 1_000, 2_460, 5_280, 7_000], "SI": [0, 300, 750, 1_600, 2_100]}
SYSTEMS: tuple[System, ...] = ("IP", "SI")
STATES, COILS = 1_000, 500  # in each unit system

# Largest differences accepted [%, and degrees of the unit system].
LIMITS = {
    "humidity ratio": 0.7,
    "volume": 0.15,
    "coil total": 0.5,
    "coil sensible": 0.3,
}


@dataclass(frozen=True)
class Difference:
    system: str
    quantity: str
    value: float  # in per cent of the real-gas value, or in °F | K for a temperature


def kelvin(system: str, degrees: float) -> float:
    return (degrees + 459.67) / 1.8 if system == "IP" else degrees + 273.15


def degrees(system: str, from_fahrenheit: float) -> float:
    return from_fahrenheit if system == "IP" else (from_fahrenheit - 32) / 1.8


def real(output: str, air: Air, db: float, given: str, value: float) -> float:
    pressure = air.pressure * PA[air.system]
    found = HAPropsSI(output, "T", kelvin(air.system, db), "P", pressure, given, value)
    return float(found)


def percent(ours: float, theirs: float) -> float:
    return abs(ours - theirs) / abs(theirs) * 100


def drawn_states(system: System) -> Iterator[State]:
    draw = random.Random(2614)  # noqa: S311  a draw, not a secret
    for _ in range(STATES):
        air = Air.at_altitude(system, draw.choice(ALTITUDES[system]))
        db = degrees(system, draw.uniform(-20, 110))
        yield air.by_relative_humidity(db, draw.uniform(10, 100))


def drawn_coils(system: System) -> Iterator[tuple[Air, tuple[float, float], tuple[float, float]]]:
    """Give the air, and dry bulb and relative humidity of entering and leaving air: 10 °F and more.

    Every third coil is a dry one, which has its leaving humidity from its entering air.
    """
    draw = random.Random(2615)  # noqa: S311  a draw, not a secret
    made = 0
    while made < COILS:
        air = Air.at_altitude(system, draw.choice(ALTITUDES[system]))
        warm = draw.uniform(70, 105)
        cold = draw.uniform(45, min(70, warm - 10))
        t_e, t_l = degrees(system, warm), degrees(system, cold)
        dry = made % 3 == 0
        rh_e, rh_l = draw.uniform(10, 25) if dry else draw.uniform(35, 75), draw.uniform(85, 99)
        entering = air.by_relative_humidity(t_e, rh_e)
        if dry:
            leaving = entering.heated_to(t_l)
            if leaving.rh > 95:
                continue
            rh_l = leaving.rh
        elif entering.w <= air.by_relative_humidity(t_l, rh_l).w:
            continue
        made += 1
        yield air, (t_e, rh_e), (t_l, rh_l)


def state_differences(system: System) -> Iterator[Difference]:
    for s in drawn_states(system):
        rh = s.rh / 100
        w = real("W", s.air, s.db, "R", rh)
        yield Difference(system, "humidity ratio", percent(s.w, w))
        v = real("V", s.air, s.db, "R", rh) / M3_KG[system]
        yield Difference(system, "volume", percent(s.v, v))
        h = (real("H", s.air, s.db, "R", rh) - real("H", s.air, degrees(system, 0), "R", 0)) / J_KG[
            system
        ]
        ours = s.h - s.air.enthalpy(degrees(system, 0), 0)
        yield Difference(system, "enthalpy above 0 °F [unit]", abs(ours - h))
        wet = real("B", s.air, s.db, "R", rh)
        if wet > 273.2:  # where ice and water meet the two may stand on different branches
            yield Difference(system, "wet bulb [degree]", abs(from_kelvin(system, wet) - s.wb))
        dew = from_kelvin(system, real("D", s.air, s.db, "R", rh))
        yield Difference(system, "dew point [degree]", abs(dew - s.dp))


def from_kelvin(system: str, kelvins: float) -> float:
    return kelvins * 1.8 - 459.67 if system == "IP" else kelvins - 273.15


def coil_differences(system: System) -> Iterator[Difference]:
    for air, (t_e, rh_e), (t_l, rh_l) in drawn_coils(system):
        entering = air.by_relative_humidity(t_e, rh_e)
        dry = entering.heated_to(t_l)
        is_dry = abs(dry.rh - rh_l) < 1e-9
        leaving = dry if is_dry else air.by_relative_humidity(t_l, rh_l)
        load = coil_load(1.0, entering, leaving)
        # The real-gas model gets the same givens: dry bulb and relative humidity, on both sides.
        h_e, w_e = (real(x, air, t_e, "R", rh_e / 100) for x in "HW")
        if is_dry:
            h_l, corner = real("H", air, t_l, "W", w_e), h_e
        else:
            h_l, w_l = (real(x, air, t_l, "R", rh_l / 100) for x in "HW")
            corner = real("H", air, t_e, "W", w_l)
        unit = J_KG[system] * (1000 if system == "IP" else 1)
        yield Difference(system, "coil total", percent(load.total, (h_e - h_l) / unit))
        yield Difference(system, "coil sensible", percent(load.sensible, (corner - h_l) / unit))
        if is_dry:
            yield Difference(system, "dry coil total", percent(load.total, (h_e - h_l) / unit))


@cache
def largest() -> dict[tuple[str, str], float]:
    found: dict[tuple[str, str], float] = {}
    for system in SYSTEMS:
        for d in (*state_differences(system), *coil_differences(system)):
            key = (d.system, d.quantity)
            found[key] = max(found.get(key, 0.0), d.value)
    return found


def test_the_largest_differences_are_told(record_property) -> None:
    lines = [f"{'against the real-gas model':32}{'IP':>10}{'SI':>10}"]
    for quantity in dict.fromkeys(quantity for _, quantity in largest()):
        ip, si = largest()["IP", quantity], largest()["SI", quantity]
        lines.append(f"{quantity:32}{ip:10.3f}{si:10.3f}")
        record_property(quantity, f"IP {ip:.3f}, SI {si:.3f}")
    print("\n" + "\n".join(lines))  # noqa: T201  the figures the README quotes
    assert len(lines) == 9


@pytest.mark.parametrize("system", ["IP", "SI"])
@pytest.mark.parametrize("quantity", LIMITS)
def test_within_the_stated_accuracy(system, quantity) -> None:
    assert 0 < largest()[system, quantity] < LIMITS[quantity]


@pytest.mark.parametrize("system", ["IP", "SI"])
def test_temperatures_agree(system) -> None:
    tenth = 0.1 if system == "IP" else 0.06
    assert largest()[system, "wet bulb [degree]"] < tenth
    assert largest()[system, "dew point [degree]"] < tenth


@pytest.mark.parametrize("system", ["IP", "SI"])
def test_mixing_agrees(system) -> None:
    air = Air(system, STANDARD_PRESSURE[system])
    for share in (0.1, 0.3, 0.6):
        a = air.by_relative_humidity(degrees(system, 95), 40)
        b = air.by_relative_humidity(degrees(system, 75), 50)
        ours = mix(a, share, b, 1 - share)
        h_a, h_b = real("H", air, a.db, "R", 0.4), real("H", air, b.db, "R", 0.5)
        w_a, w_b = real("W", air, a.db, "R", 0.4), real("W", air, b.db, "R", 0.5)
        h, w = share * h_a + (1 - share) * h_b, share * w_a + (1 - share) * w_b
        pressure = air.pressure * PA[system]
        theirs = from_kelvin(system, HAPropsSI("T", "H", h, "P", pressure, "W", w))
        assert ours.db == pytest.approx(theirs, abs=0.01)
        assert ours.w == pytest.approx(w, rel=0.007)


@pytest.mark.parametrize("altitude", [0, 5_280])
def test_the_same_bulbs_at_altitude(altitude) -> None:
    # 10 000 cfm actual from 80/67 to 55/54 °F, by wet bulbs on both sides.
    air = Air.at_altitude("IP", altitude)
    entering, leaving = air.by_wet_bulb(80, 67), air.by_wet_bulb(55, 54)
    load = coil_load(dry_air_mass(10_000, "actual", air, entering.v), entering, leaving)

    def wet(output: str, db: float, wb: float) -> float:
        return real(output, air, db, "B", kelvin("IP", wb))

    kilograms_a_second = 10_000 * 0.00047194745 / wet("V", 80, 67)
    h_e, h_l = wet("H", 80, 67), wet("H", 55, 54)
    corner = real("H", air, 80, "W", wet("W", 55, 54))
    mbh = 293.07107
    assert load.total == pytest.approx(kilograms_a_second * (h_e - h_l) / mbh, rel=5e-3)
    assert load.sensible == pytest.approx(kilograms_a_second * (corner - h_l) / mbh, rel=3e-3)


@pytest.mark.parametrize("system", ["IP", "SI"])
def test_the_apparatus_dew_point_agrees(system) -> None:
    air = Air.at_altitude(system, 0)
    entering = air.by_relative_humidity(degrees(system, 80), 50)
    leaving = air.by_relative_humidity(degrees(system, 55), 93)
    adp = apparatus_dew_point(entering, leaving)
    assert adp is not None
    # On the real-gas line and curve, by bisection down from the leaving air.
    w_e = real("W", air, entering.db, "R", 0.5)
    w_l = real("W", air, leaving.db, "R", 0.93)
    slope = (w_e - w_l) / (entering.db - leaving.db)

    def gap(t: float) -> float:
        return real("W", air, t, "R", 1.0) - (w_l + slope * (t - leaving.db))

    low, high = leaving.db - degrees(system, 42) + degrees(system, 32), leaving.db
    assert gap(low) < 0 < gap(high)
    for _ in range(25):
        middle = (low + high) / 2
        low, high = (low, middle) if gap(middle) > 0 else (middle, high)
    assert adp == pytest.approx(high, abs=0.05)
