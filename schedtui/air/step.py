"""A working: the numbers and the formula behind a result, one step at a time.

A function of this package that is given a `Steps` appends what it has just computed, so that a
working is never a second computation. A formula is written as it would be printed, constants and
conversions included, in the unit system at hand: put its numbers in and the result comes out.

Knows nothing of how a working is shown.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from typing import TYPE_CHECKING, Final

from schedtui.units import ENTHALPY, TEMPERATURE, Quantity, System

if TYPE_CHECKING:
    from collections.abc import Mapping

Number = tuple[str, float, Quantity]
"""A number that goes into a formula: its symbol there, its value, what it measures."""

SYMBOL: Final = re.compile(r"(?<![\w.])[A-Za-zΔεη]+(?:_[a-z0-9]+)?")
"""A symbol in a formula; the names of functions look the same."""

# Properties of a stream of air, whose symbols take the stream's subscript; a ton stands apart.
OF_A_STREAM: Final = frozenset({"t", "wb", "dp", "RH", "W", "h", "v", "m", "Q", "SHR", "tons"})
# What a state comes about by, written down anew for each.
_IN_BETWEEN: Final = frozenset({"T", "p_sat", "p_w", "W_sat"})
_NO_NAMES: Final[Mapping[str, str]] = {}
_SAME: Final = 1e-9  # relative difference below which two numbers are shown alike

DEFINITION: Final = "by definition"
HANDBOOK: Final = "ASHRAE Handbook—Fundamentals, ch. 1"
_EQ_30: Final = f"{HANDBOOK}, eq. 30"
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

    def renamed(self, bare: str, subscripts: Mapping[str, str]) -> Step:
        """Return this step with its symbols told apart by their streams.

        Args:
            bare: the subscript of a property of air that has none.
            subscripts: what other subscripts become; one that is not named stays.
        """

        def symbol_of(found: str) -> str:
            base, line, subscript = found.partition("_")
            if line:
                return f"{base}_{subscripts.get(subscript, subscript)}"
            return f"{base}_{bare}" if bare and base in OF_A_STREAM else base

        return Step(
            symbol_of(self.symbol),
            self.name,
            SYMBOL.sub(lambda match: symbol_of(match[0]), self.formula),
            tuple((symbol_of(symbol), value, of) for symbol, value, of in self.numbers),
            self.result,
            self.quantity,
            self.source,
        )

    def says_the_same(self, other: Step) -> bool:
        """Tell whether another step has the same formula and, as far as shown, the same numbers."""
        return (
            self.formula == other.formula
            and len(self.numbers) == len(other.numbers)
            and math.isclose(self.result, other.result, rel_tol=_SAME)
            and all(
                math.isclose(mine[1], its[1], rel_tol=_SAME)
                for mine, its in zip(self.numbers, other.numbers, strict=True)
            )
        )


class Steps(list[Step]):
    """The steps of a working, in the order they were computed; nothing is said twice on end."""

    def append(self, step: Step) -> None:
        """Append a step, unless it is what its symbol stands for already."""
        latest = next((one for one in reversed(self) if one.symbol == step.symbol), None)
        if latest is None or step.symbol in _IN_BETWEEN or not step.says_the_same(latest):
            super().append(step)

    def named(self, bare: str = "", subscripts: Mapping[str, str] = _NO_NAMES) -> Steps:
        """Return a place to append to whose steps come in here with their streams' subscripts.

        Args:
            bare: the subscript of a property of air that has none.
            subscripts: what other subscripts become; one that is not named stays.

        >>> steps = Steps()
        >>> h, w = ("h_a", 31.45, ENTHALPY), ("W", 0.0111, ENTHALPY)
        >>> steps.named("m", {"a": "o"}).append(dry_bulb_step("IP", "t", "dry bulb", h, w, 80))
        >>> steps[0].formula
        't_m = (h_o − 1061 · W_m) / (0.24 + 0.444 · W_m)'
        """
        return _Renaming(self, bare, subscripts)


class _Renaming(Steps):
    """Hands each step on with its symbols renamed."""

    def __init__(self, to: Steps, bare: str, subscripts: Mapping[str, str]) -> None:
        super().__init__()
        self._to = to
        self._bare = bare
        self._subscripts = subscripts

    def append(self, step: Step) -> None:
        """Rename a step and hand it on."""
        self._to.append(step.renamed(self._bare, self._subscripts))


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
    return Step(symbol, name, f"{symbol} = {right}", (t, w), result, ENTHALPY, _EQ_30)


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
    return Step(symbol, name, f"{symbol} = {right}", (h, w), result, TEMPERATURE, _EQ_30)
