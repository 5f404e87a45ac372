"""Air-to-air energy recovery: what the outdoor air takes over from the air that leaves.

Knows nothing of seasons' schedules; whether recovery pays is asked of it, not decided by it.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Final

from schedtui.air.step import Number, Step, Steps
from schedtui.units import AIR_MASS_FLOW, HUMIDITY_RATIO, PERCENT, TEMPERATURE

if TYPE_CHECKING:
    from schedtui.air.state import State

_SOURCE: Final = "ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery; ASHRAE 84"


@dataclass(frozen=True, slots=True)
class Effectiveness:
    """How well a recovery does.

    Args:
        sensible: sensible effectiveness [%].
        latent: latent effectiveness [%].
        by_least_flow: whether it goes with the smaller of both flows, as ratings do; else with
            the outdoor air's own.
    """

    sensible: float
    latent: float
    by_least_flow: bool = True


def recovered(
    outdoor: State,
    outdoor_mass: float,
    exhaust: State,
    exhaust_mass: float,
    effectiveness: Effectiveness,
    steps: Steps | None = None,
) -> State:
    """Return the outdoor air behind a recovery; never past saturation.

    Args:
        outdoor: outdoor air.
        outdoor_mass: its dry air [lb/h | kg/s].
        exhaust: air that leaves through the recovery.
        exhaust_mass: its dry air [lb/h | kg/s].
        effectiveness: of the recovery.
        steps: the working to append to.

    Raises:
        AirError: the air would leave the formulas' range.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery, the
    definitions of effectiveness solved for the supply side.

    >>> from schedtui.air.state import Air
    >>> air = Air("IP", 14.696)
    >>> outdoor, room = air.by_wet_bulb(95, 78), air.by_relative_humidity(75, 50)
    >>> recovered(outdoor, 4500, room, 4500, Effectiveness(70, 0)).db
    81.0
    """
    share = 1.0
    if effectiveness.by_least_flow:
        share = min(outdoor_mass, exhaust_mass) / outdoor_mass
    # x_2 = x_1 − ε · m_min/m_o · (x_1 − x_3), on dry bulb and on humidity ratio
    db = outdoor.db - effectiveness.sensible / 100 * share * (outdoor.db - exhaust.db)
    w = outdoor.w - effectiveness.latent / 100 * share * (outdoor.w - exhaust.w)
    state = outdoor.at(db=db, w=min(w, outdoor.air.saturation_humidity_ratio(db)))
    if steps is not None:
        masses = (("m_o", outdoor_mass, AIR_MASS_FLOW), ("m_x", exhaust_mass, AIR_MASS_FLOW))
        _append(steps, outdoor, exhaust, masses, effectiveness, state)
    return state


def _append(
    steps: Steps,
    outdoor: State,
    exhaust: State,
    masses: tuple[Number, Number],
    effectiveness: Effectiveness,
    state: State,
) -> None:
    """Append the dry bulb and the humidity ratio behind the recovery."""
    ratio, numbers = "", ()
    if effectiveness.by_least_flow:
        ratio, numbers = " · min(m_o, m_x) / m_o", masses
    saturated = "W_sat at t_2" if state.w == state.air.saturation_humidity_ratio(state.db) else ""
    for symbol, name, share, before, after, result, quantity, unless in (
        ("t", "recovered dry bulb", effectiveness.sensible, outdoor.db, exhaust.db, state.db,
         TEMPERATURE, ""),
        ("W", "recovered humidity ratio", effectiveness.latent, outdoor.w, exhaust.w, state.w,
         HUMIDITY_RATIO, saturated),
    ):  # fmt: skip
        formula = f"{symbol}_2 = {symbol}_1 − ε / 100{ratio} · ({symbol}_1 − {symbol}_3)"
        steps.append(
            Step(
                f"{symbol}_2",
                name,
                f"{symbol}_2 = {unless}" if unless else formula,
                (
                    (f"{symbol}_1", before, quantity),
                    (f"{symbol}_3", after, quantity),
                    ("ε", share, PERCENT),
                    *numbers,
                ),
                result,
                quantity,
                _SOURCE,
            )
        )
