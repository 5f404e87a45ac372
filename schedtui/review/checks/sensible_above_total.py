"""The scheduled sensible capacity exceeds the total.

Sensible is a part of the total; one of the two is a slip: columns swapped, a digit transposed, or
one of them from another selection. Example: total 289, sensible 298.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the scheduled sensible against the scheduled total."""
    if not case.unit.stated("cool_total", "cool_sensible"):
        return
    sensible, total = case.unit.need(Unit.cool_sensible), case.unit.need(Unit.cool_total)
    if sensible > total:
        yield Fault(
            "scheduled sensible {scheduled} is above the scheduled total {required}",
            ("cool_sensible", "cool_total"),
            sensible,
            total,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled sensible capacity is not above the total.",
    rank=CONTRADICTION,
    source="by definition: total is sensible and latent",
    judges=("cool_sensible",),
    unit=find,
)
