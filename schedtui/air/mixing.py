"""Streams that join: adiabatic mixing, and one stream taken out of a mixture again.

A mixture of two unsaturated streams may be foggy; its state says so and is no error.

Knows nothing of which streams these are.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.step import HANDBOOK, Number, Step, Steps, dry_bulb_step
from schedtui.errors import AirError
from schedtui.units import AIR_MASS_FLOW, ENTHALPY, HUMIDITY_RATIO

if TYPE_CHECKING:
    from schedtui.air.state import Air, State


def mix(a: State, mass_a: float, b: State, mass_b: float, steps: Steps | None = None) -> State:
    """Return the state of two streams mixed adiabatically.

    Args:
        a: one stream.
        mass_a: its dry air [lb/h | kg/s].
        b: the other stream.
        mass_b: its dry air [lb/h | kg/s].
        steps: the working to append to.

    Raises:
        AirError: no air flows, or the streams are not air of one place.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, adiabatic mixing of two moist airstreams.

    >>> from schedtui.air.state import Air
    >>> air = Air("IP", 14.696)
    >>> mix(air.by_wet_bulb(95, 75), 1, air.by_relative_humidity(75, 50), 3).db
    80.03
    """
    air = _one_air(a, b)
    total = mass_a + mass_b
    if mass_a < 0 or mass_b < 0 or not total > 0:
        raise AirError("no air flows to be mixed")
    # Enthalpy and moisture are conserved; the dry bulb follows from the two.
    h = (mass_a * a.h + mass_b * b.h) / total
    w = (mass_a * a.w + mass_b * b.w) / total
    mixed = air.by_enthalpy(h, w)
    if steps is not None:
        masses: tuple[Number, ...] = (
            ("m_p", mass_a, AIR_MASS_FLOW),
            ("m_q", mass_b, AIR_MASS_FLOW),
        )
        _append(steps, mixed, "mixture", masses, _TWO_STREAMS, a, b)
    if mass_b == 0:
        return a  # itself, wet bulb as stated and all
    return b if mass_a == 0 else mixed


def unmix(
    mixed: State,
    mass_mixed: float,
    known: State,
    mass_known: float,
    steps: Steps | None = None,
) -> State:
    """Return the state of the stream that makes a mixture with a known one.

    Args:
        mixed: the mixture.
        mass_mixed: its dry air [lb/h | kg/s].
        known: one of the two streams in it.
        mass_known: its dry air [lb/h | kg/s].
        steps: the working to append to.

    Raises:
        AirError: nothing is left beside the known stream, or what is left is no moist air.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, adiabatic mixing, solved for one stream.
    """
    air = _one_air(mixed, known)
    left = mass_mixed - mass_known
    if mass_known < 0 or not left > 0:
        raise AirError("no air is left in the mixture beside the known stream")
    if mass_known == 0:
        return mixed
    h = (mass_mixed * mixed.h - mass_known * known.h) / left
    w = (mass_mixed * mixed.w - mass_known * known.w) / left
    other = air.by_enthalpy(h, w)
    if steps is not None:
        masses: tuple[Number, ...] = (
            ("m_p", mass_mixed, AIR_MASS_FLOW),
            ("m_q", mass_known, AIR_MASS_FLOW),
        )
        _append(steps, other, "other stream", masses, _ONE_TAKEN_OUT, mixed, known)
    return other


_TWO_STREAMS = "{x} = (m_p · {x}_a + m_q · {x}_b) / (m_p + m_q)"
_ONE_TAKEN_OUT = "{x} = (m_p · {x}_a − m_q · {x}_b) / (m_p − m_q)"


def _one_air(a: State, b: State) -> Air:
    """Return the air that both are states of."""
    if a.air != b.air:
        raise AirError("streams at two pressures or in two unit systems cannot be mixed")
    return a.air


def _append(
    steps: Steps,
    result: State,
    name: str,
    masses: tuple[Number, ...],
    formula: str,
    a: State,
    b: State,
) -> None:
    """Append enthalpy, humidity ratio and dry bulb of a mixture."""
    h_numbers = (*masses, ("h_a", a.h, ENTHALPY), ("h_b", b.h, ENTHALPY))
    w_numbers = (*masses, ("W_a", a.w, HUMIDITY_RATIO), ("W_b", b.w, HUMIDITY_RATIO))
    h_formula, w_formula = formula.format(x="h"), formula.format(x="W")
    steps.append(
        Step("h", f"enthalpy of the {name}", h_formula, h_numbers, result.h, ENTHALPY, HANDBOOK)
    )
    steps.append(
        Step(
            "W",
            f"humidity ratio of the {name}",
            w_formula,
            w_numbers,
            result.w,
            HUMIDITY_RATIO,
            HANDBOOK,
        )
    )
    h, w = ("h", result.h, ENTHALPY), ("W", result.w, HUMIDITY_RATIO)
    steps.append(dry_bulb_step(result.air.system, "t", f"dry bulb of the {name}", h, w, result.db))
