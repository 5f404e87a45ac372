"""A unit names a plant that the project does not have.

Its load is then in no plant's sum. Mostly the plant was renamed.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Look for each named plant among the project's."""
    there = {plant.name for plant in case.schedule.plants}
    for name in case.unit.plants or ():
        if name not in there:
            yield Fault('there is no plant "{name}"', ("plants",), values={"name": name})


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Every plant that a unit names is in the project.",
    source="by definition",
    judges=("plants",),
    unit=find,
)
