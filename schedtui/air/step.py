"""A working: the numbers and the formula behind a result, one step at a time.

A function of this package that is given a `Steps` appends what it has just computed, so that a
working is never a second computation. A formula is written as it would be printed, constants and
conversions included, in the unit system at hand: put its numbers in and the result comes out.

Knows nothing of how a working is shown.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

from schedtui.units import ENTHALPY, TEMPERATURE, Quantity, System

Number = tuple[str, float, Quantity]
"""A number that goes into a formula: its symbol there, its value, what it measures."""

HANDBOOK: Final = "ASHRAE Handbook—Fundamentals, ch. 1"
HANDBOOK_LOADS: Final = "ASHRAE Handbook—Fundamentals, ch. 18"
HANDBOOK_COILS: Final = (
    "ASHRAE Handbook—HVAC Systems and Equipment, air-cooling and dehumidifying coils"
)


@dataclass(frozen=True, slots=True)
class Step:
    """One line of a working.

    Args:
        symbol: the result's symbol in the formula.
        name: what the result is, in words.
        formula: as printed, `symbol = …`.
        numbers: what goes into it, in the order it comes.
        result: what comes out.
        quantity: what the result measures.
        source: where the method is published.
    """

    symbol: str
    name: str
    formula: str
    numbers: tuple[Number, ...]
    result: float
    quantity: Quantity
    source: str


class Steps(list[Step]):
    """The steps of a working, in the order they were computed."""


def enthalpy_step(
    system: System, symbol: str, name: str, t: Number, w: Number, result: float
) -> Step:
    """Return the step of an enthalpy from dry bulb and humidity ratio.

    Args:
        system: the unit system.
        symbol: the enthalpy's symbol.
        name: what it is the enthalpy of.
        t: the dry bulb [°F | °C].
        w: the humidity ratio [lb/lb | kg/kg].
        result: the enthalpy [Btu/lb | kJ/kg].

    Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 30.
    """
    right = {
        "IP": f"0.24 · {t[0]} + {w[0]} · (1061 + 0.444 · {t[0]})",
        "SI": f"1.006 · {t[0]} + {w[0]} · (2501 + 1.86 · {t[0]})",
    }[system]
    return Step(symbol, name, f"{symbol} = {right}", (t, w), result, ENTHALPY, HANDBOOK)


def dry_bulb_step(
    system: System, symbol: str, name: str, h: Number, w: Number, result: float
) -> Step:
    """Return the step of a dry bulb from enthalpy and humidity ratio.

    Args:
        system: the unit system.
        symbol: the dry bulb's symbol.
        name: what it is the dry bulb of.
        h: the enthalpy [Btu/lb | kJ/kg].
        w: the humidity ratio [lb/lb | kg/kg].
        result: the dry bulb [°F | °C].

    Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 30, solved for the temperature.
    """
    right = {
        "IP": f"({h[0]} − 1061 · {w[0]}) / (0.24 + 0.444 · {w[0]})",
        "SI": f"({h[0]} − 2501 · {w[0]}) / (1.006 + 1.86 · {w[0]})",
    }[system]
    return Step(symbol, name, f"{symbol} = {right}", (h, w), result, TEMPERATURE, HANDBOOK)
