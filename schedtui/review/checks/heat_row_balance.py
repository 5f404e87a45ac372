"""The scheduled heating lies below what the row's own air gives.

Entering and leaving dry bulb and the airflow of a row settle its load. A load above it is margin;
far above, it was perhaps selected for other air.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the scheduled heating against the row's own entering and leaving air."""
    if not case.unit.stated("heat_total", "heat_eat_db", "heat_lat_db"):
        return
    scheduled, own = case.unit.need(Unit.heat_total), case.row_heat.heat_load
    if scheduled < own * (1 - case.site.limits.row_balance / 100):
        yield Fault(
            "scheduled heating {scheduled}, the row's own air and airflow give {required}",
            ("heat_total", "heat_eat_db", "heat_lat_db"),
            scheduled,
            own,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled heating is not below what the row's own air and airflow give.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("heat_total",),
    unit=find,
)
