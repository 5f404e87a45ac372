"""A number that looks as if typed in another unit.

A percentage below 1 is most likely a fraction: 0.35 for 35 %.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Look for percentages between 0 and 1."""
    for key, field in Unit.catalogue.items():
        cell = case.unit.typed(key)
        if field.quantity is not PERCENT or cell is None or not isinstance(cell.value, float):
            continue
        if 0 < cell.value < 1:
            yield Fault(
                "{label} {scheduled} is a fraction; {percent} was meant, if so",
                (key,),
                cell.value,
                quantity=PERCENT,
                values={
                    "label": field.label.lower(),
                    "percent": Measure(cell.value * 100, PERCENT),
                },
                severity=Severity.CAUTION,
            )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="No number looks as if typed in another unit.",
    explains=True,
    source="common practice",
    unit=find,
)
