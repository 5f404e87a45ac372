"""What of an open schedule outlives it: its journal, the lock beside it, what others have left.

A session without a place for them has none of it, and works all the same. Knows the steps of work
only as what the journal holds.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.files import finish_broken_writing, sweep
from schedtui.session.journal import Found, Journal, Step, find
from schedtui.session.lock import Lock
from schedtui.session.record import written

if TYPE_CHECKING:
    from pathlib import Path

    from schedtui.schedule.document import Document
    from schedtui.schedule.edit import Edit
    from schedtui.session.history import Done
    from schedtui.session.keeping import Keeping
    from schedtui.session.lock import Holder


_LONG_SINCE = 3600.0  # s after which no save is under way any more


class Kept:
    """What one session keeps.

    Args:
        keeping: where, and whose session it is; None to keep nothing.
        path: the schedule file.
        digest: digest of its content.
    """

    def __init__(self, keeping: Keeping | None, path: Path, digest: str) -> None:
        self._keeping = keeping
        self._path = path
        self._journal: Journal | None = None
        self._lock: Lock | None = None
        self._said = ""
        self.others: Holder | None = None
        self.left: list[Found] = []
        if keeping is None:
            return
        self._journal = Journal(keeping.folder, keeping.clock, keeping.holder)
        self._journal.begin(path, digest)
        self._take_lock(keeping)
        for found in find(keeping.folder, path):
            if found.is_saved(digest):
                found.remove()
            else:
                self.left.append(found)

    @property
    def copies(self) -> Path | None:
        """The folder for copies of files that are written in place, if there is one."""
        return self._keeping.copies if self._keeping else None

    def _take_lock(self, keeping: Keeping) -> None:
        self._lock = Lock(self._path, keeping.holder, keeping.clock)
        self.others = self._lock.take()

    def plain(self, document: Document, edit: Edit) -> Step | None:
        """Return an edit as the journal takes it, None where there is no journal.

        Args:
            document: what the edit is about to be applied to.
            edit: the edit.
        """
        return None if self._journal is None else written(document, edit)

    def note(self, kind: str, plain: Step | None, step: Done) -> None:
        """Write a step of work in the journal.

        Args:
            kind: "do", "undo" or "redo".
            plain: what it did to the document.
            step: the step.
        """
        if self._journal is not None:
            self._journal.add({kind: plain, "n": step.number, "name": step.name})

    def saving(self, digest: str | None) -> None:
        """Have every edit on the disk before a save.

        Args:
            digest: the digest that the open file is about to have; None for another file.
        """
        if self._journal is not None:
            self._journal.settle()
            if digest is not None:
                self._journal.saving(digest)

    def saved(self, path: Path, digest: str) -> None:
        """Begin the journal anew after a save; with another file, the lock goes there too."""
        if self._journal is not None:
            self._journal.restart(path, digest, [])
        if self._lock is None or self._keeping is None:
            return
        if path == self._path:
            self._lock.take()
        else:
            self._path = path
            self._lock.release()
            self._take_lock(self._keeping)

    def begin_anew(self, digest: str, plain: Step | None, step: Done | None, *, keep: bool) -> None:
        """Begin the journal anew with the file that somebody else has written.

        Args:
            digest: the digest of the file.
            plain: what was done here, as an edit of the file's document; None for nothing.
            step: what that is called.
            keep: whether what the journal holds is set aside; else it goes.
        """
        if self._journal is None:
            return
        if keep:
            self._journal.set_aside()
        steps = [] if plain is None or step is None else [
            {"do": plain, "n": step.number, "name": step.name}
        ]  # fmt: skip
        self._journal.restart(self._path, digest, steps)

    def adopt(self, found: Found) -> None:
        """Go on with a journal that an ended session has left."""
        self.left.remove(found)
        if self._journal is not None:
            self._journal.adopt(found)

    def set_aside(self, found: Found) -> None:
        """Keep what an ended session has left, and offer it no more."""
        self.left.remove(found)
        found.set_aside()

    def trouble(self) -> str:
        """Say, once, why edits cannot be kept safe before they are saved; blank for no news."""
        now = self._journal.trouble if self._journal else ""
        news = now if now and not self._said else ""
        self._said = now
        return news

    def due(self) -> float | None:
        """Return in how many seconds `settle` has to be called; None where nothing waits."""
        return self._journal.due() if self._journal else None

    def settle(self) -> None:
        """Have every edit on the disk."""
        if self._journal is not None:
            self._journal.settle()

    def close(self, *, keep: bool) -> None:
        """End the journal and take the lock away.

        Args:
            keep: whether the journal stays to be offered by the next session.
        """
        for found in self.left:
            found.leave()
        self.left.clear()
        if self._journal is not None:
            self._journal.end(keep=keep)
        if self._lock is not None:
            self._lock.release()


def mended(keeping: Keeping | None, path: Path) -> bool:
    """Finish a save of a file that was broken off while it was written in place, if one was.

    What a save that was killed otherwise has left beside the file goes.

    Raises:
        FileError: the file cannot be written.
    """
    if keeping is None:
        return False
    sweep(path, keeping.clock() - _LONG_SINCE)
    return finish_broken_writing(path, keeping.copies)
