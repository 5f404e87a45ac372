"""Air-to-air energy recovery: what the outdoor air takes over from the air that leaves.

Knows nothing of seasons' schedules; whether recovery pays is asked of it, not decided by it.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Final

from schedtui.air.derivation import saturation
from schedtui.air.step import Number, Step, Steps, enthalpy_step
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


def share_before_frost(
    outdoor: State,
    outdoor_mass: float,
    exhaust: State,
    exhaust_mass: float,
    effectiveness: Effectiveness,
    least: float,
) -> float:
    """Return the share of its effectiveness that a recovery may work with, at most 1.

    It is held back only so far that the exhaust leaves no colder than `least`, and only where the
    exhaust would be wet there: dry exhaust does not freeze.

    Args:
        outdoor: outdoor air.
        outdoor_mass: its dry air [lb/h | kg/s].
        exhaust: air that leaves through the recovery, warmer than the outdoor air.
        exhaust_mass: its dry air [lb/h | kg/s].
        effectiveness: of the recovery as rated.
        least: temperature that the exhaust is kept above [°F | °C].

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery, frost control.
    """
    if exhaust_mass == 0:
        return 1.0  # there is nothing to freeze
    flow = min(outdoor_mass, exhaust_mass) if effectiveness.by_least_flow else outdoor_mass
    taken = effectiveness.sensible / 100 * flow / exhaust_mass
    # t_4 = t_3 − ε · m_min/m_e · (t_3 − t_1), and W_4 likewise
    leaving = exhaust.db - taken * (exhaust.db - outdoor.db)
    if leaving >= least:
        return 1.0
    moisture = effectiveness.latent / 100 * flow / exhaust_mass * (exhaust.w - outdoor.w)
    if exhaust.w - moisture <= outdoor.air.saturation_humidity_ratio(leaving):
        return 1.0
    return max((exhaust.db - least) / (exhaust.db - leaving), 0.0)


def _append(
    steps: Steps,
    outdoor: State,
    exhaust: State,
    masses: tuple[Number, Number],
    effectiveness: Effectiveness,
    state: State,
) -> None:
    """Append the dry bulb and the humidity ratio behind the recovery."""
    ratio = ""
    numbers: tuple[Number, ...] = ()
    if effectiveness.by_least_flow:
        ratio, numbers = " · min(m_o, m_x) / m_o", masses
    name, formula = "recovered dry bulb", f"t_rec = t_o − ε_s / 100{ratio} · (t_o − t_ret)"
    given: tuple[Number, ...] = (
        ("t_o", outdoor.db, TEMPERATURE),
        ("t_ret", exhaust.db, TEMPERATURE),
        ("ε_s", effectiveness.sensible, PERCENT),
        *numbers,
    )
    steps.append(Step("t_rec", name, formula, given, state.db, TEMPERATURE, _SOURCE))
    name, formula = "recovered humidity ratio", f"W_rec = W_o − ε_l / 100{ratio} · (W_o − W_ret)"
    given = (
        ("W_o", outdoor.w, HUMIDITY_RATIO),
        ("W_ret", exhaust.w, HUMIDITY_RATIO),
        ("ε_l", effectiveness.latent, PERCENT),
        *numbers,
    )
    if effectiveness.latent == 0:
        name, formula, given = f"{name}: as before", "W_rec = W_o", given[:1]
    t_rec: Number = ("t_rec", state.db, TEMPERATURE)
    if state.w == state.air.saturation_humidity_ratio(state.db):
        saturation(steps, state.air.formulas, t_rec, state.air.pressure)
        name, formula = f"{name}: the air is saturated, and goes no further", "W_rec = W_sat"
        given = (("W_sat", state.w, HUMIDITY_RATIO),)
    steps.append(Step("W_rec", name, formula, given, state.w, HUMIDITY_RATIO, _SOURCE))
    w_rec: Number = ("W_rec", state.w, HUMIDITY_RATIO)
    name = "enthalpy of the recovered air"
    steps.append(enthalpy_step(state.air.system, "h_rec", name, t_rec, w_rec, state.h))
