"""Steam, electricity and fuel: the heat of a coil that no flow of liquid brings.

Steam gives its latent heat at the pressure in the coil; what condensate gives when it cools
further is not counted.

Knows nothing of coils.
"""

from __future__ import annotations

from typing import Final

from schedtui.air.fluid_tables import (
    IAPWS_SATURATION,
    STEAM_RANGE,
    liquid_enthalpy,
    saturation_temperature,
    vapour_enthalpy,
)
from schedtui.air.step import DEFINITION, Number, Step, Steps
from schedtui.errors import FluidError
from schedtui.units import (
    ELECTRIC_POWER,
    ENTHALPY,
    LOAD,
    MOISTURE_FLOW,
    PERCENT,
    STATION_PRESSURE,
    STEAM_PRESSURE,
    System,
)

HEAT_PER_KILOWATT: Final[dict[System, float]] = {"IP": 3.41214, "SI": 1.0}
"""Heat of a kilowatt [MBH | kW]: 3412.14 Btu/h."""

_COILS = "ASHRAE Handbook—HVAC Systems and Equipment, air-heating coils"
_FURNACES = "ASHRAE Handbook—HVAC Systems and Equipment, furnaces"
_UNITS = "ASHRAE Handbook—Fundamentals, units and conversions"
_PER_LOAD: Final[dict[System, float]] = {"IP": 1000.0, "SI": 3600.0}  # Btu/h in MBH; kJ/h in kW


def latent_heat(
    gauge_pressure: float, station_pressure: float, system: System, steps: Steps | None = None
) -> float:
    """Return the latent heat of saturated steam [Btu/lb | kJ/kg].

    Args:
        gauge_pressure: of the steam, above that of the station [psig | kPa gauge].
        station_pressure: of the air at the station [psia | kPa].
        system: the unit system.
        steps: the working to append to.

    Raises:
        FluidError: there is no saturated steam at that pressure.

    Source: IAPWS SR1-86(1992), eqs. 6 and 7, at the temperature of IAPWS-IF97, eq. 31.

    >>> latent_heat(15, 14.696, "IP")
    945.7
    """
    pressure = gauge_pressure + station_pressure
    least, most = STEAM_RANGE[system]
    if not least <= pressure < most:
        unit = STEAM_PRESSURE.unit(system)
        absolute = STATION_PRESSURE.unit(system)
        raise FluidError(
            f"steam at {gauge_pressure:g} {unit} and a station pressure of {station_pressure:g} "
            f"{absolute} is outside its data, {least:.3g} to {most:.4g} {absolute} absolute"
        )
    boiling = saturation_temperature(pressure, system)
    vapour, liquid = vapour_enthalpy(boiling, system), liquid_enthalpy(boiling, system)
    latent = vapour - liquid
    if steps is not None:
        parts: tuple[Number, ...] = (
            ("p_gauge", gauge_pressure, STEAM_PRESSURE),
            ("p", station_pressure, STATION_PRESSURE),
        )
        name, formula = "absolute pressure of the steam", "p_abs = p_gauge + p"
        quantity = STATION_PRESSURE
        steps.append(Step("p_abs", name, formula, parts, pressure, quantity, DEFINITION))
        numbers: tuple[Number, ...] = (("h_vap", vapour, ENTHALPY), ("h_liq", liquid, ENTHALPY))
        name, formula = "latent heat of steam at that pressure", "h_fg = h_vap − h_liq"
        steps.append(Step("h_fg", name, formula, numbers, latent, ENTHALPY, IAPWS_SATURATION))
    return latent


def steam_heat(
    flow: float,
    gauge_pressure: float,
    station_pressure: float,
    system: System,
    steps: Steps | None = None,
) -> float:
    """Return the heat [MBH | kW] that a flow of steam gives off.

    Args:
        flow: of steam [lb/h | kg/h].
        gauge_pressure: of the steam, above that of the station [psig | kPa gauge].
        station_pressure: of the air at the station [psia | kPa].
        system: the unit system.
        steps: the working to append to.

    Raises:
        FluidError: there is no saturated steam at that pressure.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-heating coils.

    >>> steam_heat(100, 15, 14.696, "IP")
    94.57
    """
    latent = latent_heat(gauge_pressure, station_pressure, system, steps)
    heat = flow * latent / _PER_LOAD[system]
    if steps is not None:
        numbers: tuple[Number, ...] = (("m_st", flow, MOISTURE_FLOW), ("h_fg", latent, ENTHALPY))
        formula = f"q_st = m_st · h_fg / {_PER_LOAD[system]:.0f}"
        steps.append(Step("q_st", "heat of the steam", formula, numbers, heat, LOAD, _COILS))
    return heat


def steam_for(
    heat: float,
    gauge_pressure: float,
    station_pressure: float,
    system: System,
    steps: Steps | None = None,
) -> float:
    """Return the flow of steam [lb/h | kg/h] that gives off a heat.

    Args:
        heat: to be given off [MBH | kW].
        gauge_pressure: of the steam, above that of the station [psig | kPa gauge].
        station_pressure: of the air at the station [psia | kPa].
        system: the unit system.
        steps: the working to append to.

    Raises:
        FluidError: there is no saturated steam at that pressure.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-heating coils.

    >>> steam_for(94.57, 15, 14.696, "IP")
    100.0
    """
    latent = latent_heat(gauge_pressure, station_pressure, system, steps)
    flow = heat * _PER_LOAD[system] / latent
    if steps is not None:
        numbers: tuple[Number, ...] = (("q_st", heat, LOAD), ("h_fg", latent, ENTHALPY))
        formula = f"m_st = q_st · {_PER_LOAD[system]:.0f} / h_fg"
        steps.append(Step("m_st", "flow of steam", formula, numbers, flow, MOISTURE_FLOW, _COILS))
    return flow


def electric_heat(power: float, system: System, steps: Steps | None = None) -> float:
    """Return the heat [MBH | kW] of an electric coil.

    Args:
        power: that it draws [kW].
        system: the unit system.
        steps: the working to append to.

    Source: ASHRAE Handbook—Fundamentals, units and conversions: 3412.14 Btu/h to the kilowatt.

    >>> electric_heat(10, "IP")
    34.12
    """
    heat = power * HEAT_PER_KILOWATT[system]
    if steps is not None:
        numbers: tuple[Number, ...] = (("P_el", power, ELECTRIC_POWER),)
        formula = {"IP": "q_el = P_el · 3412.14 / 1000", "SI": "q_el = P_el"}[system]
        steps.append(Step("q_el", "heat of electricity", formula, numbers, heat, LOAD, _UNITS))
    return heat


def fuel_heat(heat_input: float, efficiency: float, steps: Steps | None = None) -> float:
    """Return the heat [MBH | kW] that fuel gives the air.

    Args:
        heat_input: heat of the fuel burnt [MBH | kW].
        efficiency: share of it that reaches the air [%].
        steps: the working to append to.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, furnaces: output is input times efficiency.

    >>> fuel_heat(200, 80)
    160.0
    """
    heat = heat_input * efficiency / 100
    if steps is not None:
        numbers: tuple[Number, ...] = (("q_in", heat_input, LOAD), ("η_fu", efficiency, PERCENT))
        formula = "q_fu = q_in · η_fu / 100"
        steps.append(Step("q_fu", "heat of the fuel", formula, numbers, heat, LOAD, _FURNACES))
    return heat
