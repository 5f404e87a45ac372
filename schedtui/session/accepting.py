"""Accepting findings, and taking an acceptance back, as edits of the document.

Knows nothing of who asks for the reason.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.accept import basis, is_of, of_whom
from schedtui.schedule.catalogue.accepted import Accepted
from schedtui.schedule.document import Row
from schedtui.schedule.edit import DeleteRow, Edit, InsertRow, SetAccepted, Together

if TYPE_CHECKING:
    from collections.abc import Mapping
    from datetime import date

    from schedtui.review.finding import Finding
    from schedtui.schedule.typed import Typed
    from schedtui.schedule.view import Schedule


def acceptance(schedule: Schedule, finding: Finding, by: str, reason: str, on: date) -> Edit:
    """Return the edit that accepts a finding in the numbers as they stand.

    Args:
        schedule: the schedule that it was found in.
        finding: the finding.
        by: initials of who accepts it.
        reason: why.
        on: the day.

    Raises:
        AmountError: the reason is blank, or so are the initials.
    """
    document, subject = schedule.document, finding.subject
    texts = {
        "check": finding.check,
        "condition": finding.condition,
        "by": by,
        "on": on.isoformat(),
        "reason": reason,
        "fields": ", ".join(finding.fields),
        "basis": basis(finding, schedule),
    }
    if subject.table != "unit":
        texts = {"of": of_whom(finding), **texts}
    row = Row(document.next_id, _cells(texts, schedule))
    if subject.table == "unit":
        unit = document.row("unit", subject.row_id)
        return SetAccepted(subject.row_id, (*unit.accepted, row))
    return InsertRow("accepted", row, len(document.rows("accepted")))


def _cells(texts: Mapping[str, str | None], schedule: Schedule) -> dict[str, Typed]:
    return {
        key: Accepted.catalogue[key].kind.enter(text, schedule.system)
        for key, text in texts.items()
        if text is not None
    }


def taken_back(schedule: Schedule, finding: Finding) -> Edit | None:
    """Return the edit that takes back every acceptance of a finding, None where there is none.

    Args:
        schedule: the schedule that it was found in.
        finding: the finding.
    """
    document, subject = schedule.document, finding.subject
    if subject.table == "unit":
        rows = document.row("unit", subject.row_id).accepted
        kept = tuple(row for row in rows if not _accepts(row, finding, schedule))
        return None if len(kept) == len(rows) else SetAccepted(subject.row_id, kept)
    gone = [
        DeleteRow("accepted", row.row_id)
        for row in document.rows("accepted")
        if row.text("of") == of_whom(finding) and _accepts(row, finding, schedule)
    ]
    return Together(tuple(gone)) if gone else None


def _accepts(row: Row, finding: Finding, schedule: Schedule) -> bool:
    return is_of(Accepted(row.row_id, schedule.system, row.cells), finding)
