"""The headings that fields are known by, read once; and which words may stand around each.

A heading is a field's when the field's own words are all in it and everything else in it is
explained: by the coil or fan that it belongs to, by its unit, or as a word that says nothing.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache
from typing import TYPE_CHECKING

from schedtui.schedule.catalogue.field import Group
from schedtui.schedule.catalogue.unit import Unit
from schedtui.sheets.heading import Reading, part_reading
from schedtui.sheets.words import NEUTRAL, known_words
from schedtui.units import (
    ELECTRIC_POWER,
    SHAFT_POWER,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    System,
)
from schedtui.units.word import find_unit

if TYPE_CHECKING:
    from schedtui.schedule.catalogue.field import Field

_TEMPERATURES = (TEMPERATURE, TEMPERATURE_DIFFERENCE)

_COIL = "coil section"
_OF_FLUID = ("_ewt", "_lwt", "_flow", "_fluid_drop", "_fluid", "_glycol")
_OWN = 100  # what a word of the field's own counts against one that is its coil's or fan's
# What may stand around the fields whose keys begin so; what must (the words after the colon).
_AROUND: tuple[tuple[str, str, str], ...] = (
    ("precool_", f"cooling chw first {_COIL}", "precool"),
    ("preheat_", f"hw heating steam electric gas {_COIL}", "preheat"),
    ("reheat_", f"hw heating steam electric gas {_COIL}", "reheat"),
    ("cool_", f"cooling chw dx summer {_COIL}", ""),
    ("bypass", f"cooling {_COIL}", ""),
    ("capacity_control", f"cooling {_COIL}", ""),
    ("heat_airflow", "fan supply airflow hw coil", ""),
    ("heat_", f"heating hw steam electric gas heater furnace burner winter {_COIL}", ""),
    ("return_fan_", "motor static electrical fans", "return fan"),
    ("filter_drop", "fan bank", ""),
    ("fan_", "fan fans supply motor", ""),
    ("motor_", "fan fans supply motor electrical", ""),
    ("recovery_", "exchanger plate outdoor exhaust coil temp", ""),
    ("room_", "room temp dbt", ""),
    ("return_", "temp", ""),
    ("supply_airflow", "supply fan fans airflow total ventilation", ""),
    ("outdoor_", "supply fan airflow ventilation", ""),
    ("return_airflow", "airflow", ""),
    ("exhaust_airflow", "airflow recovery", ""),
    ("humidifier", "steam capacity", ""),
    ("wrap_drop", "coil", ""),
    ("tag", "identification equipment", ""),
    ("remarks", "no", ""),
)

# Families whose headings name them, so that a group carried over by mistake does not matter.
_OF_THEMSELVES = (Group.UNIT, Group.REMARKS, Group.AIR)


@dataclass(frozen=True, slots=True)
class Known:
    """A field and what a sheet may call it."""

    field: Field[object]
    patterns: tuple[tuple[frozenset[str], frozenset[str]], ...]
    around: frozenset[str]
    must: frozenset[str]

    @property
    def of_itself(self) -> bool:
        """Whether its headings name it without their group."""
        return self.field.group in _OF_THEMSELVES

    def fits(self, reading: Reading, system: System = "IP") -> int:
        """Return how much of a heading the field's own words are; 0 where it is not its heading.

        Args:
            reading: the heading.
            system: the unit system of the sheet, by which a bare kW is a load or electric power.
        """
        if not self.must <= reading.words or not all(map(self.accepts, reading.units)):
            return 0
        extra = NEUTRAL | self.around | self.must
        if self.field.quantity in _TEMPERATURES:
            extra |= {"temp"}
        units = frozenset(reading.units)
        return max(
            (
                _OWN * max(1, len(words - self.around) + len(wanted)) + len(words)
                for words, wanted in self.patterns
                if words <= reading.words
                and wanted <= units
                and reading.words <= words | extra
                and (words or self._may_be_bare(wanted, system))
            ),
            default=0,
        )

    def _may_be_bare(self, wanted: frozenset[str], system: System) -> bool:
        """Tell whether a unit alone says that it is this field: in IP a kW is electric power."""
        if wanted != {"kW"} or self.field.group is Group.COOLING:
            return True
        return (self.field.quantity is ELECTRIC_POWER) == (system == "IP")

    def accepts(self, unit: str) -> bool:
        """Tell whether a unit is one of the field's."""
        quantity = self.field.quantity
        if quantity is None:
            return False
        if unit == "bhp":
            return quantity is SHAFT_POWER
        if unit == "°":
            return quantity in _TEMPERATURES
        return find_unit(unit, quantity) is not None


@cache
def known_fields() -> tuple[Known, ...]:
    """Return every unit field with the headings it is known by."""
    return tuple(_known(field) for field in Unit.catalogue.values())


def _known(field: Field[object]) -> Known:
    around, must = next(
        ((a, m) for prefix, a, m in _AROUND if field.key.startswith(prefix)), ("", "")
    )
    if field.key.endswith(_OF_FLUID):
        around += " water fluid"
    readings = [part_reading(heading) for heading in field.headings]
    return Known(
        field,
        tuple((one.words, frozenset(one.units)) for one in readings if one.words or one.units),
        frozenset(around.split()),
        frozenset(must.split()),
    )


@cache
def vocabulary() -> frozenset[str]:
    """Return every word that means something in a heading."""
    own = {word for known in known_fields() for words, _ in known.patterns for word in words}
    context = {word for _, around, must in _AROUND for word in (*around.split(), *must.split())}
    return frozenset(own | context) | known_words()


def system_of(unit: str) -> System | None:
    """Return the unit system that a unit belongs to, None where it is of both.

    >>> system_of("cfm"), system_of("kW"), system_of("%")
    ('IP', 'SI', None)
    """
    if unit in _IP:
        return "IP"
    return "SI" if unit in _SI else None


_IP = frozenset(
    ("°F", "cfm", "gpm", "MBH", "Btu/h", "in. wg", "ft wg", "bhp", "hp", "lb/h", "fpm", "ft²",
     "psig", "psi", "gr/lb")
)  # fmt: skip
_SI = frozenset(
    ("°C", "K", "L/s", "L/min", "m³/s", "m³/h", "kW", "W", "Pa", "kPa", "kPa gauge", "kg/h",
     "kg/s", "m/s", "m²", "mm wg", "m wg", "bar")
)  # fmt: skip
