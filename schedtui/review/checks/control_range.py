"""The range of the capacity control does not reach down to the load.

With all the air around the coil, or the coil all but off, the supply air still takes more than the
room has: the room is overcooled at this condition.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.part_load import PartLoad
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Look whether the control has come to the end of its range."""
    if not isinstance(at, PartLoad) or at.settings.reaches:
        return
    yield Fault(
        "at the end of its range the supply air still takes {scheduled}, the room has {required}",
        ("capacity_control", "room_sensible"),
        at.room_met.sensible,
        at.room_load[0],
        LOAD,
    )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The capacity control reaches down to the room's load.",
    source="conservation of energy",
    cooling=find,
)
