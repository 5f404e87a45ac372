"""The schedule was rated at another condition than the one that governs.

The scheduled entering air is that of one condition, the greatest load stands at another. The
capacity there is not what the sheet says: coils carry more on humid air, and leave it moister.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Compare the rated with the governing condition."""
    if not case.unit.stated("cool_total") or not case.unit.stated("cool_eat_db"):
        return
    rated, governing = case.rated, case.governing
    if rated.name != governing.name:
        yield Fault(
            "the scheduled entering air is that of {rated} ({required}), the greatest load stands "
            "at {governing} ({scheduled})",
            ("cool_eat_db", "cool_eat_wb"),
            governing.coil.total,
            rated.coil.total,
            LOAD,
            {"rated": rated.name, "governing": governing.name},
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The schedule was rated at the condition that governs.",
    source="AHRI 410: a rating holds at its own entering air",
    reads_digits=False,
    unit=find,
)
