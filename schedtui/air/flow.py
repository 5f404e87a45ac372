"""Streams: the dry air in a volume flow, and the heat and moisture that a stream carries.

Here stand the conversions between the trade's units of flow and load, each once: a load is in MBH
or kW, moisture in pounds or kilograms an hour.

Knows nothing of equipment.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Final, Literal

from schedtui.air.psychro import STANDARD_PRESSURE
from schedtui.air.step import HANDBOOK, HANDBOOK_LOADS, Number, Step, Steps
from schedtui.errors import AirError
from schedtui.units import AIR_MASS_FLOW, AIRFLOW, SPECIFIC_VOLUME, STATION_PRESSURE, System

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

_BTU_H_PER_MBH = 1000.0
_SECONDS_PER_HOUR = 3600.0

_MASS_FORMULA: Final[dict[System, dict[AirflowBasis, str]]] = {
    "IP": {
        "standard": "m = 60 · Q · 0.075",
        "site": "m = 60 · Q · 0.075 · p / p_0",
        "actual": "m = 60 · Q / v",
    },
    "SI": {
        "standard": "m = Q / 1000 · 1.2",
        "site": "m = Q / 1000 · 1.2 · p / p_0",
        "actual": "m = Q / 1000 / v",
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
        steps: the working to append to.

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
            numbers += (("v", state_v, SPECIFIC_VOLUME),)
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


def _mass_of_one(basis: AirflowBasis, air: Air, state_v: float | None) -> float:
    """Return the dry air in a volume flow of one [lb/h in 1 cfm | kg/s in 1 L/s]."""
    volume = 60.0 if air.system == "IP" else 1 / 1000  # ft³/h in a cfm, m³/s in a L/s
    if basis == "actual":
        if state_v is None:
            raise AirError("a flow on the actual basis needs the state of its air")
        return volume / state_v
    standard = volume * STANDARD_DENSITY[air.system]
    return standard * air.density_ratio if basis == "site" else standard
