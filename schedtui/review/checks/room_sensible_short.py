"""The supply air does not take the room's sensible load.

The coil may carry what passes it and the room still run warm: too little air, or air that arrives
too warm past fan and duct.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold what the supply air takes against the room's load at one condition."""
    required = at.unit.need(Unit.room_sensible) * at.condition.sensible_load / 100
    if at.leaving_from == "room":
        return  # the supply air was made to meet it
    met = at.room_met.sensible
    if is_short(met, required, 0, at.site.limits.sensible_agreement):
        yield Fault(
            "the supply air takes {scheduled} of sensible heat, the room has {required}",
            ("room_sensible", "supply_airflow", "cool_lat_db"),
            met,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The supply air takes the room's sensible load.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("room_sensible",),
    derived=("cool_lat_db",),
    cooling=find,
)
