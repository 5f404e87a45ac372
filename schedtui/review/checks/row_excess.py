"""A scheduled load lies well above what the row's own air gives.

Margin is no fault, but a load more than a tenth above its own row was perhaps selected for other
air. Equipment that comes in steps is left to `oversized`.
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
    from schedtui.schedule.catalogue.field import Field


def find(case: UnitCase) -> Faults:
    """Hold total, sensible and heating against the row's own entering and leaving air."""
    unit, row = case.unit, case.row
    share = 1 + case.site.limits.row_excess / 100
    held: list[tuple[Field[float | None], str, float | None]] = []
    if unit.cool_kind != "dx":
        held += [
            (Unit.cool_total, "total", known(lambda: row.required_total)),
            (Unit.cool_sensible, "sensible", known(lambda: row.required_sensible)),
        ]
    if unit.heat_kind in ("hot water", "steam") and unit.stated("heat_eat_db"):
        held.append((Unit.heat_total, "heating", known(lambda: case.row_heat.heat_load)))
    for field, what, own in held:
        scheduled = unit.value_of(field)
        if scheduled is not None and own is not None and 0 < own * share < scheduled:
            yield Fault(
                "scheduled {what} {scheduled}, the row's own air and airflow give {required}",
                (field.key,),
                scheduled,
                own,
                LOAD,
                {"what": what},
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="A scheduled load is not far above what the row's own air and airflow give.",
    source="common practice",
    unit=find,
)
