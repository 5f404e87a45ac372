"""A dx capacity is stated at air cooler than the hottest outdoor air.

On the hottest day the condenser meets warmer air, and the unit carries less than it says.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the ambient of the rating against the hottest cooling condition."""
    unit = case.unit
    if unit.cool_kind != "dx" or unit.cool_ambient_db is None:
        return
    outdoors = [at.condition.outdoor_db for at in case.cooling]
    hottest = max((db for db in outdoors if db is not None), default=None)
    if hottest is not None and unit.cool_ambient_db < hottest:
        yield Fault(
            "capacity stated at {scheduled} ambient, the hottest condition has {required}",
            (Unit.cool_ambient_db.key,),
            unit.cool_ambient_db,
            hottest,
            TEMPERATURE,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="A dx capacity is stated at the hottest outdoor air.",
    source="AHRI 340/360: a rating holds at its own ambient",
    unit=find,
)
