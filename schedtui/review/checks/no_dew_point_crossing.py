"""No apparatus dew point: the line through entering and leaving air passes saturation by.

A real coil bends away from the straight line on humid outdoor air, and that is no fault. It is one
where besides the leaving air is too dry for a wet coil, or drier than the water could make it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import apparatus_dew_point
from schedtui.errors import AirError
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_WET_COIL = 90.0  # least relative humidity that leaves a wet coil without one being asked why [%]


def find(at: Cooling) -> Faults:
    """Look at the line of a wet coil."""
    at.refuse_left_by_loads()
    entering, leaving = at.coil_entering, at.coil_leaving
    if at.coil_mode != "wet" or apparatus_dew_point(entering, leaving) is not None:
        return
    if leaving.rh < _WET_COIL or _drier_than_water_allows(at):
        yield Fault(
            "the line through entering and leaving air meets no saturation, and the air leaves at "
            "{scheduled} relative humidity",
            ("cool_lat_wb", "cool_lat_db"),
            leaving.rh,
            _WET_COIL,
            PERCENT,
        )


def _drier_than_water_allows(at: Cooling) -> bool:
    ewt = at.unit.value_of(Unit.cool_ewt)
    if ewt is None or at.unit.cool_kind == "dx":
        return False
    try:
        return at.coil_leaving.w < at.site.air.saturation_humidity_ratio(ewt)
    except AirError:
        return False


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="A wet coil's line meets saturation, or its leaving air is near it.",
    source="ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils",
    judges=("cool_lat_wb",),
    rated=find,
)
