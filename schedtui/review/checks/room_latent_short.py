"""The supply air does not take the room's latent load.

It arrives too moist: the room settles above its design humidity. What the supply air takes is a
small difference of large numbers, so the formulas' own difference of 0.3 % in humidity ratio is
allowed besides.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.flow import heat_flow
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

# By how much ideal-gas and real-gas formulas part in a humidity ratio [share of it].
_FORMULAS = 0.003


def find(at: Cooling) -> Faults:
    """Hold what the supply air takes against the room's load at one condition."""
    required = at.unit.need(Unit.room_latent) * at.condition.latent_load / 100
    at.refuse_left_by_loads()
    if at.leaving_from == "room":
        return  # the supply air was made to meet it
    met = at.room_met.latent
    moisture = at.room.h - at.room.at(w=0.0).h  # the enthalpy of all the room's moisture
    allowed = heat_flow(at.supply_mass, moisture * _FORMULAS, at.site.system)
    if is_short(met + allowed, required, 0, at.site.limits.agreement):
        yield Fault(
            "the supply air takes {scheduled} of latent heat, the room has {required}",
            ("room_latent", "supply_airflow", "cool_lat_wb"),
            met,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The supply air takes the room's latent load.",
    source="ASHRAE Handbook—Fundamentals, ch. 18",
    judges=("room_latent",),
    derived=("cool_lat_db",),
    cooling=find,
)
