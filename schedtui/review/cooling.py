"""A unit's air at one cooling condition: from outdoors through the coil to the room.

Composes what `air` computes in the order that the air takes. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Literal

from schedtui.air import fan
from schedtui.air.coil import (
    CoilLoad,
    CoilMode,
    apparatus_dew_point,
    bypass_factor,
    coil_leaving,
    coil_load,
    heating_load,
    leaving_of,
)
from schedtui.air.flow import enthalpy_difference
from schedtui.air.mixing import mix, unmix
from schedtui.air.recovery import Effectiveness, recovered
from schedtui.air.room import RoomMet, room_met, supply_for
from schedtui.errors import Absent
from schedtui.review.airpath import AirPath, humid_air
from schedtui.review.figure import figure
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State

LeavingFrom = Literal["schedule", "loads", "room"]
"""Where the coil's leaving state is from: dry and wet bulb as scheduled, the scheduled total and
sensible with the dry bulb, or what the room's loads need."""


class Cooling(AirPath):
    """One unit at one cooling condition."""

    # From outdoors to the mixed air

    @figure
    def room(self) -> State:
        """The room in cooling."""
        return humid_air(self.unit, self.site, Unit.room_db, Unit.room_rh, Unit.room_wb)

    @figure
    def return_air(self) -> State:
        """Return air at the unit: as given, else the room's, warmed on the way."""
        unit = self.unit
        if not unit.stated("return_db"):
            unit.refuse_bad(Unit.return_rise)
            return self.room.heated_to(self.room.db + unit.return_rise)
        if unit.stated("return_wb") or unit.stated("return_rh"):
            return humid_air(unit, self.site, Unit.return_db, Unit.return_rh, Unit.return_wb)
        return self.room.heated_to(unit.need(Unit.return_db))

    @figure
    def exhaust_mass(self) -> float:
        """Dry air that leaves through the recovery; as much as enters where not given."""
        self.unit.refuse_bad(Unit.exhaust_airflow)
        airflow = self.unit.exhaust_airflow
        if airflow is None:
            return self.outdoor_mass
        return self.mass_of(airflow, self.return_air.v if self.basis == "actual" else None)

    @figure
    def recovered(self) -> State:
        """Outdoor air behind the energy recovery, which acts where it lowers the coil's load.

        Raises:
            Absent: the unit has no recovery, or takes no outdoor air.
        """
        unit = self.unit
        unit.refuse_bad(Unit.recovery_sensible, Unit.recovery_latent)
        unit.refuse_bad(Unit.recovery_basis)
        sensible, latent = unit.recovery_sensible or 0.0, unit.recovery_latent or 0.0
        if not (sensible or latent) or self.outdoor_mass == 0:
            raise Absent("recovery_sensible", why="there is no energy recovery")
        effectiveness = Effectiveness(sensible, latent, unit.recovery_basis == "least flow")
        outdoor, exhaust = self.outdoor, self.return_air
        after = recovered(
            outdoor, self.outdoor_mass, exhaust, self.exhaust_mass, effectiveness, self.steps
        )
        pays = after.h < outdoor.h if latent else after.db < outdoor.db
        return after if pays else outdoor

    @figure
    def intake(self) -> State:
        """Outdoor air as it comes to be mixed: recovered where there is a recovery."""
        has_recovery = self.unit.stated("recovery_sensible") or self.unit.stated("recovery_latent")
        if not has_recovery or not (self.unit.recovery_sensible or self.unit.recovery_latent):
            self.unit.refuse_bad(Unit.recovery_sensible, Unit.recovery_latent)
            return self.outdoor
        return self.recovered

    @figure
    def mixed(self) -> State:
        """Return and outdoor air, mixed."""
        return self._mixed_with_return(self.supply_mass)

    def _mixed_with_return(self, mass: float) -> State:
        """Return all of the outdoor air mixed with what else makes up a mass."""
        outdoor_mass = min(self.outdoor_mass, mass)
        if outdoor_mass == 0:
            return self.return_air
        if outdoor_mass == mass:
            return self.intake
        return mix(self.intake, outdoor_mass, self.return_air, mass - outdoor_mass, self.steps)

    # What goes around the coil

    @figure
    def bypass_share(self) -> float:
        """Share of the supply air that goes around the coil, by mass."""
        unit, share = self.unit, self.stated_bypass
        unit.refuse_bad(Unit.bypass_source)
        if share and unit.bypass_source == "return":
            # Only what returns can go around: the rest of the air is outdoor air.
            share = min(share, 1 - self.outdoor_fraction)
        return share

    @figure
    def stated_bypass(self) -> float:
        """Share of the supply air around the coil as stated, by the coil's airflow if that is."""
        unit = self.unit
        unit.refuse_bad(Unit.bypass, Unit.cool_airflow)
        if unit.cool_airflow is not None:
            return max(1 - unit.cool_airflow / self.supply_airflow, 0.0)
        return (unit.bypass or 0.0) / 100

    @figure
    def bypass_mass(self) -> float:
        """Dry air around the coil [lb/h | kg/s]."""
        return self.bypass_share * self.supply_mass

    @figure
    def coil_mass(self) -> float:
        """Dry air through the coil [lb/h | kg/s]."""
        return self.supply_mass - self.bypass_mass

    @figure
    def bypassed(self) -> State:
        """The air that goes around the coil."""
        if self.unit.bypass_source == "return":
            return self._past_blowing_fan(self.return_air)
        return self._past_blowing_fan(self.mixed)

    @figure
    def to_coil(self) -> State:
        """The air that goes to the coils: richer in outdoor air where return air bypasses."""
        if self.bypass_mass and self.unit.bypass_source == "return":
            return self._past_blowing_fan(self._mixed_with_return(self.coil_mass))
        return self._past_blowing_fan(self.mixed)

    def _past_blowing_fan(self, air: State) -> State:
        # Each pound of air takes the same heat, so that no stream's share is lost.
        return fan.after_fan(air, self.supply_mass, self.fan_heat) if self.blows_through else air

    # The coils

    @figure
    def precooled(self) -> State:
        """Air behind the first of two coils in series.

        Raises:
            Absent: there is only one.
        """
        unit = self.unit
        lat_db, lat_wb = unit.need(Unit.precool_lat_db), unit.need(Unit.precool_lat_wb)
        return coil_leaving(self.to_coil, self.site.air.by_wet_bulb(lat_db, lat_wb))[0]

    @figure
    def precool(self) -> CoilLoad:
        """What the first of two coils takes out of the air."""
        return coil_load(self.coil_mass, self.to_coil, self.precooled, self.steps)

    @figure
    def coil_entering(self) -> State:
        """Air entering the coil: past a first coil and the first side of a wrap-around."""
        air = self.precooled if self._has_precool else self.to_coil
        return air.heated_to(air.db - self.wrap) if self.wrap else air

    @property
    def _has_precool(self) -> bool:
        return self.unit.stated("precool_lat_db") or self.unit.stated("precool_lat_wb")

    @property
    def wrap(self) -> float:
        """Cooling before and warming behind the coil by a wrap-around recovery [°F | K]."""
        self.unit.refuse_bad(Unit.wrap_drop)
        return self.unit.wrap_drop or 0.0

    @figure
    def leaving_from(self) -> LeavingFrom:
        """Where the coil's leaving state is from.

        Raises:
            Absent: nothing gives it.
        """
        unit = self.unit
        if unit.stated("cool_lat_db", "cool_lat_wb"):
            return "schedule"
        if unit.stated("cool_lat_db", "cool_total", "cool_sensible"):
            return "loads"
        if unit.stated("room_sensible", "room_latent"):
            return "room"
        raise Absent(*(key for key in ("cool_lat_db", "cool_lat_wb") if not unit.stated(key)))

    @figure
    def scheduled_leaving(self) -> State:
        """The leaving state as scheduled, wherever it is taken."""
        unit = self.unit
        lat_db, lat_wb = unit.need(Unit.cool_lat_db), unit.need(Unit.cool_lat_wb)
        return self.site.air.by_wet_bulb(lat_db, lat_wb)

    @figure
    def leaving_aimed_at(self) -> State:
        """The state that the coil is to leave the air in, at every condition."""
        if self.leaving_from == "loads":
            return self._left_by_loads()
        if self.leaving_from == "room":
            return self._back_to_coil(self._needed_by_room())
        self.unit.refuse_bad(Unit.cool_lat_at)
        if self.unit.cool_lat_at == "unit":
            return self._back_to_coil(self.scheduled_leaving)
        return self.scheduled_leaving

    @figure
    def coil_leaving(self) -> State:
        """Air leaving the coil at this condition."""
        return coil_leaving(self.coil_entering, self.leaving_aimed_at)[0]

    @figure
    def coil_mode(self) -> CoilMode:
        """Whether the coil runs wet, dry or not at all at this condition."""
        return coil_leaving(self.coil_entering, self.leaving_aimed_at)[1]

    def _left_by_loads(self) -> State:
        """Return the leaving state that the scheduled loads leave behind.

        It follows from the row's own entering state if it has one, else from the computed one.
        """
        unit, entering = self.unit, self.coil_entering
        if unit.stated("cool_eat_db", "cool_eat_wb"):
            eat_db, eat_wb = unit.need(Unit.cool_eat_db), unit.need(Unit.cool_eat_wb)
            entering = self.site.air.by_wet_bulb(eat_db, eat_wb)
        fan_heat = self.fan_heat_at(entering) if unit.cool_basis == "net" else 0.0
        total = unit.need(Unit.cool_total) + fan_heat
        sensible = unit.need(Unit.cool_sensible) + fan_heat
        return leaving_of(entering, self.coil_mass, unit.need(Unit.cool_lat_db), total, sensible)

    def _needed_by_room(self) -> State:
        """Return the air that the unit must deliver for the room's loads at this condition."""
        unit, condition, mass = self.unit, self.condition, self.supply_mass
        sensible = unit.need(Unit.room_sensible) * condition.sensible_load / 100
        latent = unit.need(Unit.room_latent) * condition.latent_load / 100
        # latent = m (h(t_room, W_room) − h(t_room, W_s)), solved for W_s
        dry = self.room.at(w=0.0)
        per_moisture = (self.room.h - dry.h) / self.room.w
        w = self.room.w - enthalpy_difference(mass, latent, self.site.system) / per_moisture
        unit.refuse_bad(Unit.duct_rise)
        supply = supply_for(mass, self.room, sensible, w)
        return supply.heated_to(supply.db - unit.duct_rise)

    def _back_to_coil(self, leaving_unit: State) -> State:
        """Return the coil's leaving state behind which the unit delivers a given one."""
        air = leaving_unit if self.blows_through else self.before_fan(leaving_unit)
        if self.bypass_mass:
            air = unmix(air, self.supply_mass, self.bypassed, self.bypass_mass, self.steps)
        return air.heated_to(air.db - self.wrap) if self.wrap else air

    # From the coil to the room

    @figure
    def rejoined(self) -> State:
        """Air behind the coil, warmed by a wrap-around and joined by what went around."""
        air = self.coil_leaving
        if self.wrap:
            air = air.heated_to(air.db + self.wrap)
        if not self.bypass_mass:
            return air
        return mix(air, self.coil_mass, self.bypassed, self.bypass_mass, self.steps)

    @property
    def fan_inlet(self) -> State:
        """Air at the supply fan's inlet."""
        return self.mixed if self.blows_through else self.rejoined

    @figure
    def before_reheat(self) -> State:
        """Air that leaves the cooling part of the unit: past a fan that draws through."""
        air = self.rejoined
        return air if self.blows_through else air.heated_to(air.db + self.fan_rise)

    @figure
    def reheated(self) -> State:
        """Air behind the reheat, which never cools."""
        air = self.before_reheat
        self.unit.refuse_bad(Unit.reheat_lat_db)
        lat_db = self.unit.reheat_lat_db
        return air if lat_db is None or lat_db <= air.db else air.heated_to(lat_db)

    @figure
    def reheat_load(self) -> float:
        """Heat that the reheat puts into the supply air [MBH | kW].

        Raises:
            Absent: the unit is not scheduled to reheat.
        """
        self.unit.need(Unit.reheat_lat_db)
        return heating_load(self.supply_mass, self.before_reheat, self.reheated.db, self.steps)

    @figure
    def supply(self) -> State:
        """Air as it enters the room, past the duct."""
        self.unit.refuse_bad(Unit.duct_rise)
        return self.reheated.heated_to(self.reheated.db + self.unit.duct_rise)

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
    def required_total(self) -> float:
        """Total load that a scheduled capacity is held against, gross or net as it is stated."""
        self.refuse_left_by_loads()
        return self.coil.total - self.fan_heat_in_capacity

    @figure
    def required_sensible(self) -> float:
        """Sensible load that a scheduled capacity is held against, gross or net likewise."""
        self.refuse_left_by_loads()
        return self.coil.sensible - self.fan_heat_in_capacity

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
