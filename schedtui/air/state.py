"""Moist air at one place: the pressure there, and states of air at that pressure.

A state knows its dry bulb, humidity ratio and enthalpy; the rest is computed when asked for (a wet
bulb takes a search). It may be foggy: a mixture's humidity ratio can lie above saturation.

Knows nothing of streams or equipment.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, field
from functools import lru_cache
from typing import TYPE_CHECKING

from schedtui.air import derivation, psychro
from schedtui.errors import AirError
from schedtui.units import (
    ALTITUDE,
    HUMIDITY_RATIO,
    STATION_PRESSURE,
    TEMPERATURE_DIFFERENCE,
    System,
)

if TYPE_CHECKING:
    from schedtui.air.step import Steps

# Air whose wet bulb is all but its dry bulb may come out 1.3e-4 above saturation: the wet-bulb
# equation over ice (eq. 35, IP) does not quite close there.
_SATURATION_TOLERANCE = 2e-4

_REMEMBERED = 1024  # stated pairs of properties


@dataclass(frozen=True, slots=True)
class Air:
    """The air at one station pressure, in one unit system; it makes states.

    Args:
        system: the unit system of everything asked of it.
        pressure: station pressure [psia | kPa].
        formulas: the moist-air formulas of the unit system.

    Raises:
        AirError: the pressure is not above zero.

    >>> air = Air("IP", 14.696)
    >>> air.by_wet_bulb(80, 67).h
    31.45
    """

    system: System
    pressure: float
    formulas: psychro.Psychrometrics = field(init=False, compare=False, repr=False)

    def __post_init__(self) -> None:
        """Refuse a pressure that is none, and settle whose formulas hold."""
        if not 0 < self.pressure < math.inf:
            unit = STATION_PRESSURE.unit(self.system)
            raise AirError(f"station pressure {self.pressure:g} {unit} is not above 0")
        object.__setattr__(self, "formulas", psychro.formulas(self.system))

    @classmethod
    def at_altitude(cls, system: System, altitude: float, steps: Steps | None = None) -> Air:
        """Return the air at an altitude in the standard atmosphere.

        Args:
            system: the unit system.
            altitude: height above sea level [ft | m].
            steps: the working to append to.

        Raises:
            AirError: the altitude is outside the standard atmosphere's range.
        """
        pressure = psychro.station_pressure(altitude, system)
        if steps is not None:
            height = ("Z", altitude, ALTITUDE)
            steps.append(derivation.station_pressure_step(system, height, pressure))
        return cls(system, pressure)

    @property
    def density_ratio(self) -> float:
        """Station pressure over the standard atmosphere's (constant-temperature convention)."""
        return self.pressure / psychro.STANDARD_PRESSURE[self.system]

    def by_wet_bulb(self, db: float, wb: float, steps: Steps | None = None) -> State:
        """Return the state of a dry and a wet bulb.

        Args:
            db: dry bulb [°F | °C].
            wb: wet bulb [°F | °C].
            steps: the working to append to.

        Raises:
            AirError: no air has these two.
        """
        state = _of_bulbs(self, db, wb)
        if steps is not None:
            derivation.by_wet_bulb(steps, state, wb)
        return state

    def by_dew_point(self, db: float, dp: float, steps: Steps | None = None) -> State:
        """Return the state of a dry bulb and a dew point.

        Args:
            db: dry bulb [°F | °C].
            dp: dew point [°F | °C].
            steps: the working to append to.

        Raises:
            AirError: no air has these two.
        """
        w = self.formulas.humidity_ratio_by_dew_point(db, dp, self.pressure)
        state = self.state(db, w)
        if steps is not None:
            derivation.by_dew_point(steps, state, dp)
        return state

    def by_relative_humidity(self, db: float, rh: float, steps: Steps | None = None) -> State:
        """Return the state of a dry bulb and a relative humidity.

        Args:
            db: dry bulb [°F | °C].
            rh: relative humidity [%].
            steps: the working to append to.

        Raises:
            AirError: no air has these two.
        """
        state = _of_relative_humidity(self, db, rh)
        if steps is not None:
            derivation.by_relative_humidity(steps, state, rh)
        return state

    def by_humidity_ratio(self, db: float, w: float, steps: Steps | None = None) -> State:
        """Return the state of a dry bulb and a humidity ratio, foggy if above saturation.

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
            steps: the working to append to.

        Raises:
            AirError: the humidity ratio is below zero or the dry bulb out of range.
        """
        state = self.state(db, w)
        if steps is not None:
            derivation.enthalpy(steps, state)
        return state

    def by_enthalpy(self, h: float, w: float) -> State:
        """Return the state of an enthalpy and a humidity ratio, foggy if above saturation.

        Args:
            h: enthalpy [Btu/lb | kJ/kg of dry air].
            w: humidity ratio [lb/lb | kg/kg].

        Raises:
            AirError: the humidity ratio is below zero or the dry bulb comes out of range.
        """
        self._require_moisture(w)
        db = self.formulas.dry_bulb(h, w)
        self.formulas.require_temperature("dry bulb", db)
        return State(self, db, w, h)

    def by_dry_bulb_and_enthalpy(self, db: float, h: float) -> State:
        """Return the state of a dry bulb and an enthalpy, foggy if above saturation.

        Args:
            db: dry bulb [°F | °C].
            h: enthalpy [Btu/lb | kJ/kg of dry air].

        Raises:
            AirError: the enthalpy is below that of dry air.
        """
        return self.state(db, self.formulas.humidity_ratio_by_enthalpy(db, h))

    def enthalpy(self, db: float, w: float) -> float:
        """Return the enthalpy [Btu/lb | kJ/kg of dry air].

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
        """
        return self.formulas.enthalpy(db, w)

    def saturation_humidity_ratio(self, db: float) -> float:
        """Return the humidity ratio of saturated air [lb/lb | kg/kg].

        Args:
            db: dry bulb [°F | °C].

        Raises:
            AirError: the dry bulb is out of range.
        """
        return self.formulas.saturation_humidity_ratio(db, self.pressure)

    def state(self, db: float, w: float, wb: float | None = None) -> State:
        """Return the state of a dry bulb and a humidity ratio, with the wet bulb if it was stated.

        Args:
            db: dry bulb [°F | °C].
            w: humidity ratio [lb/lb | kg/kg].
            wb: wet bulb that it was made from [°F | °C].

        Raises:
            AirError: the humidity ratio is below zero or the dry bulb out of range.
        """
        self.formulas.require_temperature("dry bulb", db)
        self._require_moisture(w)
        return State(self, db, w, self.formulas.enthalpy(db, w), wb)

    def _require_moisture(self, w: float) -> None:
        if not 0 <= w < math.inf:
            unit = HUMIDITY_RATIO.unit(self.system)
            raise AirError(f"humidity ratio {w:.3g} {unit} is no amount of moisture")


@dataclass(frozen=True, slots=True)
class State:
    """Moist air in one state; made by an `Air`.

    Args:
        air: the air it is a state of.
        db: dry bulb [°F | °C].
        w: humidity ratio [lb/lb | kg/kg].
        h: enthalpy [Btu/lb | kJ/kg of dry air].
        stated_wb: the wet bulb [°F | °C] it was made from, if it was: near freezing one humidity
            ratio has two wet bulbs, and the stated one is the one to show.
    """

    air: Air
    db: float
    w: float
    h: float
    stated_wb: float | None = field(default=None, compare=False, repr=False)

    @property
    def wb(self) -> float:
        """Wet bulb [°F | °C]; that of foggy air is its dry bulb."""
        if self.stated_wb is not None:
            return self.stated_wb
        return self.air.formulas.wet_bulb(self.db, self.w, self.air.pressure)

    @property
    def dp(self) -> float:
        """Dew point [°F | °C]; that of foggy air is its dry bulb.

        Raises:
            AirError: the air holds next to no moisture.
        """
        return self.air.formulas.dew_point(self.db, self.w, self.air.pressure)

    @property
    def rh(self) -> float:
        """Relative humidity [%]; above 100 where the air is foggy."""
        return self.air.formulas.relative_humidity(self.db, self.w, self.air.pressure)

    @property
    def v(self) -> float:
        """Specific volume [ft³/lb | m³/kg of dry air]."""
        return self.specific_volume()

    def specific_volume(self, steps: Steps | None = None) -> float:
        """Return the specific volume [ft³/lb | m³/kg of dry air].

        Args:
            steps: the working to append to.
        """
        v = self.air.formulas.volume(self.db, self.w, self.air.pressure)
        if steps is not None:
            derivation.volume(steps, self, v)
        return v

    @property
    def supersaturated(self) -> bool:
        """Whether the humidity ratio is above saturation: fog."""
        limit = self.air.saturation_humidity_ratio(self.db)
        return self.w > limit * (1 + _SATURATION_TOLERANCE)

    def heated_to(self, db: float, steps: Steps | None = None) -> State:
        """Return this air heated or cooled at constant humidity ratio.

        Args:
            db: dry bulb afterwards [°F | °C].
            steps: the working to append to; the air before has the subscript i.

        Raises:
            AirError: the dry bulb is out of range.
        """
        after = self.at(db=db)
        if steps is not None:
            derivation.same_moisture(steps, after.w)
            derivation.enthalpy(steps, after)
        return after

    def warmed_by(self, difference: float, where: str, steps: Steps | None = None) -> State:
        """Return this air warmed or cooled by so much at constant humidity ratio.

        Args:
            difference: what its dry bulb rises by, below 0 where it falls [°F | K].
            where: where the air is afterwards, in words for the working.
            steps: the working to append to; the air before has the subscript i, the rise d.

        Raises:
            AirError: the dry bulb is out of range.
        """
        if difference == 0:
            return self
        after = self.at(db=self.db + difference)
        if steps is not None:
            rise = ("Δt_d", difference, TEMPERATURE_DIFFERENCE)
            derivation.warmed(steps, self, after, rise, where)
        return after

    def at(self, *, db: float | None = None, w: float | None = None) -> State:
        """Return this air at another dry bulb, another humidity ratio, or both.

        Args:
            db: dry bulb [°F | °C]; this state's if not given.
            w: humidity ratio [lb/lb | kg/kg]; this state's if not given.

        Raises:
            AirError: there is no such air.
        """
        return self.air.by_humidity_ratio(self.db if db is None else db, self.w if w is None else w)


# A schedule states the same few rooms, outdoor and leaving states in row after row, and asks for
# them again at each corner of the digits and for each remedy.


@lru_cache(maxsize=_REMEMBERED)
def _of_bulbs(air: Air, db: float, wb: float) -> State:
    return air.state(db, air.formulas.humidity_ratio_by_wet_bulb(db, wb, air.pressure), wb)


@lru_cache(maxsize=_REMEMBERED)
def _of_relative_humidity(air: Air, db: float, rh: float) -> State:
    return air.state(db, air.formulas.humidity_ratio_by_relative_humidity(db, rh, air.pressure))
