"""An open schedule: the document, its history, its review, and its file.

All that a screen does to a schedule goes through here, and can be tested without one.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from schedtui.errors import AmountError
from schedtui.files import Stamp, read_text, write_text
from schedtui.review.reviewed import Review, review
from schedtui.schedule.catalogue.column import own_field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.edit import Edit, SetCell
from schedtui.schedule.load import CATALOGUES, load
from schedtui.schedule.save import saved, source_text
from schedtui.schedule.view import Schedule, view
from schedtui.session import slices
from schedtui.session.history import Done, History
from schedtui.units import read_amount

if TYPE_CHECKING:
    from collections.abc import Callable
    from pathlib import Path

    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.document import Document
    from schedtui.schedule.typed import Typed


class Session:
    """A schedule file that is open.

    Args:
        path: the file.
        document: what was read from it.
        stamp: what the file was when it was read.
        at_once: how many units are reviewed before it is open; the others wait for `go_on`.
    """

    def __init__(
        self, path: Path, document: Document, stamp: Stamp, at_once: float = math.inf
    ) -> None:
        self.path = path
        self.history = History()
        self._document = document
        self._stamp = stamp
        self._schedule = view(document)
        self._review, self._waiting = slices.begun(self._schedule, at_once)
        self._saved_at: Done | None = None

    @classmethod
    def open(cls, path: Path, at_once: float = math.inf) -> Session:
        """Open a file; cells that cannot be read do not hinder it.

        Args:
            path: the file.
            at_once: how many units are reviewed now; the others wait for `go_on`.

        Raises:
            FileError: it cannot be read.
            ScheduleError: it is no schedule at all.
        """
        read = read_text(path)
        return cls(path, load(read.text, str(path)), read.stamp, at_once)

    @property
    def document(self) -> Document:
        """The document as it is now."""
        return self._document

    @property
    def schedule(self) -> Schedule:
        """The typed view of it."""
        return self._schedule

    @property
    def review(self) -> Review:
        """What its review says."""
        return self._review

    @property
    def waiting(self) -> int:
        """How many units have still to be reviewed; they stand without findings until then."""
        return len(self._waiting)

    def go_on(self, seconds: float) -> frozenset[int]:
        """Review some of the units that wait.

        Args:
            seconds: how long it may take.

        Returns:
            Row ids of the units whose review is another now.
        """
        if not self._waiting:
            return frozenset()
        before = self._review
        self._review, self._waiting = slices.continued(before, self._waiting, seconds)
        return _differing(before, self._review)

    @property
    def unsaved(self) -> bool:
        """Whether anything was done, or taken back, since the file was read or saved."""
        return self.history.last is not self._saved_at

    def field(self, table: str, key: str) -> Field[object] | Field[str | None]:
        """Return the field of a key, one of the project's own columns included.

        Raises:
            KeyError: there is no such field.
        """
        known = CATALOGUES[table].catalogue.get(key)
        if known is not None:
            return known
        for column in self._schedule.columns:
            if column.key == key:
                return own_field(column)
        raise KeyError(key)

    def entered(self, table: str, key: str, text: str) -> Typed | None:
        """Return the cell that a typed text makes, None where it clears the cell.

        Raises:
            AmountError: it cannot be accepted; the text says what is.
        """
        if not text.strip():
            if self.field(table, key).required:
                raise AmountError("must not be blank")
            return None
        return self.field(table, key).kind.enter(text, self._document.system)

    def conversion(self, table: str, key: str, text: str) -> str:
        """Say what a number typed with a unit becomes, nothing where there is nothing to say."""
        quantity = self.field(table, key).quantity
        if quantity is None:
            return ""
        try:
            return read_amount(text, quantity, self._document.system).note
        except AmountError:
            return ""

    def set_cell(self, table: str, row_id: int, key: str, text: str) -> frozenset[int]:
        """Put a typed text into a cell; nothing happens where it says what stands there.

        Returns:
            Row ids of the units whose review is another now.

        Raises:
            AmountError: the text cannot be accepted.
        """
        cell = self.entered(table, key, text)
        before = self._document.row(table, row_id).cells.get(key)
        if cell == before:
            return frozenset()
        name = self._name(table, row_id, key, before, cell)
        return self.do(SetCell(table, row_id, key, cell), name)

    def do(self, edit: Edit, name: str) -> frozenset[int]:
        """Carry out an edit as one step of work.

        Args:
            edit: the edit.
            name: what the step is called.

        Returns:
            Row ids of the units whose review is another now.
        """
        return self._become(self.history.do(self._document, edit, name))

    def undo(self) -> tuple[Done, frozenset[int]] | None:
        """Take the last step back; None where there is none.

        Returns:
            The step, and the row ids of the units whose review is another now.
        """
        return self._go(self.history.undo)

    def redo(self) -> tuple[Done, frozenset[int]] | None:
        """Take a step again that was taken back; None where there is none.

        Returns:
            The step, and the row ids of the units whose review is another now.
        """
        return self._go(self.history.redo)

    def without_default(self, row_id: int, key: str) -> frozenset[int]:
        """Do without the default of a key in one unit.

        Args:
            row_id: the unit.
            key: a key that the unit inherits.

        Returns:
            Row ids of the units whose review is another now.
        """
        before = self._document.row("unit", row_id).cells.get(Unit.without.key)
        keys = before.value if before is not None and isinstance(before.value, tuple) else ()
        field = self.field("unit", Unit.without.key)
        cell = field.kind.enter(", ".join((*keys, key)), self._document.system)
        label = self.field("unit", key).label
        name = f"{self._subject('unit', row_id)} {_lower(label)} without the default"
        return self.do(SetCell("unit", row_id, Unit.without.key, cell), name)

    def cells_of(self, step: Done) -> tuple[tuple[int, str], ...]:
        """Return the cells of units that are there now and that a step is about."""
        edit = step.edit
        if not isinstance(edit, SetCell) or edit.table != "unit":
            return ()
        return ((edit.row_id, edit.key),) if edit.row_id in self._review.units else ()

    def save(self, *, over: bool = False) -> None:
        """Write the document to its file, whole or not at all.

        Args:
            over: whether a file that somebody else has changed is written over.

        Raises:
            FileError: the file cannot be written; it is as it was, and so are the edits.
            FileChanged: the file is no longer what was read.
            SpliceError: the edits cannot be written without touching something else.
        """
        text = source_text(self._document)
        document = saved(self._document, text)
        self._stamp = write_text(self.path, text, self._stamp, replace=over)
        self._become(document)
        self._saved_at = self.history.last

    def _go(
        self, turn: Callable[[Document], tuple[Document, Done] | None]
    ) -> tuple[Done, frozenset[int]] | None:
        turned = turn(self._document)
        if turned is None:
            return None
        document, step = turned
        return step, self._become(document)

    def _become(self, document: Document) -> frozenset[int]:
        """Take a document for the present one and review what it changes."""
        before = self._review
        self._document = document
        self._schedule = view(document, self._schedule)
        self._review = review(self._schedule, before)
        self._waiting = slices.still_waiting(before, self._review, self._waiting)
        return _differing(before, self._review)

    def _name(
        self, table: str, row_id: int, key: str, before: Typed | None, after: Typed | None
    ) -> str:
        label = _lower(self.field(table, key).label)
        subject = self._subject(table, row_id)
        old, new = (cell.text if cell else "blank" for cell in (before, after))
        return f"{subject} {label} {old} → {new}"

    def _subject(self, table: str, row_id: int) -> str:
        if table == "unit":
            return self._review.units[row_id].label
        row = self._document.row(table, row_id)
        return f"{table} {row.text('name')}".rstrip()


def _differing(before: Review, now: Review) -> frozenset[int]:
    """Return the units that are new, evaluated anew, or found otherwise."""
    return frozenset(
        row_id
        for row_id, unit in now.units.items()
        if (old := before.units.get(row_id)) is None
        or old.case is not unit.case
        or old.findings != unit.findings
    )


def _lower(label: str) -> str:
    """Return a field's label as it stands in a sentence."""
    return label[:1].lower() + label[1:]
