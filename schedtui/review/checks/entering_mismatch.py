"""The scheduled entering air is not the air that enters the coil.

The coil was selected on other air: an entering wet bulb copied from another unit, an outdoor
airflow or a room state changed since, fan heat left out of a blow-through unit.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the scheduled entering bulbs against the computed ones, and tell the worse of them."""
    unit, limits = case.unit, case.site.limits
    unit.refuse_bad(Unit.cool_eat_db, Unit.cool_eat_wb)
    if unit.cool_eat_db is None and unit.cool_eat_wb is None:
        return
    at = case.nearest
    faults: list[tuple[float, Fault]] = []
    for field, what, computed, limit in (
        (Unit.cool_eat_db, "dry", at.coil_entering.db, limits.entering_db),
        (Unit.cool_eat_wb, "wet", at.coil_entering.wb, limits.entering_wb),
    ):
        scheduled = unit.value_of(field)
        if scheduled is None or abs(scheduled - computed) <= limit:
            continue
        fault = Fault(
            "entering {what} bulb {scheduled}; at {condition} air of {required} enters the coil",
            (field.key,),
            scheduled,
            computed,
            TEMPERATURE,
            {"what": what, "condition": at.name},
        )
        faults.append((abs(scheduled - computed), fault))
    if faults:
        yield max(faults, key=lambda pair: pair[0])[1]


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled entering air is the air that enters the cooling coil.",
    source="ASHRAE Handbook—Fundamentals, ch. 1, adiabatic mixing",
    explains=True,
    judges=("cool_eat_db", "cool_eat_wb"),
    unit=find,
)
