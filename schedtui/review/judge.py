"""The judge: runs the checks over a case and makes findings of their faults.

Alone in calling checks. Turns an absent figure into one `missing` finding where someone would
expect the check, names what each finding is about, and puts the numbers into its sentence.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from schedtui.errors import Absent
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Finding, Measure, Severity, Subject, margin
from schedtui.review.registry import registered
from schedtui.schedule.catalogue.condition import Condition
from schedtui.schedule.catalogue.project import Project
from schedtui.schedule.load import CATALOGUES, NAMES

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator

    from schedtui.review.case import ConditionCase, ScheduleCase, UnitCase
    from schedtui.review.check import Check, Faults
    from schedtui.review.cooling import Cooling
    from schedtui.schedule.catalogue.table import Table
    from schedtui.units import System


@dataclass(slots=True)
class _Found:
    """What one check gave over everything it was asked about."""

    faults: list[tuple[str | None, Fault]] = field(default_factory=list)
    absences: list[Absent] = field(default_factory=list)

    def ask(self, condition: str | None, find: Callable[[], Faults]) -> None:
        """Gather the faults of one call, or what it missed."""
        try:
            self.faults += [(condition, fault) for fault in find()]
        except Absent as absent:
            self.absences.append(absent)


def judge_unit(case: UnitCase, label: str) -> tuple[Finding, ...]:
    """Return the findings of a unit, worst first.

    Args:
        case: the unit with its evaluations.
        label: how messages name it.
    """
    subject = Subject("unit", case.unit.row_id, label)
    found: list[Finding] = []
    for name, check in registered().items():
        asked = _ask_about_unit(check, case)
        found += [
            _finding(name, check, subject, fault, case.unit, condition)
            for condition, fault in asked.faults
        ]
        if asked.absences and any(case.unit.stated(key) for key in check.judges):
            found.append(_missing(name, subject, case.unit, asked.absences))
    return _worst_first(found)


def judge_condition(case: ConditionCase) -> tuple[Finding, ...]:
    """Return the findings of a condition by itself, worst first."""
    row = case.condition
    subject = Subject("condition", row.row_id, f"condition {row.name}")
    found = [
        _finding(name, check, subject, fault, row, row.name)
        for name, check in registered().items()
        if check.condition is not None
        for fault in check.condition(case)
    ]
    return _worst_first(found)


def judge_schedule(case: ScheduleCase, labels: dict[int, str]) -> tuple[Finding, ...]:
    """Return the findings that only the whole schedule shows, worst first.

    Args:
        case: the schedule.
        labels: how messages name each unit, by row id.
    """
    found = [
        _finding(name, check, *_subject(case, fault, labels), None)
        for name, check in registered().items()
        if check.schedule is not None
        for fault in check.schedule(case)
    ]
    return _worst_first(found)


def _ask_about_unit(check: Check, case: UnitCase) -> _Found:
    found = _Found()
    if check.unit is not None:
        in_unit = check.unit
        found.ask(None, lambda: in_unit(case))
    if check.cooling is not None:
        at_each = check.cooling
        if not case.cooling:
            found.absences.append(Absent(why="no cooling condition applies"))
        for at in _governing_first(case):
            found.ask(at.name, lambda at=at: at_each(at))  # type: ignore[misc]
    if check.rated is not None:
        at_rated = check.rated
        rated = known(lambda: case.rated)
        found.ask(rated.name if rated else None, lambda: at_rated(case.rated))
    return found


def _governing_first(case: UnitCase) -> Iterator[Cooling]:
    governing = known(lambda: case.governing)
    if governing is not None:
        yield governing
    yield from (at for at in case.cooling if at is not governing)


def _subject(
    case: ScheduleCase, fault: Fault, labels: dict[int, str]
) -> tuple[Subject, Fault, Table]:
    """Return what a fault of the whole schedule is about, with the row that it stands in."""
    schedule = case.schedule
    table, row_id = fault.about or ("file", 0)
    row: Table = schedule.project
    label = table
    if table == "unit":
        label = labels[row_id]
        row = next(unit for unit in schedule.units if unit.row_id == row_id)
    elif table in NAMES:
        typed = schedule.document.row(table, row_id)
        label = f"{table} {typed.text(NAMES[table])}"
        row = CATALOGUES[table](row_id, schedule.system, typed.cells)
    return Subject(table, row_id, label), fault, row


def _finding(
    name: str, check: Check, subject: Subject, fault: Fault, row: Table, condition: str | None
) -> Finding:
    system = row.system
    between = None
    if fault.scheduled is not None and fault.required is not None:
        between = margin(fault.scheduled, fault.required)
    return Finding(
        check=name,
        severity=fault.severity or check.severity,
        subject=subject,
        fields=fault.fields,
        message=fault.says.format_map(_words(fault, row)),
        condition=condition,
        scheduled=fault.scheduled,
        required=fault.required,
        margin=between,
        unit=fault.quantity.unit(system) if fault.quantity else "",
    )


def _words(fault: Fault, row: Table) -> dict[str, str]:
    """Return the words that a fault's sentence has places for."""
    system = row.system
    words = {
        key: value.text(system) if isinstance(value, Measure) else value
        for key, value in fault.values.items()
    }
    if fault.quantity is not None and fault.scheduled is not None:
        words["scheduled"] = _as_typed(fault, row, system)
    if fault.quantity is not None and fault.required is not None:
        words["required"] = Measure(fault.required, fault.quantity).text(system)
    return words


def _as_typed(fault: Fault, row: Table, system: System) -> str:
    """Return the scheduled number with the digits that stand in the schedule, if they do."""
    assert fault.quantity is not None  # noqa: S101  the caller has looked
    assert fault.scheduled is not None  # noqa: S101
    cell = row.typed(fault.fields[0])
    if cell is not None and cell.value == fault.scheduled:
        return f"{cell.text} {fault.quantity.unit(system)}".rstrip()
    return Measure(fault.scheduled, fault.quantity).text(system)


def _missing(name: str, subject: Subject, row: Table, absences: list[Absent]) -> Finding:
    """Return the one finding that says what a check went without."""
    keys = tuple(dict.fromkeys(key for absent in absences for key in absent.keys))
    reasons = dict.fromkeys(absent.why for absent in absences if absent.why)
    needed = [_label(row, key) for key in keys if not any(key in why for why in reasons)]
    if needed:
        reasons[f"needs {', '.join(needed)}"] = None
    return Finding(
        check=name,
        severity=Severity.MISSING,
        subject=subject,
        fields=keys,
        message=f"not judged: {'; '.join(reasons)}",
    )


def _label(row: Table, key: str) -> str:
    for catalogue in (row.catalogue, Condition.catalogue, Project.catalogue):
        if key in catalogue:
            return f"{catalogue[key].label.lower()} ({key})"
    return key


def _worst_first(found: list[Finding]) -> tuple[Finding, ...]:
    return tuple(sorted(found, key=lambda finding: -finding.severity))
