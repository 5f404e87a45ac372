"""Flow and temperatures of the water cannot carry the coil's load.

The coil may be large enough and still starve. The load is the gross one: the water takes the fan's
heat too.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING
from schedtui.review.shortfall import is_short
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling


def find(at: Cooling) -> Faults:
    """Hold what the water carries against the coil's total at one condition."""
    if not COOLING.runs(at.unit) or not COOLING.stated(at.unit):
        return
    carried, required = COOLING.carried(at.unit, at.site.system), at.required_gross
    if is_short(carried, required - at.coil.condensate_heat, 0, at.site.limits.agreement):
        yield Fault(
            "flow and temperatures of the water carry {scheduled}, the coil needs {required}",
            ("cool_flow", "cool_lwt", "cool_ewt"),
            carried,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="Flow and temperatures of the water carry the cooling coil's load.",
    source="conservation of energy; fluid properties of Melinder 2010 and IAPWS",
    judges=("cool_flow",),
    cooling=find,
)
