"""Streams: the dry air in a volume flow, and the heat and moisture that a stream carries.

Here stand the conversions between the trade's units of flow and load, each once: a load is in MBH
or kW, moisture in pounds or kilograms an hour.

Knows nothing of equipment.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Final, Literal

from schedtui.air.psychro import STANDARD_PRESSURE
from schedtui.air.step import DEFINITION, HANDBOOK, HANDBOOK_LOADS, Number, Step, Steps
from schedtui.errors import AirError
from schedtui.units import (
    AIR_MASS_FLOW,
    AIRFLOW,
    LOAD,
    PERCENT,
    RATIO,
    SPECIFIC_VOLUME,
    STATION_PRESSURE,
    System,
)

if TYPE_CHECKING:
    from schedtui.air.state import Air

AirflowBasis = Literal["standard", "site", "actual"]
"""What a stated volume flow is a volume of: standard air, site air, or air at its own state."""

STANDARD_DENSITY: Final[dict[System, float]] = {"IP": 0.075, "SI": 1.2}
"""Density of standard air [lb/ft³ | kg/m³]."""

PER_THOUSAND: Final[dict[System, str]] = {"IP": " / 1000", "SI": ""}
"""What makes a load of mass times enthalpy, as printed: Btu/h to MBH; kg/s · kJ/kg is kW."""

PER_HOUR: Final[dict[System, str]] = {"IP": "", "SI": " · 3600"}
"""What makes an hourly moisture flow of mass times humidity ratio, as printed."""

TIMES_THOUSAND: Final[dict[System, str]] = {"IP": " · 1000", "SI": ""}
"""What makes mass times enthalpy of a load, as printed."""

_BTU_H_PER_MBH = 1000.0
_SECONDS_PER_HOUR = 3600.0

_MASS_FORMULA: Final[dict[System, dict[AirflowBasis, str]]] = {
    "IP": {
        "standard": "m = 60 · Q · 0.075",
        "site": "m = 60 · Q · 0.075 · p / p_0",
        "actual": "m = 60 · Q / v_a",
    },
    "SI": {
        "standard": "m = Q / 1000 · 1.2",
        "site": "m = Q / 1000 · 1.2 · p / p_0",
        "actual": "m = Q / 1000 / v_a",
    },
}


def dry_air_mass(
    airflow: float,
    basis: AirflowBasis,
    air: Air,
    state_v: float | None = None,
    steps: Steps | None = None,
) -> float:
    """Return the mass flow of dry air [lb/h | kg/s] in a volume flow.

    Args:
        airflow: volume flow [cfm | L/s].
        basis: what the volume is a volume of.
        air: the air at the station.
        state_v: specific volume of the stream's own state [ft³/lb | m³/kg]; only the actual
            basis asks for it.
        steps: the working to append to; the state has the subscript a there.

    Raises:
        AirError: the basis is actual and no specific volume is given.

    Source: standard air after ASHRAE Handbook—Fundamentals, ch. 18, air-side equations.

    >>> from schedtui.air.state import Air
    >>> dry_air_mass(10_000, "standard", Air("IP", 14.696))
    45000.0
    """
    mass = airflow * _mass_of_one(basis, air, state_v)
    if steps is not None:
        numbers: tuple[Number, ...] = (("Q", airflow, AIRFLOW),)
        if basis == "site":
            p0 = STANDARD_PRESSURE[air.system]
            numbers += (("p", air.pressure, STATION_PRESSURE), ("p_0", p0, STATION_PRESSURE))
        if basis == "actual" and state_v is not None:
            numbers += (("v_a", state_v, SPECIFIC_VOLUME),)
        formula = _MASS_FORMULA[air.system][basis]
        source = HANDBOOK if basis == "actual" else HANDBOOK_LOADS
        name = f"dry-air mass flow, {basis} basis"
        steps.append(Step("m", name, formula, numbers, mass, AIR_MASS_FLOW, source))
    return mass


def volume_flow(mass: float, basis: AirflowBasis, air: Air, state_v: float | None = None) -> float:
    """Return the volume flow [cfm | L/s] that holds a mass flow of dry air.

    Args:
        mass: dry air [lb/h | kg/s].
        basis: what the volume is to be a volume of.
        air: the air at the station.
        state_v: specific volume of the stream's own state [ft³/lb | m³/kg]; only the actual
            basis asks for it.

    Raises:
        AirError: the basis is actual and no specific volume is given.
    """
    return mass / _mass_of_one(basis, air, state_v)


def heat_flow(mass: float, difference: float, system: System) -> float:
    """Return the heat [MBH | kW] that a stream takes up or gives off.

    Args:
        mass: dry air [lb/h | kg/s].
        difference: of enthalpy [Btu/lb | kJ/kg of dry air].
        system: the unit system.
    """
    return mass * difference / (_BTU_H_PER_MBH if system == "IP" else 1.0)


def enthalpy_difference(mass: float, heat: float, system: System) -> float:
    """Return the enthalpy difference [Btu/lb | kJ/kg of dry air] that heat makes in a stream.

    Args:
        mass: dry air [lb/h | kg/s].
        heat: what the stream takes up [MBH | kW].
        system: the unit system.

    Raises:
        AirError: no air flows.
    """
    if not mass > 0:
        raise AirError("no air flows to take up the heat")
    return heat * (_BTU_H_PER_MBH if system == "IP" else 1.0) / mass


def moisture_flow(mass: float, difference: float, system: System) -> float:
    """Return the moisture [lb/h | kg/h] that a stream takes up or gives off.

    Args:
        mass: dry air [lb/h | kg/s].
        difference: of humidity ratio [lb/lb | kg/kg].
        system: the unit system.
    """
    return mass * difference * (1.0 if system == "IP" else _SECONDS_PER_HOUR)


def rest_of(mass: float, part: float, what: str, steps: Steps | None = None) -> float:
    """Return the dry air that is left of a stream beside a part of it [lb/h | kg/s].

    Args:
        mass: the whole stream [lb/h | kg/s].
        part: the part [lb/h | kg/s].
        what: what is left, for the working.
        steps: the working to append to; p is the whole there, q the part.
    """
    rest = mass - part
    if steps is not None:
        name, formula = f"{what}: all of it", "m = m_p"
        numbers: tuple[Number, ...] = (("m_p", mass, AIR_MASS_FLOW),)
        if part:
            name, formula = what, "m = m_p − m_q"
            numbers += (("m_q", part, AIR_MASS_FLOW),)
        steps.append(Step("m", name, formula, numbers, rest, AIR_MASS_FLOW, DEFINITION))
    return rest


def part_of(mass: float, share: float, what: str, steps: Steps | None = None) -> float:
    """Return the dry air of the supply that goes around the coil [lb/h | kg/s].

    Args:
        mass: the supply air [lb/h | kg/s].
        share: of it, 0 to 1.
        what: what the part is, for the working.
        steps: the working to append to, where there is a part.
    """
    part = share * mass
    if steps is not None and part:
        numbers: tuple[Number, ...] = (("x_b", share, RATIO), ("m_s", mass, AIR_MASS_FLOW))
        steps.append(Step("m_b", what, "m_b = x_b · m_s", numbers, part, AIR_MASS_FLOW, DEFINITION))
    return part


def gross_load(net: float, fan_heat: float, steps: Steps | None = None) -> float:
    """Return a coil's capacity that is left for the room and the fan's heat together [MBH | kW].

    Args:
        net: the capacity without the fan's heat [MBH | kW].
        fan_heat: the fan's heat [MBH | kW]; 0 where the capacity is gross already.
        steps: the working to append to, where there is fan heat; q is the load there.
    """
    load = net + fan_heat
    if steps is not None and fan_heat:
        numbers: tuple[Number, ...] = (("q_q", net, LOAD), ("q_f", fan_heat, LOAD))
        name, formula = "gross capacity, of the net one as scheduled", "q_gross = q_q + q_f"
        steps.append(Step("q_gross", name, formula, numbers, load, LOAD, DEFINITION))
    return load


def at_part_load(load: float, percent: float, steps: Steps | None = None) -> float:
    """Return the part of a room's design load that there is at a condition [MBH | kW].

    Args:
        load: the design load [MBH | kW].
        percent: of it [%].
        steps: the working to append to, where that is not all of it; q is the result there.
    """
    part = load * percent / 100
    if steps is not None and percent != 100:  # noqa: PLR2004  percent
        name, formula = "the room's load at this condition", "q_q = q_full · L / 100"
        numbers: tuple[Number, ...] = (("q_full", load, LOAD), ("L", percent, PERCENT))
        steps.append(Step("q_q", name, formula, numbers, part, LOAD, DEFINITION))
    return part


def net_load(gross: float, fan_heat: float, steps: Steps | None = None) -> float:
    """Return a coil's load less the fan's heat that a net capacity leaves out [MBH | kW].

    Args:
        gross: the coil's load [MBH | kW].
        fan_heat: the fan's heat [MBH | kW]; 0 where the capacity is gross.
        steps: the working to append to, where there is fan heat; q is the load there.
    """
    load = gross - fan_heat
    if steps is not None and fan_heat:
        numbers: tuple[Number, ...] = (("q_q", gross, LOAD), ("q_f", fan_heat, LOAD))
        name, formula = "required net capacity: the fan's heat is taken off", "q_net = q_q − q_f"
        steps.append(Step("q_net", name, formula, numbers, load, LOAD, DEFINITION))
    return load


def _mass_of_one(basis: AirflowBasis, air: Air, state_v: float | None) -> float:
    """Return the dry air in a volume flow of one [lb/h in 1 cfm | kg/s in 1 L/s]."""
    volume = 60.0 if air.system == "IP" else 1 / 1000  # ft³/h in a cfm, m³/s in a L/s
    if basis == "actual":
        if state_v is None:
            raise AirError("a flow on the actual basis needs the state of its air")
        return volume / state_v
    standard = volume * STANDARD_DENSITY[air.system]
    return standard * air.density_ratio if basis == "site" else standard
