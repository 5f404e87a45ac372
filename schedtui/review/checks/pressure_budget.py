"""External pressure and the parts' drops do not make up the fan's total pressure.

Above the total, the fan does not deliver its airflow; far below it, drops are missing from the
sheet or the fan is oversized.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIR_PRESSURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_DROPS = (Unit.filter_drop, Unit.cool_air_drop, Unit.heat_air_drop, Unit.recovery_drop)
_ENOUGH = 2  # so many drops must be stated before what is left over says anything
_LEFT_OVER = 1.3  # of what is stated


def find(case: UnitCase) -> Faults:
    """Hold the stated pressures together against the total."""
    unit = case.unit
    if not unit.stated("fan_external_pressure", "fan_total_pressure"):
        return
    total, external = unit.need(Unit.fan_total_pressure), unit.need(Unit.fan_external_pressure)
    unit.refuse_bad(*_DROPS)
    drops = [drop for field in _DROPS if (drop := unit.value_of(field)) is not None]
    together = external + sum(drops)
    keys = ("fan_total_pressure", "fan_external_pressure", *(
        field.key for field in _DROPS if unit.stated(field.key)
    ))  # fmt: skip
    if drops and external <= total < together:
        yield Fault(
            "total pressure {scheduled}, external and the drops stated are {required}",
            keys,
            total,
            together,
            AIR_PRESSURE,
        )
    elif unit.stated("filter_drop") and len(drops) >= _ENOUGH and total > together * _LEFT_OVER:
        yield Fault(
            "total pressure {scheduled}, external and the drops stated are only {required}",
            keys,
            total,
            together,
            AIR_PRESSURE,
            severity=Severity.CAUTION,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="External pressure and the drops stated are within the fan's total pressure.",
    source="common practice",
    judges=("fan_total_pressure",),
    unit=find,
)
