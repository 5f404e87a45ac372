"""A unit's air at one cooling condition: from the coil to the room, and the coil's load.

Composes what `air` computes in the order that the air takes. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import CoilLoad, apparatus_dew_point, bypass_factor, coil_load, heating_load
from schedtui.air.flow import net_load
from schedtui.air.mixing import mix
from schedtui.air.room import RoomMet, room_met
from schedtui.errors import Absent
from schedtui.review.coil_air import CoilAir
from schedtui.review.figure import figure
from schedtui.review.letters import CoolingLetters
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State

_FULL = 100.0


class Cooling(CoilAir):
    """One unit at one cooling condition."""

    @figure
    def letters(self) -> CoolingLetters:
        """The letters of the streams, for a working.

        They hang on figures whose own steps are not due yet, so another evaluation is asked.
        """
        return CoolingLetters(type(self)(self.unit, self.condition, self.site))

    @property
    def has_less_load(self) -> bool:
        """Whether the room has less than its design loads at this condition."""
        return min(self.condition.sensible_load, self.condition.latent_load) < _FULL

    # From the coil to the room

    @figure
    def past_wrap(self) -> State:
        """Air behind the coil, warmed by a wrap-around's second side."""
        steps = self.named(CoolingLetters.past_wrap)
        return self.coil_leaving.warmed_by(self.wrap, "behind the wrap-around's second side", steps)

    @figure
    def rejoined(self) -> State:
        """Air behind the coil, joined by what went around it."""
        air = self.past_wrap
        if not self.bypass_mass:
            return air
        around, steps = self.bypassed, self.named(CoolingLetters.rejoining)
        return mix(air, self.coil_mass, around, self.bypass_mass, steps)

    @property
    def fan_inlet(self) -> State:
        """Air at the supply fan's inlet."""
        return self.mixed if self.blows_through else self.rejoined

    @figure
    def before_reheat(self) -> State:
        """Air that leaves the cooling part of the unit: past a fan that draws through."""
        air = self.rejoined
        if self.blows_through:
            return air
        return air.warmed_by(self.fan_rise, "behind the fan", self.named(CoolingLetters.past_fan))

    @figure
    def reheated(self) -> State:
        """Air behind the reheat, which never cools."""
        air = self.before_reheat
        self.unit.refuse_bad(Unit.reheat_lat_db)
        lat_db = self.unit.reheat_lat_db
        if lat_db is None or lat_db <= air.db:
            return air
        return air.heated_to(lat_db, self.named(CoolingLetters.reheating))

    @property
    def drawn_through_warm(self) -> bool:
        """Whether a fan that draws through warms the air behind the coil."""
        return not self.blows_through and self.fan_rise != 0

    @property
    def reheats(self) -> bool:
        """Whether the reheat warms the air at this condition."""
        return self.reheated is not self.before_reheat

    @figure
    def reheat_load(self) -> float:
        """Heat that the reheat puts into the supply air [MBH | kW].

        Raises:
            Absent: the unit is not scheduled to reheat.
        """
        self.unit.need(Unit.reheat_lat_db)
        before, after = self.before_reheat, self.reheated
        steps = self.named(CoolingLetters.reheat_load)
        return heating_load(self.supply_mass, before, after.db, steps)

    @figure
    def supply(self) -> State:
        """Air as it enters the room, past the duct."""
        self.unit.refuse_bad(Unit.duct_rise)
        air, steps = self.reheated, self.named(CoolingLetters.supply)
        return air.warmed_by(self.unit.duct_rise, "behind the duct", steps)

    @figure
    def room_met(self) -> RoomMet:
        """What the supply air does in the room."""
        return room_met(self.supply_mass, self.supply, self.room, self.steps)

    # The coil's load

    @figure
    def coil(self) -> CoilLoad:
        """What the coil takes out of the air."""
        return coil_load(self.coil_mass, self.coil_entering, self.coil_leaving, self.steps)

    @figure
    def required_gross(self) -> float:
        """Total load of the coil itself, which its water must carry [MBH | kW]."""
        self.refuse_left_by_loads()
        return self.coil.total

    @figure
    def required_total(self) -> float:
        """Total load that a scheduled capacity is held against, gross or net as it is stated."""
        steps = self.lettered(q="t", net="tnet")
        return net_load(self.required_gross, self.fan_heat_in_capacity, steps)

    @figure
    def required_sensible(self) -> float:
        """Sensible load that a scheduled capacity is held against, gross or net likewise."""
        self.refuse_left_by_loads()
        steps = self.lettered(q="s", net="snet")
        return net_load(self.coil.sensible, self.fan_heat_in_capacity, steps)

    @figure
    def fan_heat_in_capacity(self) -> float:
        """Fan heat that a net capacity leaves out [MBH | kW]; 0 for a gross one."""
        self.unit.refuse_bad(Unit.cool_basis)
        return self.fan_heat if self.unit.cool_basis == "net" else 0.0

    @figure
    def shr(self) -> float:
        """Sensible heat ratio of the coil."""
        ratio = self.coil.shr
        if ratio is None:
            raise Absent(why=f"the coil is off at {self.name}")
        return ratio

    @figure
    def adp(self) -> float:
        """Apparatus dew point [°F | °C]."""
        self.refuse_left_by_loads()
        adp = apparatus_dew_point(self.coil_entering, self.coil_leaving, self.steps)
        if adp is None:
            raise Absent(why="the coil has no apparatus dew point")
        return adp

    @figure
    def bypass_factor(self) -> float:
        """Bypass factor of the coil."""
        return bypass_factor(self.coil_entering, self.coil_leaving, self.adp, self.steps)

    def refuse_left_by_loads(self) -> None:
        """Refuse to judge by a leaving state that follows from the scheduled loads themselves.

        Raises:
            Absent: it does.
        """
        if self.leaving_from == "loads":
            raise Absent("cool_lat_wb")
