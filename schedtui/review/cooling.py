"""A unit's air at one cooling condition: from outdoors through the coil to the room.

Composes what `air` computes in the order of the air path. Each state and number is a figure:
computed when first asked for, absent with the keys that would give it. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, cast

from schedtui.air import fan
from schedtui.air.coil import (
    CoilLoad,
    CoilMode,
    apparatus_dew_point,
    bypass_factor,
    coil_leaving,
    coil_load,
    leaving_of,
)
from schedtui.air.flow import AirflowBasis, dry_air_mass, volume_flow
from schedtui.air.mixing import mix
from schedtui.air.room import RoomMet, room_met
from schedtui.errors import Absent
from schedtui.review.figure import figure
from schedtui.schedule.catalogue.condition import HUMIDITIES, Condition
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State
    from schedtui.air.step import Steps
    from schedtui.review.site import Site

Number = Field[float | None]

_SETTLED = 1e-12  # relative change of the mass flow at which the actual basis has settled
_MOST_TURNS = 100


class Cooling:
    """One unit at one cooling condition.

    Args:
        unit: the unit as scheduled.
        condition: the design condition.
        site: where the unit stands.
        steps: a working to append to, in the order that figures are asked for.
    """

    def __init__(
        self, unit: Unit, condition: Condition, site: Site, steps: Steps | None = None
    ) -> None:
        self.unit = unit
        self.condition = condition
        self.site = site
        self.steps = steps

    @property
    def name(self) -> str:
        """The condition's name."""
        return self.condition.name or ""

    # States of the air path

    @figure
    def outdoor(self) -> State:
        """Outdoor air of the condition."""
        return outdoor_air(self.condition, self.site)

    @figure
    def room(self) -> State:
        """The room in cooling."""
        return self._humid_air(Unit.room_db, Unit.room_rh, Unit.room_wb)

    @figure
    def return_air(self) -> State:
        """Return air at the unit: as given, else the room's, warmed on the way."""
        unit = self.unit
        if not unit.stated("return_db"):
            unit.refuse_bad(Unit.return_rise)
            return self.room.heated_to(self.room.db + unit.return_rise)
        if unit.stated("return_wb") or unit.stated("return_rh"):
            return self._humid_air(Unit.return_db, Unit.return_rh, Unit.return_wb)
        return self.room.heated_to(unit.need(Unit.return_db))

    @figure
    def mixed(self) -> State:
        """Return and outdoor air, mixed."""
        return self._mixed(self.supply_mass)

    @figure
    def coil_entering(self) -> State:
        """Air entering the coil: mixed, and warmed by a fan that blows through."""
        return self._entering(self.supply_mass)

    @figure
    def scheduled_leaving(self) -> State:
        """The coil's leaving state as scheduled, by its dry and wet bulb."""
        unit = self.unit
        lat_db, lat_wb = unit.need(Unit.cool_lat_db), unit.need(Unit.cool_lat_wb)
        return self.site.air.by_wet_bulb(lat_db, lat_wb)

    @figure
    def leaving_is_derived(self) -> bool:
        """Whether the leaving state follows from the scheduled total and sensible alone."""
        loads = ("cool_lat_db", "cool_total", "cool_sensible")
        return not self.unit.stated("cool_lat_wb") and self.unit.stated(*loads)

    @figure
    def coil_leaving(self) -> State:
        """Air leaving the coil at this condition."""
        return self._leaving(self.supply_mass)[0]

    @figure
    def coil_mode(self) -> CoilMode:
        """Whether the coil runs wet, dry or not at all at this condition."""
        return self._leaving(self.supply_mass)[1]

    @figure
    def supply(self) -> State:
        """Air as it enters the room: past coil, draw-through fan and duct."""
        unit, air = self.unit, self.coil_leaving
        unit.refuse_bad(Unit.duct_rise)
        if not self._blows_through:
            air = air.heated_to(air.db + self.fan_rise)
        return air.heated_to(air.db + unit.duct_rise)

    # Flows

    @figure
    def supply_mass(self) -> float:
        """Dry air that the supply fan delivers [lb/h | kg/s]."""
        airflow = self._supply_airflow
        if self.basis != "actual":
            return dry_air_mass(airflow, self.basis, self.site.air, steps=self.steps)
        volume = self._settled_inlet_volume(airflow)
        return dry_air_mass(airflow, self.basis, self.site.air, volume, self.steps)

    @figure
    def outdoor_mass(self) -> float:
        """Dry outdoor air taken in, at most what is supplied [lb/h | kg/s]."""
        return self._outdoor_mass(self.supply_mass)

    @figure
    def outdoor_fraction(self) -> float:
        """Share of outdoor air in the supply, by mass."""
        return self.outdoor_mass / self.supply_mass

    @figure
    def coil_mass(self) -> float:
        """Dry air through the coil [lb/h | kg/s]."""
        return self.supply_mass

    @figure
    def basis(self) -> AirflowBasis:
        """What the unit's airflows mean."""
        self.unit.refuse_bad(Unit.airflow_basis)
        return cast("AirflowBasis", self.unit.airflow_basis or self.site.airflow_basis)

    # Coil

    @figure
    def coil(self) -> CoilLoad:
        """What the coil takes out of the air."""
        return coil_load(self.coil_mass, self.coil_entering, self.coil_leaving, self.steps)

    @figure
    def required_total(self) -> float:
        """Total load that a scheduled capacity is held against [MBH | kW]."""
        self._refuse_derived_leaving()
        return self.coil.total

    @figure
    def required_sensible(self) -> float:
        """Sensible load that a scheduled capacity is held against [MBH | kW]."""
        self._refuse_derived_leaving()
        return self.coil.sensible

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
        self._refuse_derived_leaving()
        adp = apparatus_dew_point(self.coil_entering, self.coil_leaving, self.steps)
        if adp is None:
            raise Absent(why="the coil has no apparatus dew point")
        return adp

    @figure
    def bypass_factor(self) -> float:
        """Bypass factor of the coil."""
        return bypass_factor(self.coil_entering, self.coil_leaving, self.adp, self.steps)

    # Fan and room

    @figure
    def fan_heat(self) -> float:
        """Heat that the supply fan puts into the air [MBH | kW]; 0 where nothing gives it."""
        return self._fan_heat(self.supply_mass, self._fan_inlet(self.supply_mass))

    @figure
    def fan_rise(self) -> float:
        """Warming of the air by the supply fan [°F | K]."""
        inlet = self._fan_inlet(self.supply_mass)
        return fan.rise(inlet, self.supply_mass, self.fan_heat, self.steps)

    @figure
    def room_met(self) -> RoomMet:
        """What the supply air does in the room."""
        return room_met(self.supply_mass, self.supply, self.room, self.steps)

    # Parts that depend on a supply mass which is perhaps not settled yet

    @property
    def _blows_through(self) -> bool:
        self.unit.refuse_bad(Unit.fan_position)
        return self.unit.fan_position == "blow-through"

    @property
    def _supply_airflow(self) -> float:
        airflow = self.unit.need(Unit.supply_airflow)
        if airflow == 0:
            raise Absent("supply_airflow", why="the supply airflow is 0")
        return airflow

    def _outdoor_mass(self, supply_mass: float) -> float:
        unit = self.unit
        unit.refuse_bad(Unit.outdoor_airflow)
        airflow = unit.outdoor_airflow or 0.0
        if airflow == 0:
            return 0.0
        # Outdoor air equal to supply air as typed means all of it, whatever the volumes weigh;
        # above that the share is held at 1, since nothing is extrapolated.
        if airflow >= self._supply_airflow:
            return supply_mass
        volume = self.outdoor.v if self.basis == "actual" else None
        return min(dry_air_mass(airflow, self.basis, self.site.air, volume), supply_mass)

    def _mixed(self, supply_mass: float) -> State:
        outdoor_mass = self._outdoor_mass(supply_mass)
        if outdoor_mass == 0:
            return self.return_air
        if outdoor_mass == supply_mass:
            return self.outdoor
        return mix(self.outdoor, outdoor_mass, self.return_air, supply_mass - outdoor_mass)

    def _entering(self, supply_mass: float) -> State:
        mixed = self._mixed(supply_mass)
        if not self._blows_through:
            return mixed
        return fan.after_fan(mixed, supply_mass, self._fan_heat(supply_mass, mixed))

    def _leaving(self, supply_mass: float) -> tuple[State, CoilMode]:
        entering = self._entering(supply_mass)
        if self.leaving_is_derived:
            return coil_leaving(entering, self._derived_leaving(entering, supply_mass))
        return coil_leaving(entering, self.scheduled_leaving)

    def _derived_leaving(self, entering: State, mass: float) -> State:
        """Return the leaving state that the scheduled loads leave behind.

        It follows from the row's own entering state if it has one, else from the computed one.
        """
        unit = self.unit
        if unit.stated("cool_eat_db", "cool_eat_wb"):
            eat_db, eat_wb = unit.need(Unit.cool_eat_db), unit.need(Unit.cool_eat_wb)
            entering = self.site.air.by_wet_bulb(eat_db, eat_wb)
        lat_db = unit.need(Unit.cool_lat_db)
        total, sensible = unit.need(Unit.cool_total), unit.need(Unit.cool_sensible)
        return leaving_of(entering, mass, lat_db, total, sensible)

    def _fan_inlet(self, supply_mass: float) -> State:
        if self._blows_through:
            return self._mixed(supply_mass)
        return self._leaving(supply_mass)[0]

    def _fan_heat(self, supply_mass: float, inlet: State) -> float:
        unit = self.unit
        unit.refuse_bad(Unit.fan_rise, Unit.fan_power, Unit.fan_total_pressure, Unit.fan_efficiency)
        if unit.fan_rise is not None:
            return fan.heat_of_rise(inlet, supply_mass, unit.fan_rise, self.steps)
        power = self._fan_power(supply_mass, inlet)
        if power is None:
            return 0.0
        unit.refuse_bad(Unit.motor_efficiency)
        efficiency = unit.motor_efficiency or self.site.limits.motor_efficiency
        motor = efficiency if unit.motor_in_airstream else None
        return fan.heat_to_air(power, self.site.system, motor, self.steps)

    def _fan_power(self, supply_mass: float, inlet: State) -> float | None:
        """Return the shaft power of the unit's supply fans, as stated or from their pressure."""
        unit = self.unit
        if unit.fan_power is not None:
            return unit.fan_power * unit.fan_count
        if unit.fan_total_pressure is None or unit.fan_efficiency is None:
            return None
        airflow = volume_flow(supply_mass, "actual", self.site.air, inlet.v)
        return fan.shaft_power(
            airflow, unit.fan_total_pressure, unit.fan_efficiency, self.site.system, self.steps
        )

    def _settled_inlet_volume(self, airflow: float) -> float:
        """Return the specific volume at the supply fan's inlet [ft³/lb | m³/kg].

        On the actual basis the supply volume is taken there, the state there may depend on the
        share of outdoor air, and that on the supply mass.
        """
        guess = self.outdoor if self._takes_outdoor_air else self.return_air
        volume = guess.v
        quiet, self.steps = self.steps, None  # only the settled turn belongs in the working
        try:
            for _ in range(_MOST_TURNS):
                before = volume
                mass = dry_air_mass(airflow, "actual", self.site.air, volume)
                volume = self._fan_inlet(mass).v
                if abs(volume - before) <= _SETTLED * before:
                    return volume
        finally:
            self.steps = quiet
        raise Absent(why="the supply airflow's state at the fan does not settle")

    @property
    def _takes_outdoor_air(self) -> bool:
        return bool(self.unit.outdoor_airflow)

    def _humid_air(self, db: Number, rh: Number, wb: Number) -> State:
        """Return the state of a dry bulb with either a relative humidity or a wet bulb."""
        unit, air = self.unit, self.site.air
        dry_bulb = unit.need(db)
        if unit.stated(rh.key, wb.key):
            raise Absent(rh.key, wb.key, why=f"{rh.key} and {wb.key} are both stated")
        if unit.stated(wb.key):
            return air.by_wet_bulb(dry_bulb, unit.need(wb))
        return air.by_relative_humidity(dry_bulb, unit.need(rh))

    def _refuse_derived_leaving(self) -> None:
        if self.leaving_is_derived:
            raise Absent("cool_lat_wb")


def outdoor_air(condition: Condition, site: Site) -> State:
    """Return the outdoor air of a condition.

    Raises:
        Absent: its dry bulb or its humidity is not stated, or the humidity is stated twice.
        AirError: there is no such air.
    """
    stated = [key for key in HUMIDITIES if condition.stated(key)]
    if len(stated) != 1:
        name = condition.name
        raise Absent(*HUMIDITIES, why=f"condition {name} does not state one outdoor humidity")
    dry_bulb = condition.need(Condition.outdoor_db)
    if stated == ["outdoor_wb"]:
        return site.air.by_wet_bulb(dry_bulb, condition.need(Condition.outdoor_wb))
    if stated == ["outdoor_dp"]:
        return site.air.by_dew_point(dry_bulb, condition.need(Condition.outdoor_dp))
    if stated == ["outdoor_rh"]:
        return site.air.by_relative_humidity(dry_bulb, condition.need(Condition.outdoor_rh))
    return site.air.by_humidity_ratio(dry_bulb, condition.need(Condition.outdoor_w))
