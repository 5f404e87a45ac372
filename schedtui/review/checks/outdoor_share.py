"""The unit takes in very little outdoor air, and the sheet does not say how much is required.

A share of a few percent is more often a digit lost than a design.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold outdoor air over supply air, as typed, against the least share."""
    unit = case.unit
    outdoor, supply = unit.outdoor_airflow, unit.supply_airflow
    if not outdoor or not supply or unit.stated("outdoor_required"):
        return
    share, least = outdoor / supply * 100, case.site.limits.outdoor_share
    if share < least:
        yield Fault(
            "outdoor air is {scheduled} of the supply air; outdoor_required is not stated",
            ("outdoor_airflow", "outdoor_required"),
            share,
            least,
            PERCENT,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Outdoor air is a usual share of the supply air, or what is required is stated.",
    source="common practice",
    unit=find,
)
