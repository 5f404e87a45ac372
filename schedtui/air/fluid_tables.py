"""What is published on the fluids of a coil: water where it boils, and water with glycol.

Each constant stands here once, with its source and range, in the form in which it was printed.
The equations are written in reduced quantities, so each unit system has its own scale and nothing
is converted but where a publication knows one unit only.

Knows nothing of flows or loads, and refuses nothing: `fluid` and `steam` ask within the ranges.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING, Final, Literal

if TYPE_CHECKING:
    from schedtui.units import System

IAPWS_SATURATION: Final = "IAPWS SR1-86(1992), saturation properties of ordinary water"
"""Wagner and Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783; triple point to critical point."""

MELINDER: Final = "Melinder 2010, Properties of Secondary Working Fluids for Indirect Systems, IIR"
"""Aqueous solutions by mass share and temperature, from freezing up."""

Glycol = Literal["propylene glycol", "ethylene glycol"]


@dataclass(frozen=True, slots=True)
class _Scale:
    """What makes the reduced quantities of water those of a unit system.

    Args:
        zero: absolute zero, sign reversed [°F | °C].
        temperature: at the critical point [°R | K].
        pressure: at the critical point [psia | kPa].
        density: at the critical point [lb/ft³ | kg/m³].
        enthalpy: the release's 1000 J/kg [Btu/lb | kJ/kg].
        work: pressure times volume as heat [Btu per psi · ft³ | kJ per kPa · m³].
        megapascal: a MPa [psia | kPa].
        kelvin: a K [°R | K].
    """

    zero: float
    temperature: float
    pressure: float
    density: float
    enthalpy: float
    work: float
    megapascal: float
    kelvin: float


_WATER: Final[dict[System, _Scale]] = {
    "IP": _Scale(
        459.67, 1164.7728, 3200.112645, 20.10180331, 0.4299226139, 0.1850497147, 145.0377377, 1.8
    ),
    "SI": _Scale(273.15, 647.096, 22064.0, 322.0, 1.0, 1.0, 1000.0, 1.0),
}

# SR1-86(1992): coefficient and exponent of each term of eqs. 1 to 4.
_PRESSURE_TERMS = (
    (-7.85951783, 1.0),
    (1.84408259, 1.5),
    (-11.7866497, 3.0),
    (22.6807411, 3.5),
    (-15.9618719, 4.0),
    (1.80122502, 7.5),
)
_LIQUID_TERMS = (
    (1.99274064, 1 / 3),
    (1.09965342, 2 / 3),
    (-0.510839303, 5 / 3),
    (-1.75493479, 16 / 3),
    (-45.5170352, 43 / 3),
    (-6.74694450e5, 110 / 3),
)
_VAPOUR_TERMS = (
    (-2.03150240, 2 / 6),
    (-2.68302940, 4 / 6),
    (-5.38626492, 8 / 6),
    (-17.2991605, 18 / 6),
    (-44.7586581, 37 / 6),
    (-63.9201063, 71 / 6),
)
_ENTHALPY_CONSTANT = -1135.905627715
_ENTHALPY_TERMS = (
    (-5.65134998e-8, -19.0),
    (2690.66631, 1.0),
    (127.287297, 4.5),
    (-135.003439, 5.0),
    (0.981825814, 54.5),
)

# IAPWS-IF97, table 34: the coefficients n1 to n10 of region 4.
_N = (
    1167.0521452767,
    -724213.16703206,
    -17.073846940092,
    12020.82470247,
    -3232555.0322333,
    14.91510861353,
    -4823.2657361591,
    405113.40542057,
    -0.23855557567849,
    650.17534844798,
)

STEAM_RANGE: Final[dict[System, tuple[float, float]]] = {
    "IP": (0.0887134, 3200.11),
    "SI": (0.611657, 22064.0),
}
"""Absolute pressures at which steam is saturated, triple to critical point [psia | kPa]."""


def saturation_temperature(pressure: float, system: System) -> float:
    """Return the temperature [°F | °C] at which water boils.

    Args:
        pressure: absolute [psia | kPa].
        system: the unit system.

    Source: IAPWS-IF97 (R7-97), region 4, eq. 31; agrees with SR1-86 to 0.01 K.

    >>> saturation_temperature(14.696, "IP")
    211.95
    """
    scale = _WATER[system]
    n1, n2, n3, n4, n5, n6, n7, n8, n9, n10 = _N
    beta = math.pow(pressure / scale.megapascal, 0.25)
    e = (beta + n3) * beta + n6
    f = (n1 * beta + n4) * beta + n7
    g = (n2 * beta + n5) * beta + n8
    d = 2 * g / (-f - math.sqrt(f * f - 4 * e * g))
    kelvin = (n10 + d - math.sqrt((n10 + d) ** 2 - 4 * (n9 + n10 * d))) / 2
    return kelvin * scale.kelvin - scale.zero


def liquid_density(temperature: float, system: System) -> float:
    """Return the density of boiling water [lb/ft³ | kg/m³].

    Args:
        temperature: of the water [°F | °C].
        system: the unit system.

    Source: IAPWS SR1-86(1992), eq. 2.

    >>> liquid_density(60, "IP")
    62.37
    """
    scale = _WATER[system]
    tau = 1 - (temperature + scale.zero) / scale.temperature
    return scale.density * (1 + sum(b * math.pow(tau, power) for b, power in _LIQUID_TERMS))


def liquid_enthalpy(temperature: float, system: System) -> float:
    """Return the enthalpy of boiling water [Btu/lb | kJ/kg].

    Args:
        temperature: of the water [°F | °C].
        system: the unit system.

    Source: IAPWS SR1-86(1992), eq. 6.

    >>> liquid_enthalpy(212, "IP")
    180.2
    """
    return _enthalpy(temperature, liquid_density(temperature, system), system)


def vapour_enthalpy(temperature: float, system: System) -> float:
    """Return the enthalpy of saturated steam [Btu/lb | kJ/kg].

    Args:
        temperature: of the steam [°F | °C].
        system: the unit system.

    Source: IAPWS SR1-86(1992), eqs. 3 and 7.

    >>> vapour_enthalpy(212, "IP")
    1150.3
    """
    scale = _WATER[system]
    tau = 1 - (temperature + scale.zero) / scale.temperature
    density = scale.density * math.exp(sum(c * math.pow(tau, power) for c, power in _VAPOUR_TERMS))
    return _enthalpy(temperature, density, system)


def _enthalpy(temperature: float, density: float, system: System) -> float:
    """Return the enthalpy of boiling water or of its steam, whichever has that density."""
    scale = _WATER[system]
    absolute = temperature + scale.zero
    theta = absolute / scale.temperature
    # SR1-86, eq. 4: the auxiliary quantity alpha.
    alpha = _ENTHALPY_CONSTANT + sum(d * math.pow(theta, power) for d, power in _ENTHALPY_TERMS)
    # SR1-86, eqs. 6 and 7: h = alpha + T / rho · dp/dT.
    slope = _pressure_slope(theta, scale)
    return alpha * scale.enthalpy + absolute / density * slope * scale.work


def _pressure_slope(theta: float, scale: _Scale) -> float:
    """Return the slope of the vapour pressure over temperature [psi/°F | kPa/K]."""
    tau = 1 - theta
    # SR1-86, eq. 1, and its derivative, eq. 1a.
    logarithm = sum(a * math.pow(tau, power) for a, power in _PRESSURE_TERMS) / theta
    inner = logarithm + sum(a * power * math.pow(tau, power - 1) for a, power in _PRESSURE_TERMS)
    pressure = scale.pressure * math.exp(logarithm)
    return -pressure / (theta * scale.temperature) * inner


GLYCOL_SHARES: Final = (0.0, 60.0)
"""Shares of glycol that the solutions' correlations hold for [% by mass]."""

GLYCOL_HOTTEST: Final[dict[System, float]] = {"IP": 212.0, "SI": 100.0}
"""Temperature up to which they hold [°F | °C]; they begin where the solution freezes."""

GLYCOL_GRAVITY: Final[dict[Glycol, float]] = {"propylene glycol": 1.040, "ethylene glycol": 1.118}
"""Density of the pure glycol over that of water, both at 60 °F (15.6 °C).

Source: the relative densities at 68 °F in ASHRAE Handbook—Fundamentals, physical properties of
secondary coolants (1.038, 1.1155), brought to 60 °F by the expansion of glycol and water.
"""

# Melinder's powers of share and of temperature, in the order in which the coefficients stand.
_POWERS = tuple((i, j) for i, powers in enumerate((4, 4, 4, 3, 2, 1)) for j in range(powers))


@dataclass(frozen=True, slots=True)
class _Solution:
    """Melinder's polynomials of one glycol, about a middle share and temperature.

    Args:
        share: the middle share [% by mass].
        celsius: the middle temperature [°C].
        freezing: terms of the freezing point by powers of the share alone [°C].
        density: terms of the density, in the order of `_POWERS` [kg/m³].
        heat: terms of the specific heat, likewise [J/kg K].
    """

    share: float
    celsius: float
    freezing: tuple[float, ...]
    density: tuple[float, ...]
    heat: tuple[float, ...]


# fmt: off
_SOLUTIONS: Final[dict[Glycol, _Solution]] = {
    "propylene glycol": _Solution(
        30.7031, 32.7083,
        (-13.25, -0.6631, -1.094e-2, -2.283e-4, -3.409e-6, 1.465e-8),
        (1018.0, -0.5406, -2.666e-3, 1.347e-5,
         0.7604, -9.45e-3, 5.541e-5, -1.343e-7,
         -2.498e-3, 2.7e-5, -4.018e-7, 3.376e-9,
         -1.55e-4, 2.829e-6, -7.175e-9,
         -1.131e-6, -2.221e-8,
         2.342e-8),
        (3882.0, 2.699, -1.659e-3, -1.032e-5,
         -13.04, 5.07e-2, -4.752e-5, 1.522e-6,
         -0.1598, 9.534e-5, 1.167e-5, -4.87e-8,
         3.539e-4, 3.102e-5, -2.95e-7,
         5.0e-5, -7.135e-7,
         -4.959e-7),
    ),
    "ethylene glycol": _Solution(
        30.8462, 31.728,
        (-15.25, -0.808, -1.334e-2, -7.293e-5, 1.006e-6, 1.14e-9),
        (1034.0, -0.4781, -2.692e-3, 4.725e-6,
         1.311, -6.876e-3, 4.805e-5, 1.69e-8,
         7.49e-5, 7.855e-5, -3.995e-7, 4.982e-9,
         -1.062e-4, 1.229e-6, -1.153e-8,
         -9.623e-7, -7.211e-8,
         4.891e-8),
        (3737.0, 2.93, -4.675e-3, -1.389e-5,
         -17.99, 0.1046, -4.147e-4, 1.847e-7,
         -9.933e-2, 3.516e-4, 5.109e-6, -7.138e-8,
         2.61e-3, -1.189e-6, -1.643e-7,
         1.537e-5, -4.272e-7,
         -1.618e-6),
    ),
}
# fmt: on


def glycol_freezing(glycol: Glycol, share: float) -> float:
    """Return the temperature at which water with glycol begins to freeze [°C].

    Args:
        glycol: which one.
        share: of glycol [% by mass].

    Source: Melinder 2010, IIR.
    """
    solution = _SOLUTIONS[glycol]
    # The published terms with a power of temperature are left out: a freezing point has none.
    x = share - solution.share
    return sum(term * x**power for power, term in enumerate(solution.freezing))


def glycol_density(glycol: Glycol, share: float, celsius: float) -> float:
    """Return the density of water with glycol [kg/m³].

    Args:
        glycol: which one.
        share: of glycol [% by mass].
        celsius: its temperature [°C].

    Source: Melinder 2010, IIR.
    """
    solution = _SOLUTIONS[glycol]
    return _polynomial(solution, solution.density, share, celsius)


def glycol_heat(glycol: Glycol, share: float, celsius: float) -> float:
    """Return the specific heat of water with glycol [J/kg K].

    Args:
        glycol: which one.
        share: of glycol [% by mass].
        celsius: its temperature [°C].

    Source: Melinder 2010, IIR.
    """
    solution = _SOLUTIONS[glycol]
    return _polynomial(solution, solution.heat, share, celsius)


def _polynomial(
    solution: _Solution, terms: tuple[float, ...], share: float, celsius: float
) -> float:
    """Return Melinder's sum of terms times powers of share and of temperature."""
    x, y = share - solution.share, celsius - solution.celsius
    return sum(term * x**i * y**j for term, (i, j) in zip(terms, _POWERS, strict=True))
