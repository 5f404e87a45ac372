"""The supply air is much colder than the room.

Such air dumps from common diffusers and makes draughts and condensation; often a temperature is
off.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import TEMPERATURE_DIFFERENCE

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold room less supply air against the limit."""
    difference, most = at.room.db - at.supply.db, at.site.limits.supply_difference
    if difference > most:
        yield Fault(
            "supply air is {scheduled} below the room, customary is at most {required}",
            ("cool_lat_db", "room_db"),
            difference,
            most,
            TEMPERATURE_DIFFERENCE,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Supply air is not too far below the room.",
    source="common practice",
    governing=find,
)
