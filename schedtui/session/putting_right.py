"""What is done about a unit's findings, a step each: a remedy taken, accepted, taken back.

Names the steps in the trade's words. Knows nothing of who asks, nor how a remedy is found.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.accept import LAPSED, held
from schedtui.schedule.edit import Edit, SetAccepted, SetCell, Together
from schedtui.schedule.view import view
from schedtui.session import naming
from schedtui.session.accepting import acceptance, taken_back

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence
    from datetime import date

    from schedtui.review.finding import Finding
    from schedtui.review.remedy import Remedy
    from schedtui.schedule.view import Schedule
    from schedtui.session.session import Session


def put_right(session: Session, finding: Finding, remedy: Remedy) -> frozenset[int]:
    """Schedule the numbers of a remedy, as one step.

    Args:
        session: the schedule.
        finding: what the remedy clears, a finding of a unit.
        remedy: the remedy.

    Returns:
        Row ids of the units whose review is another now.

    Raises:
        AmountError: a number cannot be accepted; nothing is changed then.
    """
    row_id = finding.subject.row_id
    reviewed = session.review.units[row_id]
    edits: list[Edit] = []
    names: list[str] = []
    for change in remedy.changes:
        label = session.field("unit", change.field).label
        cell = session.entered("unit", change.field, change.text)
        before = reviewed.unit.typed(change.field)
        names.append(naming.set_cell(reviewed.label if not names else "", label, before, cell))
        edits.append(SetCell("unit", row_id, change.field, cell))
    name = f"{','.join(names)} (clears {finding.check})"
    return session.do(edits[0] if len(edits) == 1 else Together(tuple(edits)), name)


def accept(
    session: Session, findings: Sequence[Finding], by: str, reason: str, on: date
) -> frozenset[int]:
    """Accept findings of a unit in the numbers as they stand, as one step.

    What was accepted of them in other numbers goes: this takes its place.

    Args:
        session: the schedule.
        findings: the findings.
        by: initials of who accepts them.
        reason: why.
        on: the day.

    Returns:
        Row ids of the units whose review is another now.

    Raises:
        AmountError: the reason is blank, or so are the initials.
    """

    def accepting(now: Schedule, finding: Finding) -> Edit:
        gone = Together(tuple(filter(None, (taken_back(now, finding),))))
        then = view(gone.apply(now.document)[0], now)
        return Together((*gone.edits, acceptance(then, finding, by, reason, on)))

    edit = _one_after_the_other(session.schedule, findings, accepting)
    return session.do(edit, f"{told(findings)} accepted")


def take_back(session: Session, findings: Sequence[Finding]) -> frozenset[int]:
    """Take back the acceptance of findings of a unit, a lapsed one included, as one step.

    Args:
        session: the schedule.
        findings: findings that are accepted, or that say that an acceptance has lapsed.

    Returns:
        Row ids of the units whose review is another now; none where nothing was accepted.
    """
    lapsed = [one for one in findings if one.check == LAPSED]
    edit: Edit = (
        _without_lapsed(session, lapsed[0])
        if lapsed
        else _one_after_the_other(session.schedule, findings, taken_back)
    )
    if not edit.touches():
        return frozenset()
    what = "lapsed acceptance taken out" if lapsed else "no longer accepted"
    name = findings[0].subject.label if lapsed else told(findings)
    return session.do(edit, f"{name} {what}")


def told(findings: Sequence[Finding]) -> str:
    """Name findings of one unit: the unit, the checks, the condition."""
    first = findings[0]
    checks = ", ".join(dict.fromkeys(one.check for one in findings))
    at = f" at {first.condition}" if first.condition else ""
    return f"{first.subject.label} {checks}{at}"


def _one_after_the_other(
    schedule: Schedule,
    findings: Sequence[Finding],
    edit_of: Callable[[Schedule, Finding], Edit | None],
) -> Together:
    """Return edits as one, each made for the schedule that those before it leave."""
    edits: list[Edit] = []
    for finding in findings:
        edit = edit_of(schedule, finding)
        if edit is not None:
            edits.append(edit)
            schedule = view(edit.apply(schedule.document)[0], schedule)
    return Together(tuple(edits))


def _without_lapsed(session: Session, finding: Finding) -> Edit:
    """Return the edit that takes out the acceptances whose lapse a finding tells of."""
    subject, schedule = finding.subject, session.schedule
    found = [one for one in session.review.units[subject.row_id].findings if one.check != LAPSED]
    rows = schedule.document.row("unit", subject.row_id).accepted
    kept = tuple(
        row
        for row in rows
        if all(one.message != finding.message for one in held((row,), found, schedule, subject)[1])
    )
    return SetAccepted(subject.row_id, kept)
