"""The schedule has no unit, or no condition to compute its units at.

Lawful, for a schedule begins so; but a clean report of nothing must not be taken for a checked
schedule.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.case import ScheduleCase


def find(case: ScheduleCase) -> Faults:
    """Look for units and conditions at all."""
    if not case.schedule.units:
        yield Fault("there is no unit to check", ("unit",))
    if not case.schedule.conditions:
        yield Fault("there is no condition to compute the units at", ("condition",))


CHECK = Check(
    severity=Severity.MISSING,
    sentence="The schedule has units, and conditions to compute them at.",
    source="by definition",
    schedule=find,
)
