"""The pages of one unit: its findings, and the states of its air."""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import Absent, AirError
from schedtui.report.findings import finding_entries
from schedtui.report.page import Block, Heading, Page, Paragraph, Table
from schedtui.review.figure import known
from schedtui.review.quantities import COOLING_FIGURES, COOLING_STATES
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
    from collections.abc import Iterator

    from schedtui.air.state import State
    from schedtui.review.cooling import Cooling
    from schedtui.review.reviewed import UnitReview

_PROPERTIES: tuple[tuple[str, str, Quantity], ...] = (
    ("db", "DB", TEMPERATURE),
    ("wb", "WB", TEMPERATURE),
    ("dp", "DP", TEMPERATURE),
    ("rh", "RH", PERCENT),
    ("w", "W", HUMIDITY_RATIO),
    ("h", "h", ENTHALPY),
    ("v", "v", SPECIFIC_VOLUME),
)
_STATE_LABELS = {
    "outdoor": "outdoor",
    "recovered": "recovered",
    "return": "return",
    "mixed": "mixed",
    "coil_entering": "coil entering",
    "coil_leaving": "coil leaving",
    "supply": "supply",
    "room": "room",
}


def unit_findings_page(reviewed: UnitReview) -> Page:
    """Return what was found in a unit, worst first."""
    heading = Heading(f"{reviewed.label}: {reviewed.status}", 2)
    bad = [f"{key} {cell.text!r} {cell.problem}" for key, cell in reviewed.unit.own.items()
           if cell.bad]  # fmt: skip
    blocks: list[Block] = [heading, *(Paragraph(text) for text in bad)]
    if reviewed.findings:
        blocks.append(finding_entries(reviewed.findings, lambda one: one.severity.word))
    elif not bad:
        blocks.append(Paragraph("Nothing found."))
    return Page(tuple(blocks))


def unit_air_page(reviewed: UnitReview) -> Page:
    """Return the states of a unit's air and its figures, condition by condition."""
    case = reviewed.case
    governing = known(lambda: case.governing)
    blocks: list[Block] = []
    if not case.cooling:
        blocks.append(Paragraph(f"{reviewed.label}: no cooling condition applies."))
    for at in case.cooling:
        governs = ", governing" if at is governing else ""
        blocks.append(Heading(f"{reviewed.label} at {at.name}{governs}", 2))
        blocks += _at_condition(at)
    return Page(tuple(blocks))


def _at_condition(at: Cooling) -> Iterator[Block]:
    system = at.site.system
    rows = tuple(_state_rows(at))
    if rows:
        headings = tuple(f"{short} {quantity.unit(system)}" for _, short, quantity in _PROPERTIES)
        yield Table(("Air", *headings), rows, frozenset(range(1, len(headings) + 1)))
    figures = tuple(
        (figure.label, format_number(value, figure.quantity.digits(system)),
         figure.quantity.unit(system), figure.of)
        for figure in COOLING_FIGURES
        if (value := known(figure.get, at)) is not None
    )  # fmt: skip
    if figures:
        yield Table(("Figure", "Value", "Unit", "From"), figures, frozenset({1}))
    try:
        at.coil  # noqa: B018  asked for its absence
    except Absent as absent:
        yield Paragraph(f"No coil load: {absent}.")


def _state_rows(at: Cooling) -> Iterator[tuple[str, ...]]:
    for name, attribute in COOLING_STATES:
        state = known(getattr, at, attribute)
        if state is not None:
            yield (_STATE_LABELS[name], *_property_texts(state))


def _property_texts(state: State) -> Iterator[str]:
    for key, _, quantity in _PROPERTIES:
        try:
            value = getattr(state, key)
        except AirError:
            yield "-"
        else:
            yield format_number(value, quantity.digits(state.air.system))
