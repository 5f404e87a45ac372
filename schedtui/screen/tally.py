"""The counts of the title line, kept so that an edit counts only what it has changed.

Must not know of widgets.
"""

from __future__ import annotations

from collections import Counter
from typing import TYPE_CHECKING

from schedtui.review.finding import WORST_FIRST
from schedtui.review.reviewed import UNREADABLE
from schedtui.schedule.document import ARRAYS, SINGLE
from schedtui.screen.unit_table import mark_of_status

if TYPE_CHECKING:
    from collections.abc import Collection

    from schedtui.review.finding import Finding
    from schedtui.review.reviewed import Review, UnitReview

_ORDER = (UNREADABLE, *(severity.word for severity in WORST_FIRST))
_NOTHING = "all clear"


class Tally:
    """How many rows cannot be read, and how many findings there are of each severity.

    Those of plants, conditions and the project count with the units'.

    Args:
        review: what is counted.
    """

    def __init__(self, review: Review) -> None:
        self._units: dict[int, Counter[str]] = {}
        self._sum: Counter[str] = Counter()
        self._rest: Counter[str] = Counter()
        self.show(review, review.units)

    def show(self, review: Review, changed: Collection[int]) -> None:
        """Count another review of the same schedule.

        Args:
            review: the review.
            changed: row ids of the units whose review is another now.
        """
        gone = self._units.keys() - review.units.keys()
        for row_id in (*gone, *changed):
            self._sum.subtract(self._units.pop(row_id, Counter()))
        for row_id in changed:
            self._units[row_id] = _of_unit(review.units[row_id])
            self._sum.update(self._units[row_id])
        plants = (one for plant in review.plants for one in plant.findings)
        self._rest = Counter(map(_severity, _open([*review.findings, *plants])))
        document = review.schedule.document
        self._rest[UNREADABLE] = sum(
            cell.bad
            for table in (*SINGLE, *ARRAYS)
            if table != "unit"
            for row in document.rows(table)
            for cell in row.cells.values()
        )

    @property
    def texts(self) -> tuple[str, str]:
        """The counts in words, and shorter with the marks of the rows."""
        counts = {word: self._sum[word] + self._rest[word] for word in _ORDER}
        found = {word: count for word, count in counts.items() if count}
        words = "  ".join(f"{count} {word}" for word, count in found.items())
        marks = " ".join(f"{mark_of_status(word)}{count}" for word, count in found.items())
        return words or _NOTHING, marks or _NOTHING


def _of_unit(reviewed: UnitReview) -> Counter[str]:
    counts = Counter(map(_severity, _open(reviewed.findings)))
    counts[UNREADABLE] = int(reviewed.status == UNREADABLE)
    return counts


def _open(findings: Collection[Finding]) -> list[Finding]:
    return [one for one in findings if not one.accepted]


def _severity(finding: Finding) -> str:
    return finding.severity.word
