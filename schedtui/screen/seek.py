"""Where there is something to look at: the next unit, the next finding, the worst to begin with.

Pure. Must not know of widgets.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.finding import WORST_FIRST
from schedtui.review.reviewed import CLEAR, UNREADABLE

if TYPE_CHECKING:
    from collections.abc import Collection, Iterator, Mapping

    from schedtui.review.finding import Finding
    from schedtui.review.reviewed import UnitReview

_TAG = "tag"


def next_unit(units: Mapping[int, UnitReview], row_id: int, direction: int) -> int | None:
    """Return the next unit that is not clear, going round at the end; None where there is none.

    Args:
        units: the units in the order shown.
        row_id: the unit to go from.
        direction: 1 for onwards, -1 for back.
    """
    order = list(units)[::direction]
    here = order.index(row_id)
    ahead = (*order[here + 1 :], *order[:here])
    return next((one for one in ahead if units[one].status != CLEAR), None)


def next_finding(
    units: Mapping[int, UnitReview], row_id: int, column_key: str, columns: Collection[str]
) -> tuple[int, str] | None:
    """Return the next cell that a finding blames, going round at the end; None for none.

    Args:
        units: the units in the order shown.
        row_id: the unit to go from.
        column_key: the column to go from; from another column the unit's own findings come first.
        columns: the columns there are.
    """
    order = list(units)
    here = order.index(row_id)
    cells = list(_blamed(units[row_id], columns))
    after = cells[cells.index(column_key) + 1 :] if column_key in cells else cells
    if after:
        return row_id, after[0]
    for one in (*order[here + 1 :], *order[: here + 1]):
        for key in _blamed(units[one], columns):
            return one, key
    return None


def blames(finding: Finding, column_key: str, columns: Collection[str]) -> bool:
    """Tell whether a finding that nobody has accepted blames a cell.

    Args:
        finding: a finding of a unit; without a cell of its own in the table it stands at the tag.
        column_key: the cell's column.
        columns: the columns there are.
    """
    blamed = next((key for key in finding.fields if key in columns), _TAG)
    return blamed == column_key and not finding.accepted


def worst(units: Mapping[int, UnitReview], columns: Collection[str]) -> tuple[int, str] | None:
    """Return the cell to begin with: the first to blame in the first of the worst units."""
    for status in (UNREADABLE, *(severity.word for severity in WORST_FIRST)):
        for row_id, reviewed in units.items():
            if reviewed.status == status:
                return row_id, next(_blamed(reviewed, columns), _TAG)
    return None


def _blamed(reviewed: UnitReview, columns: Collection[str]) -> Iterator[str]:
    """Yield each column once that a finding of the unit blames, the worst first.

    A finding without a cell of its own in the table stands at the tag, if it stands alone.
    """
    bad = [(key,) for key in reviewed.unit.bad_keys()]
    found = [one.fields for one in reviewed.findings if not one.accepted]
    blamed = (next((key for key in fields if key in columns), None) for fields in (*bad, *found))
    cells = dict.fromkeys(key for key in blamed if key is not None)
    yield from cells or ([_TAG] if found else [])
