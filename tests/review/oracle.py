"""The air path computed a second time, with the real-gas model of moist air.

Written from the engineering of the air path and not from the program: it takes what stands in a
schedule file as plain values, computes in SI with CoolProp's HumidAir (ASHRAE RP-1485) and hands
its results back in the project's units. It imports nothing of the program.

Here stands what cooling and heating have in common; `oracle_cooling` and `oracle_heating` have the
stations in the order the air takes. Those that depend on the supply mass take it, since on the
actual basis it is what is looked for.
"""

from __future__ import annotations

import warnings
from abc import ABC, abstractmethod
from dataclasses import dataclass
from functools import cached_property, lru_cache, wraps
from typing import TYPE_CHECKING, Any

with warnings.catch_warnings():
    warnings.simplefilter("ignore", DeprecationWarning)  # of CoolProp's own wrapper
    from CoolProp.HumidAirProp import HAPropsSI

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    Values = Mapping[str, Any]

SEA_LEVEL = 101_325.0  # Pa
FOOT, POUND, BTU = 0.3048, 0.45359237, 1055.05585262  # m, kg, J: exact or by definition
PSI = 6894.757293168  # Pa
TON = 3516.8528420667  # W


@dataclass(frozen=True)
class Units:
    """What one of each of a system's units is in SI's own; temperatures have a zero besides."""

    degree: float  # K
    zero: float  # K at 0 of the scale
    flow: float  # m³/s
    mass: float  # kg/s
    moisture: float  # kg/s
    load: float  # W
    enthalpy: float  # J/kg
    volume: float  # m³/kg
    length: float  # m
    pressure: float  # Pa
    standard_density: float  # kg/m³
    shaft_power: float  # W of heat
    per_power: float  # airflow times fan pressure in one unit of shaft power

    def kelvin(self, degrees: float) -> float:
        return self.zero + degrees * self.degree

    def degrees(self, kelvin: float) -> float:
        return (kelvin - self.zero) / self.degree


UNITS = {
    "IP": Units(
        degree=1 / 1.8,
        zero=459.67 / 1.8,
        flow=FOOT**3 / 60,
        mass=POUND / 3600,
        moisture=POUND / 3600,
        load=1000 * BTU / 3600,
        enthalpy=BTU / POUND,
        volume=FOOT**3 / POUND,
        length=FOOT,
        pressure=PSI,
        standard_density=0.075 * POUND / FOOT**3,
        shaft_power=2545 * BTU / 3600,
        per_power=6356.0,
    ),
    "SI": Units(
        degree=1.0,
        zero=273.15,
        flow=0.001,
        mass=1.0,
        moisture=1 / 3600,
        load=1000.0,
        enthalpy=1000.0,
        volume=1.0,
        length=1.0,
        pressure=1000.0,
        standard_density=1.2,
        shaft_power=1000.0,
        per_power=1_000_000.0,
    ),
}


def standard_atmosphere(metres: float) -> float:
    """Return the pressure [Pa] at an altitude; ICAO standard atmosphere, below 11 km."""
    return float(SEA_LEVEL * (1 - 0.0065 * metres / 288.15) ** 5.255880)


@lru_cache(maxsize=100_000)
def _property(output: str, t: float, p: float, w: float) -> float:
    return float(HAPropsSI(output, "T", t, "P", p, "W", w))


@dataclass(frozen=True)
class Moist:
    """Moist air: dry bulb [K], humidity ratio, pressure [Pa]."""

    t: float
    w: float
    p: float

    def get(self, output: str) -> float:
        return _property(output, self.t, self.p, self.w)

    @property
    def h(self) -> float:
        return self.get("H")

    @property
    def v(self) -> float:
        return self.get("V")

    def at(self, *, t: float | None = None, w: float | None = None) -> Moist:
        return Moist(self.t if t is None else t, self.w if w is None else w, self.p)


def moist(t: float, p: float, given: str, value: float) -> Moist:
    return Moist(t, float(HAPropsSI("W", "T", t, "P", p, given, value)), p)


def of_enthalpy(h: float, w: float, p: float) -> Moist:
    return Moist(float(HAPropsSI("T", "H", h, "P", p, "W", w)), w, p)


def station(place: Callable[[Any, float], Moist]) -> Callable[[Any, float], Moist]:
    """Keep what a station of a path was at a supply mass."""

    @wraps(place)
    def kept(path: Any, supply: float) -> Moist:
        key = (place.__name__, supply)
        if key not in path.kept:
            path.kept[key] = place(path, supply)
        return path.kept[key]

    return kept


def joined(a: Moist, mass_a: float, b: Moist, mass_b: float) -> Moist:
    """Return two streams mixed adiabatically."""
    if not mass_b:
        return a
    if not mass_a:
        return b
    mass = mass_a + mass_b
    h, w = (mass_a * a.h + mass_b * b.h) / mass, (mass_a * a.w + mass_b * b.w) / mass
    return of_enthalpy(h, w, a.p)


def root(gap: Callable[[float], float], low: float, high: float) -> float:
    """Return where a function that changes sign between two places is zero, by bisection."""
    below = gap(low) < 0
    for _ in range(80):
        middle = (low + high) / 2
        if (gap(middle) < 0) == below:
            low = middle
        else:
            high = middle
        if high - low <= 1e-13 * abs(high):
            break
    return (low + high) / 2


def secant(gap: Callable[[float], float], first: float, second: float) -> float:
    """Return where a nearly straight function is zero."""
    a, b = gap(first), gap(second)
    for _ in range(50):
        if abs(second - first) <= 1e-13 * abs(second) or a == b:
            return second
        first, second, a = second, second - b * (second - first) / (b - a), b
        b = gap(second)
    raise AssertionError("the fan's inlet does not settle")


class AirPath(ABC):
    """One unit at one condition, from the bare values of a schedule file."""

    def __init__(self, project: Values, condition: Values, unit: Values) -> None:
        self.system: str = project["units"]
        self.units = UNITS[self.system]
        self.condition, self.unit = condition, unit
        self.kept: dict[tuple[str, float], Moist] = {}
        self.basis = unit.get("airflow_basis", project.get("airflow_basis", "standard"))
        if "pressure" in project:
            self.p = project["pressure"] * self.units.pressure
        else:
            self.p = standard_atmosphere(project.get("altitude", 0) * self.units.length)

    # Reading

    def warmer(self, air: Moist, degrees: float) -> Moist:
        return air.at(t=air.t + degrees * self.units.degree)

    def bulb(self, db: float, wb: float) -> Moist:
        return moist(self.units.kelvin(db), self.p, "B", self.units.kelvin(wb))

    def humid(self, given: Values, at: str) -> Moist:
        """Return the air of `<at>_db` with whichever humidity is given beside it."""
        db = given[f"{at}_db"]
        if f"{at}_wb" in given:
            return self.bulb(db, given[f"{at}_wb"])
        t = self.units.kelvin(db)
        if f"{at}_dp" in given:
            return moist(t, self.p, "D", self.units.kelvin(given[f"{at}_dp"]))
        if f"{at}_rh" in given:
            return moist(t, self.p, "R", given[f"{at}_rh"] / 100)
        return Moist(t, given[f"{at}_w"], self.p)

    @cached_property
    def outdoor(self) -> Moist:
        return self.humid(self.condition, "outdoor")

    @property
    def blows_through(self) -> bool:
        return bool(self.unit.get("fan_position") == "blow-through")

    # Which cooling and heating know

    @property
    @abstractmethod
    def airflow(self) -> float:
        """Supply air at the condition."""

    @property
    @abstractmethod
    def exhaust(self) -> Moist:
        """Air that leaves through the recovery."""

    @abstractmethod
    def fan_inlet(self, supply: float) -> Moist:
        """Air that enters the fan."""

    # Masses

    def mass(self, airflow: float, air: Moist | None) -> float:
        """Return the dry air [kg/s] in an airflow as stated, of `air` on the actual basis."""
        volume = airflow * self.units.flow
        if self.basis == "actual":
            assert air is not None
            return volume / air.v
        ratio = self.p / SEA_LEVEL if self.basis == "site" else 1.0
        return volume * self.units.standard_density * ratio

    @cached_property
    def supply_mass(self) -> float:
        if self.basis != "actual":
            return self.mass(self.airflow, None)
        volume = self.airflow * self.units.flow
        thin = volume * self.p / SEA_LEVEL  # a cubic metre weighs about 1 kg at sea level
        return secant(lambda mass: mass * self.fan_inlet(mass).v - volume, thin, 1.2 * thin)

    def outdoor_mass(self, supply: float) -> float:
        airflow = self.unit.get("outdoor_airflow", 0)
        if airflow >= self.airflow:
            return supply
        if not airflow:
            return 0.0
        return min(self.mass(airflow, self.outdoor), supply)

    def exhaust_mass(self, supply: float) -> float:
        if "exhaust_airflow" not in self.unit:
            return self.outdoor_mass(supply)
        return self.mass(self.unit["exhaust_airflow"], self.exhaust)

    # Recovery

    def past_recovery(self, air: Moist, supply: float, sensible: float, latent: float) -> Moist:
        """Return outdoor air behind a recovery of two effectivenesses; never past saturation."""
        out = self.outdoor_mass(supply)
        share = 1.0
        if self.unit.get("recovery_basis", "least flow") == "least flow":
            share = min(out, self.exhaust_mass(supply)) / out
        t = air.t - sensible * share * (air.t - self.exhaust.t)
        w = air.w - latent * share * (air.w - self.exhaust.w)
        return Moist(t, min(w, moist(t, self.p, "R", 1.0).w), self.p)

    # Fan

    def past_fan(self, inlet: Moist, supply: float) -> Moist:
        if "fan_rise" in self.unit:
            return self.warmer(inlet, self.unit["fan_rise"])
        heat = self._fan_power_heat(inlet, supply)
        return of_enthalpy(inlet.h + heat / supply, inlet.w, self.p) if heat else inlet

    def before_fan(self, after: Moist, supply: float) -> Moist:
        """Return the air that a fan warms to a given state."""
        off = self.past_fan(after, supply).t - after.t
        if not off:
            return after
        t = secant(
            lambda t: self.past_fan(after.at(t=t), supply).t - after.t, after.t, after.t - off
        )
        return after.at(t=t)

    def _fan_power_heat(self, inlet: Moist, supply: float) -> float:
        """Return what the fan's power puts into the air [W]."""
        unit, units = self.unit, self.units
        if "fan_power" in unit:
            power = unit["fan_power"] * unit.get("fan_count", 1)
        elif "fan_total_pressure" in unit and "fan_efficiency" in unit:
            airflow = supply * inlet.v / units.flow
            pressure, efficiency = unit["fan_total_pressure"], unit["fan_efficiency"] / 100
            power = airflow * pressure / (units.per_power * efficiency)
        else:
            return 0.0
        if unit.get("motor_in_airstream", True):
            power /= unit.get("motor_efficiency", 90) / 100
        return float(power * units.shaft_power)

    # Results

    def properties(self, air: Moist) -> dict[str, float]:
        """Return a state's properties by their names in the JSON, in the project's units."""
        units = self.units
        # The handbook's IP formulas count dry air's enthalpy from 0 °F, CoolProp from 0 °C.
        zero = Moist(units.zero, 0.0, SEA_LEVEL).h - Moist(273.15, 0.0, SEA_LEVEL).h
        made = {
            "db": units.degrees(air.t),
            "w": air.w,
            "h": (air.h - zero) / units.enthalpy,
            "v": air.v / units.volume,
        }
        saturated = moist(air.t, self.p, "R", 1.0)
        if air.w < saturated.w * 0.995:
            made["wb"] = units.degrees(air.get("B"))
            made["dp"] = units.degrees(air.get("D"))
            made["rh"] = air.get("R") * 100
        return made
