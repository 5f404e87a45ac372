"""The scheduled entering air is not the air that enters the coil.

The coil was selected on other air: an entering wet bulb copied from another unit, an outdoor
airflow or a room state changed since, fan heat left out of a blow-through unit.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import OTHER_AIR, Check, Faults
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE, TEMPERATURE_DIFFERENCE

Number = Field[float | None]

_COILS = {
    "cool_eat_db": "coil",
    "cool_eat_wb": "coil",
    "heat_eat_db": "heating coil",
    "preheat_eat_db": "preheat",
}

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.review.case import UnitCase
    from schedtui.review.heating import Heating


def find(case: UnitCase) -> Faults:
    """Hold the scheduled entering air of each coil against the computed one."""
    yield from _cooling(case)
    yield from _heating(case, Unit.heat_eat_db, lambda: case.heat_nearest, _heat_entering)
    yield from _heating(case, Unit.preheat_eat_db, lambda: case.preheat_nearest, _preheat_entering)


def _cooling(case: UnitCase) -> Faults:
    """Hold both bulbs of the cooling coil, and tell the worse of them."""
    unit, limits = case.unit, case.site.limits
    unit.refuse_bad(Unit.cool_eat_db, Unit.cool_eat_wb)
    if unit.cool_eat_db is None and unit.cool_eat_wb is None:
        return
    at = case.nearest
    rise = at.fan_rise if at.blows_through else 0.0
    faults = [
        fault
        for field, what, computed, limit in (
            (Unit.cool_eat_db, "dry", at.coil_entering.db, limits.entering_db),
            (Unit.cool_eat_wb, "wet", at.coil_entering.wb, limits.entering_wb),
        )
        if (fault := _bulb(case, field, what, computed, limit, at.name, rise)) is not None
    ]
    if faults:
        yield max(faults, key=_off)


def _heating(
    case: UnitCase,
    field: Number,
    nearest: Callable[[], Heating],
    entering: Callable[[Heating], float],
) -> Faults:
    """Hold the dry bulb that enters a heating coil."""
    case.unit.refuse_bad(field)
    if case.unit.value_of(field) is None:
        return
    at = nearest()
    fault = _bulb(case, field, "dry", entering(at), case.site.limits.entering_db, at.name)
    if fault is not None:
        yield fault


def _bulb(
    case: UnitCase,
    field: Number,
    what: str,
    computed: float,
    limit: float,
    condition: str,
    rise: float = 0.0,
) -> Fault | None:
    scheduled = case.unit.value_of(field)
    if scheduled is None or abs(scheduled - computed) <= limit:
        return None
    says = "entering {what} bulb {scheduled}; at {condition} air of {required} enters the {coil}"
    if rise and abs(scheduled + rise - computed) <= limit:
        says += ", the blow-through fan's rise of {rise} included"
    return Fault(
        says,
        (field.key,),
        scheduled,
        computed,
        TEMPERATURE,
        {
            "what": what,
            "condition": condition,
            "coil": _COILS[field.key],
            "rise": Measure(rise, TEMPERATURE_DIFFERENCE),
        },
    )


def _off(fault: Fault) -> float:
    assert fault.scheduled is not None  # noqa: S101  every fault here has both numbers
    assert fault.required is not None  # noqa: S101
    return abs(fault.scheduled - fault.required)


def _heat_entering(at: Heating) -> float:
    return at.heat_entering.db


def _preheat_entering(at: Heating) -> float:
    return at.preheat_entering.db


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled entering air is the air that enters the coil.",
    source="ASHRAE Handbook—Fundamentals, ch. 1, adiabatic mixing",
    rank=OTHER_AIR,
    judges=("cool_eat_db", "cool_eat_wb", "heat_eat_db", "preheat_eat_db"),
    unit=find,
)
