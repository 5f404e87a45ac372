"""The supply air does not bring the room its heat.

Too little air, or air that leaves the heating coil too cool.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.heating import Heating


def find(at: Heating) -> Faults:
    """Hold the heat that the supply air brings against the room's at one condition."""
    required = at.unit.need(Unit.room_heat) * at.condition.sensible_load / 100
    if not at.unit.stated("heat_lat_db"):
        return  # the coil's leaving air was made to meet it
    met = at.room_heat_met
    if is_short(met, required, 0, at.site.limits.sensible_agreement):
        yield Fault(
            "the supply air brings {scheduled}, the room needs {required}",
            ("room_heat", "heat_lat_db", "supply_airflow"),
            met,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The supply air brings the room its heat.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("room_heat",),
    heating=find,
)
