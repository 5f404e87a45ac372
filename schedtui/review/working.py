"""The working of a unit: its evaluation at a condition, with the steps that its figures took.

The figures are asked for in the order that the air takes, of a fresh evaluation that collects its
steps; what asking a figure appended is the stage that it stands in. Nothing is computed a second
way, and nothing is formatted.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.air.state import Air
from schedtui.air.step import Number, Steps
from schedtui.errors import Absent
from schedtui.review.cooling import Cooling
from schedtui.review.figure import known
from schedtui.review.finding import margin
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import (
    ALTITUDE,
    ENTHALPY,
    HUMIDITY_RATIO,
    LOAD,
    REFRIGERATION,
    STATION_PRESSURE,
    TEMPERATURE,
    Quantity,
)

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator, Sequence

    from schedtui.air.state import State
    from schedtui.air.step import Step
    from schedtui.review.case import UnitCase
    from schedtui.review.letters import CoolingLetters


@dataclass(frozen=True, slots=True)
class Stage:
    """A stage of a working.

    Args:
        title: what it is about.
        words: what is said of it, before its steps.
        same_as: title of the stage whose air this is, unchanged.
        given: numbers of its air that are no step's result.
        steps: how its figures come about.
    """

    title: str
    words: tuple[str, ...] = ()
    same_as: str = ""
    given: tuple[Number, ...] = ()
    steps: tuple[Step, ...] = ()

    def says_the_same(self, other: Stage) -> bool:
        """Tell whether another stage says nothing else."""
        return (
            (self.title, self.words, self.same_as) == (other.title, other.words, other.same_as)
            and self.given == other.given
            and len(self.steps) == len(other.steps)
            and all(
                mine.says_the_same(its)
                for mine, its in zip(self.steps, other.steps, strict=True)
            )
        )  # fmt: skip


@dataclass(frozen=True, slots=True)
class Outcome:
    """A required figure beside what there is for it.

    Args:
        label: what it is.
        quantity: what it measures.
        required: what is required; None where that cannot be had.
        provided: what is scheduled, or what the supply air does; None where nothing is.
        margin: provided over required [%].
    """

    label: str
    quantity: Quantity
    required: float | None
    provided: float | None
    margin: float | None


@dataclass(frozen=True, slots=True)
class Working:
    """A unit's working at one cooling condition.

    Args:
        condition: its name.
        stages: in the order that the air takes.
        outcomes: what is required, beside what is provided.
    """

    condition: str
    stages: tuple[Stage, ...]
    outcomes: tuple[Outcome, ...]


@dataclass(frozen=True, slots=True)
class _Stop:
    """Where an evaluation is asked.

    Args:
        title: of the stage.
        figures: the figures to ask for, in their order.
        letter: the subscript of the state that the last of them is, if it is one.
        where: whether the unit has it at this condition.
        words: what is said before the steps.
    """

    title: str
    figures: tuple[str, ...]
    letter: Callable[[CoolingLetters], str] | str = ""
    where: Callable[[Cooling], bool] = lambda _: True
    words: Callable[[Cooling], str] = lambda _: ""


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


def working(at: Cooling) -> Working:
    """Return the working of a cooling condition.

    Args:
        at: the evaluation whose unit, condition and site are worked through anew.
    """
    fresh = Cooling(at.unit, at.condition, at.site, Steps())
    return Working(at.name, tuple(_stages(fresh, at)), tuple(_outcomes(at)))


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


def _stages(at: Cooling, plain: Cooling) -> Iterator[Stage]:
    """Yield the stages that have anything to say, each lack once.

    Args:
        at: the evaluation that collects its steps.
        plain: the same one without steps, to be asked what there is and what to say of it: a
            figure's steps belong to the stage that asks for it.
    """
    assert at.steps is not None  # noqa: S101  this module has given it some
    states: list[tuple[str, State]] = []
    lacks: set[str] = set()
    for stop in _STOPS:
        start, state, words = len(at.steps), None, ""
        try:
            if not stop.where(plain):
                continue
            for name in stop.figures:
                state = getattr(at, name)
            words = stop.words(plain)
        except Absent as absent:
            state, lack = None, _lack(absent)
            words = "" if lack in lacks else lack
            lacks.add(lack)
        same = ""
        given: tuple[Number, ...] = ()
        if state is not None and stop.letter:
            same = next((title for title, one in states if one == state), "")
            letter = stop.letter if isinstance(stop.letter, str) else stop.letter(at.letters)
            given = tuple(_not_derived(at.steps, letter, state))
            states.append((stop.title, state))
        steps = tuple(at.steps[start:])
        if steps or words or given:
            same = same if given and not steps else ""
            yield Stage(stop.title, (words,) if words else (), same, given, steps)


def _lack(absent: Absent) -> str:
    """Say why something is not computed."""
    if absent.why:
        return f"Not computed: {absent.why}."
    return f"Not computed, for want of {' and '.join(absent.keys)}."


def _not_derived(steps: Steps, letter: str, state: State) -> Iterator[Number]:
    """Yield the properties of a state that no step has for a result."""
    derived = {step.symbol for step in steps}
    for symbol, value, quantity in (
        (f"t_{letter}", state.db, TEMPERATURE),
        (f"W_{letter}", state.w, HUMIDITY_RATIO),
        (f"h_{letter}", state.h, ENTHALPY),
    ):
        if symbol not in derived:
            yield symbol, value, quantity


def _outcomes(at: Cooling) -> Iterator[Outcome]:
    unit, share = at.unit, at.condition
    for label, quantity, stated, required in (
        ("Cooling total", LOAD, Unit.cool_total, lambda: at.required_total),
        ("Cooling sensible", LOAD, Unit.cool_sensible, lambda: at.required_sensible),
        ("Cooling tons", REFRIGERATION, Unit.cool_tons, lambda: at.coil.tons),
        ("First coil total", LOAD, Unit.precool_total, lambda: at.precool.total),
        ("Reheat", LOAD, Unit.reheat_total, lambda: at.reheat_load),
    ):
        yield from _outcome(label, quantity, known(required), unit.value_of(stated))
    for label, stated, percent, met in (
        ("Room sensible, met", Unit.room_sensible, share.sensible_load,
         lambda: at.room_met.sensible),
        ("Room latent, met", Unit.room_latent, share.latent_load, lambda: at.room_met.latent),
    ):  # fmt: skip
        load = unit.value_of(stated)
        if load is not None:
            yield from _outcome(label, LOAD, load * percent / 100, known(met))


def _outcome(
    label: str, quantity: Quantity, required: float | None, provided: float | None
) -> Iterator[Outcome]:
    """Yield a comparison, if there is anything to be compared."""
    if required is None and provided is None:
        return
    between = None
    if required is not None and provided is not None:
        between = margin(provided, required)
    yield Outcome(label, quantity, required, provided, between)


# Where each figure of the air path stands


def _takes_outdoor_air(at: Cooling) -> bool:
    return at.outdoor_mass > 0


def _is_wet(at: Cooling) -> bool:
    return at.coil_mode == "wet"


def _flow_words(at: Cooling) -> str:
    if at.basis != "actual":
        return ""
    letter = at.letters.fan_inlet
    return (
        f"The supply airflow is the volume at the supply fan's inlet, whose air depends on the "
        f"flows in turn. The turn shown is the settled one: v_{letter} goes in as it comes out "
        "further down."
    )


def _recovery_words(at: Cooling) -> str:
    if at.recovery_acts:
        return ""
    which = "enthalpy" if at.unit.recovery_latent else "dry bulb"
    return (
        f"The recovery would not lower the {which} of the outdoor air, so it does not act here "
        "and the outdoor air passes as it is."
    )


def _fan_words(at: Cooling) -> str:
    unit = at.unit
    if at.fan_heat:
        if unit.fan_rise is None and unit.motor_in_airstream and unit.motor_efficiency is None:
            return "The motor's efficiency is not stated: that of the limits is assumed."
        return ""
    return (
        "Neither a rise, a shaft power, nor a pressure with its efficiency is stated: the fan's "
        "heat counts as 0."
    )


def _leaving_words(at: Cooling) -> str:
    said = []
    if at.leaving_from == "loads":
        said.append(
            "The leaving air follows from the scheduled total and sensible capacity, so nothing "
            "can be judged by it."
        )
    if at.goes_back and not at.blows_through and at.fan_heat:
        said.append(
            "Going back over the fan the turn shown is the settled one: the air that comes out "
            "is the one that the fan's heat was taken for."
        )
    return " ".join(said)


def _unit_words(at: Cooling) -> str:
    if at.leaving_from == "room":
        return "No leaving air is scheduled: it is what the room's loads need."
    return "The scheduled leaving air is that of the unit."


def _reheat_words(at: Cooling) -> str:
    return "" if at.reheats else "The air is no colder than that: the reheat adds nothing here."


def _mode_words(at: Cooling) -> str:
    if at.coil_mode == "dry":
        return (
            "The coil runs dry: the entering air holds less moisture than the air it is to "
            "leave, and a coil adds none. It leaves at the scheduled dry bulb with the moisture "
            "it entered with."
        )
    if at.coil_mode == "off":
        return (
            "The coil is off: the entering air is no warmer than the air it is to leave, and a "
            "cooling coil does not heat. The air passes as it is."
        )
    return ""


_STOPS: tuple[_Stop, ...] = (
    _Stop("Outdoor air", ("outdoor",), "o", lambda at: bool(at.unit.outdoor_airflow)),
    _Stop("Room air", ("room",), "r", lambda at: at.unit.stated("room_db")
          or not at.unit.stated("return_db")),
    _Stop("Return air", ("return_air",), "ret"),
    _Stop("Supply and outdoor air flow", ("supply_mass", "outdoor_mass", "outdoor_fraction"),
          words=_flow_words),
    _Stop("Outdoor air behind the recovery", ("recovery_reaches",), "rec",
          lambda at: at.has_recovery and _takes_outdoor_air(at), _recovery_words),
    _Stop("Mixed air", ("mixed",), "m"),
    _Stop("Air flow through and around the coil", ("bypass_mass", "coil_mass")),
    _Stop("Volume at the supply fan's inlet", ("fan_inlet_volume",),
          where=lambda at: at.blows_through and at.basis == "actual"),
    _Stop("Supply fan, blowing through", ("fan_heat",),
          where=lambda at: at.blows_through, words=_fan_words),
    _Stop("The coil's own mixture", ("mixed_for_coil",), "n", lambda at: at.richer_at_coil),
    _Stop("Air to the coil", ("to_coil",), "a", lambda at: at.blows_through),
    _Stop("Air around the coil", ("bypassed",), lambda letters: letters.around,
          lambda at: at.blows_through and at.bypass_mass > 0),
    _Stop("Air leaving the first coil", ("precooled",), "l1", lambda at: at.has_precool),
    _Stop("First coil's load", ("precool",), where=lambda at: at.has_precool),
    _Stop("Air entering the coil", ("coil_entering",), "e"),
    _Stop("Entering air as scheduled in the row", ("row_entering",), "k",
          lambda at: at.leaving_from == "loads" and at.unit.stated("cool_eat_db", "cool_eat_wb")),
    _Stop("Air that is to leave the unit", ("leaving_unit",), "u",
          lambda at: at.goes_back, _unit_words),
    _Stop("Air that the coil is to leave", ("leaving_aimed_at",),
          lambda letters: letters.aim, words=_leaving_words),
    _Stop("Air leaving the coil", ("coil_leaving",), "l", lambda at: not _is_wet(at), _mode_words),
    _Stop("Coil load", ("coil",)),
    _Stop("Apparatus dew point and bypass factor", ("adp", "bypass_factor"), where=_is_wet),
    _Stop("Air past the wrap-around's second side", ("past_wrap",), "w",
          lambda at: at.wrap > 0),
    _Stop("Air joined by what went around the coil", ("rejoined",), "j",
          lambda at: at.bypass_mass > 0),
    _Stop("Volume at the supply fan's inlet", ("fan_inlet_volume",),
          where=lambda at: not at.blows_through and at.basis == "actual"),
    _Stop("Supply fan, drawing through", ("fan_heat", "fan_rise"),
          where=lambda at: not at.blows_through, words=_fan_words),
    _Stop("Air past the fan", ("before_reheat",), "g", lambda at: at.drawn_through_warm),
    _Stop("Reheated air", ("reheated",), lambda letters: letters.reheated,
          lambda at: at.unit.stated("reheat_lat_db"), _reheat_words),
    _Stop("Reheat load", ("reheat_load",),
          where=lambda at: at.unit.stated("reheat_lat_db") and at.reheats),
    _Stop("Supply air", ("supply",), "s"),
    _Stop("What the supply air does in the room", ("room_met",)),
    _Stop("Net capacity", ("required_total", "required_sensible"),
          where=lambda at: at.unit.cool_basis == "net"),
)  # fmt: skip
