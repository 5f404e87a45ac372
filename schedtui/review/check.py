"""What a check is: a registration beside the functions that find its faults."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.case import ConditionCase, ScheduleCase, UnitCase
    from schedtui.review.cooling import Cooling
    from schedtui.review.heating import Heating
    from schedtui.review.plants import PlantCase

Faults = Iterable[Fault]

# Ranks of findings: a slip of the unit or the air explains a contradiction of two numbers, that
# one that the air entering a coil is another, and all of them that a total is short.
SLIP, IMPOSSIBLE, CONTRADICTION, DENSITY, OTHER_AIR, CAPACITY, CONSEQUENCE = range(1, 8)


@dataclass(frozen=True, slots=True, kw_only=True)
class Check:
    """A check's registration; each module of `review.checks` has one, called CHECK.

    A finder is a pure function from what it is about to faults. It may ask for figures that are
    not to be had: the judge turns that into a `missing` finding.

    Args:
        severity: the worst that it finds.
        sentence: what it holds against what, in one plain sentence.
        source: the standard or handbook behind it, or "common practice".
        judges: the scheduled keys that it judges; where one of them is typed and the check cannot
            be made, that is a finding.
        rank: place in which a unit's findings are read, the lower the earlier: what explains others
            comes before what follows from it.
        derived: givens that in this comparison were derived and printed, as the leaving dry bulb
            is from the room's load: their digits count here too.
        reads_digits: whether the digits that numbers are printed with can explain its faults.
        unit: finds faults in a unit.
        cooling: finds faults in a unit at each of its cooling conditions.
        rated: finds faults in a unit at its rated cooling condition.
        governing: finds faults in a unit at its governing cooling condition.
        heating: finds faults in a unit at each of its heating conditions.
        condition: finds faults in a condition.
        plant: finds faults in a plant.
        schedule: finds faults in the schedule as a whole.
    """

    severity: Severity
    sentence: str
    source: str
    judges: tuple[str, ...] = ()
    rank: int = CONSEQUENCE
    derived: tuple[str, ...] = ()
    reads_digits: bool = True
    unit: Callable[[UnitCase], Faults] | None = None
    cooling: Callable[[Cooling], Faults] | None = None
    rated: Callable[[Cooling], Faults] | None = None
    governing: Callable[[Cooling], Faults] | None = None
    heating: Callable[[Heating], Faults] | None = None
    condition: Callable[[ConditionCase], Faults] | None = None
    plant: Callable[[PlantCase], Faults] | None = None
    schedule: Callable[[ScheduleCase], Faults] | None = None
