"""A unit's air at one heating condition: from outdoors through the coils to the room.

Composes what `air` computes in the order that the air takes. A draw-through fan's heat is not
counted, which is the safe side; a blow-through one's is, in front of the coils. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air import fan
from schedtui.air.coil import heating_load
from schedtui.air.flow import at_part_load, rest_of
from schedtui.air.mixing import mix
from schedtui.air.recovery import Effectiveness, recovered, share_before_frost
from schedtui.air.room import heat_met, heating_supply, moisture_to_add
from schedtui.errors import Absent
from schedtui.review.airpath import AirPath
from schedtui.review.figure import figure
from schedtui.review.letters import HeatingLetters
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State
    from schedtui.air.step import Steps
    from schedtui.units import System

_NO_RECOVERY = "there is no energy recovery"
# The exhaust of a recovery is kept above freezing unless the unit says otherwise.
_EXHAUST_LEAST: dict[System, float] = {"IP": 32.0, "SI": 0.0}


class Heating(AirPath):
    """One unit at one heating condition."""

    @figure
    def letters(self) -> HeatingLetters:
        """The letters of the streams, for a working.

        They hang on figures whose own steps are not due yet, so another evaluation is asked.
        """
        return HeatingLetters(type(self)(self.unit, self.condition, self.site))

    @figure
    def supply_airflow(self) -> float:
        """Volume that the supply fan delivers in heating [cfm | L/s]."""
        self.unit.refuse_bad(Unit.heat_airflow)
        airflow = self.unit.heat_airflow
        if airflow is None:
            airflow = self.unit.need(Unit.supply_airflow)
        if airflow == 0:
            raise Absent("supply_airflow", why="the supply airflow is 0")
        return airflow

    # From outdoors to the mixed air

    @figure
    def room(self) -> State:
        """The room in heating, with the outdoor air's moisture where no humidity is stated."""
        unit = self.unit
        db = unit.need(Unit.room_heat_db)
        if unit.stated("room_heat_rh"):
            rh = unit.need(Unit.room_heat_rh)
            return self.site.air.by_relative_humidity(db, rh, self.lettered("r"))
        # What recovery hands over of the room's own moisture does not change it.
        return self.outdoor.heated_to(db, self.lettered("r", i="o"))

    @figure
    def to_recovery(self) -> State:
        """Outdoor air as it meets the recovery or the return air: past a preheat of its own."""
        return self.preheat_leaving if self.preheats_outdoor else self.outdoor

    @property
    def exhausted(self) -> tuple[State, str]:
        """The air that leaves through the recovery, with its letter."""
        return self.room, "r"

    @figure
    def effectiveness(self) -> Effectiveness:
        """Effectiveness of the recovery in heating, as rated.

        Raises:
            Absent: the unit has no recovery, or takes no outdoor air.
        """
        unit = self.unit
        unit.refuse_bad(Unit.recovery_sensible, Unit.recovery_latent)
        unit.refuse_bad(Unit.recovery_heat_sensible, Unit.recovery_heat_latent)
        unit.refuse_bad(Unit.recovery_basis)
        sensible = _first(unit.recovery_heat_sensible, unit.recovery_sensible)
        latent = _first(unit.recovery_heat_latent, unit.recovery_latent)
        if not (sensible or latent) or self.outdoor_mass == 0:
            raise Absent("recovery_sensible", why=_NO_RECOVERY)
        return Effectiveness(sensible, latent, unit.recovery_basis == "least flow")

    @figure
    def recovery_share(self) -> float:
        """Share of its effectiveness that the recovery works with, less than 1 against frost."""
        outdoor, exhaust = self.to_recovery, self.room
        if exhaust.db <= outdoor.db:
            return 0.0  # it acts only where the return air is warmer
        least = self.unit.value_of(Unit.recovery_exhaust_min)
        if least is None:
            least = _EXHAUST_LEAST[self.site.system]
        exhaust_mass, rated = self.exhaust_mass, self.effectiveness
        steps = self.named(HeatingLetters.exhaust)
        return share_before_frost(
            outdoor, self.outdoor_mass, exhaust, exhaust_mass, rated, least, steps
        )

    @figure
    def recovered(self) -> State:
        """Outdoor air behind the energy recovery, held back where its exhaust would freeze."""
        share, outdoor, exhaust_mass = self.recovery_share, self.to_recovery, self.exhaust_mass
        # One that does not act leaves nothing to be shown.
        steps = self.named(HeatingLetters.exhaust) if share else None
        held = self.effectiveness.held_back(share, steps)
        return recovered(outdoor, self.outdoor_mass, self.room, exhaust_mass, held, steps)

    @property
    def recovers(self) -> bool:
        """Whether outdoor air passes a recovery, acting or not.

        Raises:
            Absent: that cannot be known.
        """
        try:
            self.effectiveness  # noqa: B018  asked for its absence
        except Absent as absent:
            if absent.why != _NO_RECOVERY:
                raise
            return False
        return True

    @figure
    def intake(self) -> State:
        """Outdoor air as it comes to be mixed."""
        return self.recovered if self.recovers else self.to_recovery

    @figure
    def mixed(self) -> State:
        """Return and outdoor air, mixed."""
        if self.outdoor_mass == 0:
            return self.room
        if self.outdoor_mass == self.supply_mass:
            return self.intake
        intake, steps = self.intake, self.lettered("r", p="s", q="o")
        returned = rest_of(self.supply_mass, self.outdoor_mass, "return air in the mixture", steps)
        return mix(
            intake, self.outdoor_mass, self.room, returned, self.named(HeatingLetters.mixing)
        )

    # The coils

    @figure
    def to_coils(self) -> State:
        """Mixed air, past a fan that blows through."""
        if not self.blows_through:
            return self.mixed
        mixed, heat, steps = self.mixed, self.fan_heat, self.lettered("a", i="m", d="f")
        return fan.after_fan(mixed, self.supply_mass, heat, steps)

    @property
    def fan_inlet(self) -> State:
        """Air at the supply fan's inlet."""
        return self.mixed if self.blows_through else self.heat_leaving

    def _preheats(self, at: str) -> bool:
        self.unit.refuse_bad(Unit.preheat_at)
        self.unit.refuse_bad(Unit.preheat_lat_db)
        return self.unit.preheat_lat_db is not None and self.unit.preheat_at == at

    @property
    def preheats_outdoor(self) -> bool:
        """Whether a preheat stands in the outdoor air."""
        return self._preheats("outdoor")

    @property
    def preheats_mixed(self) -> bool:
        """Whether a preheat stands in the mixed air."""
        return self._preheats("mixed")

    @staticmethod
    def _warmed(air: State, db: float, steps: Steps | None) -> State:
        """Return air behind a heating coil, which never cools."""
        return air if db <= air.db else air.heated_to(db, steps)

    @figure
    def preheat_entering(self) -> State:
        """Air entering the preheat, which stands in the outdoor or in the mixed air."""
        return self.outdoor if self.preheats_outdoor else self.to_coils

    @figure
    def preheat_leaving(self) -> State:
        """Air leaving the preheat.

        Raises:
            Absent: there is none scheduled.
        """
        entering, lat_db = self.preheat_entering, self.unit.need(Unit.preheat_lat_db)
        return self._warmed(entering, lat_db, self.named(HeatingLetters.preheating))

    @figure
    def preheat_load(self) -> float:
        """Load of the preheat [MBH | kW]."""
        mass = self.outdoor_mass if self.preheats_outdoor else self.supply_mass
        entering, leaving = self.preheat_entering, self.preheat_leaving
        return heating_load(mass, entering, leaving.db, self.named(HeatingLetters.preheat_load))

    @figure
    def heat_entering(self) -> State:
        """Air entering the heating coil: past the preheat that stands in the mixed air."""
        if self.preheats_mixed:
            return self.preheat_leaving
        return self.to_coils

    @figure
    def heat_leaving(self) -> State:
        """Air leaving the heating coil: as scheduled, else as the room's heat needs it."""
        unit = self.unit
        if not unit.stated("heat_lat_db") and unit.stated("room_heat"):
            return self._needed_by_room()
        entering, lat_db = self.heat_entering, unit.need(Unit.heat_lat_db)
        return self._warmed(entering, lat_db, self.lettered("s", i="eh"))

    def _needed_by_room(self) -> State:
        """Return the air that brings the room its heat, with the entering air's moisture."""
        entering, mass = self.heat_entering, self.supply_mass
        load, percent = self.unit.need(Unit.room_heat), self.condition.sensible_load
        heat = at_part_load(load, percent, self.lettered(q="hv", full="rh0"))
        db = heating_supply(mass, entering, self.room.db, heat, self.lettered("v", i="eh"))
        return self._warmed(entering, db, self.lettered("s", i="eh"))

    @figure
    def heat_load(self) -> float:
        """Load of the heating coil [MBH | kW]."""
        entering, leaving = self.heat_entering, self.heat_leaving
        steps = self.lettered(c="s", e="eh", l="s")
        return heating_load(self.supply_mass, entering, leaving.db, steps)

    # The room

    @figure
    def room_heat_met(self) -> float:
        """Heat that the supply air brings the room [MBH | kW]."""
        self.unit.need(Unit.heat_lat_db)
        return heat_met(self.supply_mass, self.heat_leaving, self.room.db, self.steps)

    @figure
    def humidifier_load(self) -> float:
        """Moisture that the room's humidity takes [lb/h | kg/h].

        Raises:
            Absent: no room humidity is stated for heating.
        """
        self.unit.need(Unit.room_heat_rh)
        steps = self.named(HeatingLetters.moistening)
        return moisture_to_add(self.outdoor_mass, self.intake, self.room, steps)

    # Water

    @figure
    def cooling_coil_entering(self) -> State:
        """Air that enters the idle cooling coil, behind the heating coil or in front of it."""
        self.unit.refuse_bad(Unit.heat_position)
        if self.unit.heat_position == "after cooling" or not self.unit.stated("heat_lat_db"):
            return self.heat_entering
        return self.heat_leaving


def _first(*values: float | None) -> float:
    """Return the first value that is stated, 0 where none is."""
    return next((value for value in values if value is not None), 0.0)
