"""A unit names a condition that the project does not have.

The unit is then not computed at it, silently, if nobody says so. Mostly the condition was renamed.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Look for each named condition among the project's."""
    there = {condition.name for condition in case.schedule.conditions}
    for name in case.unit.conditions or ():
        if name not in there:
            yield Fault('there is no condition "{name}"', ("conditions",), values={"name": name})


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Every condition that a unit names is in the project.",
    source="by definition",
    judges=("conditions",),
    unit=find,
)
