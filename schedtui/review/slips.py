"""Slips of the unit: by what a number typed in another unit is off.

A number that stands to the one expected as such a factor was most likely typed in that unit.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.units import AIR_PRESSURE, AIRFLOW, LOAD, SHAFT_POWER, WATER_FLOW, Quantity, System

if TYPE_CHECKING:
    from collections.abc import Iterator

_LIKE = 0.12  # share of a factor that a number may be off and still look like that slip
_POWER_LIKE = 0.04  # the same for horsepower and kilowatts, which are near one another


@dataclass(frozen=True, slots=True)
class Slip:
    """One slip.

    Args:
        factor: what a number so typed is, over what it should be.
        what: what was done, in words.
        like: share of the factor that a number may be off.
    """

    factor: float
    what: str
    like: float = _LIKE

    def fits(self, ratio: float) -> bool:
        """Tell whether a ratio of typed over expected looks like this slip.

        >>> kilowatts = Slip(1 / 3.412, "typed in kW")
        >>> kilowatts.fits(0.3), kilowatts.fits(0.4)
        (True, False)
        """
        return abs(ratio / self.factor - 1) <= self.like


_ANY = (
    Slip(1000.0, "a thousand times too large"),
    Slip(1 / 1000, "a thousand times too small"),
    Slip(100.0, "two places too large"),
    Slip(1 / 100, "two places too small"),
)

# 1 kW is 3.412 MBH; 1 ton is 12 MBH and 3.517 kW; 2.119 cfm are 1 L/s, which is 3.6 m³/h;
# 15.85 gpm are 1 L/s; 1.341 hp are 1 kW; 249 Pa are 1 in. wg.
_SLIPS: dict[tuple[Quantity, System], tuple[Slip, ...]] = {
    (LOAD, "IP"): (
        Slip(1 / 3.412, "typed in kW"),
        Slip(1 / 12, "typed in tons"),
        Slip(12.0, "twelve times too large"),
        *_ANY,
    ),
    (LOAD, "SI"): (Slip(3.412, "typed in MBH"), Slip(1 / 3.517, "typed in tons"), *_ANY),
    (AIRFLOW, "IP"): (Slip(1 / 2.119, "typed in L/s"), Slip(3.6 / 2.119, "typed in m³/h"), *_ANY),
    (WATER_FLOW, "IP"): (
        Slip(1 / 15.85, "typed in L/s"),
        Slip(1 / 4.403, "typed in m³/h"),
        *_ANY,
    ),
    (WATER_FLOW, "SI"): (Slip(15.85, "typed in gpm"), Slip(3.6, "typed in m³/h"), *_ANY),
    (SHAFT_POWER, "IP"): (Slip(1 / 1.341, "typed in kW", _POWER_LIKE), *_ANY),
    (SHAFT_POWER, "SI"): (Slip(1.341, "typed in hp", _POWER_LIKE), *_ANY),
    (AIR_PRESSURE, "IP"): (Slip(249.0, "typed in Pa"), Slip(25.4, "typed in mm wg")),
    (AIR_PRESSURE, "SI"): (Slip(1 / 249, "typed in in. wg"), Slip(1 / 1000, "typed in kPa")),
    (AIRFLOW, "SI"): (Slip(2.119, "typed in cfm"), Slip(3.6, "typed in m³/h"), *_ANY),
}


def slips(quantity: Quantity, system: System, ratio: float) -> Iterator[Slip]:
    """Return the slips that a ratio of typed over expected looks like.

    Args:
        quantity: what the number measures.
        system: the unit system it should be in.
        ratio: the number over what is expected.
    """
    if ratio > 0:
        yield from (slip for slip in _SLIPS[quantity, system] if slip.fits(ratio))
