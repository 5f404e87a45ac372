"""Flow times temperature drop of the water is not the scheduled heating load.

As for cooling, for the heating coil and for the preheat.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import HEATING_SIDES
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold what the water carries against the scheduled load of each coil."""
    unit = case.unit
    for side in HEATING_SIDES:
        if not side.runs(unit) or not side.stated(unit) or not unit.stated(side.total.key):
            continue
        scheduled, carried = unit.need(side.total), side.carried(unit, case.site.system)
        if abs(carried - scheduled) > scheduled * case.site.limits.water_balance / 100:
            yield Fault(
                "flow and temperatures of the water carry {scheduled}, the {what} is scheduled for "
                "{required}",
                (side.flow.key, side.entering.key, side.leaving.key, side.total.key),
                carried,
                scheduled,
                LOAD,
                {"what": side.what},
            )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Flow times temperature drop of the water is the scheduled heating load.",
    source="conservation of energy; fluid properties of Melinder 2010 and IAPWS",
    judges=("heat_flow", "preheat_flow"),
    unit=find,
)
