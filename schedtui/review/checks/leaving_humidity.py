"""Air leaves a wet coil drier or wetter than wet coils leave it.

Most leave it at 90 to 98 % relative humidity. Much drier air means a wet bulb that is off by a
degree or two, or a leaving state taken behind fan and reheat.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold the leaving relative humidity of a wet coil against the range."""
    at.refuse_left_by_loads()
    limits = at.site.limits
    if at.coil_mode != "wet" or at.coil_leaving.supersaturated:
        return
    humidity = min(at.coil_leaving.rh, 100.0)  # a hair above is the formulas', not the coil's
    for bound, beyond in (
        (limits.leaving_humidity_low, humidity < limits.leaving_humidity_low),
        (limits.leaving_humidity_high, humidity > limits.leaving_humidity_high),
    ):
        if beyond:
            yield Fault(
                "air leaves the coil at {scheduled} relative humidity, customary is {required}",
                ("cool_lat_wb", "cool_lat_db"),
                humidity,
                bound,
                PERCENT,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Air leaves a wet coil near saturation.",
    source="common practice",
    judges=("cool_lat_wb", "cool_sensible"),
    rated=find,
)
