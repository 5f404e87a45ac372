"""The scheduled sensible cooling capacity falls short of the coil's sensible load.

A coil may carry its total and still not its sensible part, when it was selected on more humid
air; the room then runs warm. Sensible is like for like only at the condition that the schedule
was rated at, so it is judged there.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold the scheduled sensible against the coil's sensible at the rated condition."""
    scheduled, required = at.unit.need(Unit.cool_sensible), at.required_sensible
    limits = at.site.limits
    if is_short(scheduled, required, limits.sensible_margin, limits.sensible_agreement):
        yield Fault(
            "scheduled sensible {scheduled}, the coil needs {required}",
            ("cool_sensible",),
            scheduled,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The scheduled sensible capacity carries the coil's sensible load where it was rated.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("cool_sensible",),
    rated=find,
)
