"""Water temperatures that the heat cannot flow by.

Cooling water that leaves colder than it enters, or heating water that leaves hotter; air that
leaves colder than the cooling water enters, or hotter than the heating water does; cooling water
that leaves above the entering air, or heating water below it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT, FluidSide
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

Number = Field[float | None]

_AIR: tuple[tuple[FluidSide, Number, Number], ...] = (
    (COOLING, Unit.cool_eat_db, Unit.cool_lat_db),
    (HEATING, Unit.heat_eat_db, Unit.heat_lat_db),
    (PREHEAT, Unit.preheat_eat_db, Unit.preheat_lat_db),
)


def find(case: UnitCase) -> Faults:
    """Hold the water of each coil against itself and against the air."""
    for side, eat, lat in _AIR:
        if not side.runs(case.unit):
            continue
        cools = side is COOLING
        yield from _held(case.unit, side.leaving, side.entering, above=not cools)
        yield from _held(case.unit, lat, side.entering, above=not cools)
        yield from _held(case.unit, side.leaving, eat, above=cools)


def _held(unit: Unit, field: Number, other: Number, *, above: bool) -> Faults:
    """Return a fault where a temperature is above another, or below it."""
    value, bound = unit.value_of(field), unit.value_of(other)
    if value is None or bound is None or value == bound:
        return
    if (value > bound) == above:
        yield Fault(
            "{what} {scheduled} is {side} {other} {required}",
            (field.key, other.key),
            value,
            bound,
            TEMPERATURE,
            {
                "what": field.label.lower(),
                "side": "above" if above else "below",
                "other": other.label.lower(),
            },
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Water and air of every coil have temperatures that the heat can flow by.",
    source="second law of thermodynamics, counterflow coils",
    rank=CONTRADICTION,
    unit=find,
)
