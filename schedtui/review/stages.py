"""Stages of a working: an evaluation asked, figure by figure, with the steps that asking took.

The figures are asked for in the order that the air takes, of a fresh evaluation that collects its
steps; what asking a figure appended is the stage that it stands in. Nothing is computed a second
way, and nothing is formatted. Knows neither season, nor what stages there are.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Generic, TypeVar

from schedtui.errors import Absent
from schedtui.review.finding import margin
from schedtui.units import ENTHALPY, HUMIDITY_RATIO, TEMPERATURE, Quantity

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator, Sequence

    from schedtui.air.state import State
    from schedtui.air.step import Number, Step, Steps
    from schedtui.review.airpath import AirPath

P = TypeVar("P", bound="AirPath")


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
class Stop(Generic[P]):
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
    letter: Callable[[P], str] | str = ""
    where: Callable[[P], bool] = lambda _: True
    words: Callable[[P], str] = lambda _: ""


def asked(stops: Sequence[Stop[P]], at: P, plain: P) -> Iterator[Stage]:
    """Yield the stages that have anything to say, each lack once.

    Args:
        stops: where to ask, in the order that the air takes.
        at: the evaluation that collects its steps.
        plain: the same one without steps, to be asked what there is and what to say of it: a
            figure's steps belong to the stage that asks for it.
    """
    assert at.steps is not None  # noqa: S101  whoever asks has given it some
    states: list[tuple[str, State]] = []
    lacks: set[str] = set()
    for stop in stops:
        start, state, words = len(at.steps), None, ""
        try:
            if not stop.where(plain):
                continue
            for name in stop.figures:
                state = getattr(at, name)
            words = stop.words(plain)
        except Absent as absent:
            state, said = None, lack(absent)
            words = "" if said in lacks else said
            lacks.add(said)
        same = ""
        given: tuple[Number, ...] = ()
        if state is not None and stop.letter:
            same = next((title for title, one in states if one == state), "")
            letter = stop.letter if isinstance(stop.letter, str) else stop.letter(at)
            given = tuple(_not_derived(at.steps, letter, state))
            states.append((stop.title, state))
        steps = tuple(at.steps[start:])
        if steps or words or given:
            same = same if given and not steps else ""
            yield Stage(stop.title, (words,) if words else (), same, given, steps)


def lack(absent: Absent) -> str:
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


def outcome(
    label: str, quantity: Quantity, required: float | None, provided: float | None
) -> Iterator[Outcome]:
    """Yield a comparison, if there is anything to be compared."""
    if required is None and provided is None:
        return
    between = None
    if required is not None and provided is not None:
        between = margin(provided, required)
    yield Outcome(label, quantity, required, provided, between)


# What cooling and heating say alike


def flow_words(at: AirPath) -> str:
    """Say of flows on the actual basis that they settle."""
    if at.basis != "actual":
        return ""
    letter = at.letters.fan_inlet
    return (
        f"The supply airflow is the volume at the supply fan's inlet, whose air depends on the "
        f"flows in turn. The turn shown is the settled one: v_{letter} goes in as it comes out "
        "further down."
    )


def fan_words(at: AirPath) -> str:
    """Say what the supply fan's heat is taken from where that is not stated."""
    unit = at.unit
    if at.fan_heat:
        if unit.fan_rise is None and unit.motor_in_airstream and unit.motor_efficiency is None:
            return "The motor's efficiency is not stated: that of the limits is assumed."
        return ""
    return (
        "Neither a rise, a shaft power, nor a pressure with its efficiency is stated: the fan's "
        "heat counts as 0."
    )
