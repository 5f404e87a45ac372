"""The ranges that a number of each quantity is accepted in.

Wide on purpose: they refuse what no schedule can mean (a slipped column, a wrong unit by
orders of magnitude) and leave everything an engineer could have drawn to the checks.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui import units

if TYPE_CHECKING:
    from schedtui.units import Quantity


@dataclass(frozen=True, slots=True)
class Range:
    """An interval of accepted numbers.

    Args:
        low: least number, or None for no bound.
        high: greatest number, or None for no bound.
        above: the least number itself is not accepted.
        below: the greatest number itself is not accepted.
    """

    low: float | None = None
    high: float | None = None
    above: bool = False
    below: bool = False

    def holds(self, number: float) -> bool:
        """Tell whether `number` lies in the range."""
        if self.low is not None and (number <= self.low if self.above else number < self.low):
            return False
        return not (
            self.high is not None and (number >= self.high if self.below else number > self.high)
        )

    def words(self) -> str:
        """Say the range in words.

        >>> Range(0).words(), Range(0, 100, above=True).words(), Range(-100, 300).words()
        ('0 or more', 'above 0 to 100', '-100 to 300')
        """
        if self.low is None:
            return "any number" if self.high is None else f"up to {self.high:g}"
        if self.high is None:
            return f"above {self.low:g}" if self.above else f"{self.low:g} or more"
        start = f"above {self.low:g}" if self.above else f"{self.low:g}"
        return f"{start} to {'below ' if self.below else ''}{self.high:g}"


ZERO_OR_MORE = Range(0)
ABOVE_ZERO = Range(0, above=True)
PERCENT = Range(0, 100)
PERCENT_ABOVE_ZERO = Range(0, 100, above=True)
PERCENT_BELOW_HUNDRED = Range(0, 100, below=True)

# Air between −100 and 300 °F; water and steam may be hotter.
AIR_TEMPERATURE = (Range(-100, 300), Range(-75, 150))
FLUID_TEMPERATURE = (Range(-100, 450), Range(-75, 230))

_BY_QUANTITY: dict[Quantity, tuple[Range, Range]] = {
    units.TEMPERATURE: AIR_TEMPERATURE,
    units.TEMPERATURE_DIFFERENCE: (Range(-100, 300), Range(-55, 165)),
    units.PERCENT: (PERCENT, PERCENT),
    units.STATION_PRESSURE: (Range(5, 16), Range(34, 110)),
    units.ALTITUDE: (Range(-1500, 36000), Range(-450, 11000)),
    units.HUMIDITY_RATIO: (Range(0, 0.2), Range(0, 0.2)),
}


def usual(quantity: Quantity) -> tuple[Range, Range]:
    """Return the ranges of a quantity, IP and SI: 0 or more unless a narrower one is known."""
    return _BY_QUANTITY.get(quantity, (ZERO_OR_MORE, ZERO_OR_MORE))
