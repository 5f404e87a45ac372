"""The heating path of drawn units, against the real-gas model.

The limits are stated here and come from the differences between the handbook's ideal-gas formulas
(psychrolib) and CoolProp (ASHRAE RP-1485); `pytest -s tests/review/test_heating.py` prints the
largest differences, the figures to quote.
"""

from collections import Counter
from itertools import product

import pytest

from schedtui.errors import Absent
from schedtui.review.quantities import HEATING_FIGURES, HEATING_STATES

SYSTEMS = ("IP", "SI")
TEN_DEGREES = {"IP": 10.0, "SI": 10 / 1.8}
CP = {"IP": 0.241e-3, "SI": 1.01}  # of dry winter air, near enough [MBH h/lb °F | kJ/kg K]

# Largest differences accepted [%, or as said]. Cold air is denser than an ideal gas by up to 0.1 %.
# Its dry bulb after mixing and its loads part by as much as the specific heats do, 0.2 %: the
# handbook's 0.240 and 1.006 hold at room temperature.
LIMITS = {
    "supply mass": 0.15,
    "outdoor mass": 0.15,
    "outdoor share": 0.15,
    "dry bulb [degree]": 0.07,
    "humidity ratio": 0.7,
    "humidity ratio of dry air [1e-5]": 2.5,
    "volume": 0.15,
    "wet bulb [degree]": 0.12,
    "preheat load": 0.3,
    "preheat load [degree]": 0.03,  # lifts of less than 10 °F
    "heating load": 0.3,
    "heating load [degree]": 0.03,
    "room heat met": 0.3,
    "room heat met [degree]": 0.03,
    "moisture to add, of the room's": 0.7,
}
_DRY = 0.004


def percent(ours, theirs):
    return abs(ours - theirs) / abs(theirs) * 100


def load_difference(one, what, ours, theirs, mass, lift):
    if abs(lift) >= TEN_DEGREES[one.system]:
        yield what, percent(ours, theirs)
    else:
        yield f"{what} [degree]", abs(ours - theirs) / (mass * CP[one.system])


def load_differences(one, ours, theirs):
    at = one.at
    supply, out = at.supply_mass, at.outdoor_mass
    lift = at.heat_leaving.db - at.heat_entering.db
    yield from load_difference(
        one, "heating load", ours["heat_load"], theirs["heat_load"], supply, lift
    )
    if "preheat_load" in theirs and (out or one.unit.get("preheat_at") != "outdoor"):
        mass = out if one.unit.get("preheat_at") == "outdoor" else supply
        lift = at.preheat_leaving.db - at.preheat_entering.db
        loads = ours["preheat_load"], theirs["preheat_load"]
        yield from load_difference(one, "preheat load", *loads, mass, lift)
    if "room_heat_met" in theirs:
        loads = ours["room_heat_met"], theirs["room_heat_met"]
        lift = at.heat_leaving.db - at.room.db
        yield from load_difference(one, "room heat met", *loads, supply, lift)


def mass_differences(one, ours, theirs):
    yield "supply mass", percent(ours["supply_mass"], theirs["supply_mass"])
    if not theirs["outdoor_mass"]:
        assert ours["outdoor_mass"] == 0
        return
    yield "outdoor mass", percent(ours["outdoor_mass"], theirs["outdoor_mass"])
    yield "outdoor share", percent(ours["outdoor_fraction"], theirs["outdoor_fraction"])
    if "humidifier_load" in theirs:
        hourly = one.at.outdoor_mass * (1 if one.system == "IP" else 3600) * one.at.room.w
        off = abs(ours["humidifier_load"] - theirs["humidifier_load"])
        yield "moisture to add, of the room's", off / hourly * 100


def state_differences(one):
    attributes = dict(HEATING_STATES)
    for name, air in one.path.states().items():
        ours, theirs = getattr(one.at, attributes[name]), one.path.properties(air)
        yield "dry bulb [degree]", abs(ours.db - theirs["db"])
        if theirs["w"] < _DRY:
            yield "humidity ratio of dry air [1e-5]", abs(ours.w - theirs["w"]) * 1e5
        else:
            yield "humidity ratio", percent(ours.w, theirs["w"])
        yield "volume", percent(ours.v, theirs["v"])
        freezing = 32.0 if one.system == "IP" else 0.0
        if "wb" in theirs and min(ours.wb, theirs["wb"]) > freezing:  # below, ice or not
            yield "wet bulb [degree]", abs(ours.wb - theirs["wb"])


@pytest.fixture(scope="module")
def largest(heated):
    found = {}
    figures = {figure.key: figure.get for figure in HEATING_FIGURES}
    for one in heated:
        theirs = one.path.figures()
        ours = {key: figures[key](one.at) for key in theirs}
        for quantity, value in (
            *mass_differences(one, ours, theirs),
            *load_differences(one, ours, theirs),
            *state_differences(one),
        ):
            key = (one.system, quantity)
            found[key] = max(found.get(key, 0.0), value)
    return found


# What a heating path may have; the preheat stands in one of two places.
BESIDES = {
    "recovery": lambda one: one.path.recovers(one.path.supply_mass),
    "held back by frost": lambda one: (
        "recovery_sensible" in one.unit
        and one.at.outdoor_mass > 0
        and 0 < one.path.working_share(one.path.supply_mass) < 1
    ),
    "preheat in mixed air": lambda one: (
        "preheat_lat_db" in one.unit and "preheat_at" not in one.unit
    ),
    "preheat outdoors": lambda one: one.unit.get("preheat_at") == "outdoor",
    "blow-through": lambda one: one.blows_through,
    "humidifier": lambda one: "room_heat_rh" in one.unit,
    "heating airflow": lambda one: "heat_airflow" in one.unit,
    "by the room's heat": lambda one: "room_heat" in one.unit,
    "actual": lambda one: one.at.basis == "actual",
}
PLACES = {"preheat in mixed air", "preheat outdoors"}


def test_the_draw_holds_every_kind_of_unit(heated):
    assert len({id(one.unit) for one in heated}) >= 200
    together = Counter()
    for one in heated:
        has = [name for name, of in BESIDES.items() if of(one)]
        together.update(frozenset(pair) for pair in product(has, has))
    for pair in product(BESIDES, BESIDES):
        if set(pair) != PLACES:
            assert together[frozenset(pair)] > 0, pair


def test_the_largest_differences_are_told(largest, record_property):
    lines = [f"{'heating path against the real-gas model':42}{'IP':>8}{'SI':>8}{'accepted':>10}"]
    for quantity, limit in LIMITS.items():
        ip, si = largest["IP", quantity], largest["SI", quantity]
        lines.append(f"{quantity:42}{ip:8.4f}{si:8.4f}{limit:10.2f}")
        record_property(quantity, f"IP {ip:.4f}, SI {si:.4f}")
    print("\n" + "\n".join(lines))  # noqa: T201  the figures to quote
    assert {quantity for _, quantity in largest} == set(LIMITS)


@pytest.mark.parametrize("system", SYSTEMS)
@pytest.mark.parametrize("quantity", LIMITS)
def test_within_the_stated_accuracy(largest, system, quantity):
    assert largest[system, quantity] < LIMITS[quantity]


# By hand: 9 000 lb/h of outdoor air at 10 °F, 36 000 of room air at 70 °F, all with 0.001 lb/lb.
# A degree of 45 000 lb/h is 45 000 · (0.240 + 0.444 · 0.001) = 10.82 MBH.

BY_HAND = """
[project]
title = "By hand"
units = "IP"
[[condition]]
name = "winter"
season = "heating"
outdoor_db = 10.0
outdoor_w = 0.001
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 2000
room_heat_db = 70
heat_lat_db = 95
"""


def winter(one_unit, more=""):
    (at,) = one_unit(BY_HAND + more).case.heating
    return at


def test_mixing_heating_and_the_room_by_hand(one_unit):
    at = winter(one_unit)
    assert at.mixed.db == pytest.approx(58.0, abs=1e-9)
    assert at.heat_load == pytest.approx(37 * 10.81998, rel=1e-6)
    assert at.room_heat_met == pytest.approx(25 * 10.81998, rel=1e-6)


def test_outdoor_air_of_a_heating_condition(one_unit):
    text = BY_HAND.replace("outdoor_db = 10.0", "outdoor_db = 5.0").replace(
        "_w = 0.001", "_rh = 80"
    )
    (at,) = one_unit(text).case.heating
    assert at.name == "winter"
    # Saturation over ice at 5 °F: 0.0010207 lb/lb (Fundamentals 2017, ch. 1, table 2).
    assert at.outdoor.w == pytest.approx(0.8 * 0.0010207, rel=7e-3)


def test_recovery_acts_only_where_the_return_air_is_warmer(one_unit):
    at = winter(one_unit, "recovery_sensible = 50\n")
    assert at.recovered.db == pytest.approx(40.0, abs=1e-9)
    warm = BY_HAND.replace("outdoor_db = 10.0", "outdoor_db = 75.0")
    (at,) = one_unit(warm + "recovery_sensible = 50\n").case.heating
    assert at.recovered.db == 75.0


def test_a_heating_coil_never_cools(one_unit):
    at = winter(one_unit, "preheat_lat_db = 40\n")
    assert at.preheat_leaving.db == pytest.approx(58.0, abs=1e-9)
    assert at.preheat_load == 0
    assert at.heat_entering.db == pytest.approx(58.0, abs=1e-9)


def test_no_humidity_of_the_room_no_moisture_to_add(one_unit):
    at = winter(one_unit)
    with pytest.raises(Absent) as absent:
        at.humidifier_load  # noqa: B018  asked for its absence
    assert absent.value.keys == ("room_heat_rh",)


def test_latent_recovery_does_not_change_a_room_that_states_no_humidity(one_unit):
    at = winter(one_unit, "recovery_sensible = 50\nrecovery_latent = 50\n")
    assert at.room.w == at.recovered.w == at.mixed.w == pytest.approx(0.001, abs=1e-12)


@pytest.mark.parametrize(
    ("line", "figure", "key"),
    [
        ("room_heat_db = 70", "mixed", "room_heat_db"),
        ("supply_airflow = 10000", "supply_mass", "supply_airflow"),
        ("heat_lat_db = 95", "heat_load", "heat_lat_db"),
    ],
)
def test_a_gap_names_the_key_that_would_fill_it(one_unit, line, figure, key):
    (at,) = one_unit(BY_HAND.replace(line + "\n", "")).case.heating
    with pytest.raises(Absent) as absent:
        getattr(at, figure)
    assert key in absent.value.keys


@pytest.mark.parametrize("exhaust", [0, 1000])
def test_an_exhaust_of_any_size_is_lawful(one_unit, exhaust):
    """Without exhaust nothing is recovered."""
    at = winter(one_unit, f"recovery_sensible = 50\nexhaust_airflow = {exhaust}\n")
    # ε · m_min/m_o: 50 % of half the outdoor air's warming, or of none.
    assert at.recovered.db == pytest.approx(10 + 60 * 0.5 * exhaust / 2000, abs=1e-9)
