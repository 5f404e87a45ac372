"""Nothing gives the supply fan's heat, which is then taken as zero.

A draw-through fan of 4 in. wg warms the supply air by some 2 °F, which the room does not get; a
blow-through one loads the coil with it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Look for the fan's rise, its power, or pressure with efficiency."""
    unit = case.unit
    if not unit.stated("supply_airflow") or not unit.stated("cool_lat_db"):
        return
    if unit.stated("fan_rise") or unit.stated("fan_power"):
        return
    if not unit.stated("fan_total_pressure", "fan_efficiency"):
        yield Fault(
            "the supply fan's heat is taken as 0: fan_rise, fan_power, or fan_total_pressure with "
            "fan_efficiency would give it",
            ("fan_power", "fan_rise", "fan_total_pressure", "fan_efficiency"),
        )


CHECK = Check(
    severity=Severity.MISSING,
    sentence="Something gives the supply fan's heat.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    unit=find,
)
