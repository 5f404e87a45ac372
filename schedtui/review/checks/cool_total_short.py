"""The scheduled total cooling capacity falls short of the coil's load.

A coil that is too small lets the supply air rise and the room go humid on the very days it was
bought for. Example: at 5 280 ft, 10 000 cfm of standard air from 80/67 to 55/54 °F needs some
380 MBH; 340 scheduled is short by a tenth.

The heat that leaves with the condensate is a further allowance: the handbook takes it off the
load, practice mostly does not, and neither is a fault.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import LOAD_PER_TON
from schedtui.review.check import CAPACITY, Check, Faults
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD, REFRIGERATION

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_MOST_OF = 0.6  # so much of the fan's heat lacking looks like a net capacity


def find(at: Cooling) -> Faults:
    """Hold the scheduled total of each coil against its load at one condition."""
    yield from _first_coil(at)
    unit, limits = at.unit, at.site.limits
    per = LOAD_PER_TON[at.site.system]
    by_tons = not unit.stated("cool_total") and unit.stated("cool_tons")
    if not by_tons and not unit.stated("cool_total"):
        return
    scheduled = unit.need(Unit.cool_tons) * per if by_tons else unit.need(Unit.cool_total)
    required = at.required_total
    allowed = required - at.coil.condensate_heat
    if not is_short(scheduled, allowed, limits.total_margin, limits.agreement):
        return
    says = "scheduled total {scheduled}, the coil needs {required}"
    if limits.total_margin:
        says += ", {wanted} with its margin"
    elif _is_net(at, scheduled, allowed):
        says += "; with the fan's heat of {fan} it would do: is it a net capacity?"
    wanted = Measure(required * (1 + limits.total_margin / 100), LOAD)
    values = {"fan": Measure(at.fan_heat, LOAD), "wanted": wanted}
    if by_tons:
        tons = unit.need(Unit.cool_tons)
        yield Fault(says, ("cool_tons",), tons, required / per, REFRIGERATION, values)
    else:
        yield Fault(says, ("cool_total",), scheduled, required, LOAD, values)


def _first_coil(at: Cooling) -> Faults:
    """Hold the first of two coils in series against its own load."""
    if at.unit.precool_total is None:
        return
    scheduled, load, limits = at.unit.need(Unit.precool_total), at.precool, at.site.limits
    allowed = load.total - load.condensate_heat
    if is_short(scheduled, allowed, limits.total_margin, limits.agreement):
        says = "scheduled total of the first coil {scheduled}, it needs {required}"
        yield Fault(says, ("precool_total",), scheduled, load.total, LOAD)


def _is_net(at: Cooling, scheduled: float, required: float) -> bool:
    """Tell whether it is about the supply fan's heat that a gross capacity lacks."""
    lacking, fan = required - scheduled, at.fan_heat
    return at.unit.cool_basis == "gross" and fan * _MOST_OF <= lacking <= fan


CHECK = Check(
    severity=Severity.SHORT,
    sentence="The scheduled cooling total carries the coil's load at every cooling condition.",
    source="ASHRAE Handbook—Fundamentals, ch. 1 and ch. 18",
    rank=CAPACITY,
    judges=("cool_total", "cool_tons"),
    cooling=find,
)
