"""Flow and temperatures of the water cannot carry the load of heating coil or preheat.

The coil may be large enough and still starve.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import HEATING, HEATING_SIDES
from schedtui.review.shortfall import is_short
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.heating import Heating


def find(at: Heating) -> Faults:
    """Hold what the water carries against each coil's load at one condition."""
    for side in HEATING_SIDES:
        if not side.runs(at.unit) or not side.stated(at.unit):
            continue
        carried = side.carried(at.unit, at.site.system)
        required = at.heat_load if side is HEATING else at.preheat_load
        if is_short(carried, required, 0, at.site.limits.sensible_agreement):
            yield Fault(
                "flow and temperatures of the water carry {scheduled}, the {what} needs {required}",
                (side.flow.key, side.leaving.key, side.entering.key),
                carried,
                required,
                LOAD,
                {"what": side.what},
            )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="Flow and temperatures of the water carry the loads of heating coil and preheat.",
    source="conservation of energy; fluid properties of Melinder 2010 and IAPWS",
    judges=("heat_flow", "preheat_flow"),
    heating=find,
)
