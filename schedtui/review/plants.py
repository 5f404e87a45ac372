"""What the units together draw from a plant, condition by condition.

A sum is coincident: every unit at the same condition. Judges nothing.
"""

from __future__ import annotations

from collections import Counter
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.air.fluid import flow_for
from schedtui.errors import Absent
from schedtui.review.figure import figure, known
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT, FluidSide

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping, Sequence

    from schedtui.review.case import Loads, UnitCase
    from schedtui.review.site import Site
    from schedtui.schedule.catalogue.plant import Plant
    from schedtui.schedule.catalogue.unit import Unit
    from schedtui.schedule.view import Schedule

# What a unit knows of each coil's loads.
_LOADS = {
    COOLING.what: "cooling_loads",
    HEATING.what: "heating_loads",
    PREHEAT.what: "preheat_loads",
}


@dataclass(frozen=True, slots=True)
class Feed:
    """A unit's coil on a plant.

    Args:
        label: how messages name the unit.
        case: the unit with its evaluations.
        side: which of its coils.
        share: how much of the coil's load this plant takes, units standing by left out: the
            number of units times the plant's part in them.
    """

    label: str
    case: UnitCase
    side: FluidSide
    share: float

    def load(self, condition: str) -> float | None:
        """Return what one unit's coil requires at a condition [MBH | kW], None if not known."""
        loads: Loads = getattr(self.case, _LOADS[self.side.what])
        return loads.get(condition, 0.0)

    def flow(self, load: float) -> float | None:
        """Return one unit's flow [gpm | L/s]: as scheduled, else what its load asks for."""
        unit, side = self.case.unit, self.side
        stated = unit.value_of(side.flow)
        if stated is not None:
            return stated
        entering, leaving = unit.value_of(side.entering), unit.value_of(side.leaving)
        if entering is None or leaving is None or entering == leaving:
            return None
        system = self.case.site.system
        return known(lambda: flow_for(load, entering, leaving, side.fluid_of(unit), system))


class PlantCase:
    """A plant with what it feeds.

    Args:
        plant: the plant as scheduled.
        schedule: the schedule it stands in.
        site: where it stands.
        units: every unit of the schedule with its label.
    """

    def __init__(
        self, plant: Plant, schedule: Schedule, site: Site, units: Sequence[tuple[str, UnitCase]]
    ) -> None:
        self.plant = plant
        self.schedule = schedule
        self.site = site
        self._units = units

    def of(self, plant: Plant) -> PlantCase:
        """Return another reading of the plant with what this one feeds."""
        plants = tuple(plant if one is self.plant else one for one in self.schedule.plants)
        # A unit on two plants is shared by their capacities: what feeds it hangs on this one's.
        return PlantCase(plant, replace(self.schedule, plants=plants), self.site, self._units)

    @property
    def name(self) -> str:
        """The plant's name."""
        return self.plant.name or ""

    @figure
    def feeds(self) -> tuple[Feed, ...]:
        """The coils on the plant."""
        return tuple(feed for label, case in self._units for feed in self._feeds_of(label, case))

    def _feeds_of(self, label: str, case: UnitCase) -> Iterator[Feed]:
        unit = case.unit
        plants = _plants_of(unit, self.schedule, self.plant.serves)
        if self.plant not in plants:
            return
        number = max(unit.quantity - unit.standby, 0)
        for side, on in self._split(unit, plants):
            if self.plant in on:
                yield Feed(label, case, side, number * _part(self.plant, on))

    def _split(self, unit: Unit, plants: list[Plant]) -> Iterator[tuple[FluidSide, list[Plant]]]:
        """Yield each coil that plants of the kind feed, with those of the unit's that feed it.

        A coil is on all of them, unless the unit has coils of different supply: then on those
        known to supply what it takes, else on those of which nothing is known, else on all.
        """
        fed, steam = _fed(unit, self.plant.serves), []
        if len(plants) > 1 and unit.plants is not None:
            there = (side for side in _there(unit, self.plant.serves) if side not in fed)
            steam = [side for side in there if side.supply(unit) == "steam"]
        if len(plants) == 1 or len({side.supply(unit) for side in (*fed, *steam)}) == 1:
            yield from ((side, plants) for side in fed)
            return
        unknown = [plant for plant in plants if plant.name not in self._supplies]
        for side in fed:
            yield side, self._supplying(side.supply(unit), plants) or unknown or plants
        # Steam beside water is fed only where one of the plants is not the water's.
        left = unknown if len(unknown) < len(plants) else []
        for side in steam:
            if on := self._supplying("steam", plants) or left:
                yield side, on

    def _supplying(self, supply: str, plants: list[Plant]) -> list[Plant]:
        return [plant for plant in plants if self._supplies.get(plant.name or "") == supply]

    @figure
    def _supplies(self) -> dict[str, str]:
        """What each plant of the kind supplies, as far as the units on it alone tell."""
        serves = self.plant.serves
        told: dict[str, Counter[str]] = {}
        for _, case in self._units:
            plants = _plants_of(case.unit, self.schedule, serves)
            supplies = {side.supply(case.unit) for side in _fed(case.unit, serves)}
            if len(plants) == len(supplies) == 1:
                told.setdefault(plants[0].name or "", Counter()).update(supplies)
        return {name: most for name, supplies in told.items() if (most := most_common(supplies))}

    def unknown(self, condition: str) -> tuple[str, ...]:
        """Name the units whose load at a condition is not known."""
        loads = zip(self.feeds, self.loads[condition], strict=True)
        return tuple(feed.label for feed, load in loads if load is None)

    @figure
    def governing(self) -> str:
        """The condition with the greatest load, the first of equals.

        Raises:
            Absent: no condition of the plant's season is there, or nothing is fed.
        """
        if not self.loads or not self.feeds:
            raise Absent(why=f"plant {self.name} feeds no unit at any condition")
        return max(self.loads, key=self.load_at)

    @figure
    def loads(self) -> dict[str, tuple[float | None, ...]]:
        """What one unit of each feed requires, by condition [MBH | kW]; None where not known."""
        return {
            name: tuple(feed.load(name) for feed in self.feeds)
            for one in self.schedule.conditions
            if one.season == self.plant.serves and (name := one.name)
        }

    def load_at(self, condition: str) -> float:
        """Return the units' load together at a condition, diversity counted [MBH | kW]."""
        loads = zip(self.feeds, self.loads[condition], strict=True)
        return sum(feed.share * (load or 0.0) for feed, load in loads) * self._diversity

    @figure
    def load(self) -> float:
        """The load at the governing condition [MBH | kW]."""
        return self.load_at(self.governing)

    @figure
    def flow(self) -> float:
        """The flow at the governing condition, diversity counted [gpm | L/s]."""
        together = 0.0
        for feed, load in zip(self.feeds, self.loads[self.governing], strict=True):
            flow = feed.flow(load or 0.0)
            if flow is None:
                raise Absent(why=f"the flow of {feed.label} is not known ({feed.side.flow.key})")
            together += feed.share * flow
        return together * self._diversity

    @property
    def _diversity(self) -> float:
        return self.plant.diversity / 100


def _plants_of(unit: Unit, schedule: Schedule, serves: str) -> list[Plant]:
    """Return the plants of a kind that feed a unit: those it names, else all of that kind."""
    named = unit.plants
    return [
        plant
        for plant in schedule.plants
        if plant.serves == serves and (named is None or plant.name in named)
    ]


def _part(plant: Plant, plants: Sequence[Plant]) -> float:
    """Return a plant's part in a unit on several: by their capacities, equal where unknown."""
    capacities = [one.capacity or 0.0 for one in plants]
    if not all(capacities):
        return 1 / len(plants)
    return (plant.capacity or 0.0) / sum(capacities)


def most_common(counted: Mapping[str, float]) -> str | None:
    """Return what is counted most often, None where two are alike or nothing is counted."""
    most = max(counted.values(), default=0.0)
    names = [name for name, number in counted.items() if number == most]
    return names[0] if len(names) == 1 else None


def _there(unit: Unit, serves: str) -> tuple[FluidSide, ...]:
    """Return the coils of a kind that a unit has."""
    sides = (COOLING,) if serves == "cooling" else (HEATING, PREHEAT)
    return tuple(side for side in sides if side.exists(unit))


def _fed(unit: Unit, serves: str) -> tuple[FluidSide, ...]:
    """Return the coils of a unit that a plant feeds: those of its fluid.

    Where the unit names the plant and has no such coil, whatever it has is fed by it.
    """
    there = _there(unit, serves)
    wet = tuple(side for side in there if side.runs(unit))
    return wet or (there if unit.plants is not None else ())
