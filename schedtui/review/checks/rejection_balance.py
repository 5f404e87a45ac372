"""The condenser water of a dx unit does not carry the heat that it rejects.

That is the cooling capacity and the compressor's work, 1.15 to 1.35 times the capacity together.
Water that leaves no warmer than it enters carries none of it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD, TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_LEAST, _MOST = 1.15, 1.35


def find(case: UnitCase) -> Faults:
    """Hold what the condenser water carries against the scheduled total."""
    unit = case.unit
    if unit.cool_kind != "dx" or not COOLING.stated(unit) or unit.cool_total is None:
        return
    entering, leaving = unit.need(Unit.cool_ewt), unit.need(Unit.cool_lwt)
    if leaving <= entering:
        yield Fault(
            "condenser water leaves at {scheduled}, no warmer than it enters at {required}",
            ("cool_ewt", "cool_lwt"),
            leaving,
            entering,
            TEMPERATURE,
        )
        return
    carried, total = COOLING.carried(unit, case.site.system), unit.need(Unit.cool_total)
    for bound, beyond in (
        (total * _LEAST, carried < total * _LEAST),
        (total * _MOST, carried > total * _MOST),
    ):
        if beyond:
            yield Fault(
                "the condenser water carries {scheduled}, customary here is {required}",
                ("cool_flow", "cool_ewt", "cool_lwt"),
                carried,
                bound,
                LOAD,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The condenser water of a dx unit carries capacity and compressor work.",
    source="common practice",
    unit=find,
)
