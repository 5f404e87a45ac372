"""The scheduled reheat falls short of what brings the air to its scheduled temperature.

A unit that supplies neutral air reheats at full load too: what the coil left cold must be warmed
again, or the rooms are overcooled on the days that they need drying most.
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
    """Hold the scheduled reheat against the load at one condition."""
    scheduled, required = at.unit.need(Unit.reheat_total), at.reheat_load
    if is_short(scheduled, required, 0, at.site.limits.sensible_agreement):
        yield Fault(
            "scheduled reheat {scheduled}, the air needs {required}",
            ("reheat_total",),
            scheduled,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The scheduled reheat warms the air to its scheduled leaving dry bulb.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("reheat_total",),
    cooling=find,
)
