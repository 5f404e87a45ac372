"""The scheduled capacity is much more than the coil needs.

An oversized coil and its valve hunt at part load and dry poorly; the plant is sized for what
nobody needs.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold the scheduled total against the governing load."""
    scheduled = at.unit.value_of(Unit.cool_total)
    if scheduled is None:
        return
    required = at.required_total
    if 0 < required * (1 + at.site.limits.oversize / 100) < scheduled:
        yield Fault(
            "scheduled total {scheduled}, the coil needs {required}",
            ("cool_total",),
            scheduled,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The scheduled total is not far above what the coil needs.",
    source="common practice",
    governing=find,
)
