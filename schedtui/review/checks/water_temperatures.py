"""Water temperatures that the heat cannot flow by.

Cooling water that leaves colder than it enters, or heating water that leaves hotter; air that
leaves colder than the cooling water enters, or hotter than the heating water does; cooling water
that leaves above the entering air, or heating water below it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT, FluidSide
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.review.case import UnitCase

Number = Field[float | None]

# Each coil with its entering and leaving air, and the air that is computed to enter it.
_AIR: tuple[tuple[FluidSide, Number, Number, Callable[[UnitCase], float]], ...] = (
    (COOLING, Unit.cool_eat_db, Unit.cool_lat_db, lambda case: case.rated.coil_entering.db),
    (HEATING, Unit.heat_eat_db, Unit.heat_lat_db, lambda case: case.heat_nearest.heat_entering.db),
    (PREHEAT, Unit.preheat_eat_db, Unit.preheat_lat_db,
     lambda case: case.preheat_nearest.preheat_entering.db),
)  # fmt: skip


def find(case: UnitCase) -> Faults:
    """Hold the water of each coil against itself and against the air."""
    for side, eat, lat, entering in _AIR:
        if not side.runs(case.unit):
            continue
        cools = side is COOLING
        if case.unit.value_of(eat) is None:
            yield from _against_computed(case, side, known(entering, case))
        yield from _held(case.unit, side.leaving, side.entering, above=not cools)
        yield from _held(case.unit, lat, side.entering, above=not cools)
        yield from _held(case.unit, side.leaving, eat, above=cools)


def _against_computed(case: UnitCase, side: FluidSide, entering: float | None) -> Faults:
    """Hold the leaving water against the computed entering air, where none is scheduled."""
    value, cools = case.unit.value_of(side.leaving), side is COOLING
    if value is None or entering is None or value == entering:
        return
    if (value > entering) == cools:
        yield Fault(
            "{what} {scheduled} is {side} the {required} of the air that enters",
            (side.leaving.key,),
            value,
            entering,
            TEMPERATURE,
            {"what": side.leaving.label.lower(), "side": "above" if cools else "below"},
        )


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
