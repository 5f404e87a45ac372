"""The tons are not the total over 12 000 Btu/h.

Tons from the sensible load, from an older total, or nominal ones of a catalogue; what is ordered
by tons is then not what was scheduled. A dx unit's nominal tons are looser by nature.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import LOAD_PER_TON
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import REFRIGERATION

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_NOMINAL = 15.0  # what a dx unit's nominal tons may differ by [%]


def find(case: UnitCase) -> Faults:
    """Hold the scheduled tons against the scheduled total."""
    unit = case.unit
    if not unit.stated("cool_tons", "cool_total"):
        return
    tons = unit.need(Unit.cool_tons)
    own = unit.need(Unit.cool_total) / LOAD_PER_TON[case.site.system]
    nominal = unit.cool_kind == "dx"
    allowed = _NOMINAL if nominal else case.site.limits.tons_balance
    if abs(tons - own) > own * allowed / 100:
        yield Fault(
            "{scheduled}, the scheduled total is {required}",
            ("cool_tons", "cool_total"),
            tons,
            own,
            REFRIGERATION,
            severity=Severity.CAUTION if nominal else None,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled tons are the scheduled total over 12 000 Btu/h.",
    source="by definition",
    judges=("cool_tons",),
    unit=find,
)
