"""What the hint line says about the cell under the cursor, and about an edit in it.

Pure texts. Must not know of widgets.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.registry import registered
from schedtui.screen.looks import Look, sign_of

if TYPE_CHECKING:
    from collections.abc import Sequence

    from schedtui.review.finding import Finding
    from schedtui.review.quantities import ComputedColumn
    from schedtui.review.remedy import Remedy
    from schedtui.review.reviewed import UnitReview
    from schedtui.schedule.catalogue.field import Field
    from schedtui.screen.painter import Cell
    from schedtui.units import System

    AnyField = Field[object] | Field[str | None]

_MARKS = {
    "unreadable": "a cell cannot be read",
    "short": "too small for what is required",
    "conflict": "contradicts itself, another row, or physics",
    "caution": "outside customary practice",
    "missing": "something could not be judged",
    "clear": "nothing found",
}
_BLAMED = {Look.BLAMED, Look.CAUTION, Look.WANTED}


def about_mark(reviewed: UnitReview) -> str:
    """Say what a row's mark means."""
    return f"{reviewed.label} is {reviewed.status}: {_MARKS[reviewed.status]}"


def about_computed(column: ComputedColumn, cell: Cell) -> str:
    """Say what a computed cell is computed from."""
    falls = " falls short," if cell.look is Look.FALLS_SHORT else ""
    return f"{sign_of(cell.look)} {column.label}:{falls} computed from {column.of}"


def about_scheduled(reviewed: UnitReview, field: AnyField, cell: Cell) -> str:
    """Say what a scheduled cell is, beginning with what its sign says."""
    words = f"{field.label}: {field.doc}"
    said = _said_by_sign(reviewed, field.key, cell.look)
    return f"{sign_of(cell.look)} {said}. {words}" if said else words


def _said_by_sign(reviewed: UnitReview, key: str, look: Look) -> str:
    if look is Look.INHERITED:
        return "from the defaults"
    if look is Look.BAD:
        typed = reviewed.unit.typed(key)
        return typed.problem or "" if typed else ""
    if look in _BLAMED:
        names = (one.check for one in reviewed.findings if one.fields and one.fields[0] == key)
        return ", ".join(dict.fromkeys(names))
    return ""


def accepted(field: AnyField, system: System) -> str:
    """Say what a field accepts, and which checks judge it."""
    judged = [name for name, check in registered().items() if field.key in check.judges]
    words = f"{field.kind.accepted(system)}."
    return f"{words} Judged by {', '.join(judged)}." if judged else words


def about_edit(field: AnyField, system: System) -> str:
    """Say what an edit accepts, and what the value is for."""
    return f"{field.label}: {accepted(field, system)} {field.doc}"


def about_findings(findings: Sequence[Finding]) -> str:
    """Say which findings are meant: those of one entry.

    Args:
        findings: the findings.
    """
    first = findings[0]
    names = ", ".join(dict.fromkeys(one.check for one in findings))
    at = f" at {first.condition}" if first.condition else ""
    return f"{names}{at}{' (accepted)' if first.accepted else ''}"


def about_remedy(remedy: Remedy) -> str:
    """Say which numbers a remedy would schedule, and what turns worse by it."""
    changes = " with ".join(f"{one.field} {one.text} {one.unit}" for one in remedy.changes)
    worse = f"; worse: {', '.join(remedy.worsens)}" if remedy.worsens else ""
    return f"{changes}{worse}"


def answer(label: str, before: str, after: str) -> str:
    """Say what an edit has made of a unit.

    >>> answer("AHU-3", "short", "clear")
    'AHU-3 was short, is clear'
    """
    if before == after:
        return f"{label} is still {after}"
    return f"{label} was {before}, is {after}"
