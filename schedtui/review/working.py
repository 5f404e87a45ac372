"""The working of a unit at a condition: its stages, and what is required beside what is there.

Nothing is computed a second way, and nothing is formatted.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.air.state import Air
from schedtui.air.step import Steps
from schedtui.errors import Absent
from schedtui.review.cooling import Cooling
from schedtui.review.cooling_stages import COOLING_STOPS, cooling_outcomes, part_load_stage
from schedtui.review.heating import Heating
from schedtui.review.heating_stages import HEATING_STOPS, heating_outcomes, nothing_heats
from schedtui.review.letters import CoolingLetters
from schedtui.review.part_load import PartLoad
from schedtui.review.stages import Outcome, Stage, asked, lack
from schedtui.units import ALTITUDE, STATION_PRESSURE

if TYPE_CHECKING:
    from collections.abc import Sequence

    from schedtui.review.case import UnitCase


@dataclass(frozen=True, slots=True)
class Working:
    """A unit's working at one condition.

    Args:
        condition: its name.
        stages: in the order that the air takes.
        outcomes: what is required, beside what is provided.
    """

    condition: str
    stages: tuple[Stage, ...]
    outcomes: tuple[Outcome, ...]


def site_stage(case: UnitCase) -> Stage:
    """Return how the station pressure comes about."""
    project, site = case.schedule.project, case.site
    if project.pressure is not None:
        given = ("p", project.pressure, STATION_PRESSURE)
        return Stage("Station pressure", ("As the project states it.",), given=(given,))
    altitude, steps = project.altitude or 0.0, Steps()
    Air.at_altitude(site.system, altitude, steps)
    given = ("Z", altitude, ALTITUDE)
    return Stage("Station pressure", given=(given,), steps=tuple(steps))


def working(at: Cooling | Heating) -> Working:
    """Return the working of a condition.

    Args:
        at: the evaluation whose unit, condition and site are worked through anew.
    """
    if isinstance(at, PartLoad):
        return _part_load_working(at)
    if isinstance(at, Cooling):
        cooled = Cooling(at.unit, at.condition, at.site, Steps())
        stages = tuple(asked(COOLING_STOPS, cooled, at))
        return Working(at.name, stages, tuple(cooling_outcomes(at)))
    if nothing_heats(at.unit):
        return Working(at.name, (Stage("Heating", ("The unit has no heating scheduled.",)),), ())
    heated = Heating(at.unit, at.condition, at.site, Steps())
    stages = tuple(asked(HEATING_STOPS, heated, at))
    return Working(at.name, stages, tuple(heating_outcomes(at)))


def _part_load_working(at: PartLoad) -> Working:
    """Return the working of part load, at the settings that have been found."""
    try:
        settled = part_load_stage(at)
    except Absent as absent:
        return Working(at.name, (Stage("Part load", (lack(absent),)),), ())
    fresh = PartLoad(at.unit, at.condition, at.site, Steps())
    # The search is not made again, neither for the air nor for its letters.
    fresh.__dict__["_known"] = {"settings": at.settings, "letters": CoolingLetters(at)}
    stages = asked(COOLING_STOPS, fresh, at)
    return Working(at.name, (settled, *stages), tuple(cooling_outcomes(at)))


def without_repeats(workings: Sequence[Working]) -> tuple[Working, ...]:
    """Return workings whose stages only point to an earlier condition that says the same."""
    seen: list[tuple[str, Stage]] = []
    told = []
    for one in workings:
        stages = []
        for stage in one.stages:
            before = next((name for name, its in seen if stage.says_the_same(its)), None)
            if before is None or not stage.steps:
                seen.append((one.condition, stage))
                stages.append(stage)
            else:
                stages.append(Stage(stage.title, (f"As at {before}.",)))
        told.append(replace(one, stages=tuple(stages)))
    return tuple(told)
