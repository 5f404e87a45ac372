"""The history of an open schedule: what was done, by name, and what takes it back."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TYPE_CHECKING

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
    """

    name: str
    edit: Edit
    inverse: Edit


@dataclass(slots=True)
class History:
    """Undo and redo without limit.

    Args:
        done: the steps taken, the last one last.
        undone: the steps taken back, the next to redo last.
    """

    done: list[Done] = field(default_factory=list)
    undone: list[Done] = field(default_factory=list)

    @property
    def last(self) -> Done | None:
        """The step that an undo would take back."""
        return self.done[-1] if self.done else None

    def do(self, document: Document, edit: Edit, name: str) -> Document:
        """Apply an edit and remember it; what was taken back before can be redone no more."""
        changed, inverse = edit.apply(document)
        self.done.append(Done(name, edit, inverse))
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
