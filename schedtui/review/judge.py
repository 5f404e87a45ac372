"""The judge: runs the checks over a case and makes findings of their faults.

Alone in calling checks. Turns an absent figure into one `missing` finding where someone would
expect the check, asks whether the printed digits explain a fault, and names what each finding is
about.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING, TypeVar

from schedtui.errors import Absent, StateError
from schedtui.review.case import ConditionCase, ScheduleCase, UnitCase
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Finding, Severity, Subject, in_order, margin
from schedtui.review.registry import registered
from schedtui.review.rounding import explained_by_digits
from schedtui.review.wording import band, lack, sentence
from schedtui.schedule.load import CATALOGUES, NAMES

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator, Mapping, Sequence

    from schedtui.review.airpath import AirPath
    from schedtui.review.check import Check, Faults
    from schedtui.review.plants import PlantCase
    from schedtui.schedule.catalogue.table import Table
    from schedtui.schedule.catalogue.unit import Unit

A = TypeVar("A", bound="AirPath")


@dataclass(frozen=True, slots=True)
class _Asking:
    """A check asked about one thing.

    Args:
        condition: name of the condition it is asked at, if it is.
        now: asks it about the unit as scheduled.
        of: asks it about another reading of the unit.
    """

    condition: str | None
    now: Callable[[], Faults]
    of: Callable[[Unit], Faults]


def judge_unit(
    case: UnitCase, label: str, bearable: Mapping[str, int] | None = None
) -> tuple[Finding, ...]:
    """Return the findings of a unit, causes first and then worst first.

    Args:
        case: the unit with its evaluations.
        label: how messages name it.
        bearable: for each check a severity that is no news: what cannot be worse is left out,
            digits unasked. None to have every finding.
    """
    subject = Subject("unit", case.unit.row_id, label)
    found: list[Finding] = []
    for name, check in registered().items():
        absences: list[Absent] = []
        for asking in _askings(check, case):
            try:
                faults = list(asking.now())
            except Absent as absent:
                absences.append(absent)
                continue
            except StateError as error:
                absences.append(Absent(why=str(error)))
                continue
            for fault in faults:
                worst = fault.severity or check.severity
                if bearable is None or worst > bearable.get(name, 0):
                    found += _judged(name, check, subject, case, fault, asking)
        if absences and any(case.unit.stated(key) for key in check.judges):
            message, keys = lack(absences, case.unit)
            found.append(Finding(name, Severity.MISSING, subject, keys, message))
    return in_order(found)


def still_found(name: str, case: UnitCase) -> bool:
    """Tell whether a check finds anything in a unit, within the printed digits or not.

    What can no longer be judged counts as found.
    """
    for asking in _askings(registered()[name], case):
        try:
            if any(True for _ in asking.now()):
                return True
        except (Absent, StateError):
            return True
    return False


def judge_condition(case: ConditionCase) -> tuple[Finding, ...]:
    """Return the findings of a condition by itself, worst first."""
    row = case.condition
    subject = Subject("condition", row.row_id, f"condition {row.name}")
    return in_order(
        _finding(name, check, subject, fault, row, row.name)
        for name, check in registered().items()
        if check.condition is not None
        for fault in check.condition(case)
    )


def judge_plant(case: PlantCase) -> tuple[Finding, ...]:
    """Return the findings of a plant, worst first."""
    row = case.plant
    subject = Subject("plant", row.row_id, f"plant {row.name}")
    condition = known(lambda: case.governing)
    found: list[Finding] = []
    for name, check in registered().items():
        if check.plant is None:
            continue
        try:
            faults = list(check.plant(case))
        except Absent as absent:
            if any(map(row.stated, check.judges)):
                message, keys = lack([absent], row)
                found.append(Finding(name, Severity.MISSING, subject, keys, message))
            continue
        found += [_finding(name, check, subject, fault, row, condition) for fault in faults]
    return in_order(found)


def judge_schedule(case: ScheduleCase, labels: dict[int, str]) -> tuple[Finding, ...]:
    """Return the findings that only the whole schedule shows, worst first.

    Args:
        case: the schedule.
        labels: how messages name each unit, by row id.
    """
    return in_order(
        _finding(name, check, *_subject(case, fault, labels), None)
        for name, check in registered().items()
        if check.schedule is not None
        for fault in check.schedule(case)
    )


def _askings(check: Check, case: UnitCase) -> Iterator[_Asking]:
    """Return everything that a check is to be asked about a unit, the governing condition first."""
    if (in_unit := check.unit) is not None:
        yield _Asking(
            None,
            lambda: in_unit(case),
            lambda unit: in_unit(UnitCase(unit, case.schedule, case.site)),
        )
    if check.cooling is not None:
        if not case.cooling:
            yield _absent("no cooling condition applies")
        yield from (
            _at(check.cooling, at) for at in _first(known(lambda: case.governing), case.cooling)
        )
    if check.heating is not None:
        if not case.heating:
            yield _absent("no heating condition applies")
        governing = known(lambda: case.heat_governing)
        yield from (_at(check.heating, at) for at in _first(governing, case.heating))
    if check.rated is not None:
        yield _at_one(check.rated, lambda: case.rated)
    if check.governing is not None:
        yield _at_one(check.governing, lambda: case.governing)


def _at(find: Callable[[A], Faults], at: A) -> _Asking:
    return _Asking(at.name, lambda: find(at), lambda unit: find(at.of(unit)))


def _at_one(find: Callable[[A], Faults], ask: Callable[[], A]) -> _Asking:
    try:
        return _at(find, ask())
    except Absent as absent:
        return _absent(absent.why, *absent.keys)


def _absent(why: str, *keys: str) -> _Asking:
    def missing(*_: object) -> Faults:
        raise Absent(*keys, why=why)

    return _Asking(None, missing, missing)


def _first(governing: A | None, conditions: Sequence[A]) -> Iterator[A]:
    """Return the conditions with the governing one in front."""
    if governing is not None:
        yield governing
    yield from (at for at in conditions if at is not governing)


def _judged(
    name: str, check: Check, subject: Subject, case: UnitCase, fault: Fault, asking: _Asking
) -> Iterator[Finding]:
    """Return the finding of a fault: at full severity, milder within the digits, or none."""
    finding = _finding(name, check, subject, fault, case.unit, asking.condition)
    limits = case.site.limits
    explained = None
    if check.reads_digits:
        explained = explained_by_digits(
            case.unit, fault, asking.of, limits.rounding_cap, check.derived
        )
    if explained is None:
        yield finding
        return
    if finding.severity <= Severity.CAUTION:
        return  # nothing is milder than a caution
    severity = finding.severity if limits.rounding == "strict" else Severity.CAUTION
    message = f"{finding.message}; {band(explained, fault, case.unit)}"
    yield replace(finding, severity=severity, message=message, rounding=True)


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
    between = None
    if fault.scheduled is not None and fault.required is not None:
        between = margin(fault.scheduled, fault.required)
    return Finding(
        check=name,
        severity=fault.severity or check.severity,
        subject=subject,
        fields=fault.fields,
        message=sentence(fault, row),
        condition=condition,
        scheduled=fault.scheduled,
        required=fault.required,
        margin=between,
        unit=fault.quantity.unit(row.system) if fault.quantity else "",
        rank=check.rank,
    )
