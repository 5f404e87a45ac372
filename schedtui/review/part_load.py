"""A unit at a cooling condition with less than its design room loads: how it sheds the rest.

The control settles where the supply air takes just the room's sensible load; the room's humidity is
what the moisture balance over room, mixing and coil then leaves. Both are found together. Judges
nothing.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.air import fan
from schedtui.air.coil import heating_load
from schedtui.air.room import supply_moisture
from schedtui.errors import Absent
from schedtui.review.cooling import Cooling
from schedtui.review.figure import figure
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.air.state import State
    from schedtui.review.site import Site
    from schedtui.schedule.catalogue.condition import Condition

PART_LOAD_NEEDS = ("room_sensible", "room_latent", "room_db", "cool_lat_db", "cool_lat_wb")
"""Keys without which a unit's part load cannot be had, a room humidity besides."""

_SETTLED = 1e-12
_MOST_TURNS = 60
_NEARLY_ALL = 1 - 1e-9  # of the air around the coil, the most that bypass control can send there


@dataclass(frozen=True, slots=True)
class Settings:
    """What the control and the room have settled at, or are tried at.

    Args:
        room_w: humidity ratio of the room [lb/lb | kg/kg].
        bypass: share of the supply air around the coil.
        supply_mass: dry air supplied [lb/h | kg/s].
        leaving: the air that the coil leaves.
        supply_db: dry bulb that the reheat brings the air to in front of the duct [°F | °C]; None
            for no reheat.
        reaches: whether the range of the control reaches the load.
    """

    room_w: float
    bypass: float
    supply_mass: float
    leaving: State
    supply_db: float | None = None
    reaches: bool = True


def cooling_at(unit: Unit, condition: Condition, site: Site) -> Cooling:
    """Return a unit at a cooling condition, shedding load where the condition has less of it."""
    plain = Cooling(unit, condition, site)
    if not plain.has_less_load or not unit.stated(*PART_LOAD_NEEDS):
        return plain
    states_humidity = unit.stated("room_rh") or unit.stated("room_wb")
    return PartLoad(unit, condition, site) if states_humidity else plain


class PartLoad(Cooling):
    """One unit at one cooling condition with less than its design room loads."""

    def tried(self, settings: Settings) -> PartLoad:
        """Return the same unit and condition with its control set so."""
        trial = PartLoad(self.unit, self.condition, self.site)
        trial.__dict__["_known"] = {"settings": settings, "design": self.design}
        return trial

    @figure
    def design(self) -> Cooling:
        """The unit at this condition with its coil as at design, and the room as designed."""
        return Cooling(self.unit, self.condition, self.site)

    @figure
    def settings(self) -> Settings:
        """Where control and room settle."""
        return _settled(self)

    @property
    def control(self) -> str:
        """How the unit sheds load."""
        self.unit.refuse_bad(Unit.capacity_control)
        return self.unit.capacity_control

    @property
    def estimated(self) -> bool:
        """Whether the figures rest on how a coil behaves, which a schedule does not state."""
        return self.control == "coil"

    @figure
    def room_load(self) -> tuple[float, float]:
        """Sensible and latent load of the room at this condition [MBH | kW]."""
        unit, condition = self.unit, self.condition
        return (
            unit.need(Unit.room_sensible) * condition.sensible_load / 100,
            unit.need(Unit.room_latent) * condition.latent_load / 100,
        )

    # What the settings put in the place of the design's

    @figure
    def room(self) -> State:
        """The room at its design dry bulb, as humid as it comes to be."""
        return self.design.room.at(w=self.settings.room_w)

    @figure
    def return_air(self) -> State:
        """Return air at the unit; a humidity given for it moves with the room's."""
        design = self.design.return_air
        return design.at(w=max(design.w + self.room.w - self.design.room.w, 0.0))

    @figure
    def bypass_share(self) -> float:
        """Share of the supply air that goes around the coil, by mass."""
        share = self.settings.bypass
        if self.unit.bypass_source == "return":
            share = min(share, 1 - self.outdoor_fraction)  # no more returns of the air that is left
        return share

    @figure
    def supply_mass(self) -> float:
        """Dry air that the supply fan delivers [lb/h | kg/s]."""
        return self.settings.supply_mass

    @figure
    def outdoor_mass(self) -> float:
        """Dry outdoor air taken in, as scheduled [lb/h | kg/s]."""
        return min(self.design.outdoor_mass, self.supply_mass)

    @figure
    def leaving_aimed_at(self) -> State:
        """The state that the coil leaves the air in."""
        return self.settings.leaving

    @figure
    def fan_heat(self) -> float:
        """Heat that the supply fan puts into the air: less air takes less, by the same rise."""
        return fan.heat_of_rise(self.fan_inlet, self.supply_mass, self.design.fan_rise)

    @figure
    def reheated(self) -> State:
        """Air behind the reheat: as scheduled at full load, and as much more as the room needs."""
        air = self.before_reheat
        self.unit.refuse_bad(Unit.reheat_lat_db)
        targets = (self.unit.reheat_lat_db, self.settings.supply_db)
        return air.heated_to(max(db for db in (air.db, *targets) if db is not None))

    @figure
    def reheat_load(self) -> float:
        """Heat that the reheat puts into the supply air [MBH | kW].

        Raises:
            Absent: the unit does not reheat at this condition.
        """
        if self.settings.supply_db is None:
            self.unit.need(Unit.reheat_lat_db)
        return heating_load(self.supply_mass, self.before_reheat, self.reheated.db)


def _settled(at: PartLoad) -> Settings:
    """Return the settings at which the room's humidity stays what it is.

    The humidity ratio that a room comes to is linear in the one it has but for a coil that turns
    dry, so that a secant finds it in a few turns.
    """
    design = at.design
    start = Settings(
        design.room.w, design.bypass_share, design.supply_mass, design.leaving_aimed_at
    )
    w0 = design.room.w
    f0 = _room_after(at, _controlled(at, start))
    w1 = f0
    for _ in range(_MOST_TURNS):
        settings = _controlled(at, replace(start, room_w=w1))
        f1 = _room_after(at, settings)
        if abs(f1 - w1) <= _SETTLED * max(w1, _SETTLED):
            return settings
        slope = (f1 - f0) / (w1 - w0) if w1 != w0 else 0.0
        w0, f0 = w1, f1
        # The fixed point of the line through both turns; a plain turn where they stand alike.
        w1 = w1 + (f1 - w1) / (1 - slope) if slope < 1 else f1
        w1 = max(w1, 0.0)
    raise Absent(why=f"the room's humidity at {at.name} does not settle")


def _room_after(at: PartLoad, settings: Settings) -> float:
    """Return the room's humidity ratio that some settings lead to."""
    trial = at.tried(settings)
    latent = at.room_load[1]
    # W_room = W_supply + what the latent load adds
    added = trial.room.w - supply_moisture(trial.supply_mass, trial.room, latent)
    return trial.supply.w + added


def _controlled(at: PartLoad, settings: Settings) -> Settings:
    """Return the settings with which the supply air takes just the room's sensible load."""
    if _surplus(at, settings) <= 0:
        return settings  # nothing to shed
    return {
        "bypass": _by_bypass,
        "reheat": _by_reheat,
        "airflow": _by_airflow,
        "coil": _by_coil,
    }[at.control](at, settings)


def _surplus(at: PartLoad, settings: Settings) -> float:
    """Return the sensible heat that the supply air takes beyond the room's load [MBH | kW]."""
    return at.tried(settings).room_met.sensible - at.room_load[0]


def _by_bypass(at: PartLoad, settings: Settings) -> Settings:
    """Send air around the coil, whose leaving air stays as it is."""
    most = _NEARLY_ALL
    if at.unit.bypass_source == "return":
        most = min(most, 1 - at.design.outdoor_fraction)

    def set_to(share: float) -> Settings:
        return replace(settings, bypass=share)

    if most <= settings.bypass or _surplus(at, set_to(most)) > 0:
        return replace(set_to(max(most, settings.bypass)), reaches=False)
    return set_to(_root(lambda share: _surplus(at, set_to(share)), settings.bypass, most))


def _by_reheat(at: PartLoad, settings: Settings) -> Settings:
    """Warm the air behind the coil up to what the room needs."""
    trial = at.tried(settings)

    def set_to(db: float) -> Settings:
        return replace(settings, supply_db=db)

    cold = trial.before_reheat.db
    # At the room's dry bulb in front of the duct the air takes no heat at all.
    return set_to(_root(lambda db: _surplus(at, set_to(db)), cold, trial.room.db))


def _by_airflow(at: PartLoad, settings: Settings) -> Settings:
    """Supply less air, down to the outdoor air or the least airflow; the rest by reheat."""
    design = at.design
    share = max(_least_share(at.unit), 1 - _NEARLY_ALL)  # without any air nothing can be balanced
    least = max(design.outdoor_mass, design.supply_mass * share)

    def set_to(mass: float) -> Settings:
        return replace(settings, supply_mass=mass)

    if least >= settings.supply_mass:
        return _by_reheat(at, settings)
    if _surplus(at, set_to(least)) > 0:
        return _by_reheat(at, set_to(least))
    return set_to(_root(lambda mass: _surplus(at, set_to(mass)), least, settings.supply_mass))


def _least_share(unit: Unit) -> float:
    """Return the least supply airflow over the supply airflow, both as typed."""
    unit.refuse_bad(Unit.supply_airflow_min)
    return (unit.supply_airflow_min or 0.0) / unit.need(Unit.supply_airflow)


def _by_coil(at: PartLoad, settings: Settings) -> Settings:
    """Leave the air warmer, as moist relatively as at design: a guess at the coil's behaviour."""
    cold, air = settings.leaving, at.site.air
    humidity = min(cold.rh, 100.0)

    def set_to(db: float) -> Settings:
        return replace(settings, leaving=air.by_relative_humidity(db, humidity))

    warm = at.tried(settings).coil_entering.db
    if warm <= cold.db:
        return settings
    if _surplus(at, set_to(warm)) > 0:
        return replace(set_to(warm), reaches=False)
    return set_to(_root(lambda db: _surplus(at, set_to(db)), cold.db, warm))


def _root(function: Callable[[float], float], low: float, high: float) -> float:
    """Return where a function that changes its sign between two places is 0.

    By false position with the halving of the end that stays (Illinois), which needs few turns for
    what is nearly a line.
    """
    f_low, f_high = function(low), function(high)
    for _ in range(_MOST_TURNS):
        if f_low == f_high:
            return high
        middle = high - f_high * (high - low) / (f_high - f_low)
        found = function(middle)
        if found == 0 or abs(middle - high) <= _SETTLED * max(abs(middle), 1.0):
            return middle
        if (found > 0) == (f_high > 0):
            f_low /= 2
        else:
            low, f_low = high, f_high
        high, f_high = middle, found
    return high
