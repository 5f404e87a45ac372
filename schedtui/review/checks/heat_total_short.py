"""The scheduled heating capacity falls short of the heating coil's load.

The room then runs cold on the design night. Judged at every heating condition.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CAPACITY, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.heating import Heating


def find(at: Heating) -> Faults:
    """Hold the scheduled heating against the coil's load at one condition."""
    scheduled, required = at.unit.need(Unit.heat_total), at.heat_load
    if is_short(scheduled, required, 0, at.site.limits.sensible_agreement):
        yield Fault(
            "scheduled heating {scheduled}, the coil needs {required}",
            ("heat_total",),
            scheduled,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The scheduled heating carries the heating coil's load at every heating condition.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    rank=CAPACITY,
    judges=("heat_total",),
    heating=find,
)
