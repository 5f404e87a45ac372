"""Flow times temperature rise of the water is not the scheduled cooling load.

Whoever balances the system sets the flow, and gets another load than the schedule says. A net
capacity is held against the water with the fan's heat added: the water carries that too.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold what the water carries against the scheduled total."""
    unit = case.unit
    if not COOLING.runs(unit) or not COOLING.stated(unit) or not unit.stated("cool_total"):
        return
    scheduled = unit.need(Unit.cool_total)
    if unit.cool_basis == "net":
        scheduled += case.governing.fan_heat
    carried = COOLING.carried(unit, case.site.system)
    if abs(carried - scheduled) > scheduled * case.site.limits.water_balance / 100:
        yield Fault(
            "flow and temperatures of the water carry {scheduled}, scheduled are {required}",
            ("cool_flow", "cool_ewt", "cool_lwt", "cool_total"),
            carried,
            scheduled,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Flow times temperature rise of the water is the scheduled cooling load.",
    source="conservation of energy; fluid properties of Melinder 2010 and IAPWS",
    judges=("cool_flow",),
    unit=find,
)
