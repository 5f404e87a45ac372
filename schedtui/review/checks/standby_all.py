"""All units of a row stand by.

Then none runs, and the row's load is in no plant's sum and in no total. Mostly the number of units
was typed without those that stand by.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import COUNT

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the number standing by against the number of units."""
    quantity, standby = case.unit.quantity, case.unit.standby
    if standby and standby >= quantity:
        yield Fault(
            "{scheduled} of {required} stand by: none runs, and no plant and no total counts it",
            ("standby", "quantity"),
            standby,
            quantity,
            COUNT,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Of a row's units at least one does not stand by.",
    source="by definition",
    judges=("standby",),
    reads_digits=False,
    unit=find,
)
