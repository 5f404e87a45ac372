"""The page of a check: what was found, worst first, and each unit in one line."""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.report.page import (
    CAUTION,
    Block,
    Entries,
    Entry,
    Heading,
    Page,
    Paragraph,
    Table,
)
from schedtui.review.figure import known
from schedtui.review.finding import WORST_FIRST, Finding, Measure, Severity
from schedtui.review.quantities import COLUMNS
from schedtui.review.remedy import plant_remedies, remedies_by_check
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import ALTITUDE, LOAD, STATION_PRESSURE, format_number

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable, Iterator

    from schedtui.review.remedy import Remedy
    from schedtui.review.reviewed import Review, UnitReview

    Cures = Callable[[Finding], tuple[Remedy, ...] | None]

# Computed columns of the summary, with headings short enough for 80 columns.
_IN_SUMMARY = {
    "total_required": "Required",
    "total_margin": "Margin %",
    "tons_required": "Tons",
    "shr": "SHR",
}
_NOTHING = "-"


def findings_page(review: Review, file: str) -> Page:
    """Return the page of a review.

    Args:
        review: the review.
        file: the file's name as the person gave it.
    """
    project = review.schedule.project
    blocks: list[Block] = [
        Heading(f"{project.title or 'No title'} ({file})", 1),
        Paragraph(f"{site_line(review)}. {_sizes(review)}."),
        Paragraph(counts_line(review)),
    ]
    for severity in WORST_FIRST:
        found = [one for one in review.all_findings if one.severity == severity]
        if found:
            blocks.append(Heading(f"{severity.word.capitalize()} ({len(found)})"))
            cures = _cures(review) if severity is Severity.SHORT else _no_cures
            blocks.append(finding_entries(found, lambda one: one.subject.label, cures))
    if review.units:
        load = LOAD.unit(review.schedule.system)
        blocks += [
            Heading(f"Units: cooling total in {load}, at the governing condition"),
            _summary(review),
        ]
    return Page((*blocks, Paragraph(CAUTION)))


def site_line(review: Review) -> str:
    """Say the unit system, the site's pressure and what airflows mean."""
    system, project = review.schedule.system, review.schedule.project
    pressure = Measure(review.site.air.pressure, STATION_PRESSURE).text(system)
    where = f"station pressure {pressure}"
    if project.pressure is None:
        where = f"{_altitude(review)} above sea level ({pressure})"
    basis = "" if project.stated("airflow_basis") else ", by default"
    return f"{system} units, {where}, airflows {project.airflow_basis}{basis}"


def short_site(review: Review) -> str:
    """Say the same in as few words as it takes."""
    system, project = review.schedule.system, review.schedule.project
    pressure = Measure(review.site.air.pressure, STATION_PRESSURE).text(system)
    where = _altitude(review) if project.pressure is None else pressure
    return f"{system}  {where}  {project.airflow_basis} air"


def _altitude(review: Review) -> str:
    altitude = review.schedule.project.altitude or 0.0
    return Measure(altitude, ALTITUDE).text(review.schedule.system)


def counts_line(review: Review) -> str:
    """Say how much was found, by severity."""
    counts = review.counts()
    words = [f"{counts[severity.word]} {severity.word}" for severity in WORST_FIRST]
    words += [f"{_number(counts['clear'], 'unit')} clear", f"{counts['accepted']} accepted"]
    if counts["rounding"]:
        words.append(f"{counts['rounding']} of the cautions within the printed digits")
    return ", ".join(words)


def short_counts(review: Review) -> str:
    """Say what was found by severity, in as few words as it takes."""
    counts = review.counts()
    words = [
        f"{counts[severity.word]} {severity.word}"
        for severity in WORST_FIRST
        if counts[severity.word]
    ]
    return "  ".join(words) or "all clear"


def _number(count: int, noun: str) -> str:
    return f"{count} {noun}{'' if count == 1 else 's'}"


def _sizes(review: Review) -> str:
    units = _number(len(review.units), "unit")
    return f"{units}, {_number(len(review.schedule.conditions), 'condition')}"


def _no_cures(finding: Finding) -> None:  # noqa: ARG001  a finding that is not short has none
    return None


def _cures(review: Review) -> Cures:
    """Return what tells the remedies of a short finding, of a unit or of a plant."""
    plants = {one.case.plant.row_id: one for one in review.plants}

    def cures(finding: Finding) -> tuple[Remedy, ...]:
        row_id = finding.subject.row_id
        if finding.subject.table == "plant":
            return plant_remedies(plants[row_id], finding)
        return remedies_by_check(review.units[row_id]).get(finding.check, ())

    return cures


def remedy_lines(finding: Finding, cures: tuple[Remedy, ...] | None) -> tuple[str, ...]:
    """Say what would clear a finding, a line each."""
    if cures is None or finding.severity is not Severity.SHORT:
        return ()
    if not cures:
        return ("No one number clears this, nor two together.",)
    return tuple(map(_remedy_line, cures))


def _remedy_line(remedy: Remedy) -> str:
    changes = " with ".join(f"{one.field} {one.text} {one.unit}" for one in remedy.changes)
    after = f"; then {', '.join(remedy.worsens)}" if remedy.worsens else ""
    return f"Cleared by {changes}{after}."


def finding_entries(
    findings: Iterable[Finding], label: Callable[[Finding], str], cures: Cures = _no_cures
) -> Entries:
    """Return findings as a list; what could not be judged for one and the same reason is one entry.

    Args:
        findings: the findings, in the order they are read.
        label: what stands before each: what it is about, or how bad it is.
        cures: tells the remedies of a short finding.
    """
    entries: dict[tuple[str, str, str], Entry] = {}
    for place, finding in enumerate(findings):
        apart = "" if finding.severity is Severity.MISSING else str(place)
        alike = (label(finding), finding.message, apart)
        before = entries.get(alike)
        head = f"{before.head}, {finding.check}" if before else _head(finding)
        lines = (finding.message, *remedy_lines(finding, cures(finding)))
        entries[alike] = Entry(label(finding), head, lines)
    return Entries(tuple(entries.values()))


# A difference of these in percent says nothing: 44.5 °F is not "−1212 %" of −4 °F.
_NO_RATIOS = ("°F", "°C", "K", "%")


def _apart(finding: Finding) -> str:
    """Say how far scheduled and required are apart: in percent, or in the unit of a scale."""
    scheduled, required = finding.scheduled, finding.required
    if finding.unit in _NO_RATIOS and scheduled is not None and required is not None:
        return f"{scheduled - required:+.1f} {finding.unit}"
    return f"{finding.margin:+.1f} %"


def _head(finding: Finding) -> str:
    head = finding.check
    if finding.condition and finding.subject.table == "unit":
        head += f" at {finding.condition}"
    if finding.margin is not None:
        head += f", {_apart(finding)}"
    return f"{head} (accepted)" if finding.accepted else head


def _summary(review: Review) -> Table:
    """Return one line a unit: what it is scheduled for and what it needs."""
    headings = ("Tag", "Status", "Governing", "Scheduled", *_IN_SUMMARY.values())
    rows = tuple(tuple(_unit_cells(unit)) for unit in review.units.values())
    return Table(headings, rows, frozenset(range(3, len(headings))))


def _unit_cells(reviewed: UnitReview) -> Iterator[str]:
    case = reviewed.case
    governing = known(lambda: case.governing)
    yield reviewed.label
    yield reviewed.status
    yield governing.name if governing else _NOTHING
    cell = reviewed.unit.typed(Unit.cool_total.key)
    yield cell.text if cell else _NOTHING
    columns = {column.key: column for column in COLUMNS}
    for key in _IN_SUMMARY:
        column = columns[key]
        value = known(column.get, case)
        digits = column.quantity.digits(case.site.system)
        yield _NOTHING if value is None else format_number(value, digits)
