"""What a check is given: a unit with its evaluations, a condition, the whole schedule."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, TypeVar

from schedtui.air.fan import shaft_power
from schedtui.air.flow import volume_flow
from schedtui.errors import Absent, StateError
from schedtui.review.airpath import outdoor_air
from schedtui.review.cooling import Cooling
from schedtui.review.face import velocity
from schedtui.review.figure import figure, known
from schedtui.review.heating import Heating
from schedtui.review.part_load import cooling_at
from schedtui.review.row import RowCoil
from schedtui.review.row_heat import RowHeat
from schedtui.schedule.catalogue.condition import Condition
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.typed import Typed

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from schedtui.air.state import State
    from schedtui.review.site import Site
    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.view import Schedule

C = TypeVar("C")

Loads = dict[str, float | None]
"""Loads by condition [MBH | kW], None where one is not known."""

# A unit without outdoor air needs no condition; where the file has none it is computed at this.
_ROOM_CONDITION = {
    "name": Typed("room", "room", '"room"'),
    "season": Typed("cooling", "cooling", '"cooling"'),
}
_FULL_LOAD = 100.0
_NEAREST = 3.0  # a rated condition's entering air lies within so many limits of the scheduled one


class UnitCase:
    """A unit, evaluated at every condition that applies to it.

    Args:
        unit: the unit as scheduled.
        schedule: the schedule it stands in.
        site: where it stands.
    """

    def __init__(self, unit: Unit, schedule: Schedule, site: Site) -> None:
        self.unit = unit
        self.schedule = schedule
        self.site = site

    @figure
    def conditions(self) -> tuple[Condition, ...]:
        """The conditions that apply to the unit, in file order."""
        named = self.unit.conditions
        conditions = self.schedule.conditions
        if not conditions and not self.unit.outdoor_airflow:
            return (Condition(0, self.site.system, _ROOM_CONDITION),)
        return tuple(one for one in conditions if named is None or one.name in named)

    @figure
    def row(self) -> RowCoil:
        """The cooling coil as the row's own numbers have it."""
        return RowCoil(self.unit, Condition(0, self.site.system, _ROOM_CONDITION), self.site)

    @figure
    def evaluations(self) -> tuple[Cooling | Heating, ...]:
        """The unit at each condition that applies, in file order."""
        return tuple(
            cooling_at(self.unit, one, self.site)
            if one.season == "cooling"
            else Heating(self.unit, one, self.site)
            for one in self.conditions
        )

    @figure
    def cooling(self) -> tuple[Cooling, ...]:
        """The unit at each of its cooling conditions."""
        return tuple(at for at in self.evaluations if isinstance(at, Cooling))

    @figure
    def heating(self) -> tuple[Heating, ...]:
        """The unit at each of its heating conditions."""
        return tuple(at for at in self.evaluations if isinstance(at, Heating))

    @figure
    def governing(self) -> Cooling:
        """The cooling condition with the greatest coil total, the first of equals."""
        return self._greatest("cooling", self.cooling, lambda at: at.coil.total)

    @figure
    def rated(self) -> Cooling:
        """The cooling condition that the scheduled capacity was rated at.

        The nearest one, if it is near; the governing one where no entering state is scheduled.
        """
        if not self._states_entering:
            return self.governing
        nearest = self.nearest
        if self._distance(nearest) >= _NEAREST:
            raise Absent(why="no full-load condition has the scheduled air entering the coil")
        return nearest

    @figure
    def nearest(self) -> Cooling:
        """The full-load condition whose air entering the coil is nearest the scheduled one.

        Where no entering state is scheduled, that is the governing condition.
        """
        if not self._states_entering:
            return self.governing
        full = [
            at
            for at in self.cooling
            if at.condition.sensible_load == at.condition.latent_load == _FULL_LOAD
        ]
        return self._greatest("cooling", full or self.cooling, lambda at: -self._distance(at))

    @property
    def _states_entering(self) -> bool:
        return self.unit.stated("cool_eat_db") or self.unit.stated("cool_eat_wb")

    @figure
    def face_velocity(self) -> float:
        """Velocity at the cooling coil's face, of the actual volume that leaves it [fpm | m/s]."""
        area = self.unit.need(Unit.cool_face_area)
        if area == 0:
            raise Absent("cool_face_area", why="the face area is 0")
        at = self.governing
        actual = volume_flow(at.coil_mass, "actual", self.site.air, at.coil_leaving.v)
        return velocity(actual, area, self.site.system)

    @figure
    def shaft_power(self) -> float:
        """Shaft power of one supply fan, as stated or from its pressure [bhp | kW]."""
        unit = self.unit
        if unit.stated("fan_power"):
            return unit.need(Unit.fan_power)
        pressure, efficiency = unit.need(Unit.fan_total_pressure), unit.need(Unit.fan_efficiency)
        airflow = self.fan_airflow / unit.fan_count
        return shaft_power(airflow, pressure, efficiency, self.site.system)

    @figure
    def cooling_loads(self) -> Loads:
        """What the cooling coil requires at each condition, with a first coil in front of it."""
        return {at.name: known(_both_coils, at) for at in self.cooling}

    @figure
    def heating_loads(self) -> Loads:
        """What the heating coil requires at each condition."""
        return {at.name: known(getattr, at, "heat_load") for at in self.heating}

    @figure
    def preheat_loads(self) -> Loads:
        """What the preheat requires at each condition."""
        return {at.name: known(getattr, at, "preheat_load") for at in self.heating}

    @figure
    def required_tons(self) -> float:
        """Tons that the unit's cooling needs at its governing condition, both coils of two."""
        at = self.governing
        return at.coil.tons + (at.precool.tons if at.has_precool else 0.0)

    @figure
    def heat_face_velocity(self) -> float:
        """Velocity at the heating coil's face, of the actual volume that leaves it [fpm | m/s]."""
        area = self.unit.need(Unit.heat_face_area)
        if area == 0:
            raise Absent("heat_face_area", why="the face area is 0")
        at = self.heat_governing
        actual = volume_flow(at.supply_mass, "actual", self.site.air, at.heat_leaving.v)
        return velocity(actual, area, self.site.system)

    @figure
    def fan_airflow(self) -> float:
        """Actual volume at the supply fan's inlet [cfm | L/s], at the governing condition."""
        at = self.governing
        if at.basis == "actual":
            return at.supply_airflow
        return volume_flow(at.supply_mass, "actual", self.site.air, at.fan_inlet.v)

    @figure
    def heat_governing(self) -> Heating:
        """The heating condition with the greatest load of the heating coil, the first of equals."""
        return self._greatest("heating", self.heating, lambda at: at.heat_load)

    @figure
    def heat_nearest(self) -> Heating:
        """The heating condition whose air entering the heating coil is nearest the scheduled one.

        Where no entering dry bulb is scheduled, that is the governing condition.
        """
        return self._nearest_heating(Unit.heat_eat_db, lambda at: at.heat_entering.db)

    @figure
    def preheat_nearest(self) -> Heating:
        """The heating condition whose air entering the preheat is nearest the scheduled one."""
        return self._nearest_heating(Unit.preheat_eat_db, lambda at: at.preheat_entering.db)

    def _nearest_heating(
        self, field: Field[float | None], entering: Callable[[Heating], float]
    ) -> Heating:
        self.unit.refuse_bad(field)
        scheduled = self.unit.value_of(field)
        if scheduled is None:
            return self.heat_governing
        return self._greatest("heating", self.heating, lambda at: -abs(entering(at) - scheduled))

    @figure
    def row_heat(self) -> RowHeat:
        """The heating coil as the row's own numbers have it."""
        return RowHeat(self.unit, self.heat_nearest.condition, self.site)

    def _greatest(self, season: str, conditions: Sequence[C], measure: Callable[[C], float]) -> C:
        """Return the condition of the greatest measure, the first of equals.

        Raises:
            Absent: none has it; for the first one's reason.
        """
        measured = [(known(measure, at), at) for at in conditions]
        found = [(value, at) for value, at in measured if value is not None]
        if not found:
            raise _why_none(season, conditions, measure)
        return max(found, key=lambda pair: pair[0])[1]

    def _distance(self, at: Cooling) -> float:
        """Return how far the computed entering air is from the scheduled, in limits."""
        unit, limits, computed = self.unit, self.site.limits, at.coil_entering
        unit.refuse_bad(Unit.cool_eat_db, Unit.cool_eat_wb)
        parts = []
        if unit.cool_eat_db is not None:
            parts.append(abs(unit.cool_eat_db - computed.db) / limits.entering_db)
        if unit.cool_eat_wb is not None:
            parts.append(abs(unit.cool_eat_wb - computed.wb) / limits.entering_wb)
        return max(parts)


@dataclass(frozen=True, slots=True)
class ConditionCase:
    """A condition at the site.

    Args:
        condition: the condition as typed.
        site: where it holds.
    """

    condition: Condition
    site: Site

    @property
    def outdoor(self) -> State:
        """Its outdoor air.

        Raises:
            Absent: not stated.
            StateError: no such air.
        """
        return outdoor_air(self.condition, self.site)


@dataclass(frozen=True, slots=True)
class ScheduleCase:
    """The schedule as a whole.

    Args:
        schedule: its rows.
        site: where it stands.
    """

    schedule: Schedule
    site: Site

    def units_by_tag(self) -> Mapping[str, list[Unit]]:
        """Return the units of each tag, in file order."""
        found: dict[str, list[Unit]] = {}
        for unit in self.schedule.units:
            if unit.tag is not None:
                found.setdefault(unit.tag, []).append(unit)
        return found


def _both_coils(at: Cooling) -> float:
    """Return the load of a cooling coil, with that of a first coil in front of it."""
    return at.coil.total + (at.precool.total if at.has_precool else 0.0)


def _why_none(season: str, conditions: Sequence[C], ask: Callable[[C], object]) -> Absent:
    """Return why none of a season's conditions has a figure: the first one's reason."""
    for at in conditions:
        try:
            ask(at)
        except Absent as absent:
            return absent
        except StateError as error:
            return Absent(why=str(error))
    return Absent(why=f"no {season} condition applies")
