"""Air-to-air energy recovery: what the outdoor air takes over from the air that leaves.

Knows nothing of seasons' schedules; whether recovery pays is asked of it, not decided by it.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING, Final

from schedtui.air.derivation import saturation
from schedtui.air.step import DEFINITION, Number, Step, Steps, enthalpy_step
from schedtui.units import AIR_MASS_FLOW, HUMIDITY_RATIO, PERCENT, RATIO, TEMPERATURE

if TYPE_CHECKING:
    from schedtui.air.state import State

_SOURCE: Final = "ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery; ASHRAE 84"
_FROST: Final = (
    "ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery, frost control"
)
_KINDS: Final = {"s": "sensible", "l": "latent"}


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

    def held_back(self, share: float, steps: Steps | None = None) -> Effectiveness:
        """Return the effectiveness of a recovery that works with a share of its own.

        Args:
            share: of the rated effectiveness, 0 to 1.
            steps: the working to append to, where the share is less than 1.
        """
        held = replace(self, sensible=self.sensible * share, latent=self.latent * share)
        if steps is not None and share != 1:
            for kind, rated, now in (
                ("s", self.sensible, held.sensible),
                ("l", self.latent, held.latent),
            ):
                if rated:
                    numbers: tuple[Number, ...] = (
                        ("x_fr", share, RATIO),
                        (f"ε_{kind}r", rated, PERCENT),
                    )
                    name = f"{_KINDS[kind]} effectiveness, held back"
                    formula = f"ε_{kind} = x_fr · ε_{kind}r"
                    steps.append(
                        Step(f"ε_{kind}", name, formula, numbers, now, PERCENT, DEFINITION)
                    )
        return held


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
        steps: the working to append to; the outdoor air has the subscript i there.

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
    steps: Steps | None = None,
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
        steps: the working to append to; the outdoor air has the subscript i there.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery, frost control.
    """
    if exhaust_mass == 0:
        return 1.0  # there is nothing to freeze
    flow = min(outdoor_mass, exhaust_mass) if effectiveness.by_least_flow else outdoor_mass
    taken = effectiveness.sensible / 100 * flow / exhaust_mass
    # t_4 = t_3 − ε · m_min/m_e · (t_3 − t_1), and W_4 likewise
    leaving = exhaust.db - taken * (exhaust.db - outdoor.db)
    masses = (("m_o", outdoor_mass, AIR_MASS_FLOW), ("m_x", exhaust_mass, AIR_MASS_FLOW))
    if steps is not None:
        _append_exhaust_db(steps, outdoor, exhaust, masses, effectiveness, leaving)
    if leaving >= least:
        return 1.0
    moisture = effectiveness.latent / 100 * flow / exhaust_mass * (exhaust.w - outdoor.w)
    if steps is not None:
        w = exhaust.w - moisture
        _append_exhaust_moisture(steps, outdoor, exhaust, masses, effectiveness, w)
        t_ex: Number = ("t_ex", leaving, TEMPERATURE)
        saturation(steps, outdoor.air.formulas, t_ex, outdoor.air.pressure)
    if exhaust.w - moisture <= outdoor.air.saturation_humidity_ratio(leaving):
        return 1.0
    share = max((exhaust.db - least) / (exhaust.db - leaving), 0.0)
    if steps is not None:
        _append_share(steps, exhaust, least, leaving, share)
    return share


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
    name, formula = "recovered dry bulb", f"t_rec = t_i − ε_s / 100{ratio} · (t_i − t_ret)"
    given: tuple[Number, ...] = (
        ("t_i", outdoor.db, TEMPERATURE),
        ("t_ret", exhaust.db, TEMPERATURE),
        ("ε_s", effectiveness.sensible, PERCENT),
        *numbers,
    )
    steps.append(Step("t_rec", name, formula, given, state.db, TEMPERATURE, _SOURCE))
    name, formula = "recovered humidity ratio", f"W_rec = W_i − ε_l / 100{ratio} · (W_i − W_ret)"
    given = (
        ("W_i", outdoor.w, HUMIDITY_RATIO),
        ("W_ret", exhaust.w, HUMIDITY_RATIO),
        ("ε_l", effectiveness.latent, PERCENT),
        *numbers,
    )
    if effectiveness.latent == 0:
        name, formula, given = f"{name}: as before", "W_rec = W_i", given[:1]
    t_rec: Number = ("t_rec", state.db, TEMPERATURE)
    if state.w == state.air.saturation_humidity_ratio(state.db):
        saturation(steps, state.air.formulas, t_rec, state.air.pressure)
        name, formula = f"{name}: the air is saturated, and goes no further", "W_rec = W_sat"
        given = (("W_sat", state.w, HUMIDITY_RATIO),)
    steps.append(Step("W_rec", name, formula, given, state.w, HUMIDITY_RATIO, _SOURCE))
    w_rec: Number = ("W_rec", state.w, HUMIDITY_RATIO)
    name = "enthalpy of the recovered air"
    steps.append(enthalpy_step(state.air.system, "h_rec", name, t_rec, w_rec, state.h))


def _flows_of_exhaust(
    effectiveness: Effectiveness, masses: tuple[Number, Number]
) -> tuple[str, tuple[Number, ...]]:
    """Return what the exhaust's flow makes of the effectiveness, as printed, and its numbers."""
    return ("min(m_o, m_x) / m_x" if effectiveness.by_least_flow else "m_o / m_x"), masses


def _append_exhaust_db(
    steps: Steps,
    outdoor: State,
    exhaust: State,
    masses: tuple[Number, Number],
    effectiveness: Effectiveness,
    leaving: float,
) -> None:
    """Append the dry bulb that the exhaust would leave at if nothing held the recovery back."""
    ratio, flows = _flows_of_exhaust(effectiveness, masses)
    numbers: tuple[Number, ...] = (
        ("t_ret", exhaust.db, TEMPERATURE),
        ("ε_sr", effectiveness.sensible, PERCENT),
        *flows,
        ("t_i", outdoor.db, TEMPERATURE),
    )
    name = "dry bulb of the exhaust leaving the recovery, at its rated effectiveness"
    formula = f"t_ex = t_ret − ε_sr / 100 · {ratio} · (t_ret − t_i)"
    steps.append(Step("t_ex", name, formula, numbers, leaving, TEMPERATURE, _SOURCE))


def _append_exhaust_moisture(
    steps: Steps,
    outdoor: State,
    exhaust: State,
    masses: tuple[Number, Number],
    effectiveness: Effectiveness,
    w: float,
) -> None:
    """Append the humidity ratio that the exhaust would leave with likewise."""
    ratio, flows = _flows_of_exhaust(effectiveness, masses)
    numbers: tuple[Number, ...] = (("W_ret", exhaust.w, HUMIDITY_RATIO),)
    name, formula = "its humidity ratio", "W_ex = W_ret"
    if effectiveness.latent:
        formula = f"W_ex = W_ret − ε_lr / 100 · {ratio} · (W_ret − W_i)"
        numbers += (
            ("ε_lr", effectiveness.latent, PERCENT),
            *flows,
            ("W_i", outdoor.w, HUMIDITY_RATIO),
        )
    steps.append(Step("W_ex", name, formula, numbers, w, HUMIDITY_RATIO, _SOURCE))


def _append_share(steps: Steps, exhaust: State, least: float, leaving: float, share: float) -> None:
    """Append the share of its effectiveness that keeps the exhaust from freezing."""
    numbers: tuple[Number, ...] = (
        ("t_ret", exhaust.db, TEMPERATURE),
        ("t_min", least, TEMPERATURE),
        ("t_ex", leaving, TEMPERATURE),
    )
    name = "share of the effectiveness at which the exhaust leaves no colder than allowed"
    formula = "x_fr = max((t_ret − t_min) / (t_ret − t_ex), 0)"
    steps.append(Step("x_fr", name, formula, numbers, share, RATIO, _FROST))
