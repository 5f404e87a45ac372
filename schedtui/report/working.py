"""The pages of a working: each step with its formula, the numbers put in, the result, the source.

A result is printed with a few digits more than a schedule has; a number that is put into a formula
with more again, so that a pocket calculator comes to the printed result from the printed numbers.
"""

from __future__ import annotations

import math
import re
from typing import TYPE_CHECKING, Final

from schedtui.air.derivation import ABSOLUTE_TEMPERATURE
from schedtui.air.fluid import DENSITY, HEAT_FACTOR, SPECIFIC_HEAT
from schedtui.air.step import OF_A_STREAM, SYMBOL
from schedtui.report.page import (
    CAUTION,
    Block,
    Calculations,
    Entries,
    Entry,
    Heading,
    Page,
    Paragraph,
    Table,
)
from schedtui.review.equipment_stages import equipment
from schedtui.review.figure import known
from schedtui.review.heating import Heating
from schedtui.review.letters import MEANINGS
from schedtui.review.working import Working, site_stage, without_repeats, working
from schedtui.units import (
    AIR_MASS_FLOW,
    AIR_PRESSURE,
    AIRFLOW,
    ELECTRIC_POWER,
    ENTHALPY,
    HUMIDITY_RATIO,
    LOAD,
    MOISTURE_FLOW,
    PERCENT,
    RATIO,
    REFRIGERATION,
    SHAFT_POWER,
    SPECIFIC_VOLUME,
    STATION_PRESSURE,
    STEAM_PRESSURE,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    VELOCITY,
    WATER_FLOW,
    Quantity,
    System,
    format_number,
)

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator, Sequence

    from schedtui.air.step import Number, Step
    from schedtui.review.case import UnitCase
    from schedtui.review.cooling import Cooling
    from schedtui.review.reviewed import UnitReview
    from schedtui.review.stages import Outcome, Stage

# Decimals of a printed result, IP and SI. Every one of them comes out again of the numbers put in.
_DIGITS: Final[dict[Quantity, tuple[int, int]]] = {
    TEMPERATURE: (3, 3),
    TEMPERATURE_DIFFERENCE: (3, 3),
    ABSOLUTE_TEMPERATURE: (3, 3),
    HUMIDITY_RATIO: (6, 6),
    ENTHALPY: (3, 3),
    SPECIFIC_VOLUME: (4, 5),
    STATION_PRESSURE: (5, 4),
    AIRFLOW: (1, 1),
    AIR_MASS_FLOW: (1, 4),
    LOAD: (2, 3),
    MOISTURE_FLOW: (2, 2),
    REFRIGERATION: (3, 3),
    SHAFT_POWER: (3, 3),
    AIR_PRESSURE: (3, 1),
    RATIO: (4, 4),
    PERCENT: (2, 2),
    WATER_FLOW: (2, 3),
    STEAM_PRESSURE: (2, 2),
    ELECTRIC_POWER: (2, 2),
    VELOCITY: (1, 3),
    DENSITY: (4, 5),
    SPECIFIC_HEAT: (4, 4),
    HEAT_FACTOR: (2, 4),
}
_SYMBOL: Final = re.compile(SYMBOL.pattern.replace("Δ", "Δρ"))  # a density is no stream's
_MORE = 3  # decimals that a number put in has beyond those of a result
_SIGNIFICANT = 8  # figures that it has at least, where it is small

_BESIDE: Final = "water, power and fans, as the row states them"
_HOW: Final = (
    "Below each result stand the formula and the numbers put in, which carry more digits than the "
    "results do: with them a calculator comes to the result printed. Numbers in brackets name the "
    "sources at the end."
)


def unit_working_page(reviewed: UnitReview) -> Page:
    """Return the working of a unit at every condition, the governing ones first."""
    case = reviewed.case
    governing = known(lambda: case.governing), known(lambda: case.heat_governing)
    ordered = sorted(case.evaluations, key=lambda at: at not in governing)
    return Page((*_unit_blocks(reviewed, ordered), Paragraph(CAUTION)))


def working_page(units: Sequence[UnitReview], condition: str | None, title: str) -> Page:
    """Return the working of units at a condition, or at all of theirs: cooling, then heating.

    Args:
        units: the units' reviews.
        condition: name of the condition; None for all.
        title: the page's heading.
    """
    blocks: list[Block] = [Heading(title, 1)]
    for reviewed in units:
        evaluations = [
            at for at in reviewed.case.evaluations if condition is None or at.name == condition
        ]
        blocks += _unit_blocks(reviewed, evaluations)
    return Page((*blocks, Paragraph(CAUTION)))


def _unit_blocks(reviewed: UnitReview, evaluations: Sequence[Cooling | Heating]) -> Iterator[Block]:
    """Yield a unit's working at some of its conditions, with its symbols and sources."""
    case = reviewed.case
    system = case.site.system
    sources: dict[str, int] = {}
    yield Heading(f"{reviewed.label}: working", 2)
    if not evaluations:
        yield Paragraph("No condition applies.")
        return
    yield Paragraph(_HOW)
    site = site_stage(case)
    yield from _stage(site, system, sources)
    ordered = sorted(evaluations, key=lambda at: isinstance(at, Heating))
    workings = without_repeats([working(at) for at in ordered])
    for at, found in zip(ordered, workings, strict=True):
        yield Heading(f"{reviewed.label} at {at.name}{_role(case, at)}", 2)
        yield from _condition(found, at, case, sources)
    beside, outcomes = equipment(case)
    if beside:
        yield Heading(f"{reviewed.label}: {_BESIDE}", 2)
        for stage in beside:
            yield from _stage(stage, system, sources)
        yield from _outcomes(outcomes, "Computed", "Scheduled", "Off by %", system)
    stages = (site, *(s for w in workings for s in w.stages), *beside)
    yield from _legend([step for one in stages for step in one.steps], system)
    yield from _sources(sources)


def _role(case: UnitCase, at: Cooling | Heating) -> str:
    roles: tuple[tuple[str, Callable[[], object]], ...] = (
        ("governing", lambda: case.governing),
        ("governing", lambda: case.heat_governing),
        ("rated", lambda: case.rated),
    )
    said = [word for word, ask in roles if known(ask) is at]
    return f" ({' and '.join(said)})" if said else ""


def _condition(
    found: Working, at: Cooling | Heating, case: UnitCase, sources: dict[str, int]
) -> Iterator[Block]:
    system = case.site.system
    for stage in found.stages:
        yield from _stage(stage, system, sources)
    if not found.outcomes:
        return
    yield from _outcomes(found.outcomes, "Required", "Provided", "Margin %", system)
    rated = known(lambda: case.rated)
    if rated is not None and rated.name != found.condition and not isinstance(at, Heating):
        yield Paragraph(f"Sensible capacity is judged at the rated condition, {rated.name}.")


def _outcomes(
    outcomes: Sequence[Outcome], one: str, other: str, off: str, system: System
) -> Iterator[Block]:
    """Yield what is required or computed, under `one`, beside what there is, under `other`."""
    if not outcomes:
        return
    yield Heading(f"{one} and {other.lower()}", 3)
    rows = tuple(
        (
            found.label,
            _or_dash(found.required, found.quantity.digits(system)),
            _or_dash(found.provided, found.quantity.digits(system)),
            found.quantity.unit(system),
            _or_dash(found.margin, 1),
        )
        for found in outcomes
    )
    yield Table(("Figure", one, other, "Unit", off), rows, frozenset({1, 2, 4}))


def _stage(stage: Stage, system: System, sources: dict[str, int]) -> Iterator[Block]:
    yield Heading(stage.title, 3)
    for text in stage.words:
        yield Paragraph(text)
    if stage.given:
        numbers = ", ".join(
            f"{symbol} = {put_in(value, of, system)} {of.unit(system)}".rstrip()
            for symbol, value, of in stage.given
        )
        same = f"The same as: {stage.same_as.lower()}. " if stage.same_as else ""
        yield Paragraph(f"{same}{numbers}")
    if stage.steps:
        yield Calculations(tuple(_entry(step, system, sources) for step in stage.steps))


def _entry(step: Step, system: System, sources: dict[str, int]) -> Entry:
    """Return a step: its result and name, the formula, the numbers in the symbols' places."""
    note = sources.setdefault(step.source, len(sources) + 1)
    value = result(step.result, step.quantity, system)
    amount = f"{value} {step.quantity.unit(system)}".rstrip()
    head = f"{amount}   {step.name} [{note}]"
    _, _, right = step.formula.partition(" = ")
    lines = [f"= {right}" if step.numbers else step.formula]
    if step.numbers:
        lines.append(f"= {_filled(right, step.numbers, system)}")
    return Entry(step.symbol, head, tuple(lines))


def _filled(formula: str, numbers: tuple[Number, ...], system: System) -> str:
    """Return a formula with its numbers in the place of their symbols."""
    texts = {symbol: put_in(value, quantity, system) for symbol, value, quantity in numbers}
    in_brackets = {
        symbol: f"({text})" if text.startswith("−") else text for symbol, text in texts.items()
    }
    return _SYMBOL.sub(lambda match: in_brackets.get(match[0], match[0]), formula)


def result(value: float, quantity: Quantity, system: System) -> str:
    """Return a result as printed.

    >>> result(31.44836, ENTHALPY, "IP")
    '31.448'
    """
    return _signed(format_number(value, _decimals(quantity, system)))


def put_in(value: float, quantity: Quantity, system: System) -> str:
    """Return a number that goes into a formula, without the zeros that say nothing.

    >>> put_in(31.448361234, ENTHALPY, "IP"), put_in(9440.0, AIRFLOW, "IP")
    ('31.448361', '9440')
    """
    places = _decimals(quantity, system) + _MORE
    if value:
        places = max(places, _SIGNIFICANT - 1 - math.floor(math.log10(abs(value))))
    text = format_number(value, places)
    return _signed(text.rstrip("0").rstrip(".") if "." in text else text)


def _decimals(quantity: Quantity, system: System) -> int:
    ip, si = _DIGITS.get(quantity, (quantity.digits_ip, quantity.digits_si))
    return ip if system == "IP" else si


def _signed(text: str) -> str:
    return text.replace("-", "−")


def _or_dash(value: float | None, digits: int) -> str:
    return "-" if value is None else _signed(format_number(value, digits))


def _legend(steps: Sequence[Step], system: System) -> Iterator[Block]:
    """Yield what the symbols and subscripts of some steps mean."""
    letters: dict[str, tuple[str, str]] = {}
    subscripts: set[str] = set()
    for step in steps:
        for symbol, _, quantity in ((step.symbol, 0.0, step.quantity), *step.numbers):
            letter, _, subscript = symbol.partition("_")
            name, unit = _LETTERS.get(letter, quantity.name), quantity.unit(system)
            if letters.setdefault(letter, (name, unit))[1] != unit:
                letters[symbol] = (quantity.name, unit)  # one letter, and another quantity
            if letter in OF_A_STREAM and symbol != "m_w":
                subscripts.add(subscript)
    if not letters:
        return
    yield Heading("Symbols", 3)
    yield Table(
        ("Symbol", "What it is", "Unit"),
        tuple((letter, name, unit) for letter, (name, unit) in sorted(letters.items())),
    )
    meant = ", ".join(f"{one} {MEANINGS[one]}" for one in MEANINGS if one in subscripts)
    yield Paragraph(f"Subscripts: {meant}.")


_LETTERS: Final = {
    "t": "dry bulb",
    "wb": "wet bulb",
    "dp": "dew point",
    "RH": "relative humidity",
    "q": "heat, load",
    "p": "pressure",
    "x": "share",
    "ε": "effectiveness",
    "η": "efficiency",
    "m": "mass flow of dry air",
    "c": "specific heat, c_p",
    "K": "heat factor of a fluid",
    "V": "velocity",
    "G": "share of glycol",
    "B": "bypass, as stated",
    "L": "part of the design load",
    "SHR": "sensible heat ratio",
    "BF": "bypass factor",
}


def _sources(sources: dict[str, int]) -> Iterator[Block]:
    if sources:
        yield Heading("Sources", 3)
        yield Entries(tuple(Entry(f"[{number}]", source) for source, number in sources.items()))
