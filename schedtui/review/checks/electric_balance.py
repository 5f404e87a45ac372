"""The electric heater's kilowatts are not its heating capacity.

One kilowatt is 3 412 Btu/h. For a heat pump the electric heat is supplementary, and is left alone.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.steam import electric_heat
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the heating capacity against the electric power."""
    unit = case.unit
    if unit.heat_kind != "electric" or not unit.stated("heat_electric", "heat_total"):
        return
    total = unit.need(Unit.heat_total)
    own = electric_heat(unit.need(Unit.heat_electric), case.site.system)
    if abs(total - own) > own * case.site.limits.electric_balance / 100:
        yield Fault(
            "scheduled heating {scheduled}, its electric power gives {required}",
            ("heat_total", "heat_electric"),
            total,
            own,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The electric power is the heating capacity.",
    source="by definition: 3 412.14 Btu/h per kW",
    judges=("heat_electric",),
    unit=find,
)
