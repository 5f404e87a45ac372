"""Fluids: water and glycol solutions in a coil's tubes, and the heat that their flow carries.

The trade's 500 is one value of the heat factor, that of water near 60 °F; here the factor is that
of the fluid at the mean of its two temperatures, and the working prints it. A fluid outside its
data is refused: no number is made up beyond a correlation, nor below freezing.

Knows nothing of coils, nor of which way the heat goes: the same flow cools or heats.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final, Literal

from schedtui.air.fluid_tables import (
    GLYCOL_GRAVITY,
    GLYCOL_HOTTEST,
    GLYCOL_SHARES,
    IAPWS_SATURATION,
    MELINDER,
    glycol_density,
    glycol_freezing,
    glycol_heat,
    liquid_density,
    liquid_enthalpy,
)
from schedtui.air.step import DEFINITION, HANDBOOK_LOADS, Number, Step, Steps
from schedtui.errors import FluidError
from schedtui.units import LOAD, PERCENT, TEMPERATURE, WATER_FLOW, Quantity, System

FluidKind = Literal["water", "propylene glycol", "ethylene glycol"]
"""What flows in a coil's tubes, glycol meaning its solution in water."""

DENSITY: Final = Quantity("density", "lb/gal", "kg/L", 3, 4)
SPECIFIC_HEAT: Final = Quantity("specific heat", "Btu/lb °F", "kJ/kg K", 4, 3)
HEAT_FACTOR: Final = Quantity("heat factor", "Btu/h per gpm °F", "kW per L/s K", 1, 3)

WATER_RANGE: Final[dict[System, tuple[float, float]]] = {"IP": (32.0, 450.0), "SI": (0.0, 232.2)}
"""Temperatures that water is computed at, from freezing to hot water under pressure [°F | °C].

It is taken at the pressure it boils at; 150 psi (1 MPa) more make 0.1 % of its heat factor.
"""

_DENSITY_UNIT: Final[dict[System, float]] = {"IP": 231 / 1728, "SI": 1 / 1000}  # to lb/gal | kg/L
_PER_KG_M3: Final[dict[System, float]] = {"IP": 0.00834540445, "SI": 1 / 1000}  # kg/m³ to the same
_PER_J_KG_K: Final[dict[System, float]] = {"IP": 1 / 4186.8, "SI": 1 / 1000}
_MINUTES: Final[dict[System, float]] = {"IP": 60.0, "SI": 1.0}  # gpm by the hour; L/s as it is
_FACTOR: Final[dict[System, str]] = {"IP": "K = 60 · ρ · c_p", "SI": "K = ρ · c_p"}
_THOUSAND: Final[dict[System, float]] = {"IP": 1000.0, "SI": 1.0}  # Btu/h in a MBH
_ALL = 100.0


@dataclass(frozen=True, slots=True)
class Fluid:
    """What flows in a coil's tubes.

    Args:
        kind: water, or one of the two glycols in water.
        share: of glycol [% by mass].
    """

    kind: FluidKind
    share: float = 0.0

    def __str__(self) -> str:
        """Return the fluid's name, with its share of glycol."""
        return f"{self.kind} {self.share:.3g} %" if self.kind != "water" or self.share else "water"


def by_volume(kind: FluidKind, share_by_volume: float, steps: Steps | None = None) -> Fluid:
    """Return a fluid whose share of glycol is stated by volume, at 60 °F (15.6 °C).

    The volumes are those of glycol and water before they are mixed, as a system is filled.

    Args:
        kind: water, or one of the two glycols in water.
        share_by_volume: of glycol [% by volume].
        steps: the working to append to, where there is glycol.

    Raises:
        FluidError: the share is not one from 0 to 100 %.

    >>> by_volume("ethylene glycol", 30).share
    32.4
    """
    if not 0 <= share_by_volume <= _ALL:
        raise FluidError(f"{kind}: a share of {share_by_volume:g} % by volume is not 0 to 100 %")
    if kind == "water":
        return Fluid(kind, share_by_volume)
    gravity = GLYCOL_GRAVITY[kind]
    glycol = share_by_volume * gravity
    fluid = Fluid(kind, _ALL * glycol / (glycol + _ALL - share_by_volume))
    if steps is not None:
        numbers: tuple[Number, ...] = (("G_v", share_by_volume, PERCENT),)
        name = f"share of {kind} by mass, {gravity:g} times as heavy as water"
        part = f"G_v · {gravity:g}"
        formula = f"G_m = 100 · {part} / ({part} + 100 − G_v)"
        steps.append(Step("G_m", name, formula, numbers, fluid.share, PERCENT, DEFINITION))
    return fluid


def freezing_point(fluid: Fluid, system: System) -> float:
    """Return the temperature [°F | °C] at which a fluid begins to freeze.

    Args:
        fluid: what flows.
        system: the unit system.

    Raises:
        FluidError: the share of glycol is outside the data.

    Source: Melinder 2010, IIR.

    >>> freezing_point(Fluid("propylene glycol", 30), "IP")
    9.0
    """
    _require_share(fluid)
    if fluid.kind == "water":
        return WATER_RANGE[system][0]
    celsius = glycol_freezing(fluid.kind, fluid.share)
    return celsius * 1.8 + 32 if system == "IP" else celsius


def density(fluid: Fluid, temperature: float, system: System) -> float:
    """Return the density of a fluid [lb/gal | kg/L].

    Args:
        fluid: what flows.
        temperature: its own [°F | °C].
        system: the unit system.

    Raises:
        FluidError: the fluid is outside its data, freezing included.

    Source: water, boiling, IAPWS SR1-86(1992), eq. 2; glycols Melinder 2010, IIR.

    >>> density(Fluid("water"), 60, "IP")
    8.337
    """
    _require_range(fluid, temperature, system)
    if fluid.kind == "water":
        return liquid_density(temperature, system) * _DENSITY_UNIT[system]
    value = glycol_density(fluid.kind, fluid.share, _celsius(temperature, system))
    return value * _PER_KG_M3[system]


def specific_heat(fluid: Fluid, temperature: float, system: System) -> float:
    """Return the specific heat of a fluid [Btu/lb °F | kJ/kg K].

    Args:
        fluid: what flows.
        temperature: its own [°F | °C].
        system: the unit system.

    Raises:
        FluidError: the fluid is outside its data, freezing included.

    Source: water, boiling, the enthalpy of IAPWS SR1-86(1992), eq. 6; glycols Melinder 2010, IIR.

    >>> specific_heat(Fluid("propylene glycol", 30), 50, "IP")
    0.915
    """
    _require_range(fluid, temperature, system)
    if fluid.kind == "water":
        # The heat of one degree, half of it on either side.
        hotter = liquid_enthalpy(temperature + 0.5, system)
        return hotter - liquid_enthalpy(temperature - 0.5, system)
    value = glycol_heat(fluid.kind, fluid.share, _celsius(temperature, system))
    return value * _PER_J_KG_K[system]


def heat_factor(
    fluid: Fluid, mean_temperature: float, system: System, steps: Steps | None = None
) -> float:
    """Return the heat that a flow of one carries a degree [Btu/h per gpm °F | kW per L/s K].

    Args:
        fluid: what flows.
        mean_temperature: of what enters and what leaves [°F | °C].
        system: the unit system.
        steps: the working to append to.

    Raises:
        FluidError: the fluid is outside its data, freezing included.

    Source: ASHRAE Handbook—Fundamentals, ch. 18; the properties as in `density`.

    >>> heat_factor(Fluid("water"), 60, "IP")
    500.4
    """
    weight = density(fluid, mean_temperature, system)
    heat = specific_heat(fluid, mean_temperature, system)
    factor = _MINUTES[system] * weight * heat
    if steps is not None:
        numbers: tuple[Number, ...] = (("ρ", weight, DENSITY), ("c_p", heat, SPECIFIC_HEAT))
        source = IAPWS_SATURATION if fluid.kind == "water" else MELINDER
        name = f"heat factor of {fluid} at the mean temperature"
        steps.append(Step("K", name, _FACTOR[system], numbers, factor, HEAT_FACTOR, source))
    return factor


def fluid_heat(
    flow: float,
    temperature_in: float,
    temperature_out: float,
    fluid: Fluid,
    system: System,
    steps: Steps | None = None,
) -> float:
    """Return the heat [MBH | kW] that a flow takes up or gives off, never below 0.

    Args:
        flow: of the fluid [gpm | L/s].
        temperature_in: of what enters [°F | °C].
        temperature_out: of what leaves, on either side of it [°F | °C].
        fluid: what flows.
        system: the unit system.
        steps: the working to append to.

    Raises:
        FluidError: the fluid is outside its data at one of the temperatures, freezing included.

    Source: ASHRAE Handbook—Fundamentals, ch. 18; the properties as in `density`.

    >>> fluid_heat(60, 44, 54, Fluid("water"), "IP")
    301.0
    """
    factor = _mean_factor(temperature_in, temperature_out, fluid, system, steps)
    heat = factor * flow * abs(temperature_out - temperature_in) / _THOUSAND[system]
    if steps is not None:
        difference, ends = _difference(temperature_in, temperature_out)
        numbers: tuple[Number, ...] = (
            ("K", factor, HEAT_FACTOR),
            ("Q_w", flow, WATER_FLOW),
            *ends,
        )
        formula = f"q_w = K · Q_w · {difference}{' / 1000' if system == 'IP' else ''}"
        name = f"heat carried by the {fluid.kind}"
        steps.append(Step("q_w", name, formula, numbers, heat, LOAD, HANDBOOK_LOADS))
    return heat


def flow_for(
    heat: float,
    temperature_in: float,
    temperature_out: float,
    fluid: Fluid,
    system: System,
    steps: Steps | None = None,
) -> float:
    """Return the flow [gpm | L/s] that carries a heat between two temperatures.

    Args:
        heat: to be carried [MBH | kW].
        temperature_in: of what enters [°F | °C].
        temperature_out: of what leaves, on either side of it [°F | °C].
        fluid: what flows.
        system: the unit system.
        steps: the working to append to.

    Raises:
        FluidError: the two temperatures are one, or the fluid is outside its data at one of them,
            freezing included.

    Source: ASHRAE Handbook—Fundamentals, ch. 18; the properties as in `density`.

    >>> flow_for(301, 44, 54, Fluid("water"), "IP")
    60.0
    """
    factor = _mean_factor(temperature_in, temperature_out, fluid, system, steps)
    if temperature_in == temperature_out:
        raise FluidError(f"{fluid} that leaves as it enters carries no heat")
    flow = heat * _THOUSAND[system] / (factor * abs(temperature_out - temperature_in))
    if steps is not None:
        difference, ends = _difference(temperature_in, temperature_out)
        numbers: tuple[Number, ...] = (("q_w", heat, LOAD), ("K", factor, HEAT_FACTOR), *ends)
        formula = f"Q_w = q_w{' · 1000' if system == 'IP' else ''} / (K · {difference})"
        name = f"flow of the {fluid.kind}"
        steps.append(Step("Q_w", name, formula, numbers, flow, WATER_FLOW, HANDBOOK_LOADS))
    return flow


def _mean_factor(
    temperature_in: float,
    temperature_out: float,
    fluid: Fluid,
    system: System,
    steps: Steps | None,
) -> float:
    """Return the heat factor at the mean of two temperatures, each of which the fluid must bear."""
    for temperature in (temperature_in, temperature_out):
        _require_range(fluid, temperature, system)
    mean = (temperature_in + temperature_out) / 2
    if steps is not None:
        numbers: tuple[Number, ...] = (
            ("t_w1", temperature_in, TEMPERATURE),
            ("t_w2", temperature_out, TEMPERATURE),
        )
        name = f"mean temperature of the {fluid.kind}"
        formula = "t_w = (t_w1 + t_w2) / 2"
        steps.append(Step("t_w", name, formula, numbers, mean, TEMPERATURE, DEFINITION))
    return heat_factor(fluid, mean, system, steps)


def _difference(temperature_in: float, temperature_out: float) -> tuple[str, tuple[Number, ...]]:
    """Return the difference as printed, the warmer end first, and its two numbers."""
    first: Number = ("t_w1", temperature_in, TEMPERATURE)
    second: Number = ("t_w2", temperature_out, TEMPERATURE)
    if temperature_out >= temperature_in:
        return "(t_w2 − t_w1)", (second, first)
    return "(t_w1 − t_w2)", (first, second)


def _celsius(temperature: float, system: System) -> float:
    """Return the temperature in the one unit that the glycols' correlations know [°C]."""
    return (temperature - 32) / 1.8 if system == "IP" else temperature


def _require_share(fluid: Fluid) -> None:
    """Raise for a share of glycol that no data tell of."""
    least, most = GLYCOL_SHARES
    if fluid.kind == "water":
        if fluid.share:
            raise FluidError(f"water holds no glycol, and {fluid.share:g} % is stated")
    elif not least <= fluid.share <= most:
        raise FluidError(f"{fluid} by mass is outside its data, {least:.0f} to {most:.0f} %")


def _require_range(fluid: Fluid, temperature: float, system: System) -> None:
    """Raise for a fluid that is frozen, or hotter than its data."""
    coldest = freezing_point(fluid, system)
    hottest = WATER_RANGE[system][1] if fluid.kind == "water" else GLYCOL_HOTTEST[system]
    if coldest <= temperature <= hottest:
        return
    unit = TEMPERATURE.unit(system)
    if temperature < coldest:
        raise FluidError(
            f"{fluid} at {temperature:.1f} {unit} is below its freezing point, {coldest:.1f} {unit}"
        )
    raise FluidError(
        f"{fluid} at {temperature:.1f} {unit} is outside its data, "
        f"{coldest:.1f} to {hottest:.1f} {unit}"
    )
