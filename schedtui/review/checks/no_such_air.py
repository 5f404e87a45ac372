"""A stated pair of properties that no moist air has.

A dry bulb of 95 °F with a wet bulb of 40 °F would need a humidity ratio below zero. Something in
the pair is a slip, most often a digit. A wet bulb above its dry bulb has a check of its own.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import Absent, AirError
from schedtui.review.check import IMPOSSIBLE, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.condition import HUMIDITIES
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.review.case import ConditionCase, UnitCase

_PAIRS = (
    (Unit.room_db, Unit.room_wb),
    (Unit.return_db, Unit.return_wb),
    (Unit.cool_eat_db, Unit.cool_eat_wb),
    (Unit.cool_lat_db, Unit.cool_lat_wb),
    (Unit.precool_lat_db, Unit.precool_lat_wb),
)


def find_in_unit(case: UnitCase) -> Faults:
    """Try to make air of every pair of bulbs in a unit's row."""
    for dry, wet in _PAIRS:
        db, wb = case.unit.value_of(dry), case.unit.value_of(wet)
        if db is None or wb is None or wb > db:
            continue
        try:
            case.site.air.by_wet_bulb(db, wb)
        except AirError as error:
            yield Fault("{why}", (wet.key, dry.key), values={"why": str(error)})


def find_in_condition(case: ConditionCase) -> Faults:
    """Try to make the outdoor air of a condition."""
    condition = case.condition
    db, wb = condition.outdoor_db, condition.outdoor_wb
    if db is not None and wb is not None and wb > db:
        return
    try:
        case.outdoor  # noqa: B018  asked for its absence
    except Absent:
        return
    except AirError as error:
        stated = tuple(key for key in HUMIDITIES if condition.stated(key))
        yield Fault("{why}", (*stated, "outdoor_db"), values={"why": str(error)})


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Every stated pair of properties is one that moist air can have.",
    rank=IMPOSSIBLE,
    source="ASHRAE Handbook—Fundamentals, ch. 1",
    unit=find_in_unit,
    condition=find_in_condition,
)
