"""The scheduled cooling total lies below what the row's own air gives.

Entering air, leaving air and airflow of a row settle its load. A total well below it was not
selected for that air, or one of the numbers is from another unit. A total above it is margin, and
no fault of balance.
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
    """Hold the scheduled total against the row's own entering and leaving air."""
    scheduled, own = case.unit.need(Unit.cool_total), case.row.required_total
    if scheduled < own * (1 - case.site.limits.row_balance / 100):
        yield Fault(
            "scheduled total {scheduled}, the row's own air and airflow give {required}",
            ("cool_total", "cool_eat_db", "cool_eat_wb", "cool_lat_db", "cool_lat_wb"),
            scheduled,
            own,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled total is not below what the row's own air and airflow give.",
    source="ASHRAE Handbook—Fundamentals, ch. 1",
    judges=("cool_total",),
    unit=find,
)
