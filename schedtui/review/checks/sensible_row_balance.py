"""The scheduled sensible capacity lies below what the row's own air gives.

As for the total: entering and leaving dry bulb and the airflow settle it. A sensible above is
margin, and no fault of balance.
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
    """Hold the scheduled sensible against the row's own entering and leaving air."""
    scheduled, own = case.unit.need(Unit.cool_sensible), case.row.required_sensible
    if scheduled < own * (1 - case.site.limits.row_balance / 100):
        yield Fault(
            "scheduled sensible {scheduled}, the row's own air and airflow give {required}",
            ("cool_sensible", "cool_eat_db", "cool_lat_db"),
            scheduled,
            own,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled sensible is not below what the row's own air and airflow give.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("cool_sensible",),
    unit=find,
)
