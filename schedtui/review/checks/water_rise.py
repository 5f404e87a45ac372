"""The temperature rise of the cooling water is out of the ordinary.

Chilled water rises by 10 to 20 °F; a small rise asks for much pumping, a large one for a deep
coil, and either is often a temperature that is off.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE_DIFFERENCE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the rise against the range."""
    unit, limits = case.unit, case.site.limits
    if not COOLING.runs(unit) or unit.cool_ewt is None or unit.cool_lwt is None:
        return
    rise = unit.cool_lwt - unit.cool_ewt
    for bound, beyond in (
        (limits.water_rise_low, 0 <= rise < limits.water_rise_low),
        (limits.water_rise_high, rise > limits.water_rise_high),
    ):
        if beyond:
            yield Fault(
                "the cooling water rises by {scheduled}, customary is {required}",
                (Unit.cool_lwt.key, Unit.cool_ewt.key),
                rise,
                bound,
                TEMPERATURE_DIFFERENCE,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The cooling water's rise is an ordinary one.",
    source="common practice",
    unit=find,
)
