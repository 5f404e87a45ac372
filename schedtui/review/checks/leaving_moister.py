"""Air is scheduled to leave a cooling coil moister than it enters.

A coil dries the air or leaves its moisture alone. A wet bulb from another row is the usual cause,
a leaving state for humid air copied to a unit in dry air the next.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.units import HUMIDITY_RATIO

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase
    from schedtui.review.cooling import Cooling

_ALLOWED = 1.01  # of the entering humidity ratio, in the row's own states


def find(case: UnitCase) -> Faults:
    """Look at the row's own states, and where they are not both there, at the rated condition."""
    if case.unit.stated("cool_eat_db", "cool_eat_wb"):
        entering, leaving = case.row.coil_entering, case.row.coil_leaving
        if leaving.w > entering.w * _ALLOWED:
            yield _fault(leaving.w, entering.w)
        return
    rated = known(lambda: case.rated)
    if rated is not None:
        yield from _find_at(rated)


def _find_at(at: Cooling) -> Faults:
    """Hold the leaving air against the computed entering air, as far as a bulb may be off."""
    at.refuse_left_by_loads()
    entering, leaving = at.coil_entering, at.leaving_aimed_at
    moister = min(entering.wb + at.site.limits.entering_wb, entering.db)
    most = at.site.air.by_wet_bulb(entering.db, moister).w
    if entering.db > leaving.db and leaving.w > most:
        yield _fault(leaving.w, entering.w)


def _fault(leaving: float, entering: float) -> Fault:
    return Fault(
        "leaving air at {scheduled} is moister than entering air at {required}",
        ("cool_lat_wb", "cool_eat_wb"),
        leaving,
        entering,
        HUMIDITY_RATIO,
    )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Air leaves a cooling coil no moister than it enters.",
    source="ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils",
    rank=CONTRADICTION,
    judges=("cool_lat_wb",),
    unit=find,
)
