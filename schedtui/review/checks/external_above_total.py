"""The external pressure is above the fan's total pressure.

What is left for the unit's own coils and filters would be less than nothing; the columns are
swapped, or one is of another unit.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIR_PRESSURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the external against the total pressure."""
    unit = case.unit
    if not unit.stated("fan_external_pressure", "fan_total_pressure"):
        return
    external, total = unit.need(Unit.fan_external_pressure), unit.need(Unit.fan_total_pressure)
    if external > total:
        yield Fault(
            "external pressure {scheduled} is above the total pressure {required}",
            ("fan_external_pressure", "fan_total_pressure"),
            external,
            total,
            AIR_PRESSURE,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The external pressure is not above the fan's total pressure.",
    source="by definition: the external is a part of the total",
    rank=CONTRADICTION,
    judges=("fan_external_pressure",),
    unit=find,
)
