"""What the steps of a person's work are called, in the words of the trade."""

from __future__ import annotations

from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from schedtui.review.reviewed import Review
    from schedtui.schedule.typed import Typed


def set_cell(subject: str, label: str, before: Typed | None, after: Typed | None) -> str:
    """Name the step that puts a text into a cell.

    Args:
        subject: whose cell it is.
        label: the field's label.
        before: what the cell held, None for nothing.
        after: what it holds then.
    """
    old, new = (cell.text if cell else "blank" for cell in (before, after))
    return f"{subject} {in_sentence(label)} {old} → {new}"


def subject(review: Review, table: str, row_id: int) -> str:
    """Name a row: a unit by its label, another by its table and its name.

    Args:
        review: the review of the schedule it is in.
        table: name of its table.
        row_id: its id.
    """
    if table == "unit":
        return review.units[row_id].label
    row = review.schedule.document.row(table, row_id)
    return f"{table} {row.text('name')}".rstrip()


def in_sentence(label: str) -> str:
    """Return a field's label as it stands in a sentence.

    >>> in_sentence("Supply airflow")
    'supply airflow'
    """
    return label[:1].lower() + label[1:]
