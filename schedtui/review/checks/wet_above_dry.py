"""A wet bulb above its dry bulb.

No air has it: the wet bulb is what the air cools to by evaporation. Mostly the two columns are
swapped, or one of them belongs to another unit.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import IMPOSSIBLE, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.condition import Condition
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import ConditionCase, UnitCase
    from schedtui.schedule.catalogue.table import Table

Number = Field[float | None]

_UNIT_PAIRS = (
    (Unit.room_db, Unit.room_wb),
    (Unit.return_db, Unit.return_wb),
    (Unit.cool_eat_db, Unit.cool_eat_wb),
    (Unit.cool_lat_db, Unit.cool_lat_wb),
    (Unit.precool_lat_db, Unit.precool_lat_wb),
)
_CONDITION_PAIRS = ((Condition.outdoor_db, Condition.outdoor_wb),)


def _find(row: Table, pairs: tuple[tuple[Number, Number], ...]) -> Faults:
    for dry, wet in pairs:
        db, wb = row.value_of(dry), row.value_of(wet)
        if db is not None and wb is not None and wb > db:
            what = wet.label.lower()
            yield Fault(
                "{what} {scheduled} is above its dry bulb {required}",
                (wet.key, dry.key),
                wb,
                db,
                TEMPERATURE,
                {"what": what},
            )


def find_in_unit(case: UnitCase) -> Faults:
    """Look at every pair of bulbs in a unit's row."""
    return _find(case.unit, _UNIT_PAIRS)


def find_in_condition(case: ConditionCase) -> Faults:
    """Look at the outdoor bulbs of a condition."""
    return _find(case.condition, _CONDITION_PAIRS)


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="No wet bulb is above its dry bulb.",
    rank=IMPOSSIBLE,
    source="ASHRAE Handbook—Fundamentals, ch. 1",
    unit=find_in_unit,
    condition=find_in_condition,
)
