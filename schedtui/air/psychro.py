"""The handbook's moist-air formulas in both unit systems, alone with psychrolib.

What else in the program wants a property of moist air asks here, by way of `air.state`. psychrolib
has two habits that must go no further than this module: its unit system is a switch shared by the
whole process, and it turns an impossible humidity ratio into 1e-7 without a word. So each unit
system has an instance of the library to itself, set once and never again, and in those instances
the floor is taken out, which lets an impossible state be refused.

Knows nothing of states, streams or equipment.
"""

from __future__ import annotations

import importlib.util
import math
import sys
from contextlib import contextmanager
from dataclasses import dataclass
from functools import lru_cache
from typing import TYPE_CHECKING, Any, Final, cast

from schedtui.air.crossing import crossing
from schedtui.errors import AirError
from schedtui.units import ALTITUDE, HUMIDITY_RATIO, STATION_PRESSURE, TEMPERATURE, System

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator
    from types import ModuleType


@contextmanager
def _numba_out_of_sight() -> Iterator[None]:
    """Keep psychrolib from compiling itself: that costs a second and drags in numpy."""
    modules = cast("dict[str, ModuleType | None]", sys.modules)
    had, before = "numba" in modules, modules.get("numba")
    modules["numba"] = None  # the import system takes None for "there is none"
    try:
        yield
    finally:
        if had:
            modules["numba"] = before
        else:
            del modules["numba"]


with _numba_out_of_sight():
    import psychrolib  # type: ignore[import-untyped]  # it ships no marker for its annotations

STANDARD_PRESSURE: Final[dict[System, float]] = {"IP": 14.696, "SI": 101.325}
"""Pressure of the standard atmosphere at sea level [psia | kPa]."""

ALTITUDE_RANGE: Final[dict[System, tuple[float, float]]] = {
    "IP": (-16_400.0, 36_000.0),
    "SI": (-5_000.0, 11_000.0),
}
"""Altitudes that the standard atmosphere's formula holds for [ft | m]."""

TEMPERATURE_RANGE: Final[dict[System, tuple[float, float]]] = {
    "IP": (-148.0, 392.0),
    "SI": (-100.0, 200.0),
}
"""Temperatures that the saturation formulas hold for [°F | °C]."""

TRIPLE_POINT: Final[dict[System, float]] = {"IP": 32.018, "SI": 0.01}
"""The triple point of water [°F | °C]: saturation is over ice up to there, over water above."""

FREEZING_POINT: Final[dict[System, float]] = {"IP": 32.0, "SI": 0.0}
"""Wet bulb below which there is ice on the wick [°F | °C]."""

_TOLERANCE = 1e-9  # degrees; the library's own leaves a wet bulb good to 0.002 °F only
_DRIEST = 1e-7  # humidity ratio below which saturation would lie outside the formulas
_OUT_OF_GAP = 1.0 - 1e-6
_UNDER_BOILING = 1e-6  # degrees
_REMEMBERED = 4096  # wet bulbs: each air's is asked for by several checks and columns


def _instance(system: System) -> ModuleType:
    """Return a psychrolib of our own, set to one unit system for good."""
    spec = psychrolib.__spec__
    module = importlib.util.module_from_spec(spec)
    with _numba_out_of_sight():
        spec.loader.exec_module(module)
    module.SetUnitSystem(getattr(module, system))
    # Without a floor the wet-bulb formula returns the negative humidity ratio that it found.
    vars(module).update(PSYCHROLIB_TOLERANCE=_TOLERANCE, MIN_HUM_RATIO=-math.inf)
    return module


@dataclass(frozen=True, slots=True, eq=False)
class Psychrometrics:
    """The formulas in one unit system; pressures in psia | kPa, enthalpies in Btu/lb | kJ/kg.

    Args:
        system: the unit system of every argument and result.
        library: the psychrolib instance set to it.
        thousand: what makes of a kPa the library's Pa, of a kJ its J; 1 in IP.
    """

    system: System
    library: ModuleType
    thousand: float

    def require_temperature(self, what: str, value: float) -> None:
        """Refuse a temperature that the formulas do not hold for.

        Args:
            what: the temperature's name, for the sentence.
            value: the temperature [°F | °C].

        Raises:
            AirError: it is outside −148 to 392 °F, −100 to 200 °C.
        """
        low, high = TEMPERATURE_RANGE[self.system]
        if not low <= value <= high:
            raise AirError(
                f"{what} {self._degrees(value)} is outside the formulas' range, "
                f"{low:g} to {self._degrees(high)}"
            )

    def humidity_ratio_by_wet_bulb(self, db: float, wb: float, pressure: float) -> float:
        """Return the humidity ratio from dry and wet bulb.

        Args:
            db: dry bulb [°F | °C].
            wb: thermodynamic wet bulb [°F | °C].
            pressure: station pressure [psia | kPa].

        Raises:
            AirError: the wet bulb is above the dry bulb, or lower than even dry air's.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 33 (water) and 35 (ice).
        """
        self.require_temperature("dry bulb", db)
        self.require_temperature("wet bulb", wb)
        if wb > db:
            raise AirError(f"wet bulb {self._degrees(wb)} is above dry bulb {self._degrees(db)}")
        if wb == db:  # saturated; over ice the IP equation misses that by up to 1.3e-4
            return self._below_boiling("GetSatHumRatio", (db,), db, pressure)
        w = self._ask("GetHumRatioFromTWetBulb", db, wb, pressure * self.thousand)
        if w < 0:
            raise AirError(
                f"no air of {self._degrees(db)} dry bulb has a wet bulb of {self._degrees(wb)}: "
                "even air without moisture has a higher one"
            )
        return w

    def humidity_ratio_by_dew_point(self, db: float, dp: float, pressure: float) -> float:
        """Return the humidity ratio from dry bulb and dew point.

        Args:
            db: dry bulb [°F | °C].
            dp: dew point [°F | °C].
            pressure: station pressure [psia | kPa].

        Raises:
            AirError: the dew point is above the dry bulb.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 20 and 36.
        """
        self.require_temperature("dry bulb", db)
        self.require_temperature("dew point", dp)
        if dp > db:
            raise AirError(f"dew point {self._degrees(dp)} is above dry bulb {self._degrees(db)}")
        return self._below_boiling("GetHumRatioFromTDewPoint", (dp,), dp, pressure)

    def humidity_ratio_by_relative_humidity(self, db: float, rh: float, pressure: float) -> float:
        """Return the humidity ratio from dry bulb and relative humidity.

        Args:
            db: dry bulb [°F | °C].
            rh: relative humidity [%].
            pressure: station pressure [psia | kPa].

        Raises:
            AirError: the relative humidity is outside 0 to 100 %.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 20 and 22.
        """
        self.require_temperature("dry bulb", db)
        if not 0 <= rh <= 100:  # noqa: PLR2004  percent
            raise AirError(f"relative humidity {rh:g} % is outside 0 to 100 %")
        return self._below_boiling("GetHumRatioFromRelHum", (db, rh / 100), db, pressure)

    def humidity_ratio_by_enthalpy(self, db: float, h: float) -> float:
        """Return the humidity ratio at which air of a dry bulb has an enthalpy, negative or not.

        Args:
            db: dry bulb [°F | °C].
            h: enthalpy [Btu/lb | kJ/kg].

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 30.
        """
        return self._ask("GetHumRatioFromEnthalpyAndTDryBulb", h * self.thousand, db)

    def saturation_pressure(self, temperature: float) -> float:
        """Return the pressure of saturated vapour [psia | kPa].

        Args:
            temperature: [°F | °C].

        Raises:
            AirError: the temperature is outside the formulas' range.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 5 (ice) and 6 (water).
        """
        self.require_temperature("temperature", temperature)
        return self._ask("GetSatVapPres", temperature) / self.thousand

    def saturation_humidity_ratio(self, db: float, pressure: float) -> float:
        """Return the humidity ratio of saturated air, infinite where water boils.

        Args:
            db: dry bulb [°F | °C].
            pressure: station pressure [psia | kPa].

        Raises:
            AirError: the temperature is outside the formulas' range.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 5, 6 and 20.
        """
        self.require_temperature("dry bulb", db)
        w = self._ask("GetSatHumRatio", db, pressure * self.thousand)
        return w if w >= 0 else math.inf

    def enthalpy(self, db: float, w: float) -> float:
        """Return the enthalpy [Btu/lb | kJ/kg of dry air].

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 30.
        """
        return self._ask("GetMoistAirEnthalpy", db, w) / self.thousand

    def dry_bulb(self, h: float, w: float) -> float:
        """Return the dry bulb [°F | °C].

        Args:
            h: enthalpy [Btu/lb | kJ/kg of dry air].
            w: humidity ratio [lb/lb | kg/kg].

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 30, solved for the temperature.
        """
        return self._ask("GetTDryBulbFromEnthalpyAndHumRatio", h * self.thousand, w)

    def volume(self, db: float, w: float, pressure: float) -> float:
        """Return the specific volume [ft³/lb | m³/kg of dry air].

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
            pressure: station pressure [psia | kPa].

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 26.
        """
        return self._ask("GetMoistAirVolume", db, w, pressure * self.thousand)

    def relative_humidity(self, db: float, w: float, pressure: float) -> float:
        """Return the relative humidity [%], above 100 where the air holds fog.

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
            pressure: station pressure [psia | kPa].

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 20 and 22.
        """
        return 100 * self._ask("GetRelHumFromHumRatio", db, w, pressure * self.thousand)

    def dew_point(self, db: float, w: float, pressure: float) -> float:
        """Return the dew point [°F | °C], never above the dry bulb.

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
            pressure: station pressure [psia | kPa].

        Raises:
            AirError: the air holds next to no moisture.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 5 and 6 solved for the temperature.
        """
        if w < _DRIEST:
            raise AirError(
                f"humidity ratio {w:g} {HUMIDITY_RATIO.unit(self.system)} "
                "is too low for the air to have a dew point"
            )
        try:
            return self._ask("GetTDewPointFromHumRatio", db, w, pressure * self.thousand)
        except AirError:
            # The formulas over ice and over water leave 4e-7 of vapour pressure between them at
            # the triple point; a search for a value in there ends at neither edge.
            w *= _OUT_OF_GAP
            return self._ask("GetTDewPointFromHumRatio", db, w, pressure * self.thousand)

    @lru_cache(maxsize=_REMEMBERED)  # noqa: B019  both that there are stay as long as the module
    def wet_bulb(self, db: float, w: float, pressure: float) -> float:
        """Return the thermodynamic wet bulb [°F | °C]: the lower one where ice and water both fit.

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
            pressure: station pressure [psia | kPa].

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 33 and 35 solved for the wet bulb.
        """
        # Bracketed by the dew point, which air of no moisture has not: so little moisture as is put
        # in its place moves the wet bulb by less than 0.001 °F.
        w = max(w, _DRIEST)
        humidity_ratio, asked = self.library.GetHumRatioFromTWetBulb, pressure * self.thousand

        def excess(wb: float) -> float:
            return float(humidity_ratio(db, wb, asked)) - w

        low, high = self.dew_point(db, w, pressure), db
        if low >= high:
            return db
        if excess(high) <= 0:  # water boils at the dry bulb
            high = min(high, self._ask("GetTDewPointFromVapPres", db, asked) - _UNDER_BOILING)
        freezing = FREEZING_POINT[self.system]
        if low < freezing < high:
            # The humidity ratio drops where the ice melts, so each side is searched by itself.
            below = math.nextafter(freezing, low)
            low, high = (low, below) if excess(below) > 0 else (freezing, high)
        return crossing(excess, low, high, _TOLERANCE)

    def station_pressure(self, altitude: float) -> float:
        """Return the standard atmosphere's pressure [psia | kPa].

        Args:
            altitude: height above sea level [ft | m].

        Raises:
            AirError: the altitude is outside the formula's range.

        Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 3.
        """
        low, high = ALTITUDE_RANGE[self.system]
        if not low <= altitude <= high:
            unit = ALTITUDE.unit(self.system)
            raise AirError(
                f"altitude {altitude:g} {unit} is outside the standard atmosphere's "
                f"{low:g} to {high:g} {unit}"
            )
        return self._ask("GetStandardAtmPressure", altitude) / self.thousand

    def _ask(self, function: str, *arguments: float) -> float:
        """Return what the library's function gives; its complaint becomes an AirError."""
        call: Callable[..., Any] = getattr(self.library, function)
        try:
            return float(call(*arguments))
        except (ValueError, ArithmeticError) as error:
            raise AirError(str(error)) from error

    def _below_boiling(
        self, function: str, arguments: tuple[float, ...], temperature: float, pressure: float
    ) -> float:
        """Return a humidity ratio, refusing a vapour pressure above the station pressure."""
        w = self._ask(function, *arguments, pressure * self.thousand)
        if w < 0:
            raise AirError(
                f"at {self._degrees(temperature)} the moisture asked for would boil at "
                f"{pressure:g} {STATION_PRESSURE.unit(self.system)}"
            )
        return w

    def _degrees(self, value: float) -> str:
        return f"{value:g} {TEMPERATURE.unit(self.system)}"


_FORMULAS: Final[dict[System, Psychrometrics]] = {
    "IP": Psychrometrics("IP", _instance("IP"), 1.0),
    "SI": Psychrometrics("SI", _instance("SI"), 1000.0),
}


def formulas(system: System) -> Psychrometrics:
    """Return the formulas of a unit system."""
    return _FORMULAS[system]


def station_pressure(altitude: float, system: System) -> float:
    """Return the standard atmosphere's pressure [psia | kPa].

    Args:
        altitude: height above sea level [ft | m].
        system: the unit system of the altitude and the pressure.

    Raises:
        AirError: the altitude is outside the formula's range.

    Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, eq. 3.

    >>> station_pressure(5000, "IP")
    12.228
    >>> station_pressure(1500, "SI")
    84.556
    """
    return formulas(system).station_pressure(altitude)
