"""The fuel's heat times the efficiency is not the heating capacity.

Input and output of a furnace are easily taken for one another.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_ALLOWED = 2.0  # [%], common practice


def find(case: UnitCase) -> Faults:
    """Hold the heating capacity against input times efficiency."""
    unit = case.unit
    if not unit.stated("heat_input", "heat_efficiency", "heat_total"):
        return
    total = unit.need(Unit.heat_total)
    own = unit.need(Unit.heat_input) * unit.need(Unit.heat_efficiency) / 100
    if abs(total - own) > own * _ALLOWED / 100:
        yield Fault(
            "scheduled heating {scheduled}, input times efficiency is {required}",
            ("heat_total", "heat_input", "heat_efficiency"),
            total,
            own,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Fuel input times efficiency is the heating capacity.",
    source="by definition; 2 % is common practice",
    judges=("heat_input",),
    unit=find,
)
