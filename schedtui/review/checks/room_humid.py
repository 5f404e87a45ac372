"""The room comes to be more humid than is accepted.

At part load a unit cools less, and so dries less: a room may stay at its dry bulb and grow humid.
What is found is the room's own humidity, from the moisture balance of the control that the unit
has.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import Absent
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.part_load import PART_LOAD_NEEDS, PartLoad
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold the room's humidity at part load against the highest accepted."""
    if not at.unit.stated("room_rh_max") or not at.has_less_load:
        return
    if not isinstance(at, PartLoad):
        lacking = [key for key in PART_LOAD_NEEDS if not at.unit.stated(key)]
        raise Absent(*lacking, why="" if lacking else "the room's humidity is not stated")
    most, humidity = at.unit.need(Unit.room_rh_max), at.room.rh
    if humidity > most:
        guess = ", by a guess at the coil's behaviour" if at.estimated else ""
        yield Fault(
            "the room comes to {scheduled} relative humidity{guess}, accepted are {required}",
            ("capacity_control", "room_rh_max"),
            humidity,
            most,
            PERCENT,
            {"guess": guess},
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="No room comes to be more humid than accepted at part load.",
    source="conservation of moisture; ASHRAE Handbook—Fundamentals, ch. 1",
    judges=("room_rh_max",),
    cooling=find,
)
