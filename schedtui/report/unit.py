"""The pages of one unit: its findings, and the states of its air."""

from __future__ import annotations

from functools import partial
from typing import TYPE_CHECKING, TypeVar

from schedtui.errors import Absent, AirError
from schedtui.report.findings import finding_entries
from schedtui.report.page import Block, Heading, Page, Paragraph, Table
from schedtui.review.cooling import Cooling
from schedtui.review.figure import known
from schedtui.review.quantities import (
    COOLING_FIGURES,
    COOLING_STATES,
    HEATING_FIGURES,
    HEATING_STATES,
)
from schedtui.review.remedy import remedies_by_check
from schedtui.units import (
    ENTHALPY,
    HUMIDITY_RATIO,
    PERCENT,
    SPECIFIC_VOLUME,
    TEMPERATURE,
    Quantity,
    format_number,
)

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator

    from schedtui.air.state import State
    from schedtui.review.airpath import AirPath
    from schedtui.review.quantities import Figure
    from schedtui.review.reviewed import UnitReview

A = TypeVar("A", bound="AirPath")

_PROPERTIES: tuple[tuple[str, str, Quantity], ...] = (
    ("db", "DB", TEMPERATURE),
    ("wb", "WB", TEMPERATURE),
    ("dp", "DP", TEMPERATURE),
    ("rh", "RH", PERCENT),
    ("w", "W", HUMIDITY_RATIO),
    ("h", "h", ENTHALPY),
    ("v", "v", SPECIFIC_VOLUME),
)


def unit_findings_page(reviewed: UnitReview) -> Page:
    """Return what was found in a unit, worst first."""
    heading = Heading(f"{reviewed.label}: {reviewed.status}", 2)
    bad = [f"{key} {cell.text!r} {cell.problem}" for key, cell in reviewed.unit.own.items()
           if cell.bad]  # fmt: skip
    blocks: list[Block] = [heading, *(Paragraph(text) for text in bad)]
    if reviewed.findings:
        cures = remedies_by_check(reviewed)
        blocks.append(
            finding_entries(
                reviewed.findings, lambda one: one.severity.word, lambda one: cures.get(one.check)
            )
        )
    elif not bad:
        blocks.append(Paragraph("Nothing found."))
    return Page(tuple(blocks))


def unit_air_page(reviewed: UnitReview) -> Page:
    """Return the states of a unit's air and its figures, condition by condition."""
    case = reviewed.case
    governing = (known(lambda: case.governing), known(lambda: case.heat_governing))
    blocks: list[Block] = []
    if not case.evaluations:
        blocks.append(Paragraph(f"{reviewed.label}: no condition applies."))
    for at in case.evaluations:
        governs = ", governing" if at in governing else ""
        blocks.append(Heading(f"{reviewed.label} at {at.name}{governs}", 2))
        if isinstance(at, Cooling):
            blocks += _at_condition(at, COOLING_STATES, COOLING_FIGURES)
            blocks += _without_load(partial(getattr, at, "coil"))
        else:
            blocks += _at_condition(at, HEATING_STATES, HEATING_FIGURES)
    return Page(tuple(blocks))


def _at_condition(
    at: A, states: tuple[tuple[str, str], ...], figures: tuple[Figure[A], ...]
) -> Iterator[Block]:
    system = at.site.system
    rows = tuple(_state_rows(at, states))
    if rows:
        headings = tuple(f"{short} {quantity.unit(system)}" for _, short, quantity in _PROPERTIES)
        yield Table(("Air", *headings), rows, frozenset(range(1, len(headings) + 1)))
    found = tuple(
        (figure.label, format_number(value, figure.quantity.digits(system)),
         figure.quantity.unit(system), figure.of)
        for figure in figures
        if (value := known(figure.get, at)) is not None
    )  # fmt: skip
    if found:
        yield Table(("Figure", "Value", "Unit", "From"), found, frozenset({1}))


def _without_load(ask: Callable[[], object]) -> Iterator[Block]:
    """Say why there is no coil load, where there is none."""
    try:
        ask()
    except Absent as absent:
        yield Paragraph(f"No coil load: {absent}.")


def _state_rows(at: AirPath, states: tuple[tuple[str, str], ...]) -> Iterator[tuple[str, ...]]:
    for name, attribute in states:
        state = known(getattr, at, attribute)
        if state is not None:
            yield (name.replace("_", " "), *_property_texts(state))


def _property_texts(state: State) -> Iterator[str]:
    for key, _, quantity in _PROPERTIES:
        try:
            value = getattr(state, key)
        except AirError:
            yield "-"
        else:
            yield format_number(value, quantity.digits(state.air.system))
