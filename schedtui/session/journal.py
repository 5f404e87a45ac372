"""The journal: what an open schedule's edits were, on the disk before they are on the screen.

One file a session in the user's state folder, locked while the session lives. Its first line says
which content of which file the edits are made to; each further line is one step of work. The
journal of a session that has ended without saving is found again by the next one.

Knows nothing of what an edit does: a step is a plain value here. A folder that takes no journal
hinders nobody; `trouble` says so.
"""

from __future__ import annotations

import contextlib
import fcntl
import hashlib
import json
import os
import secrets
from dataclasses import dataclass, field
from typing import TYPE_CHECKING, Any

from schedtui.errors import FileError
from schedtui.files import real, reason_of, sync_folder, write_all
from schedtui.session.lock import Holder

if TYPE_CHECKING:
    from collections.abc import Callable
    from pathlib import Path

SYNC_WITHIN = 0.5  # s from a step to its being on the disk, at most
_LARGEST = 200_000_000  # bytes of a journal that are read
_ENDING = ".journal"
_BEGUN = ".begun"
_ASIDE = ".aside"

Step = dict[str, Any]


@dataclass(slots=True)
class Journal:
    """The journal of one session.

    Args:
        folder: the state folder.
        clock: tells the time [s].
        holder: whose session it is.
        trouble: why the last step is not on the disk; empty where it is.
    """

    folder: Path
    clock: Callable[[], float]
    holder: Holder
    trouble: str = ""
    _file: Path | None = None
    _descriptor: int = -1
    _length: int = 0
    _waiting: list[Step] = field(default_factory=list)  # steps that are in no file yet
    _unsynced_since: float | None = None
    _head: Step = field(default_factory=dict)

    def begin(self, path: Path, digest: str) -> None:
        """Say what the next steps are made to; nothing is written before there is one.

        Args:
            path: the schedule file.
            digest: digest of its content.
        """
        self._head = {
            "journal": 1, "file": str(real(path)), "digest": digest, **self.holder.plain(),
        }  # fmt: skip

    def add(self, step: Step) -> None:
        """Write a step, and any that could not be written before; it is synced by `settle`."""
        self._waiting.append(step)
        try:
            if self._descriptor < 0:
                self._create()
            self._append(self._waiting)
        except (OSError, FileError) as error:
            self._fail(error)
        else:
            self._waiting.clear()
            self.trouble = ""
            if self._unsynced_since is None:
                self._unsynced_since = self.clock()

    def due(self) -> float | None:
        """Return in how many seconds `settle` has to be called; None where nothing waits."""
        if self._unsynced_since is None:
            return None
        return max(0.0, self._unsynced_since + SYNC_WITHIN - self.clock())

    def settle(self) -> None:
        """Have on the disk what was written."""
        if self._unsynced_since is None:
            return
        self._unsynced_since = None
        try:
            os.fsync(self._descriptor)
        except OSError as error:
            self._fail(error)

    def saving(self, digest: str) -> None:
        """Note, on the disk, that the file is about to have this content."""
        if self._descriptor >= 0:
            self.add({"saving": digest})
            self.settle()

    def restart(self, path: Path, digest: str, steps: list[Step]) -> None:
        """Begin anew: the file has this content now, and these steps are made to it.

        The journal that there was goes once the new one is on the disk.
        """
        old, old_file = self._descriptor, self._file
        self._descriptor, self._file, self._length = -1, None, 0
        self._waiting.clear()
        self._unsynced_since = None
        self.begin(path, digest)
        for step in steps:
            self.add(step)
        self.settle()
        if steps and self.trouble:
            old_file = None  # better one that does not fit than none
        _remove(old_file, old)

    def end(self, *, keep: bool) -> None:
        """End the session's journal.

        Args:
            keep: whether it stays, to be offered by the next session.
        """
        if keep:
            self.settle()
        _remove(None if keep else self._file, self._descriptor)
        self._descriptor, self._file = -1, None

    def set_aside(self) -> None:
        """Keep the journal where it is not offered, and begin another with the next step."""
        self.settle()
        if self._file is not None:
            _set_aside(self._file)
        _remove(None, self._descriptor)
        self._descriptor, self._file, self._length = -1, None, 0
        self._waiting.clear()
        self._unsynced_since = None

    def adopt(self, found: Found) -> None:
        """Go on with a journal that an earlier session left."""
        self._file, self._descriptor = found.file, found.descriptor
        self._length = found.length
        self._head = found.head
        with contextlib.suppress(OSError):
            os.ftruncate(self._descriptor, self._length)  # what breaks off halfway is no step

    def _create(self) -> None:
        journals = self.folder / "journals"
        journals.mkdir(mode=0o700, parents=True, exist_ok=True)
        file = journals / f"{_key(self._head['file'])}-{secrets.token_hex(6)}{_ENDING}"
        made = file.with_suffix(_BEGUN)  # not to be found before it is locked
        flags = os.O_RDWR | os.O_CREAT | os.O_EXCL | os.O_APPEND | os.O_CLOEXEC
        descriptor = os.open(made, flags, 0o600)
        try:
            with contextlib.suppress(OSError):  # some network file systems know no locks
                fcntl.flock(descriptor, fcntl.LOCK_EX | fcntl.LOCK_NB)
            head = _line(self._head)
            write_all(descriptor, head)
            os.replace(made, file)  # noqa: PTH105  one way to call the system
        except BaseException:
            _remove(made, descriptor)
            raise
        sync_folder(journals)
        self._descriptor, self._file, self._length = descriptor, file, len(head)

    def _append(self, steps: list[Step]) -> None:
        lines = b"".join(map(_line, steps))
        try:
            write_all(self._descriptor, lines)
        except OSError:
            with contextlib.suppress(OSError):  # half a line would spoil the next
                os.ftruncate(self._descriptor, self._length)
            raise
        self._length += len(lines)

    def _fail(self, error: OSError | FileError) -> None:
        reason = reason_of(error) if isinstance(error, OSError) else str(error)
        self.trouble = f"Edits are not safe before a save: {reason} ({self.folder})"


@dataclass(frozen=True, slots=True)
class Found:
    """A journal that a session left and that nobody holds; it is locked while it is looked at.

    Args:
        file: its place.
        descriptor: it, open and locked.
        head: its first line.
        steps: its whole steps.
        length: how far they reach in it [bytes].
        changed_at: when it was last written [s since 1970].
    """

    file: Path
    descriptor: int
    head: Step
    steps: tuple[Step, ...]
    length: int
    changed_at: float

    @property
    def aside(self) -> Path:
        """Where it is once it is set aside."""
        return self.file.with_suffix(_ASIDE)

    def fits(self, digest: str) -> bool:
        """Tell whether its edits are made to this content."""
        return self.head.get("digest") == digest

    def is_saved(self, digest: str) -> bool:
        """Tell whether this content holds its edits already: the save was broken off after it."""
        return bool(self.steps) and self.steps[-1].get("saving") == digest

    def edits(self) -> tuple[Step, ...]:
        """Return the steps that are somebody's work."""
        return tuple(step for step in self.steps if "saving" not in step)

    def leave(self) -> None:
        """Let it be; the next session finds it again."""
        os.close(self.descriptor)

    def set_aside(self) -> None:
        """Keep it where it is not offered."""
        _set_aside(self.file)
        os.close(self.descriptor)

    def remove(self) -> None:
        """Remove it: its edits are in the file."""
        _remove(self.file, self.descriptor)


def find(folder: Path, path: Path) -> list[Found]:
    """Return the journals that ended sessions left for a file, the last first; each is locked.

    Args:
        folder: the state folder.
        path: the schedule file.
    """
    name = str(real(path))
    try:
        files = sorted((folder / "journals").glob(f"{_key(name)}-*{_ENDING}"))
    except OSError:
        return []
    found = [one for file in files if (one := _taken(file, name)) is not None]
    return sorted(found, key=lambda one: one.changed_at, reverse=True)


def _taken(file: Path, name: str) -> Found | None:
    try:
        flags = os.O_RDWR | os.O_APPEND | os.O_CLOEXEC | os.O_NOFOLLOW | os.O_NONBLOCK
        descriptor = os.open(file, flags)
    except OSError:
        return None
    try:
        locked = _locked(descriptor)
        with open(os.dup(descriptor), "rb") as stream:  # noqa: PTH123  a descriptor, not a path
            content = stream.read(_LARGEST)
        found = _read(file, descriptor, content, os.fstat(descriptor).st_mtime)
        there = file.exists()  # else it went while the lock was waited for
    except OSError:  # a live session holds it
        os.close(descriptor)
        return None
    if not locked and (found is None or Holder.of(found.head).lives()):
        os.close(descriptor)
        return None
    if found is not None and found.head.get("file") == name and there and found.edits():
        return found
    # One without a step has nothing to offer; one that is no journal is nobody's to remove.
    empty = found is not None and not found.edits()
    _remove(file if empty or not content else None, descriptor)
    return None


def _locked(descriptor: int) -> bool:
    """Lock a journal; False where its file system knows no locks.

    Raises:
        BlockingIOError: a live session holds it.
    """
    try:
        fcntl.flock(descriptor, fcntl.LOCK_EX | fcntl.LOCK_NB)
    except BlockingIOError:
        raise
    except OSError:
        return False
    return True


def _read(file: Path, descriptor: int, content: bytes, changed_at: float) -> Found | None:
    """Read the whole lines; what breaks off halfway was not accepted."""
    lines: list[Step] = []
    length = 0
    for line in content.splitlines(keepends=True):
        try:
            step = json.loads(line)
        except ValueError:
            break
        if not line.endswith(b"\n") or not isinstance(step, dict):
            break
        lines.append(step)
        length += len(line)
    if not lines or lines[0].get("journal") != 1:
        return None
    return Found(file, descriptor, lines[0], tuple(lines[1:]), length, changed_at)


def _line(step: Step) -> bytes:
    # Letters beyond ASCII are written as escapes: no line ends anywhere but at its end.
    return json.dumps(step, separators=(",", ":")).encode("ascii") + b"\n"


def _key(name: str) -> str:
    return hashlib.sha256(os.fsencode(name)).hexdigest()[:24]


def _set_aside(file: Path) -> None:
    with contextlib.suppress(OSError):
        file.rename(file.with_suffix(_ASIDE))


def _remove(file: Path | None, descriptor: int) -> None:
    if file is not None:
        with contextlib.suppress(OSError):
            os.unlink(file)  # noqa: PTH108  one way to call the system
    if descriptor >= 0:
        os.close(descriptor)
