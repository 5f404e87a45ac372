"""The scheduled humidifier adds less moisture than the room's humidity takes.

Outdoor air in winter is dry: what it lacks of the room's humidity ratio must be added.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import MOISTURE_FLOW

if TYPE_CHECKING:
    from schedtui.review.heating import Heating


def find(at: Heating) -> Faults:
    """Hold the scheduled moisture against what is needed at one condition."""
    scheduled, required = at.unit.need(Unit.humidifier), at.humidifier_load
    if is_short(scheduled, required, 0, at.site.limits.sensible_agreement):
        yield Fault(
            "scheduled humidifier {scheduled}, the outdoor air lacks {required}",
            ("humidifier",),
            scheduled,
            required,
            MOISTURE_FLOW,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The scheduled humidifier adds what the outdoor air lacks.",
    source="ASHRAE Handbook—HVAC Systems and Equipment, humidifiers",
    judges=("humidifier",),
    heating=find,
)
