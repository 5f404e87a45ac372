"""Rooms: what supply air does in one.

Knows nothing of where the room's loads come from.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.air.flow import (
    PER_HOUR,
    PER_THOUSAND,
    TIMES_THOUSAND,
    enthalpy_difference,
    heat_flow,
    moisture_flow,
)
from schedtui.air.step import HANDBOOK_LOADS, Number, Step, Steps, dry_bulb_step, enthalpy_step
from schedtui.units import (
    AIR_MASS_FLOW,
    ENTHALPY,
    HUMIDITY_RATIO,
    LOAD,
    MOISTURE_FLOW,
    TEMPERATURE,
)

if TYPE_CHECKING:
    from schedtui.air.state import State

_CORNER = "enthalpy at the room's dry bulb and the supply's humidity ratio"


@dataclass(frozen=True, slots=True)
class RoomMet:
    """The loads of a room that its supply air meets; negative where it adds to them.

    Args:
        sensible: sensible load met [MBH | kW].
        latent: latent load met [MBH | kW].
        moisture: moisture taken up from the room [lb/h | kg/h].
    """

    sensible: float
    latent: float
    moisture: float


def room_met(mass: float, supply: State, room: State, steps: Steps | None = None) -> RoomMet:
    """Return the loads that supply air meets in a room.

    Args:
        mass: dry supply air [lb/h | kg/s].
        supply: supply air.
        room: room air.
        steps: the working to append to.

    Source: ASHRAE Handbook—Fundamentals, ch. 18, air-side equations on the enthalpies of ch. 1.

    >>> from schedtui.air.state import Air
    >>> air = Air("IP", 14.696)
    >>> room_met(45_000, air.by_wet_bulb(57, 54.8), air.by_relative_humidity(75, 50)).sensible
    197.5
    """
    air = room.air
    # Warmed to the room's dry bulb at the supply's humidity ratio, then moistened to the room's.
    corner = air.enthalpy(room.db, supply.w)
    met = RoomMet(
        sensible=heat_flow(mass, corner - supply.h, air.system),
        latent=heat_flow(mass, room.h - corner, air.system),
        moisture=moisture_flow(mass, room.w - supply.w, air.system),
    )
    if steps is not None:
        _append_met(steps, mass, supply, room, corner, met)
    return met


def heat_met(mass: float, supply: State, room_db: float, steps: Steps | None = None) -> float:
    """Return the heating load of a room that supply air meets [MBH | kW].

    Args:
        mass: dry supply air [lb/h | kg/s].
        supply: supply air.
        room_db: dry bulb of the room [°F | °C].
        steps: the working to append to.

    Raises:
        AirError: the dry bulb is out of range.

    Source: ASHRAE Handbook—Fundamentals, ch. 18, air-side equations on the enthalpies of ch. 1.
    """
    system = supply.air.system
    cooled = supply.heated_to(room_db)
    heat = heat_flow(mass, supply.h - cooled.h, system)
    if steps is not None:
        t_r, w_s = ("t_r", room_db, TEMPERATURE), ("W_s", supply.w, HUMIDITY_RATIO)
        steps.append(enthalpy_step(system, "h_rs", _CORNER, t_r, w_s, cooled.h))
        numbers: tuple[Number, ...] = (
            ("m_s", mass, AIR_MASS_FLOW),
            ("h_s", supply.h, ENTHALPY),
            ("h_rs", cooled.h, ENTHALPY),
        )
        formula = f"q_rh = m_s · (h_s − h_rs){PER_THOUSAND[system]}"
        steps.append(Step("q_rh", "room heat met", formula, numbers, heat, LOAD, HANDBOOK_LOADS))
    return heat


def heating_supply(
    mass: float, before: State, room_db: float, heat: float, steps: Steps | None = None
) -> float:
    """Return the dry bulb at which supply air brings a room its heat [°F | °C].

    Args:
        mass: dry supply air [lb/h | kg/s].
        before: the air before it is heated, as moist as it is to be.
        room_db: dry bulb of the room [°F | °C].
        heat: that the room needs [MBH | kW].
        steps: the working to append to; the air before has the subscript i there.

    Raises:
        AirError: no air flows.

    Source: the heat of `heat_met`, solved for the supply dry bulb.

    >>> from schedtui.air.state import Air
    >>> heating_supply(45_000, Air("IP", 14.696).by_humidity_ratio(50, 0.003), 70, 300)
    97.62
    """
    air = before.air
    # Enthalpy is linear in the dry bulb: its rise from 0 to 1 is the heat of a degree.
    per_degree = air.enthalpy(1.0, before.w) - air.enthalpy(0.0, before.w)
    db = room_db + enthalpy_difference(mass, heat, air.system) / per_degree
    if steps is not None:
        degree = {"IP": "(0.24 + 0.444 · W_i)", "SI": "(1.006 + 1.86 · W_i)"}[air.system]
        numbers: tuple[Number, ...] = (
            ("t_r", room_db, TEMPERATURE),
            ("q_hv", heat, LOAD),
            ("m_s", mass, AIR_MASS_FLOW),
            ("W_i", before.w, HUMIDITY_RATIO),
        )
        formula = f"t = t_r + q_hv{TIMES_THOUSAND[air.system]} / (m_s · {degree})"
        name = "dry bulb that brings the room its heat"
        steps.append(Step("t", name, formula, numbers, db, TEMPERATURE, HANDBOOK_LOADS))
    return db


def supply_moisture(mass: float, room: State, latent: float, steps: Steps | None = None) -> float:
    """Return the humidity ratio of the supply air that meets a room's latent load [lb/lb | kg/kg].

    Args:
        mass: dry supply air [lb/h | kg/s].
        room: room air.
        latent: latent load to be met [MBH | kW].
        steps: the working to append to.

    Raises:
        AirError: no air flows.

    Source: the latent load of `room_met`, solved for the supply humidity ratio.
    """
    air = room.air
    gain = enthalpy_difference(mass, latent, air.system)
    # Enthalpy is linear in the humidity ratio: its rise from 0 to 1 is the heat of the vapour.
    w = room.w - gain / (air.enthalpy(room.db, 1.0) - air.enthalpy(room.db, 0.0))
    if steps is not None:
        vapour = {"IP": "(1061 + 0.444 · t_r)", "SI": "(2501 + 1.86 · t_r)"}[air.system]
        numbers: tuple[Number, ...] = (
            ("W_r", room.w, HUMIDITY_RATIO),
            ("q_rl", latent, LOAD),
            ("m", mass, AIR_MASS_FLOW),
            ("t_r", room.db, TEMPERATURE),
        )
        formula = f"W_s = W_r − q_rl{TIMES_THOUSAND[air.system]} / (m · {vapour})"
        name = "supply humidity ratio that meets the room's latent load"
        steps.append(Step("W_s", name, formula, numbers, w, HUMIDITY_RATIO, HANDBOOK_LOADS))
    return w


def supply_for(
    mass: float, room: State, sensible: float, w: float, steps: Steps | None = None
) -> State:
    """Return the supply air of a given humidity ratio that meets a room's sensible load.

    Args:
        mass: dry supply air [lb/h | kg/s].
        room: room air.
        sensible: sensible load to be met [MBH | kW].
        w: humidity ratio of the supply air [lb/lb | kg/kg].
        steps: the working to append to.

    Raises:
        AirError: no air flows, or the supply air would leave the formulas' range.

    Source: the sensible load of `room_met`, solved for the supply dry bulb.
    """
    system = room.air.system
    warm = room.at(w=w)
    supply = room.air.by_enthalpy(warm.h - enthalpy_difference(mass, sensible, system), w)
    if steps is not None:
        w_s: Number = ("W_s", w, HUMIDITY_RATIO)
        h_s: Number = ("h_s", supply.h, ENTHALPY)
        steps.append(
            enthalpy_step(system, "h_rs", _CORNER, ("t_r", room.db, TEMPERATURE), w_s, warm.h)
        )
        numbers: tuple[Number, ...] = (
            ("h_rs", warm.h, ENTHALPY),
            ("q_rs", sensible, LOAD),
            ("m", mass, AIR_MASS_FLOW),
        )
        formula = f"h_s = h_rs − q_rs{TIMES_THOUSAND[system]} / m"
        name = "supply enthalpy that meets the room's sensible load"
        steps.append(Step("h_s", name, formula, numbers, supply.h, ENTHALPY, HANDBOOK_LOADS))
        steps.append(dry_bulb_step(system, "t_s", "its dry bulb", h_s, w_s, supply.db))
    return supply


def moisture_to_add(mass: float, dry: State, room: State, steps: Steps | None = None) -> float:
    """Return the moisture that brings a stream to the room's humidity ratio [lb/h | kg/h].

    Args:
        mass: dry air of the stream [lb/h | kg/s].
        dry: air of the stream.
        room: room air.
        steps: the working to append to.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, humidifiers.
    """
    system = room.air.system
    moisture = max(moisture_flow(mass, room.w - dry.w, system), 0.0)
    if steps is not None:
        numbers: tuple[Number, ...] = (
            ("m", mass, AIR_MASS_FLOW),
            ("W_r", room.w, HUMIDITY_RATIO),
            ("W_o", dry.w, HUMIDITY_RATIO),
        )
        formula = f"m_w = max(m · (W_r − W_o){PER_HOUR[system]}, 0)"
        source = "ASHRAE Handbook—HVAC Systems and Equipment, humidifiers"
        name = "moisture to add"
        steps.append(Step("m_w", name, formula, numbers, moisture, MOISTURE_FLOW, source))
    return moisture


def _append_met(
    steps: Steps, mass: float, supply: State, room: State, corner: float, met: RoomMet
) -> None:
    """Append the corner of the process, the sensible and the latent load met."""
    system = room.air.system
    steps.append(
        enthalpy_step(
            system,
            "h_rs",
            _CORNER,
            ("t_r", room.db, TEMPERATURE),
            ("W_s", supply.w, HUMIDITY_RATIO),
            corner,
        )
    )
    m: Number = ("m_s", mass, AIR_MASS_FLOW)
    h_rs: Number = ("h_rs", corner, ENTHALPY)
    numbers: tuple[Number, ...] = (m, h_rs, ("h_s", supply.h, ENTHALPY))
    formula = f"q_rs = m_s · (h_rs − h_s){PER_THOUSAND[system]}"
    name = "room sensible met"
    steps.append(Step("q_rs", name, formula, numbers, met.sensible, LOAD, HANDBOOK_LOADS))
    numbers = (m, ("h_r", room.h, ENTHALPY), h_rs)
    formula = f"q_rl = m_s · (h_r − h_rs){PER_THOUSAND[system]}"
    name = "room latent met"
    steps.append(Step("q_rl", name, formula, numbers, met.latent, LOAD, HANDBOOK_LOADS))
