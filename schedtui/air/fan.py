"""Fans: shaft power, the heat that a fan puts into the air, and the rise it makes.

Knows nothing of where the fan stands.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Final

from schedtui.air.flow import PER_THOUSAND, enthalpy_difference, heat_flow
from schedtui.air.step import HANDBOOK, HANDBOOK_LOADS, Number, Step, Steps
from schedtui.errors import AirError
from schedtui.units import (
    AIR_MASS_FLOW,
    AIR_PRESSURE,
    AIRFLOW,
    ENTHALPY,
    HUMIDITY_RATIO,
    LOAD,
    PERCENT,
    SHAFT_POWER,
    TEMPERATURE_DIFFERENCE,
    System,
)

if TYPE_CHECKING:
    from schedtui.air.state import State

AIR_POWER: Final[dict[System, float]] = {"IP": 6356.0, "SI": 1_000_000.0}
"""Flow times pressure in a unit of power [cfm · in. wg per hp | L/s · Pa per kW]."""

HEAT_PER_POWER: Final[dict[System, float]] = {"IP": 2.545, "SI": 1.0}
"""Heat of a unit of power [MBH per hp | kW per kW]: 2545 Btu/h to the horsepower."""

_AMCA = "AMCA 210"


def shaft_power(
    airflow: float,
    total_pressure: float,
    efficiency: float,
    system: System,
    steps: Steps | None = None,
) -> float:
    """Return the power at the fan's shaft [hp | kW].

    Args:
        airflow: actual volume flow at the fan's inlet [cfm | L/s].
        total_pressure: pressure that goes with the efficiency, total with total [in. wg | Pa].
        efficiency: of the fan [%].
        system: the unit system.
        steps: the working to append to.

    Raises:
        AirError: the efficiency is not above 0.

    Source: AMCA 210; 6356 as in ASHRAE Handbook—HVAC Systems and Equipment, fans.

    >>> shaft_power(10_000, 4.0, 65, "IP")
    9.68
    """
    _require_efficiency("fan efficiency", efficiency)
    power = airflow * total_pressure / (AIR_POWER[system] * efficiency / 100)
    if steps is not None:
        numbers: tuple[Number, ...] = (
            ("Q", airflow, AIRFLOW),
            ("p", total_pressure, AIR_PRESSURE),
            ("η", efficiency, PERCENT),
        )
        formula = f"P = Q · p / ({AIR_POWER[system]:.0f} · η / 100)"
        steps.append(Step("P", "fan shaft power", formula, numbers, power, SHAFT_POWER, _AMCA))
    return power


def heat_to_air(
    power: float,
    system: System,
    motor_efficiency: float | None = None,
    steps: Steps | None = None,
) -> float:
    """Return the heat that a fan puts into the air [MBH | kW].

    Args:
        power: at the shaft [hp | kW].
        system: the unit system.
        motor_efficiency: of a motor in the airstream [%]; None for a motor outside of it.
        steps: the working to append to.

    Raises:
        AirError: the motor's efficiency is not above 0.

    Source: ASHRAE Handbook—Fundamentals, ch. 18, heat gain of motors and their loads.

    >>> heat_to_air(10, "IP", motor_efficiency=92)
    27.663
    """
    numbers: tuple[Number, ...] = (("P", power, SHAFT_POWER),)
    divisor, share = "", 1.0
    if motor_efficiency is not None:
        _require_efficiency("motor efficiency", motor_efficiency)
        divisor, share = " / (η_m / 100)", motor_efficiency / 100
        numbers += (("η_m", motor_efficiency, PERCENT),)
    heat = power * HEAT_PER_POWER[system] / share
    if steps is not None:
        constant = {"IP": " · 2545 / 1000", "SI": ""}[system]
        formula = f"q_f = P{constant}{divisor}"
        steps.append(Step("q_f", "fan heat", formula, numbers, heat, LOAD, HANDBOOK_LOADS))
    return heat


def rise(air_in: State, mass: float, heat: float, steps: Steps | None = None) -> float:
    """Return the temperature rise [°F | K] that heat makes at constant humidity ratio.

    It depends on the humidity ratio alone, so it serves to go back over a fan as well.

    Args:
        air_in: air at the fan, on either side.
        mass: dry air [lb/h | kg/s].
        heat: what the fan puts into it [MBH | kW].
        steps: the working to append to.

    Raises:
        AirError: no air flows.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, moist air sensible heating.
    """
    system = air_in.air.system
    gain = enthalpy_difference(mass, heat, system)
    difference = gain / _specific_heat(air_in)
    if steps is not None:
        times, coefficients = {
            "IP": (" · 1000", "(0.24 + 0.444 · W)"),
            "SI": ("", "(1.006 + 1.86 · W)"),
        }[system]
        numbers: tuple[Number, ...] = (
            ("q_f", heat, LOAD),
            ("m", mass, AIR_MASS_FLOW),
            ("W", air_in.w, HUMIDITY_RATIO),
        )
        formula = f"Δt = q_f{times} / (m · {coefficients})"
        quantity = TEMPERATURE_DIFFERENCE
        steps.append(Step("Δt", "fan rise", formula, numbers, difference, quantity, HANDBOOK))
    return difference


def after_fan(air_in: State, mass: float, heat: float, steps: Steps | None = None) -> State:
    """Return the air behind a fan.

    Args:
        air_in: air in front of it.
        mass: dry air [lb/h | kg/s].
        heat: what the fan puts into it [MBH | kW].
        steps: the working to append to.

    Raises:
        AirError: no air flows, or the air would leave the formulas' range.
    """
    return air_in.heated_to(air_in.db + rise(air_in, mass, heat, steps))


def heat_of_rise(
    air_in: State, mass: float, rise_stated: float, steps: Steps | None = None
) -> float:
    """Return the heat [MBH | kW] behind a rise at constant humidity ratio.

    Args:
        air_in: air in front of the fan.
        mass: dry air [lb/h | kg/s].
        rise_stated: temperature rise [°F | K].
        steps: the working to append to.

    Raises:
        AirError: the air would leave the formulas' range.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, moist air sensible heating.
    """
    system = air_in.air.system
    air_out = air_in.heated_to(air_in.db + rise_stated)
    heat = heat_flow(mass, air_out.h - air_in.h, system)
    if steps is not None:
        numbers: tuple[Number, ...] = (
            ("m", mass, AIR_MASS_FLOW),
            ("h_2", air_out.h, ENTHALPY),
            ("h_1", air_in.h, ENTHALPY),
        )
        formula = f"q_f = m · (h_2 − h_1){PER_THOUSAND[system]}"
        steps.append(Step("q_f", "heat of the rise", formula, numbers, heat, LOAD, HANDBOOK))
    return heat


def _specific_heat(state: State) -> float:
    """Return the heat of a degree at constant humidity ratio [Btu/lb °F | kJ/kg K of dry air]."""
    # Enthalpy is linear in the dry bulb, so any degree gives it; 0 and 1 give it exactly.
    return state.air.enthalpy(1.0, state.w) - state.air.enthalpy(0.0, state.w)


def _require_efficiency(what: str, value: float) -> None:
    if not value > 0:
        raise AirError(f"{what} {value:g} % is not above 0")
