"""An open schedule: the document, its history, its review, and its file.

All that a screen does to a schedule goes through here, and can be tested without one.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from schedtui.errors import AmountError, FileError
from schedtui.files import Stamp, digest_of, read_text, write_text
from schedtui.review.reviewed import Review, review
from schedtui.schedule.catalogue.column import own_field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.edit import Edit, SetCell, Together
from schedtui.schedule.load import CATALOGUES, load
from schedtui.schedule.save import saved, source_text
from schedtui.schedule.view import Schedule, view
from schedtui.session import kept, naming, on_disk, slices
from schedtui.session.history import Done, History
from schedtui.session.recovery import replayed
from schedtui.units import read_amount

if TYPE_CHECKING:
    from collections.abc import Callable
    from pathlib import Path

    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.document import Document
    from schedtui.schedule.typed import Typed
    from schedtui.session.comparison import Comparison
    from schedtui.session.journal import Found
    from schedtui.session.keeping import Keeping

_LOOKS_EVERY = 1.0  # s between two looks at whether the file is another


class Session:
    """A schedule file that is open.

    Args:
        path: the file.
        document: what was read from it.
        stamp: what the file was when it was read.
        at_once: how many units are reviewed before it is open; the others wait for `go_on`.
        keeping: where its journal is and whose session it is; without, neither a journal nor a
            lock is made.
    """

    def __init__(
        self,
        path: Path,
        document: Document,
        stamp: Stamp,
        at_once: float = math.inf,
        keeping: Keeping | None = None,
    ) -> None:
        self.path = path
        self.history = History()
        self._document = document
        self._stamp = stamp
        self._schedule = view(document)
        self._review, self._waiting = slices.begun(self._schedule, at_once)
        self._saved_at: Done | None = None
        self._clock = keeping.clock if keeping else None
        self._looked_at = -math.inf
        self.kept = kept.Kept(keeping, path, stamp.digest)
        self.mended = False

    @classmethod
    def open(cls, path: Path, at_once: float = math.inf, keeping: Keeping | None = None) -> Session:
        """Open a file; cells that cannot be read do not hinder it.

        Args:
            path: the file.
            at_once: how many units are reviewed now; the others wait for `go_on`.
            keeping: where its journal is and whose session it is; none if not given.

        Raises:
            FileError: it cannot be read.
            ScheduleError: it is no schedule at all.
        """
        mended = kept.mended(keeping, path)
        read = read_text(path)
        session = cls(path, load(read.text, str(path)), read.stamp, at_once, keeping)
        session.mended = mended
        return session

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
        subject = naming.subject(self._review, table, row_id)
        name = naming.set_cell(subject, self.field(table, key).label, before, cell)
        return self.do(SetCell(table, row_id, key, cell), name)

    def do(self, edit: Edit, name: str) -> frozenset[int]:
        """Carry out an edit as one step of work.

        Args:
            edit: the edit.
            name: what the step is called.

        Returns:
            Row ids of the units whose review is another now.
        """
        plain = self.kept.plain(self._document, edit)
        document = self.history.do(self._document, edit, name)
        self.kept.note("do", plain, self.history.done[-1])  # before anybody sees what it makes
        return self._become(document)

    def undo(self) -> tuple[Done, frozenset[int]] | None:
        """Take the last step back; None where there is none.

        Returns:
            The step, and the row ids of the units whose review is another now.
        """
        return self._go("undo", self.history.undo)

    def redo(self) -> tuple[Done, frozenset[int]] | None:
        """Take a step again that was taken back; None where there is none.

        Returns:
            The step, and the row ids of the units whose review is another now.
        """
        return self._go("redo", self.history.redo)

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
        subject = naming.subject(self._review, "unit", row_id)
        label = naming.in_sentence(self.field("unit", key).label)
        name = f"{subject} {label} without the default"
        return self.do(SetCell("unit", row_id, Unit.without.key, cell), name)

    def cells_of(self, step: Done) -> tuple[tuple[int, str], ...]:
        """Return the cells of units that are there now and that a step is about."""
        edits = step.edit.edits if isinstance(step.edit, Together) else (step.edit,)
        cells = (one for one in edits if isinstance(one, SetCell) and one.table == "unit")
        return tuple((one.row_id, one.key) for one in cells if one.row_id in self._review.units)

    # -- the file ----------------------------------------------------------------------------

    def save(self, *, over: Comparison | None = None) -> None:
        """Write the document to its file, whole or not at all.

        Args:
            over: what the file on the disk is known to be, where that is to be written over.

        Raises:
            FileError: the file cannot be written; it is as it was, and so are the edits.
            FileChanged: the file is no longer what was read.
            SpliceError: the edits cannot be written without touching something else.
        """
        self._save(self.path, self._stamp if over is None else over.stamp)

    def save_as(self, path: Path) -> None:
        """Write the document to another file, which is the open one from then on.

        Args:
            path: a file that is not there yet.

        Raises:
            FileError: it is there already, or cannot be written.
            SpliceError: the edits cannot be written without touching something else.
        """
        self._save(path, None)

    def _save(self, path: Path, expected: Stamp | None) -> None:
        text = source_text(self._document)
        document = saved(self._document, text)
        self.kept.saving(digest_of(text) if path == self.path else None)
        self._stamp = write_text(path, text, expected, copies=self.kept.copies)
        self.path = path
        self.kept.saved(path, self._stamp.digest)
        self._become(document)
        self._saved_at = self.history.last

    def changed_on_disk(self, *, at_once: bool = False) -> bool:
        """Tell whether the file on the disk has another content than was read or saved.

        Args:
            at_once: whether to look now, however short ago the last look was.
        """
        now = self._clock() if self._clock else math.inf
        if not at_once and now - self._looked_at < _LOOKS_EVERY:
            return False
        self._looked_at = now
        found = on_disk.unchanged(self.path, self._stamp)
        self._stamp = found or self._stamp
        return found is None

    def compare(self) -> Comparison:
        """Hold the file on the disk against what is here."""
        return on_disk.comparison(self.path, self._document)

    def take_disk(self, comparison: Comparison) -> frozenset[int]:
        """Go on with what is on the disk; what was done here and not saved is set aside.

        Args:
            comparison: what was found on the disk, which can be opened.

        Returns:
            Row ids of the units whose review is another now.
        """
        return self._take_over(comparison, (), keep=self.unsaved)

    def merge(self, comparison: Comparison) -> frozenset[int]:
        """Go on with what is on the disk and what was done here; nothing is saved by it.

        Args:
            comparison: what was found on the disk, with the edits that were made here.

        Returns:
            Row ids of the units whose review is another now.
        """
        return self._take_over(comparison, comparison.edits or (), keep=False)

    def _take_over(
        self, comparison: Comparison, edits: tuple[Edit, ...], *, keep: bool
    ) -> frozenset[int]:
        theirs, stamp = comparison.theirs, comparison.stamp
        if theirs is None or stamp is None:
            raise FileError("what is on the disk cannot be opened")
        here = Together(edits)
        step = Done("what was done here", here, here, self.history.next_number)
        document, _ = here.apply(theirs)
        self.kept.begin_anew(
            stamp.digest, self.kept.plain(theirs, here) if edits else None, step, keep=keep
        )
        if (keep and not edits) or not self.history.knows(self._document, document):
            self.history = History(next_number=step.number)
            if edits:
                document = self.history.do(theirs, here, step.name, step.number)
            self._saved_at = None
        elif not edits:
            self._saved_at = self.history.last
        self.history.next_number = step.number + 1
        self._stamp = stamp
        return self._become(document)

    # -- what must outlive it ----------------------------------------------------------------

    @property
    def offered(self) -> Found | None:
        """The journal of an ended session whose edits can be brought back, the last one."""
        fitting = (one for one in self.kept.left if one.fits(self._stamp.digest))
        return None if self.unsaved else next(fitting, None)

    def bring_back(self, found: Found) -> frozenset[int]:
        """Take the edits again that an ended session has left, and go on with its journal.

        Returns:
            Row ids of the units whose review is another now.

        Raises:
            FileError: they cannot be read; they are kept where they are.
        """
        document, history = replayed(self._document, found.edits())
        self.history = history
        self.kept.adopt(found)
        return self._become(document)

    def close(self, *, keep: bool) -> None:
        """End the session.

        Args:
            keep: whether what is unsaved is kept to be offered by the next session.
        """
        self.kept.close(keep=keep and self.unsaved)

    def _go(
        self, kind: str, turn: Callable[[Document], tuple[Document, Done] | None]
    ) -> tuple[Done, frozenset[int]] | None:
        before = self._document
        turned = turn(before)
        if turned is None:
            return None
        document, step = turned
        edit = step.inverse if kind == "undo" else step.edit
        self.kept.note(kind, self.kept.plain(before, edit), step)
        return step, self._become(document)

    def _become(self, document: Document) -> frozenset[int]:
        """Take a document for the present one and review what it changes."""
        before = self._review
        self._document = document
        self._schedule = view(document, self._schedule)
        self._review = review(self._schedule, before)
        self._waiting = slices.still_waiting(before, self._review, self._waiting)
        return _differing(before, self._review)


def _differing(before: Review, now: Review) -> frozenset[int]:
    """Return the units that are new, evaluated anew, or found otherwise."""
    return frozenset(
        row_id
        for row_id, unit in now.units.items()
        if (old := before.units.get(row_id)) is None
        or old.case is not unit.case
        or old.findings != unit.findings
    )
