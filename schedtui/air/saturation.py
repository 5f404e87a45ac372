"""Where a straight line in the temperature–humidity plane meets the saturation curve.

The curve is convex, but for a bend at the triple point: below it the air is over ice. So each side
of the bend is searched by itself, with the crossing held between two points at every step.

Knows nothing of coils.
"""

from __future__ import annotations

from itertools import pairwise
from typing import TYPE_CHECKING

from schedtui.air.crossing import crossing
from schedtui.air.psychro import TEMPERATURE_RANGE, TRIPLE_POINT

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.air.state import State

_ON_THE_CURVE = 1e-9  # humidity ratio that a state at saturation may be off by
_SHARPNESS = 1e-10  # degrees, for a crossing
_NEAR_THE_LOWEST = 1e-6  # degrees, for the lowest gap: it is flat there


def first_crossing(warm: State, cool: State) -> float | None:
    """Return the temperature where the line on from `cool` first meets saturation [°F | °C].

    None where it passes saturation by, or where the cool air is foggy already.

    Args:
        warm: the warmer and moister end of the line.
        cool: the end that the line is drawn on from.
    """
    air = cool.air
    slope = (warm.w - cool.w) / (warm.db - cool.db)

    def gap(t: float) -> float:
        return air.saturation_humidity_ratio(t) - (cool.w + slope * (t - cool.db))

    if gap(cool.db) <= _ON_THE_CURVE:
        return None if cool.supersaturated else cool.db
    # Where the line holds no moisture any more it cannot meet saturation.
    lowest = max(cool.db - cool.w / slope, TEMPERATURE_RANGE[air.system][0])
    bend = TRIPLE_POINT[air.system]
    corners = [cool.db, bend, lowest] if lowest < bend < cool.db else [cool.db, lowest]
    for high, low in pairwise(corners):
        beneath = _not_above_zero(gap, low, high)
        if beneath is not None:
            return crossing(gap, beneath, high, _SHARPNESS)
    return None


def _not_above_zero(convex: Callable[[float], float], low: float, high: float) -> float | None:
    """Return a place where a convex function is not above zero, None if there is none.

    It closes in on the minimum: of two points within, that lies on the side of the lower one.
    """
    if convex(low) <= 0:
        return low
    while high - low > _NEAR_THE_LOWEST:
        third = (high - low) / 3
        a, b = low + third, high - third
        at_a, at_b = convex(a), convex(b)
        if min(at_a, at_b) <= 0:
            return b if at_b <= 0 else a
        low, high = (low, b) if at_a < at_b else (a, high)
    return None
