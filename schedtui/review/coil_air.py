"""A unit's air at one cooling condition, up to what enters and leaves its cooling coil.

Composes what `air` computes in the order that the air takes, and back from a leaving state that is
scheduled for the unit. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Literal

from schedtui.air import fan
from schedtui.air.bypass import share_beside, share_of_percent, within_return
from schedtui.air.coil import CoilLoad, CoilMode, coil_leaving, coil_load, leaving_of
from schedtui.air.flow import at_part_load, gross_load, part_of, rest_of
from schedtui.air.mixing import mix, unmix
from schedtui.air.recovery import Effectiveness, recovered
from schedtui.air.room import supply_for, supply_moisture
from schedtui.errors import Absent
from schedtui.review.airpath import AirPath, humid_air
from schedtui.review.figure import figure
from schedtui.review.letters import CoolingLetters
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State
    from schedtui.air.step import Steps

LeavingFrom = Literal["schedule", "loads", "room"]
"""Where the coil's leaving state is from: dry and wet bulb as scheduled, the scheduled total and
sensible with the dry bulb, or what the room's loads need."""


class CoilAir(AirPath):
    """The air of one unit at one cooling condition, up to its cooling coil."""

    # From outdoors to the mixed air

    @figure
    def room(self) -> State:
        """The room in cooling."""
        unit, steps = self.unit, self.lettered("r")
        return humid_air(unit, self.site, Unit.room_db, Unit.room_rh, Unit.room_wb, steps)

    @figure
    def return_air(self) -> State:
        """Return air at the unit: as given, else the room's, warmed on the way."""
        unit, site = self.unit, self.site
        if not unit.stated("return_db"):
            unit.refuse_bad(Unit.return_rise)
            steps = self.lettered("ret", i="r", d="ret")
            return self.room.warmed_by(unit.return_rise, "at the unit", steps)
        if unit.stated("return_wb") or unit.stated("return_rh"):
            steps = self.lettered("ret")
            return humid_air(unit, site, Unit.return_db, Unit.return_rh, Unit.return_wb, steps)
        return self.room.heated_to(unit.need(Unit.return_db), self.lettered("ret", i="r"))

    @property
    def exhausted(self) -> tuple[State, str]:
        """The air that leaves through the recovery, with its letter."""
        return self.return_air, "ret"

    @figure
    def recovered(self) -> State:
        """Outdoor air behind the energy recovery, which acts where it lowers the coil's load.

        Raises:
            Absent: the unit has no recovery, or takes no outdoor air.
        """
        outdoor, after = self.outdoor, self.recovery_reaches
        pays = after.h < outdoor.h if self.unit.recovery_latent else after.db < outdoor.db
        return after if pays else outdoor

    @figure
    def recovery_reaches(self) -> State:
        """Outdoor air behind the energy recovery if it acts.

        Raises:
            Absent: the unit has no recovery, or takes no outdoor air.
        """
        unit = self.unit
        unit.refuse_bad(Unit.recovery_sensible, Unit.recovery_latent)
        unit.refuse_bad(Unit.recovery_basis)
        if not self.has_recovery or self.outdoor_mass == 0:
            raise Absent("recovery_sensible", why="there is no energy recovery")
        sensible, latent = unit.recovery_sensible or 0.0, unit.recovery_latent or 0.0
        effectiveness = Effectiveness(sensible, latent, unit.recovery_basis == "least flow")
        outdoor, exhaust, exhaust_mass = self.outdoor, self.return_air, self.exhaust_mass
        steps = self.named(CoolingLetters.exhaust)
        return recovered(outdoor, self.outdoor_mass, exhaust, exhaust_mass, effectiveness, steps)

    @property
    def has_recovery(self) -> bool:
        """Whether an effectiveness above 0 is stated."""
        return bool(self.unit.recovery_sensible or self.unit.recovery_latent)

    @property
    def recovery_acts(self) -> bool:
        """Whether there is a recovery and it lowers the coil's load at this condition."""
        return self.intake is not self.outdoor

    @figure
    def intake(self) -> State:
        """Outdoor air as it comes to be mixed: recovered where there is a recovery."""
        if not self.has_recovery:
            self.unit.refuse_bad(Unit.recovery_sensible, Unit.recovery_latent)
            return self.outdoor
        return self.recovered

    @figure
    def mixed(self) -> State:
        """Return and outdoor air, mixed."""
        if not 0 < self.outdoor_mass < self.supply_mass:
            return self.intake if self.outdoor_mass else self.return_air
        steps = self.lettered("ret", p="s", q="o")
        returned = rest_of(self.supply_mass, self.outdoor_mass, "return air in the mixture", steps)
        return self._mixed(returned, self.named(CoolingLetters.mixing))

    @figure
    def mixed_for_coil(self) -> State:
        """All of the outdoor air mixed with what else goes to the coil."""
        if not 0 < self.outdoor_mass < self.coil_mass:
            return self.intake if self.outdoor_mass else self.return_air
        steps = self.lettered("cr", p="c", q="o")
        returned = rest_of(self.coil_mass, self.outdoor_mass, "return air to the coil", steps)
        return self._mixed(returned, self.named(CoolingLetters.mixing_for_coil))

    def _mixed(self, returned: float, steps: Steps | None) -> State:
        return mix(self.intake, self.outdoor_mass, self.return_air, returned, steps)

    # What goes around the coil

    @figure
    def bypass_share(self) -> float:
        """Share of the supply air that goes around the coil, by mass."""
        unit, share = self.unit, self.stated_bypass
        unit.refuse_bad(Unit.bypass_source)
        if share and unit.bypass_source == "return":
            # Only what returns can go around: the rest of the air is outdoor air.
            share = within_return(share, self.outdoor_fraction, self.steps)
        return share

    @figure
    def stated_bypass(self) -> float:
        """Share of the supply air around the coil as stated, by the coil's airflow if that is."""
        unit = self.unit
        unit.refuse_bad(Unit.bypass, Unit.cool_airflow)
        if unit.cool_airflow is not None:
            return share_beside(unit.cool_airflow, self.supply_airflow, self.steps)
        return share_of_percent(unit.bypass or 0.0, self.steps)

    @figure
    def bypass_mass(self) -> float:
        """Dry air around the coil [lb/h | kg/s]."""
        return part_of(self.supply_mass, self.bypass_share, "dry air around the coil", self.steps)

    @figure
    def coil_mass(self) -> float:
        """Dry air through the coil [lb/h | kg/s]."""
        steps = self.lettered("c", p="s", q="b")
        return rest_of(self.supply_mass, self.bypass_mass, "dry air through the coil", steps)

    @figure
    def bypassed(self) -> State:
        """The air that goes around the coil."""
        if self.unit.bypass_source == "return":
            return self._past_blowing_fan(self.return_air, self.lettered("b", i="ret", d="f"))
        return self._past_blowing_fan(self.mixed, self.lettered("a", i="m", d="f"))

    @property
    def richer_at_coil(self) -> bool:
        """Whether the coil's stream is richer in outdoor air, since return air goes around it."""
        return bool(self.bypass_mass) and self.unit.bypass_source == "return"

    @figure
    def to_coil(self) -> State:
        """The air that goes to the coils: richer in outdoor air where return air bypasses."""
        air = self.mixed_for_coil if self.richer_at_coil else self.mixed
        return self._past_blowing_fan(air, self.named(CoolingLetters.to_coil_past_fan))

    def _past_blowing_fan(self, air: State, steps: Steps | None) -> State:
        # Each pound of air takes the same heat, so that no stream's share is lost.
        return (
            fan.after_fan(air, self.supply_mass, self.fan_heat, steps)
            if self.blows_through
            else air
        )

    # The coils

    @figure
    def precooled(self) -> State:
        """Air behind the first of two coils in series.

        Raises:
            Absent: there is only one.
        """
        unit, air, entering = self.unit, self.site.air, self.to_coil
        lat_db, lat_wb = unit.need_both(Unit.precool_lat_db, Unit.precool_lat_wb)
        scheduled = air.by_wet_bulb(lat_db, lat_wb)
        leaving, mode = coil_leaving(entering, scheduled, self.named(CoolingLetters.precooling))
        if self.steps is not None and mode == "wet":
            air.by_wet_bulb(lat_db, lat_wb, self.steps.named("l1"))
        return leaving

    @figure
    def precool(self) -> CoilLoad:
        """What the first of two coils takes out of the air."""
        steps = self.named(CoolingLetters.precooling)
        return coil_load(self.coil_mass, self.to_coil, self.precooled, steps)

    @figure
    def coil_entering(self) -> State:
        """Air entering the coil: past a first coil and the first side of a wrap-around."""
        air = self.precooled if self.has_precool else self.to_coil
        return air.warmed_by(
            -self.wrap, "behind the wrap-around's first side", self.named(CoolingLetters.entering)
        )

    @property
    def has_precool(self) -> bool:
        """Whether a first coil stands in front of the cooling coil."""
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
        unit, steps = self.unit, self.named(CoolingLetters.scheduled_leaving)
        lat_db, lat_wb = unit.need_both(Unit.cool_lat_db, Unit.cool_lat_wb)
        return self.site.air.by_wet_bulb(lat_db, lat_wb, steps)

    @figure
    def leaving_aimed_at(self) -> State:
        """The state that the coil is to leave the air in, at every condition."""
        if self.leaving_from == "loads":
            return self._left_by_loads()
        if self.goes_back:
            return self._back_to_coil(self.leaving_unit)
        return self.scheduled_leaving

    @property
    def goes_back(self) -> bool:
        """Whether it is the unit's leaving air that is given, and the coil's follows from it."""
        if self.leaving_from == "room":
            return True
        self.unit.refuse_bad(Unit.cool_lat_at)
        return self.leaving_from == "schedule" and self.unit.cool_lat_at == "unit"

    @figure
    def leaving_unit(self) -> State:
        """The air that is to leave the unit: as scheduled for it, or as the room needs it."""
        return self._needed_by_room() if self.leaving_from == "room" else self.scheduled_leaving

    @figure
    def coil_leaving(self) -> State:
        """Air leaving the coil at this condition."""
        return coil_leaving(self.coil_entering, self.leaving_aimed_at, self.steps)[0]

    @figure
    def coil_mode(self) -> CoilMode:
        """Whether the coil runs wet, dry or not at all at this condition."""
        return coil_leaving(self.coil_entering, self.leaving_aimed_at)[1]

    @figure
    def row_entering(self) -> State:
        """Air entering the coil as the row has it."""
        eat_db, eat_wb = self.unit.need_both(Unit.cool_eat_db, Unit.cool_eat_wb)
        return self.site.air.by_wet_bulb(eat_db, eat_wb, self.lettered("k"))

    def _left_by_loads(self) -> State:
        """Return the leaving state that the scheduled loads leave behind.

        It follows from the row's own entering state if it has one, else from the computed one.
        """
        unit, entering, fan_steps = self.unit, self.coil_entering, self.lettered(i="e")
        if unit.stated("cool_eat_db", "cool_eat_wb"):
            entering, fan_steps = self.row_entering, self.lettered(i="k")
        net = unit.cool_basis == "net"
        fan_heat = self.fan_heat_at(entering, fan_steps) if net else 0.0
        total = gross_load(unit.need(Unit.cool_total), fan_heat, self.lettered(q="tn", gross="tk"))
        sensible = gross_load(
            unit.need(Unit.cool_sensible), fan_heat, self.lettered(q="sn", gross="sk")
        )
        lat_db, steps = unit.need(Unit.cool_lat_db), self.named(CoolingLetters.left_by_loads)
        return leaving_of(entering, self.coil_mass, lat_db, total, sensible, steps)

    def _needed_by_room(self) -> State:
        """Return the air that the unit must deliver for the room's loads at this condition."""
        unit, condition, mass, room = self.unit, self.condition, self.supply_mass, self.room
        steps = self.lettered(q="rv", full="rs0")
        sensible = at_part_load(unit.need(Unit.room_sensible), condition.sensible_load, steps)
        steps = self.lettered(q="lv", full="rl0")
        latent = at_part_load(unit.need(Unit.room_latent), condition.latent_load, steps)
        steps = self.lettered("s", s="v", rs="rv", rl="lv")
        w = supply_moisture(mass, room, latent, steps)
        unit.refuse_bad(Unit.duct_rise)
        supply = supply_for(mass, room, sensible, w, steps)
        steps = self.lettered("u", i="v", d="duct")
        return supply.warmed_by(-unit.duct_rise, "in front of the duct", steps)

    def _back_to_coil(self, leaving_unit: State) -> State:
        """Return the coil's leaving state behind which the unit delivers a given one."""
        air = leaving_unit if self.blows_through else self.before_fan(leaving_unit)
        if self.bypass_mass:
            around, steps = self.bypassed, self.named(CoolingLetters.unmixing)
            air = unmix(air, self.supply_mass, around, self.bypass_mass, steps)
        steps = self.named(CoolingLetters.back_over_wrap)
        return air.warmed_by(-self.wrap, "in front of the wrap-around's second side", steps)
