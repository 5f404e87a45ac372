"""Slips of the unit: by what a number typed in another unit is off.

A number that stands to the one expected as such a factor was most likely typed in that unit.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.units import AIRFLOW, LOAD, Quantity, System

if TYPE_CHECKING:
    from collections.abc import Iterator

_LIKE = 0.12  # share of a factor that a number may be off and still look like that slip


@dataclass(frozen=True, slots=True)
class Slip:
    """One slip.

    Args:
        factor: what a number so typed is, over what it should be.
        what: what was done, in words.
    """

    factor: float
    what: str

    def fits(self, ratio: float) -> bool:
        """Tell whether a ratio of typed over expected looks like this slip.

        >>> kilowatts = Slip(1 / 3.412, "typed in kW")
        >>> kilowatts.fits(0.3), kilowatts.fits(0.4)
        (True, False)
        """
        return abs(ratio / self.factor - 1) <= _LIKE


_ANY = (
    Slip(1000.0, "a thousand times too large"),
    Slip(1 / 1000, "a thousand times too small"),
    Slip(100.0, "two places too large"),
    Slip(1 / 100, "two places too small"),
)

# 1 kW is 3.412 MBH; 1 ton is 12 MBH and 3.517 kW; 1 cfm is 1/2.119 L/s; 1 L/s is 3.6 m³/h.
_SLIPS: dict[tuple[Quantity, System], tuple[Slip, ...]] = {
    (LOAD, "IP"): (
        Slip(1 / 3.412, "typed in kW"),
        Slip(1 / 12, "typed in tons"),
        Slip(12.0, "twelve times too large"),
        *_ANY,
    ),
    (LOAD, "SI"): (Slip(3.412, "typed in MBH"), Slip(1 / 3.517, "typed in tons"), *_ANY),
    (AIRFLOW, "IP"): (Slip(1 / 2.119, "typed in L/s"), Slip(3.6 / 2.119, "typed in m³/h"), *_ANY),
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
