"""The pages of one unit: its findings, and the states of its air."""

from __future__ import annotations

from dataclasses import replace
from functools import partial
from typing import TYPE_CHECKING, TypeVar

from schedtui.errors import Absent, AirError
from schedtui.report.findings import finding_entries
from schedtui.report.page import Block, Entries, Entry, Heading, Page, Paragraph, Table
from schedtui.review.accept import is_of
from schedtui.review.cooling import Cooling
from schedtui.review.figure import known
from schedtui.review.finding import Severity
from schedtui.review.quantities import (
    COOLING_FIGURES,
    COOLING_STATES,
    HEATING_FIGURES,
    HEATING_STATES,
)
from schedtui.review.remedy import remedies_by_check
from schedtui.schedule.catalogue.accepted import Accepted
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
    from collections.abc import Callable, Iterable, Iterator

    from schedtui.air.state import State
    from schedtui.review.airpath import AirPath
    from schedtui.review.finding import Finding
    from schedtui.review.quantities import Figure
    from schedtui.review.reviewed import UnitReview
    from schedtui.schedule.view import Schedule

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


def read_together(findings: Iterable[Finding]) -> tuple[tuple[Finding, ...], ...]:
    """Return findings as they are read, an entry each: what is missing for one reason is one."""
    entries: dict[tuple[str, bool, int], tuple[Finding, ...]] = {}
    for place, one in enumerate(findings):
        apart = -1 if one.severity is Severity.MISSING else place
        alike = (one.message, one.accepted, apart)
        entries[alike] = (*entries.get(alike, ()), one)
    return tuple(entries.values())


def unit_findings_page(reviewed: UnitReview, schedule: Schedule | None = None) -> Page:
    """Return what was found in a unit, worst first, in the entries of `read_together`.

    Args:
        reviewed: the unit.
        schedule: the schedule as it is now, for who has accepted what and why; left out without.
    """
    heading = Heading(f"{reviewed.label}: {reviewed.status}", 2)
    bad = [f"{key} {cell.text!r} {cell.problem}" for key, cell in reviewed.unit.own.items()
           if cell.bad]  # fmt: skip
    blocks: list[Block] = [heading, *(Paragraph(text) for text in bad)]
    if reviewed.findings:
        together = read_together(reviewed.findings)
        blocks.append(Entries(tuple(_entry(reviewed, ones, schedule) for ones in together)))
    elif not bad:
        blocks.append(Paragraph("Nothing found."))
    return Page(tuple(blocks))


def _entry(reviewed: UnitReview, findings: tuple[Finding, ...], schedule: Schedule | None) -> Entry:
    """Return one entry of a unit's findings; what is accepted says by whom and needs no remedy."""
    first = findings[0]
    cures = {} if first.accepted else remedies_by_check(reviewed)
    (entry,) = finding_entries(
        findings, lambda one: one.severity.word, lambda one: cures.get(one.check)
    ).entries
    if schedule is None or not first.accepted:
        return entry
    return replace(entry, lines=(*entry.lines, *_who_and_why(first, schedule)))


def _who_and_why(finding: Finding, schedule: Schedule) -> Iterator[str]:
    """Say who has accepted a finding of a unit, when and why."""
    for row in schedule.document.row("unit", finding.subject.row_id).accepted:
        accepted = Accepted(row.row_id, schedule.system, row.cells)
        if is_of(accepted, finding):
            by = f" by {accepted.by}" if accepted.by else ""
            on = f" on {accepted.on}" if accepted.on else ""
            yield f"Accepted{by}{on}: {accepted.reason or 'no reason given'}"


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
