"""The coil's surface would have to be colder than the water in it.

The apparatus dew point is the mean surface that the air behaves as if it met; it lies above the
entering water. Below it, leaving air, water temperature or entering air is wrong.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold the apparatus dew point of a wet coil against the water that enters it."""
    if at.unit.cool_kind == "dx" or not at.unit.stated("cool_ewt"):
        return
    ewt = at.unit.need(Unit.cool_ewt)
    at.refuse_left_by_loads()
    if at.coil_mode != "wet" or _scheduled_dry(at.unit):
        return
    if at.adp < ewt:
        yield Fault(
            "apparatus dew point {scheduled} is below the entering water {required}",
            ("cool_lat_wb", "cool_lat_db", "cool_ewt"),
            at.adp,
            ewt,
            TEMPERATURE,
        )


def _scheduled_dry(unit: Unit) -> bool:
    """Tell whether the row itself has a dry coil, one that meets no apparatus dew point.

    Printed to its digits the wet bulb of such a coil may still leave a trace of moisture.
    """
    return unit.cool_total is not None and unit.cool_total == unit.cool_sensible


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The apparatus dew point is not below the entering water.",
    source="ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils",
    judges=("cool_ewt",),
    rated=find,
)
