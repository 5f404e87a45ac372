"""The scheduled preheat falls short of its load.

Air colder than planned then meets the coils behind it, which may freeze.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.heating import Heating


def find(at: Heating) -> Faults:
    """Hold the scheduled preheat against its load at one condition."""
    scheduled, required = at.unit.need(Unit.preheat_total), at.preheat_load
    if is_short(scheduled, required, 0, at.site.limits.sensible_agreement):
        yield Fault(
            "scheduled preheat {scheduled}, the air needs {required}",
            ("preheat_total",),
            scheduled,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The scheduled preheat carries its load at every heating condition.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("preheat_total",),
    heating=find,
)
