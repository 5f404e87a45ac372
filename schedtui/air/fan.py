"""Fans: shaft power, the heat that a fan puts into the air, and the rise it makes.

Knows nothing of where the fan stands.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Final

from schedtui.air.flow import PER_THOUSAND, enthalpy_difference, heat_flow, volume_flow
from schedtui.air.step import (
    DEFINITION,
    HANDBOOK,
    HANDBOOK_LOADS,
    Number,
    Step,
    Steps,
    enthalpy_step,
)
from schedtui.errors import AirError
from schedtui.units import (
    AIR_MASS_FLOW,
    AIR_PRESSURE,
    AIRFLOW,
    COUNT,
    ENTHALPY,
    HUMIDITY_RATIO,
    LOAD,
    PERCENT,
    SHAFT_POWER,
    SPECIFIC_VOLUME,
    TEMPERATURE,
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
            ("Q_f", airflow, AIRFLOW),
            ("p_f", total_pressure, AIR_PRESSURE),
            ("η_f", efficiency, PERCENT),
        )
        formula = f"P = Q_f · p_f / ({AIR_POWER[system]:.0f} · η_f / 100)"
        steps.append(Step("P", "fan shaft power", formula, numbers, power, SHAFT_POWER, _AMCA))
    return power


def inlet_airflow(
    inlet: State, mass: float, steps: Steps | None = None, where: str = "at the fan's inlet"
) -> float:
    """Return the actual volume flow at a fan's inlet, or where else air has a state [cfm | L/s].

    Args:
        inlet: air there.
        mass: dry air through it [lb/h | kg/s].
        steps: the working to append to.
        where: where that is, for the working.
    """
    air = inlet.air
    named = None if steps is None else steps.named("i")
    v = inlet.specific_volume(named)
    flow = volume_flow(mass, "actual", air, v)
    if steps is not None:
        formula = {"IP": "Q_f = m_s · v_i / 60", "SI": "Q_f = m_s · v_i · 1000"}[air.system]
        numbers: tuple[Number, ...] = (
            ("m_s", mass, AIR_MASS_FLOW),
            ("v_i", v, SPECIFIC_VOLUME),
        )
        name = f"actual volume flow {where}"
        steps.append(Step("Q_f", name, formula, numbers, flow, AIRFLOW, HANDBOOK))
    return flow


def power_of_all(power: float, count: float, steps: Steps | None = None) -> float:
    """Return the shaft power of so many equal fans [hp | kW].

    Args:
        power: of each [hp | kW].
        count: how many there are.
        steps: the working to append to.
    """
    if steps is not None and count != 1:
        numbers: tuple[Number, ...] = (("P_each", power, SHAFT_POWER), ("n", count, COUNT))
        name, formula = "shaft power of all fans", "P = n · P_each"
        steps.append(Step("P", name, formula, numbers, power * count, SHAFT_POWER, DEFINITION))
    return power * count


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
        steps: the working to append to, where there is heat.

    Raises:
        AirError: no air flows.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, moist air sensible heating.
    """
    system = air_in.air.system
    gain = enthalpy_difference(mass, heat, system)
    difference = gain / _specific_heat(air_in)
    if steps is not None and heat:
        times, coefficients = {
            "IP": (" · 1000", "(0.24 + 0.444 · W_i)"),
            "SI": ("", "(1.006 + 1.86 · W_i)"),
        }[system]
        numbers: tuple[Number, ...] = (
            ("q_f", heat, LOAD),
            ("m_s", mass, AIR_MASS_FLOW),
            ("W_i", air_in.w, HUMIDITY_RATIO),
        )
        formula = f"Δt_f = q_f{times} / (m_s · {coefficients})"
        quantity = TEMPERATURE_DIFFERENCE
        steps.append(Step("Δt_f", "fan rise", formula, numbers, difference, quantity, HANDBOOK))
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
    return air_in.warmed_by(rise(air_in, mass, heat, steps), "behind the fan", steps)


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
            ("m_s", mass, AIR_MASS_FLOW),
            ("h_out", air_out.h, ENTHALPY),
            ("h_i", air_in.h, ENTHALPY),
        )
        t_out, w_i = ("t_out", air_out.db, TEMPERATURE), ("W_i", air_in.w, HUMIDITY_RATIO)
        parts: tuple[Number, ...] = (
            ("t_i", air_in.db, TEMPERATURE),
            ("Δt_f", rise_stated, TEMPERATURE_DIFFERENCE),
        )
        name, formula = "dry bulb behind the fan", "t_out = t_i + Δt_f"
        steps.append(Step("t_out", name, formula, parts, air_out.db, TEMPERATURE, HANDBOOK))
        steps.append(
            enthalpy_step(system, "h_out", "enthalpy behind the fan", t_out, w_i, air_out.h)
        )
        formula = f"q_f = m_s · (h_out − h_i){PER_THOUSAND[system]}"
        steps.append(
            Step("q_f", "fan heat, that of the stated rise", formula, numbers, heat, LOAD, HANDBOOK)
        )
    return heat


def _specific_heat(state: State) -> float:
    """Return the heat of a degree at constant humidity ratio [Btu/lb °F | kJ/kg K of dry air]."""
    # Enthalpy is linear in the dry bulb, so any degree gives it; 0 and 1 give it exactly.
    return state.air.enthalpy(1.0, state.w) - state.air.enthalpy(0.0, state.w)


def _require_efficiency(what: str, value: float) -> None:
    if not value > 0:
        raise AirError(f"{what} {value:g} % is not above 0")
