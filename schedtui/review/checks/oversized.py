"""The scheduled capacity is much more than the coil needs.

An oversized coil and its valve hunt at part load and dry poorly; the plant is sized for what
nobody needs.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase
    from schedtui.review.cooling import Cooling

_IN_STEPS = 60.0  # margin from which gas and electric heating is oversized [%]


def find(at: Cooling) -> Faults:
    """Hold the scheduled total against the governing load."""
    scheduled = at.unit.value_of(Unit.cool_total)
    if scheduled is None:
        return
    required = at.required_total
    if 0 < required * (1 + at.site.limits.oversize / 100) < scheduled:
        yield Fault(
            "scheduled total {scheduled}, the coil needs {required}",
            ("cool_total",),
            scheduled,
            required,
            LOAD,
        )


def find_heating(case: UnitCase) -> Faults:
    """Hold the scheduled heating against the governing load; burners and heaters come in steps."""
    scheduled = case.unit.heat_total
    required = known(lambda: case.heat_governing.heat_load)
    if scheduled is None or required is None:
        return
    most = case.site.limits.oversize
    if case.unit.heat_kind in ("gas", "electric"):
        most = max(most, _IN_STEPS)
    if 0 < required * (1 + most / 100) < scheduled:
        yield Fault(
            "scheduled heating {scheduled}, the coil needs {required}",
            (Unit.heat_total.key,),
            scheduled,
            required,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="A scheduled capacity is not far above what its coil needs.",
    source="common practice",
    governing=find,
    unit=find_heating,
)
