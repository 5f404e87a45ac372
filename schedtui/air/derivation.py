"""How a state of air comes about, as steps of a working: the handbook's formulas as printed.

Computes nothing that a working does not show, and is called for a working alone: a state's own
numbers come from `psychro`, and are given here to be explained.

Knows nothing of streams or equipment.
"""

from __future__ import annotations

from typing import Final, Protocol

from schedtui.air.psychro import FREEZING_POINT, TRIPLE_POINT, Psychrometrics
from schedtui.air.step import HANDBOOK, Number, Step, Steps, enthalpy_step
from schedtui.units import (
    HUMIDITY_RATIO,
    PERCENT,
    SPECIFIC_VOLUME,
    STATION_PRESSURE,
    TEMPERATURE,
    Quantity,
    System,
)


class Air(Protocol):
    """What air at a station pressure has to offer."""

    @property
    def system(self) -> System:
        """The unit system."""

    @property
    def pressure(self) -> float:
        """Station pressure [psia | kPa]."""

    @property
    def formulas(self) -> Psychrometrics:
        """The moist-air formulas of the unit system."""


class State(Protocol):
    """What a state of air has to offer."""

    @property
    def air(self) -> Air:
        """The air it is a state of."""

    @property
    def db(self) -> float:
        """Dry bulb [°F | °C]."""

    @property
    def w(self) -> float:
        """Humidity ratio [lb/lb | kg/kg]."""

    @property
    def h(self) -> float:
        """Enthalpy [Btu/lb | kJ/kg of dry air]."""


ABSOLUTE_TEMPERATURE: Final = Quantity("absolute temperature", "°R", "K", 2, 2)
"""What the saturation formulas are written in; no schedule has it."""

_EQ_5: Final = f"{HANDBOOK}, eq. 5"
_EQ_6: Final = f"{HANDBOOK}, eq. 6"
_EQ_20: Final = f"{HANDBOOK}, eq. 20"
_EQ_22: Final = f"{HANDBOOK}, eq. 22"
_EQ_26: Final = f"{HANDBOOK}, eq. 26"
_EQ_33: Final = f"{HANDBOOK}, eq. 33"
_EQ_35: Final = f"{HANDBOOK}, eq. 35"
_EQ_36: Final = f"{HANDBOOK}, eq. 36"

_ZERO: Final[dict[System, str]] = {"IP": "459.67", "SI": "273.15"}

# eq. 5, over ice, and eq. 6, over liquid water; the handbook has the pressure in psia | Pa
_OVER_ICE: Final[dict[System, str]] = {
    "IP": (
        "exp(−1.0214165E+04 / T − 4.8932428 − 5.3765794E−03 · T + 1.9202377E−07 · T² "
        "+ 3.5575832E−10 · T³ − 9.0344688E−14 · T⁴ + 4.1635019 · ln(T))"
    ),
    "SI": (
        "exp(−5.6745359E+03 / T + 6.3925247 − 9.677843E−03 · T + 6.2215701E−07 · T² "
        "+ 2.0747825E−09 · T³ − 9.484024E−13 · T⁴ + 4.1635019 · ln(T)) / 1000"
    ),
}
_OVER_WATER: Final[dict[System, str]] = {
    "IP": (
        "exp(−1.0440397E+04 / T − 1.1294650E+01 − 2.7022355E−02 · T + 1.2890360E−05 · T² "
        "− 2.4780681E−09 · T³ + 6.5459673 · ln(T))"
    ),
    "SI": (
        "exp(−5.8002206E+03 / T + 1.3914993 − 4.8640239E−02 · T + 4.1764768E−05 · T² "
        "− 1.4452093E−08 · T³ + 6.5459673 · ln(T)) / 1000"
    ),
}
_BY_WET_BULB: Final[dict[System, dict[bool, str]]] = {  # False: water on the wick, True: ice
    "IP": {
        False: "((1093 − 0.556 · wb) · W_sat − 0.24 · (t − wb)) / (1093 + 0.444 · t − wb)",
        True: "((1220 − 0.04 · wb) · W_sat − 0.24 · (t − wb)) / (1220 + 0.444 · t − 0.48 · wb)",
    },
    "SI": {
        False: (
            "((2501 − 2.326 · wb) · W_sat − 1.006 · (t − wb)) / (2501 + 1.86 · t − 4.186 · wb)"
        ),
        True: "((2830 − 0.24 · wb) · W_sat − 1.006 · (t − wb)) / (2830 + 1.86 · t − 2.1 · wb)",
    },
}
_VOLUME: Final[dict[System, str]] = {
    "IP": "v = 53.35 · (t + 459.67) · (1 + 1.607858 · W) / (144 · p)",
    "SI": "v = 0.287042 · (t + 273.15) · (1 + 1.607858 · W) / p",
}
_STATION_PRESSURE: Final[dict[System, str]] = {
    "IP": "p = 14.696 · (1 − 6.8754E−06 · Z)^5.2559",
    "SI": "p = 101.325 · (1 − 2.25577E−05 · Z)^5.2559",
}


def station_pressure_step(system: System, altitude: Number, result: float) -> Step:
    """Return the step of the standard atmosphere's pressure at an altitude.

    Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 3.
    """
    name = "station pressure, from the altitude by the standard atmosphere"
    source = f"{HANDBOOK}, eq. 3"
    return Step("p", name, _STATION_PRESSURE[system], (altitude,), result, STATION_PRESSURE, source)


def saturation_pressure(steps: Steps, formulas: Psychrometrics, t: Number) -> float:
    """Append the saturation pressure at a temperature and return it [psia | kPa].

    Args:
        steps: the working to append to.
        formulas: the moist-air formulas of the unit system.
        t: the temperature [°F | °C].
    """
    symbol, value, _ = t
    system = formulas.system
    zero = _ZERO[system]
    absolute = value + float(zero)
    pressure = formulas.saturation_pressure(value)
    ice = value <= TRIPLE_POINT[system]
    right, source = (_OVER_ICE, _EQ_5) if ice else (_OVER_WATER, _EQ_6)
    name, formula = "absolute temperature", f"T = {symbol} + {zero}"
    steps.append(Step("T", name, formula, (t,), absolute, ABSOLUTE_TEMPERATURE, HANDBOOK))
    steps.append(
        Step(
            "p_sat",
            f"saturation pressure over {'ice' if ice else 'water'}",
            f"p_sat = {right[system]}",
            (("T", absolute, ABSOLUTE_TEMPERATURE),),
            pressure,
            STATION_PRESSURE,
            source,
        )
    )
    return pressure


def saturation(steps: Steps, formulas: Psychrometrics, t: Number, pressure: float) -> float:
    """Append the humidity ratio of air saturated at a temperature and return it [lb/lb | kg/kg].

    Args:
        steps: the working to append to.
        formulas: the moist-air formulas of the unit system.
        t: the temperature [°F | °C].
        pressure: station pressure [psia | kPa].
    """
    p_sat = saturation_pressure(steps, formulas, t)
    w = formulas.saturation_humidity_ratio(t[1], pressure)
    numbers: tuple[Number, ...] = (
        ("p_sat", p_sat, STATION_PRESSURE),
        ("p", pressure, STATION_PRESSURE),
    )
    formula = "W_sat = 0.621945 · p_sat / (p − p_sat)"
    name = "humidity ratio at saturation"
    steps.append(Step("W_sat", name, formula, numbers, w, HUMIDITY_RATIO, _EQ_20))
    return w


def by_wet_bulb(steps: Steps, state: State, wb: float) -> None:
    """Append how a state follows from its dry and wet bulb."""
    formulas, system = state.air.formulas, state.air.system
    wet: Number = ("wb", wb, TEMPERATURE)
    w_sat = saturation(steps, formulas, wet, state.air.pressure)
    ratio: Number = ("W_sat", w_sat, HUMIDITY_RATIO)
    name = "humidity ratio"
    if wb == state.db:
        name = "humidity ratio: the air is saturated"
        steps.append(Step("W", name, "W = W_sat", (ratio,), state.w, HUMIDITY_RATIO, _EQ_33))
    else:
        ice = wb < FREEZING_POINT[system]
        numbers = (wet, ratio, ("t", state.db, TEMPERATURE))
        formula = f"W = {_BY_WET_BULB[system][ice]}"
        name = "humidity ratio, ice on the wick" if ice else name
        source = _EQ_35 if ice else _EQ_33
        steps.append(Step("W", name, formula, numbers, state.w, HUMIDITY_RATIO, source))
    enthalpy(steps, state)


def by_relative_humidity(steps: Steps, state: State, rh: float) -> None:
    """Append how a state follows from its dry bulb and relative humidity."""
    t: Number = ("t", state.db, TEMPERATURE)
    p_sat = saturation_pressure(steps, state.air.formulas, t)
    numbers: tuple[Number, ...] = (("RH", rh, PERCENT), ("p_sat", p_sat, STATION_PRESSURE))
    name = "vapour pressure"
    p_w, formula = rh / 100 * p_sat, "p_w = RH / 100 · p_sat"
    steps.append(Step("p_w", name, formula, numbers, p_w, STATION_PRESSURE, _EQ_22))
    _by_vapour_pressure(steps, state, p_w, _EQ_20)


def by_dew_point(steps: Steps, state: State, dp: float) -> None:
    """Append how a state follows from its dry bulb and dew point."""
    p_sat = saturation_pressure(steps, state.air.formulas, ("dp", dp, TEMPERATURE))
    name = "vapour pressure: saturation at the dew point"
    numbers: tuple[Number, ...] = (("p_sat", p_sat, STATION_PRESSURE),)
    steps.append(Step("p_w", name, "p_w = p_sat", numbers, p_sat, STATION_PRESSURE, _EQ_36))
    _by_vapour_pressure(steps, state, p_sat, _EQ_20)


def enthalpy(steps: Steps, state: State, name: str = "enthalpy") -> None:
    """Append the enthalpy of a state from its dry bulb and humidity ratio."""
    t, w = ("t", state.db, TEMPERATURE), ("W", state.w, HUMIDITY_RATIO)
    steps.append(enthalpy_step(state.air.system, "h", name, t, w, state.h))


def warmed(steps: Steps, before: State, after: State, difference: Number, where: str) -> None:
    """Append how air that is warmed or cooled at constant humidity ratio comes out.

    Args:
        steps: the working to append to.
        before: the air before, with the subscript i.
        after: the air after it.
        difference: what its dry bulb rises by, or falls by where negative [°F | K].
        where: where the air is afterwards, in words.
    """
    symbol, value, quantity = difference
    sign = "−" if value < 0 else "+"
    numbers: tuple[Number, ...] = (
        ("t_i", before.db, TEMPERATURE),
        (symbol, abs(value), quantity),
    )
    formula = f"t = t_i {sign} {symbol}"
    name = f"dry bulb {where}"
    steps.append(Step("t", name, formula, numbers, after.db, TEMPERATURE, HANDBOOK))
    same_moisture(steps, after.w)
    enthalpy(steps, after)


def same_moisture(steps: Steps, w: float) -> None:
    """Append that air has the humidity ratio of the air i before it [lb/lb | kg/kg]."""
    numbers: tuple[Number, ...] = (("W_i", w, HUMIDITY_RATIO),)
    name = "humidity ratio: no moisture comes or goes"
    steps.append(Step("W", name, "W = W_i", numbers, w, HUMIDITY_RATIO, HANDBOOK))


def volume(steps: Steps, state: State, v: float) -> None:
    """Append the specific volume of a state."""
    numbers: tuple[Number, ...] = (
        ("t", state.db, TEMPERATURE),
        ("W", state.w, HUMIDITY_RATIO),
        ("p", state.air.pressure, STATION_PRESSURE),
    )
    formula = _VOLUME[state.air.system]
    steps.append(Step("v", "specific volume", formula, numbers, v, SPECIFIC_VOLUME, _EQ_26))


def _by_vapour_pressure(steps: Steps, state: State, p_w: float, source: str) -> None:
    numbers: tuple[Number, ...] = (
        ("p_w", p_w, STATION_PRESSURE),
        ("p", state.air.pressure, STATION_PRESSURE),
    )
    formula = "W = 0.621945 · p_w / (p − p_w)"
    steps.append(Step("W", "humidity ratio", formula, numbers, state.w, HUMIDITY_RATIO, source))
    enthalpy(steps, state)
