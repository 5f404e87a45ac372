"""The sensible heat ratio of the coil is out of the ordinary.

Below a half the coil mostly dries, which outdoor air may ask for and return air seldom does.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import RATIO

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_OUTDOOR = 0.4  # of the lower bound, taken off it for all outdoor air
_WHOLE = 1e-9  # a dry coil's ratio is 1 but for the last bit


def find(at: Cooling) -> Faults:
    """Hold the coil's sensible heat ratio against the range."""
    at.refuse_left_by_loads()
    limits = at.site.limits
    low = limits.shr_low * (1 - _OUTDOOR * at.outdoor_fraction)
    high = limits.shr_high + _WHOLE
    for bound, beyond in ((low, at.shr < low), (limits.shr_high, at.shr > high)):
        if beyond:
            yield Fault(
                "sensible heat ratio {scheduled}, customary is {required} here",
                ("cool_lat_wb", "cool_lat_db"),
                at.shr,
                bound,
                RATIO,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The sensible heat ratio of the coil is an ordinary one.",
    source="common practice",
    governing=find,
)
