"""Where a function goes from below zero to above it, between two points that hold the place.

Knows nothing of air: wet bulbs and apparatus dew points are found by it.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable

_CURVATURE = 0.2  # the method's κ₁, over the first interval; its κ₂ is 2
_SPARE = 3  # its n₀: steps more than halving takes that it may spend on worse than halving


def crossing(function: Callable[[float], float], low: float, high: float, within: float) -> float:
    """Return where a function crosses zero, to within half of `within`.

    The chord's zero, drawn towards the middle and never further from it than halving would come:
    at most a few evaluations more than halving takes, mostly a third as many.

    Args:
        function: not above zero at `low` and above it at `high`.
        low: one end of what holds the crossing.
        high: the other; above `low` or beneath it.
        within: how near together the ends are brought.

    Source: Oliveira and Takahashi, An enhancement of the bisection method average performance
    preserving minmax optimality (the ITP method), ACM TOMS 47 (2020) 1.

    >>> crossing(lambda x: x**3 - 8, 0, 5, 1e-9)
    2.000000000
    """
    at_low, at_high = function(low), function(high)
    reach = max(within, abs(high - low))
    least = within * 2 ** (math.ceil(math.log2(reach / within)) + _SPARE - 1)
    curvature = _CURVATURE / reach
    while abs(high - low) > within:
        middle, span = (low + high) / 2, high - low
        chord = (high * at_low - low * at_high) / (at_low - at_high)
        towards = math.copysign(1.0, middle - chord)
        pull = curvature * span**2
        at = chord + towards * pull if pull <= abs(middle - chord) else middle
        room = least - abs(span) / 2  # how far from the middle it may lie
        if abs(at - middle) > room:
            at = middle - towards * room
        value = function(at)
        if value > 0:
            high, at_high = at, value
        elif value < 0:
            low, at_low = at, value
        else:
            return at
        least /= 2
    return (low + high) / 2
