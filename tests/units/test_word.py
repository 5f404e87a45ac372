"""Units and what they are worth, against the published factors.

NIST SP 811 (2008), appendix B.8, from memory; each to the seven figures printed there.
"""

from __future__ import annotations

import pytest

from schedtui import units
from schedtui.units import Quantity, System
from schedtui.units.word import Unit, accepted_units, convert, find_unit, own_unit

QUANTITIES = [value for value in vars(units).values() if isinstance(value, Quantity)]
SYSTEMS: tuple[System, ...] = ("IP", "SI")


def unit(word: str, quantity: Quantity) -> Unit:
    found = find_unit(word, quantity)
    assert found is not None
    return found


@pytest.mark.parametrize(
    ("quantity", "source", "factor", "target"),
    [
        (units.LOAD, "Btu/h", 2.930711e-01, "W"),
        (units.LOAD, "MBH", 2.930711e-01, "kW"),
        (units.LOAD, "tons", 3.516853e03, "W"),  # ton of refrigeration, 12 000 Btu(IT)/h
        (units.LOAD, "tons", 12.0, "MBH"),  # by definition
        (units.SHAFT_POWER, "bhp", 7.456999e02, "W"),  # 550 ft·lbf/s
        (units.AIRFLOW, "cfm", 4.719474e-04, "m³/s"),
        (units.AIRFLOW, "cfm", 4.719474e-01, "L/s"),
        (units.AIRFLOW, "m³/h", 1 / 3600, "m³/s"),
        (units.WATER_FLOW, "gpm", 6.309020e-02, "L/s"),
        (units.AIR_PRESSURE, "in. wg", 2.490889e02, "Pa"),  # inch of water, conventional
        (units.WATER_DROP, "ft wg", 2.989067, "kPa"),  # foot of water, conventional
        (units.WATER_DROP, "psi", 6.894757e03, "Pa"),
        (units.STATION_PRESSURE, "psia", 6.894757, "kPa"),
        (units.STATION_PRESSURE, "in. Hg", 3.386389, "kPa"),  # inch of mercury, conventional
        (units.STEAM_PRESSURE, "psig", 6.894757, "kPa gauge"),
        (units.ALTITUDE, "ft", 3.048e-01, "m"),
        (units.VELOCITY, "fpm", 5.08e-03, "m/s"),
        (units.AREA, "ft²", 9.290304e-02, "m²"),
        (units.AREA, "in²", 6.4516e-04, "m²"),
        (units.MOISTURE_FLOW, "lb/h", 1.259979e-04, "kg/s"),
        (units.AIR_MASS_FLOW, "lb/h", 1.259979e-04, "kg/s"),
        (units.ENTHALPY, "Btu/lb", 2.326, "kJ/kg"),  # exact
        (units.SPECIFIC_VOLUME, "ft³/lb", 6.242796e-02, "m³/kg"),
        (units.TEMPERATURE_DIFFERENCE, "°F", 5 / 9, "K"),
        (units.HUMIDITY_RATIO, "gr/lb", 1 / 7000, "lb/lb"),  # 7 000 grains make a pound
    ],
)
def test_published_factors(quantity, source, factor, target):
    one = convert(1.0, unit(source, quantity), unit(target, quantity))
    assert one == pytest.approx(factor, rel=3e-7)


@pytest.mark.parametrize(
    ("fahrenheit", "celsius"),
    [(32, 0), (212, 100), (-40, -40), (80, 26.666667), (-459.67, -273.15)],
)
def test_temperatures_have_an_offset_and_their_differences_none(fahrenheit, celsius):
    to = convert(fahrenheit, unit("°F", units.TEMPERATURE), unit("°C", units.TEMPERATURE))
    assert to == pytest.approx(celsius, abs=1e-6)
    rise = units.TEMPERATURE_DIFFERENCE
    assert convert(18, unit("°F", rise), unit("K", rise)) == pytest.approx(10)
    assert convert(10, unit("°C", rise), unit("K", rise)) == 10


@pytest.mark.parametrize("system", SYSTEMS)
@pytest.mark.parametrize("quantity", QUANTITIES, ids=lambda quantity: quantity.name)
def test_every_quantity_knows_its_own_unit(quantity, system):
    own = own_unit(quantity, system)
    if not quantity.unit(system):
        assert own is None
        assert accepted_units(quantity) == ()
    else:
        assert own is not None
        assert own.label in accepted_units(quantity)


@pytest.mark.parametrize("quantity", QUANTITIES, ids=lambda quantity: quantity.name)
def test_every_unit_of_a_quantity_converts_to_every_other_and_back(quantity):
    labels = accepted_units(quantity)
    for source in labels:
        for target in labels:
            there = convert(7.25, unit(source, quantity), unit(target, quantity))
            back = convert(there, unit(target, quantity), unit(source, quantity))
            assert back == pytest.approx(7.25, rel=1e-12, abs=1e-12), (source, target)


@pytest.mark.parametrize(
    ("quantity", "label", "words"),
    [
        (units.TEMPERATURE, "°F", ["F", "f", "degF", "deg F", "degrees F", "° F", "℉"]),
        (units.TEMPERATURE, "°C", ["C", "c", "degC", "℃", "celsius"]),
        (units.AIRFLOW, "cfm", ["CFM", "ft³/min", "ft3/min", "ft^3/min", "cu. ft/min"]),
        (units.AIRFLOW, "L/s", ["l/s", "L/S", "L/sec", "l / s"]),
        (units.AIRFLOW, "m³/h", ["m3/h", "m3/hr", "M3/H", "m^3/hour"]),
        (
            units.AIR_PRESSURE,
            "in. wg",
            ["inwg", "in wg", "in.w.g.", '"wg', "in. wc", "inH2O", "in. H₂O"],
        ),
        (units.WATER_DROP, "ft wg", ["ft", "ft w.c.", "ft hd", "FT H2O"]),
        (units.LOAD, "MBH", ["mbh", "kBtu/h", "kBtu/hr", "KBTUH"]),
        (units.LOAD, "Btu/h", ["btu/hr", "BTUH"]),
        (units.LOAD, "kW", ["kw", "KW"]),
        (units.LOAD, "tons", ["ton", "TR"]),
        (units.SHAFT_POWER, "hp", ["bhp", "BHP", "HP"]),
        (units.AREA, "ft²", ["ft2", "sq ft", "sq. ft.", "SF", "ft^2"]),
        (units.AREA, "m²", ["m2", "sq m"]),
        (units.STEAM_PRESSURE, "kPa gauge", ["kPa", "kPag", "kPa(g)", "KPA GAUGE"]),
        (units.STEAM_PRESSURE, "psig", ["psi", "PSIG", "psi(g)"]),
        (units.MOISTURE_FLOW, "lb/h", ["lb/hr", "lbs/hr", "pph"]),
        (units.PERCENT, "%", ["percent", "pct"]),
    ],
)
def test_words_for_a_unit(quantity, label, words):
    assert {word: unit(word, quantity).label for word in words} == dict.fromkeys(words, label)


@pytest.mark.parametrize(
    ("quantity", "word"),
    [
        (units.AIRFLOW, "kW"),
        (units.AIRFLOW, "scfm"),  # says an airflow basis too, which is a field of its own
        (units.TEMPERATURE, "cfm"),
        (units.STEAM_PRESSURE, "psia"),
        (units.STATION_PRESSURE, "psig"),
        (units.LOAD, "Mbtu/h"),  # a thousand to some, a million to others
        (units.LOAD, "MW"),
        (units.COUNT, "cfm"),
        (units.AREA, "ft"),
    ],
)
def test_units_of_other_quantities_and_ambiguous_ones_are_none(quantity, word):
    assert find_unit(word, quantity) is None


@pytest.mark.parametrize("quantity", QUANTITIES, ids=lambda quantity: quantity.name)
def test_no_word_means_two_units(quantity):
    worth = {}
    for label in accepted_units(quantity):
        one = unit(label, quantity)
        assert one.label == label
        for word in one.words:
            assert unit(word, quantity) is one
            assert worth.setdefault(word, label) == label
