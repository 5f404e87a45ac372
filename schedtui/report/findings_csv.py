"""The findings of reviews as comma-separated lines, one a finding."""

from __future__ import annotations

import csv
import io
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    from schedtui.review.finding import Finding
    from schedtui.review.reviewed import Review

HEADINGS = (
    "file", "subject", "severity", "check", "condition", "fields",
    "scheduled", "required", "margin", "unit", "rounding", "accepted", "message",
)  # fmt: skip
# A spreadsheet would run a text that begins with one of these.
_RUNS = ("=", "+", "-", "@", "\t")


def findings_csv(reviews: Iterable[tuple[str, Review]]) -> str:
    """Return the findings of reviews, each with its file's name, below one line of headings."""
    made = io.StringIO()
    writer = csv.writer(made, lineterminator="\n")
    writer.writerow(HEADINGS)
    for file, review in reviews:
        for finding in review.all_findings:
            writer.writerow(map(harmless, _cells(file, finding)))
    return made.getvalue()


def _cells(file: str, finding: Finding) -> Iterator[str | float]:
    yield file
    yield finding.subject.label
    yield finding.severity.word
    yield finding.check
    yield finding.condition or ""
    yield " ".join(finding.paths)
    yield "" if finding.scheduled is None else finding.scheduled
    yield "" if finding.required is None else finding.required
    yield "" if finding.margin is None else finding.margin
    yield finding.unit
    yield "yes" if finding.rounding else "no"
    yield "yes" if finding.accepted else "no"
    yield finding.message


def harmless(cell: str | float) -> str | float:
    """Return a cell that no spreadsheet runs: such a text gets an apostrophe in front.

    >>> harmless("=1+1"), harmless(-3.2)
    ("'=1+1", -3.2)
    """
    return f"'{cell}" if isinstance(cell, str) and cell.startswith(_RUNS) else cell
