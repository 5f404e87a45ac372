"""The air leaving the coil would hold more moisture than air can.

It comes out so where the leaving state follows from other numbers: a leaving state given behind
the fan or the bypass, or loads that leave too little sensible heat. One of those numbers is off.
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
    """Look at the leaving state that the coil is to reach."""
    leaving = at.leaving_aimed_at
    if leaving.supersaturated:
        keys = {
            "schedule": ("cool_lat_wb", "cool_lat_db"),
            "loads": ("cool_sensible", "cool_total", "cool_lat_db"),
            "room": ("room_sensible", "room_latent", "supply_airflow"),
        }[at.leaving_from]
        yield Fault(
            "the coil would have to leave air at {scheduled} relative humidity",
            keys,
            leaving.rh,
            _SATURATED,
            PERCENT,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Air leaving the coil is not above saturation.",
    source="ASHRAE Handbook—Fundamentals, ch. 1",
    rated=find,
)
