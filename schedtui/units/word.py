"""The unit words that may be typed, and what each is worth in another unit.

A word is looked up in the lists below, a list a quantity. pint stands behind the conversion,
is loaded with the first one, and is given our own definitions only: its parser evaluates
expressions, and takes "20 cfm" for femtometres and "C" for coulombs.
"""

from __future__ import annotations

import re
import unicodedata
from dataclasses import dataclass
from functools import cache
from typing import TYPE_CHECKING, Any

from schedtui.units.quantity import (
    AIR_MASS_FLOW,
    AIR_PRESSURE,
    AIRFLOW,
    AIRFLOW_PER_LOAD,
    ALTITUDE,
    AREA,
    COUNT,
    ELECTRIC_POWER,
    ENTHALPY,
    FIN_DENSITY,
    HUMIDITY_RATIO,
    LOAD,
    MOISTURE_FLOW,
    MOTOR_POWER,
    PERCENT,
    RATIO,
    REFRIGERATION,
    SHAFT_POWER,
    SPECIFIC_VOLUME,
    STATION_PRESSURE,
    STEAM_PRESSURE,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    VELOCITY,
    WATER_DROP,
    WATER_FLOW,
    Quantity,
    System,
)

if TYPE_CHECKING:
    from collections.abc import Mapping

    from pint import UnitRegistry

# What pint is told: each unit from exact definitions (the international foot and pound, the
# gallon of 231 cubic inches, standard gravity, the International Table Btu by 2 326 J/kg a
# Btu/lb) and the conventional columns of water and mercury (NIST SP 811, appendix B).
_DEFINITIONS = """
metre = [length]
second = [time]
kilogram = [mass]
kelvin = [temperature]; offset: 0
celsius = kelvin; offset: 273.15
fahrenheit = 5 / 9 * kelvin; offset: 459.67 * 5 / 9
fahrenheit_degree = 5 / 9 * kelvin
minute = 60 * second
hour = 3600 * second
foot = 0.3048 * metre
inch = 0.0254 * metre
millimetre = 0.001 * metre
litre = 0.001 * metre ** 3
gallon = 231 * inch ** 3
gram = 0.001 * kilogram
pound = 0.45359237 * kilogram
grain = pound / 7000
gravity = 9.80665 * metre / second ** 2
joule = kilogram * metre ** 2 / second ** 2
kilojoule = 1000 * joule
btu = 2326 * joule / kilogram * pound
kilobtu = 1000 * btu
watt = joule / second
kilowatt = 1000 * watt
horsepower = 550 * foot * pound * gravity / second
refrigeration_ton = 12000 * btu / hour
pascal = kilogram / metre / second ** 2
hectopascal = 100 * pascal
kilopascal = 1000 * pascal
bar = 100 * kilopascal
psi = pound * gravity / inch ** 2
water = 1000 * kilogram / metre ** 3 * gravity
mercury = 13595.1 * kilogram / metre ** 3 * gravity
percent = []
"""


@dataclass(frozen=True, slots=True)
class Unit:
    """A unit that may be typed.

    Args:
        label: how messages write it, and a word for it by itself.
        definition: the unit in the names that pint was given.
        words: other words for it, as `_squash` leaves them.
    """

    label: str
    definition: str
    words: tuple[str, ...] = ()


_FAHRENHEIT = Unit("°F", "fahrenheit", ("fahrenheit",))
_CELSIUS = Unit("°C", "celsius", ("celsius",))
_KELVIN = Unit("K", "kelvin")
_CFM = Unit("cfm", "foot ** 3 / minute", ("ft3/min", "cuft/min", "ft3/m"))
_LITRE_SECOND = Unit("L/s", "litre / second", ("lps",))
_LITRE_MINUTE = Unit("L/min", "litre / minute", ("lpm",))
_CUBIC_SECOND = Unit("m³/s", "metre ** 3 / second", ("cms",))
_CUBIC_HOUR = Unit("m³/h", "metre ** 3 / hour", ("cmh",))
_GPM = Unit("gpm", "gallon / minute", ("usgpm", "gal/min"))
_POUND_HOUR = Unit("lb/h", "pound / hour", ("lbs/h", "lbm/h", "pph"))
_KILOGRAM_HOUR = Unit("kg/h", "kilogram / hour")
_KILOGRAM_SECOND = Unit("kg/s", "kilogram / second")
_MBH = Unit("MBH", "kilobtu / hour", ("kbtu/h", "kbtuh"))
_BTU_HOUR = Unit("Btu/h", "btu / hour", ("btuh",))
_TONS = Unit("tons", "refrigeration_ton", ("ton", "tr", "tonsr", "tonr"))
_KILOWATT = Unit("kW", "kilowatt")
_WATT = Unit("W", "watt")
_HORSEPOWER = Unit("hp", "horsepower", ("bhp", "shp"))
_SQUARE_FOOT = Unit("ft²", "foot ** 2", ("sqft", "sf"))
_SQUARE_INCH = Unit("in²", "inch ** 2", ("sqin",))
_SQUARE_METRE = Unit("m²", "metre ** 2", ("sqm",))
_INCH_WATER = Unit("in. wg", "inch * water", ('"wg', "inchwg", "incheswg"))
_FOOT_WATER = Unit("ft wg", "foot * water", ("ft", "fthd", "fthead"))
_MILLIMETRE_WATER = Unit("mm wg", "millimetre * water")
_METRE_WATER = Unit("m wg", "metre * water", ("mhd", "mhead"))
_PASCAL = Unit("Pa", "pascal")
_KILOPASCAL = Unit("kPa", "kilopascal", ("kpaa", "kpaabs"))
_HECTOPASCAL = Unit("hPa", "hectopascal", ("mbar",))
_BAR = Unit("bar", "bar", ("bara",))
_PSI = Unit("psi", "psi")
_PSIA = Unit("psia", "psi", ("psi",))
_INCH_MERCURY = Unit("in. Hg", "inch * mercury", ('"hg',))
# Gauge pressure stays gauge: these convert among themselves and to no absolute one.
_PSIG = Unit("psig", "psi", ("psi",))
_KILOPASCAL_GAUGE = Unit("kPa gauge", "kilopascal", ("kpag", "kpa"))
_BAR_GAUGE = Unit("bar gauge", "bar", ("barg", "bar"))
_FOOT = Unit("ft", "foot", ("feet", "foot", "'"))
_METRE = Unit("m", "metre", ("metres", "meters"))
_FPM = Unit("fpm", "foot / minute", ("ft/min",))
_METRE_SECOND = Unit("m/s", "metre / second", ("mps",))
_PERCENT = Unit("%", "percent", ("percent", "pct"))
_HEAT = (_MBH, _KILOWATT, _BTU_HOUR, _WATT, _TONS)
_SHAFT = (_HORSEPOWER, _KILOWATT, _WATT)

_ACCEPTED: Mapping[Quantity, tuple[Unit, ...]] = {
    TEMPERATURE: (_FAHRENHEIT, _CELSIUS, _KELVIN),
    TEMPERATURE_DIFFERENCE: (
        Unit("°F", "fahrenheit_degree", ("fahrenheit",)),
        _KELVIN,
        Unit("°C", "kelvin", ("celsius",)),
    ),
    AIRFLOW: (_CFM, _LITRE_SECOND, _CUBIC_SECOND, _CUBIC_HOUR),
    AIR_MASS_FLOW: (_POUND_HOUR, _KILOGRAM_SECOND, _KILOGRAM_HOUR),
    PERCENT: (_PERCENT,),
    LOAD: _HEAT,
    REFRIGERATION: (_TONS, _KILOWATT, _MBH, _BTU_HOUR),
    SHAFT_POWER: _SHAFT,
    MOTOR_POWER: _SHAFT,
    ELECTRIC_POWER: (_KILOWATT, _WATT, _HORSEPOWER, _MBH, _BTU_HOUR),
    AREA: (_SQUARE_FOOT, _SQUARE_METRE, _SQUARE_INCH),
    AIR_PRESSURE: (_INCH_WATER, _PASCAL, _KILOPASCAL, _MILLIMETRE_WATER),
    STATION_PRESSURE: (_PSIA, _KILOPASCAL, _PASCAL, _HECTOPASCAL, _INCH_MERCURY, _BAR),
    ALTITUDE: (_FOOT, _METRE),
    WATER_FLOW: (_GPM, _LITRE_SECOND, _LITRE_MINUTE, _CUBIC_HOUR),
    WATER_DROP: (_FOOT_WATER, _KILOPASCAL, _PASCAL, _PSI, _METRE_WATER, _BAR),
    MOISTURE_FLOW: (_POUND_HOUR, _KILOGRAM_HOUR, _KILOGRAM_SECOND),
    STEAM_PRESSURE: (_PSIG, _KILOPASCAL_GAUGE, _BAR_GAUGE),
    VELOCITY: (_FPM, _METRE_SECOND),
    HUMIDITY_RATIO: (
        Unit("lb/lb", "pound / pound"),
        Unit("kg/kg", "kilogram / kilogram"),
        Unit("gr/lb", "grain / pound", ("grains/lb",)),
        Unit("g/kg", "gram / kilogram"),
    ),
    ENTHALPY: (Unit("Btu/lb", "btu / pound"), Unit("kJ/kg", "kilojoule / kilogram")),
    SPECIFIC_VOLUME: (
        Unit("ft³/lb", "foot ** 3 / pound"),
        Unit("m³/kg", "metre ** 3 / kilogram"),
    ),
    AIRFLOW_PER_LOAD: (
        Unit("cfm/ton", "foot ** 3 / minute / refrigeration_ton"),
        Unit("L/s per kW", "litre / second / kilowatt"),
    ),
    FIN_DENSITY: (
        Unit("per inch", "inch ** -1", ("fpi", "/in", "/inch")),
        Unit("per 25.4 mm", "inch ** -1"),
    ),
    COUNT: (),
    RATIO: (),
}


def accepted_units(quantity: Quantity) -> tuple[str, ...]:
    """Return the labels of the units that a number of this quantity may be typed with."""
    return tuple(unit.label for unit in _ACCEPTED[quantity])


def own_unit(quantity: Quantity, system: System) -> Unit | None:
    """Return the unit that a quantity is stored in; None for a pure number."""
    return find_unit(quantity.unit(system), quantity)


def find_unit(word: str, quantity: Quantity) -> Unit | None:
    """Return the unit that a word means for a quantity; None when it is none of its units.

    >>> find_unit("IN. W.C.", AIR_PRESSURE).label, find_unit("in. wg", AIRFLOW)
    ('in. wg', None)
    """
    return _words(quantity).get(_squash(word))


def convert(value: float, source: Unit, target: Unit) -> float:
    """Return `value` [source] as a number [target]; both are units of one quantity."""
    quantity = _registry().Quantity(value, source.definition)
    return float(quantity.to(target.definition).magnitude)


@cache
def _words(quantity: Quantity) -> Mapping[str, Unit]:
    """Return the unit that each squashed word means for a quantity."""
    return {
        word: unit for unit in _ACCEPTED[quantity] for word in (_squash(unit.label), *unit.words)
    }


def _squash(word: str) -> str:
    """Return a unit word without what people write in different ways.

    No quantity has two units that differ by capitals alone, so capitals say nothing.
    """
    squashed = unicodedata.normalize("NFKC", word).casefold()
    squashed = re.sub(r"[\s.°^()]|deg(?:rees?)?(?=\s*[fck])", "", squashed)
    squashed = re.sub(r"(?<=/)(?:hr|hour)$", "h", squashed)
    squashed = re.sub(r"(?<=/)sec$", "s", squashed)
    return re.sub(r"(?<=.)(?:wc|h2o|aq)$", "wg", squashed)


@cache
def _registry() -> UnitRegistry[Any]:
    """Return pint's registry, holding our definitions and nothing else."""
    import pint  # noqa: PLC0415 - a quarter of a second that most runs never need

    registry: UnitRegistry[Any] = pint.UnitRegistry(None)
    for line in _DEFINITIONS.strip().splitlines():
        registry.define(line)
    return registry
