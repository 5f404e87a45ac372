"""Rooms: what supply air does in one.

Knows nothing of where the room's loads come from.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.air.flow import PER_HOUR, PER_THOUSAND, enthalpy_difference, heat_flow, moisture_flow
from schedtui.air.step import HANDBOOK_LOADS, Number, Step, Steps, enthalpy_step
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
        numbers: tuple[Number, ...] = (
            ("m", mass, AIR_MASS_FLOW),
            ("h_s", supply.h, ENTHALPY),
            ("h_r", cooled.h, ENTHALPY),
        )
        formula = f"q_h = m · (h_s − h_r){PER_THOUSAND[system]}"
        steps.append(Step("q_h", "room heat met", formula, numbers, heat, LOAD, HANDBOOK_LOADS))
    return heat


def supply_for(mass: float, room: State, sensible: float, w: float) -> State:
    """Return the supply air of a given humidity ratio that meets a room's sensible load.

    Args:
        mass: dry supply air [lb/h | kg/s].
        room: room air.
        sensible: sensible load to be met [MBH | kW].
        w: humidity ratio of the supply air [lb/lb | kg/kg].

    Raises:
        AirError: no air flows, or the supply air would leave the formulas' range.

    Source: the sensible load of `room_met`, solved for the supply dry bulb.
    """
    warm = room.at(w=w)
    return room.air.by_enthalpy(warm.h - enthalpy_difference(mass, sensible, room.air.system), w)


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
            "h_x",
            "enthalpy at the room's dry bulb and the supply's humidity ratio",
            ("t_r", room.db, TEMPERATURE),
            ("W_s", supply.w, HUMIDITY_RATIO),
            corner,
        )
    )
    m: Number = ("m", mass, AIR_MASS_FLOW)
    h_x: Number = ("h_x", corner, ENTHALPY)
    numbers: tuple[Number, ...] = (m, h_x, ("h_s", supply.h, ENTHALPY))
    formula = f"q_s = m · (h_x − h_s){PER_THOUSAND[system]}"
    name = "room sensible met"
    steps.append(Step("q_s", name, formula, numbers, met.sensible, LOAD, HANDBOOK_LOADS))
    numbers = (m, ("h_r", room.h, ENTHALPY), h_x)
    formula = f"q_l = m · (h_r − h_x){PER_THOUSAND[system]}"
    name = "room latent met"
    steps.append(Step("q_l", name, formula, numbers, met.latent, LOAD, HANDBOOK_LOADS))
