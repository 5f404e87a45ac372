"""The history of an open schedule: what was done, by name, and what takes it back."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from schedtui.schedule.document import ARRAYS, SINGLE

if TYPE_CHECKING:
    from schedtui.schedule.document import Document
    from schedtui.schedule.edit import Edit


@dataclass(frozen=True, slots=True, eq=False)
class Done:
    """One step of a person's work; two steps are never the same one.

    Args:
        name: what it is called: "AHU-3 supply airflow 9440 → 9650".
        edit: what it did.
        inverse: what takes it back.
        number: its own among the steps of its history.
    """

    name: str
    edit: Edit
    inverse: Edit
    number: int = 0


@dataclass(slots=True)
class History:
    """Undo and redo without limit.

    Args:
        done: the steps taken, the last one last.
        undone: the steps taken back, the next to redo last.
        next_number: number of the next step.
    """

    done: list[Done] = field(default_factory=list)
    undone: list[Done] = field(default_factory=list)
    next_number: int = 1

    @property
    def last(self) -> Done | None:
        """The step that an undo would take back."""
        return self.done[-1] if self.done else None

    def knows(self, document: Document, other: Document) -> bool:
        """Tell whether its steps can be taken in another document as well as in this one.

        Args:
            document: the document that they were taken in.
            other: one that is to take its place, its rows of the same ids where they are the same.
        """
        there, found = (_rows_of(one) for one in (document, other))
        steps = (*self.done, *self.undone)
        touched = frozenset().union(*(step.edit.touches() for step in steps))
        return not (touched & there) - found

    def do(self, document: Document, edit: Edit, name: str, number: int | None = None) -> Document:
        """Apply an edit and remember it; what was taken back before can be redone no more.

        Args:
            document: what it is applied to.
            edit: the edit.
            name: what the step is called.
            number: its number, where it had one before.
        """
        changed, inverse = edit.apply(document)
        number = self.next_number if number is None else number
        self.next_number = max(self.next_number, number + 1)
        self.done.append(Done(name, edit, inverse, number))
        self.undone.clear()
        return changed

    def undo(self, document: Document) -> tuple[Document, Done] | None:
        """Take the last step back; None where there is none."""
        if not self.done:
            return None
        step = self.done.pop()
        self.undone.append(step)
        return step.inverse.apply(document)[0], step

    def redo(self, document: Document) -> tuple[Document, Done] | None:
        """Take the step again that was taken back last; None where there is none."""
        if not self.undone:
            return None
        step = self.undone.pop()
        self.done.append(step)
        return step.edit.apply(document)[0], step


def _rows_of(document: Document) -> frozenset[tuple[str, int]]:
    return frozenset(
        (table, row.row_id) for table in (*SINGLE, *ARRAYS) for row in document.rows(table)
    )
