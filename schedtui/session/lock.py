"""Who has a schedule open: a small file beside it, which warns and forbids nothing.

It goes when the session ends. One that a session could not take away is told from a live one by
its process, or by its age. Knows nothing of what is in a schedule.
"""

from __future__ import annotations

import contextlib
import getpass
import json
import os
import socket
from dataclasses import asdict, dataclass
from datetime import datetime
from pathlib import Path
from typing import TYPE_CHECKING, Any

from schedtui.files import real, write_all

if TYPE_CHECKING:
    from collections.abc import Callable

OLD = 7 * 24 * 3600.0  # s after which a lock of another machine is taken for a forgotten one
_LARGEST = 4096  # bytes of a lock that are read
_ENDING = ".open"
_LATE = 2.0  # s by which a clock may differ from that of the processes' starts


@dataclass(frozen=True, slots=True)
class Holder:
    """A session, as others are told of it.

    Args:
        user: name of the person's account.
        host: name of the machine.
        pid: number of the process there.
        since: when it began [s since 1970].
    """

    user: str
    host: str
    pid: int
    since: float

    @classmethod
    def this(cls, now: float) -> Holder:
        """Return the session of this process.

        Args:
            now: the time [s since 1970].
        """
        try:
            user = getpass.getuser()
        except (KeyError, OSError):  # an account without a name
            user = str(os.getuid())
        return cls(user, socket.gethostname(), os.getpid(), now)

    @classmethod
    def of(cls, plain: dict[str, Any]) -> Holder:
        """Return a session from what was written of it; what is not there is blank."""
        user, host = (str(plain.get(key, ""))[:64] for key in ("user", "host"))
        pid, since = plain.get("pid", 0), plain.get("since", 0)
        known = isinstance(pid, int) and isinstance(since, int | float) and 0 <= since < OLD * 1e6
        return cls(user, host, pid, float(since)) if known else cls(user, host, 0, 0.0)

    def plain(self) -> dict[str, Any]:
        """Return it as plain values to be written."""
        return asdict(self)

    def is_of_this_host(self) -> bool:
        """Tell whether its process can be looked for here."""
        return self.host == socket.gethostname()

    def lives(self) -> bool:
        """Tell whether its process is, or may be, still there."""
        if not self.is_of_this_host():
            return True
        if self.pid <= 0:
            return False
        try:
            os.kill(self.pid, 0)
        except ProcessLookupError:
            return False
        except (PermissionError, OverflowError):
            pass
        started = _started(self.pid)
        return started is None or started <= self.since + _LATE

    def __str__(self) -> str:
        """Return who it is, where, and since when."""
        since = datetime.fromtimestamp(self.since).astimezone()
        return f"{self.user} on {self.host} since {since:%Y-%m-%d %H:%M}"


def _started(pid: int) -> float | None:
    """Return when a process began [s since 1970], None where the system does not tell.

    A number is given again to a later process: one that began after the lock is another one.
    """
    try:
        fields = Path(f"/proc/{pid}/stat").read_text("utf-8", "replace").rpartition(")")[2].split()
        lines = Path("/proc/stat").read_text("ascii").splitlines()
        booted = next(int(line.split()[1]) for line in lines if line.startswith("btime "))
        return booted + int(fields[19]) / os.sysconf("SC_CLK_TCK")
    except (OSError, ValueError, IndexError, StopIteration):
        return None


class Lock:
    """The lock of one session.

    Args:
        path: the schedule file.
        holder: the session.
        clock: tells the time [s since 1970].
    """

    def __init__(self, path: Path, holder: Holder, clock: Callable[[], float]) -> None:
        target = real(path)
        self.file = target.with_name(target.name + _ENDING)
        self._holder = holder
        self._clock = clock
        self._held = False

    def take(self) -> Holder | None:
        """Say that the schedule is open here, unless somebody else does already.

        Returns:
            Whoever has it open besides; None where nobody has, or where the folder takes no lock.
        """
        if self._held:
            return None
        if self._make():
            return None
        other = self._other()
        if other is None:
            return None
        if self._is_stale(other):
            with contextlib.suppress(OSError):
                os.unlink(self.file)  # noqa: PTH108  one way to call the system
            self._make()
            return None
        return other

    def release(self) -> None:
        """Take the lock away, if it is still this session's."""
        if self._held and self._other() == self._holder:
            with contextlib.suppress(OSError):
                os.unlink(self.file)  # noqa: PTH108  one way to call the system
        self._held = False

    def _make(self) -> bool:
        flags = os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC | os.O_NOFOLLOW
        try:
            descriptor = os.open(self.file, flags, 0o644)
        except OSError:
            return False
        try:
            write_all(descriptor, json.dumps(self._holder.plain()).encode() + b"\n")
            self._held = True
        except OSError:  # a full disk: an empty lock would say nothing
            with contextlib.suppress(OSError):
                os.unlink(self.file)  # noqa: PTH108  one way to call the system
        finally:
            os.close(descriptor)
        return True

    def _other(self) -> Holder | None:
        try:
            flags = os.O_RDONLY | os.O_CLOEXEC | os.O_NOFOLLOW | os.O_NONBLOCK
            descriptor = os.open(self.file, flags)
            try:
                content = os.read(descriptor, _LARGEST)
            finally:
                os.close(descriptor)
            plain = json.loads(content or b"{}")  # empty: whoever made it was killed at it
        except (OSError, ValueError):  # not there, or not ours to judge
            return None
        return Holder.of(plain) if isinstance(plain, dict) else None

    def _is_stale(self, other: Holder) -> bool:
        if other.is_of_this_host():
            return not other.lives()
        return self._clock() - other.since > OLD
