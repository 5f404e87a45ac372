"""The shaft power that a motor must give."""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.figure import known
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase
    from schedtui.schedule.catalogue.field import Field


def shaft_of(case: UnitCase, fan: Field[float | None]) -> float | None:
    """Return the shaft power of a fan [bhp | kW]: as stated, the supply fan's else from pressure.

    Args:
        case: the unit.
        fan: the key that states it.
    """
    if fan is Unit.fan_power:
        return known(getattr, case, "shaft_power")
    return case.unit.value_of(fan)
