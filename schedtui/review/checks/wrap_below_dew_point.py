"""The wrap-around recovery would cool the air below its dew point.

Its first side is scheduled by a drop in dry bulb alone, and takes no moisture out: below the dew
point it would, and give its second side more heat than the drop says. The drop is another unit's,
or is too large for this air.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_SATURATED = 100.0


def find(at: Cooling) -> Faults:
    """Look at the air between the wrap-around's first side and the coil."""
    if at.wrap and at.coil_entering.supersaturated:
        yield Fault(
            "behind the wrap-around's first side the air would have {scheduled} relative humidity",
            ("wrap_drop",),
            at.coil_entering.rh,
            _SATURATED,
            PERCENT,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="A wrap-around recovery cools the air no further than its dew point.",
    source="ASHRAE Handbook—Fundamentals, ch. 1",
    cooling=find,
)
