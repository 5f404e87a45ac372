"""A program in a pseudo-terminal: keys in, bytes out, and what a terminal would show of them."""

from __future__ import annotations

import contextlib
import fcntl
import os
import pty
import re
import select
import signal
import struct
import termios
import time
from pathlib import Path
from typing import TYPE_CHECKING, Self

import pyte

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

#: What pyte takes for text: queries and modes with an intermediate or private sign.
_UNKNOWN = re.compile(rb"\x1b\[[<>=?]?[0-9;]*(?:\$p|u)|\x1b\[>[0-9;]*[a-z]")

_KEPT = 1 << 16  # bytes received last

KEYS = {
    "up": "\x1b[A",
    "down": "\x1b[B",
    "right": "\x1b[C",
    "left": "\x1b[D",
    "home": "\x1b[H",
    "end": "\x1b[F",
    "pageup": "\x1b[5~",
    "pagedown": "\x1b[6~",
    "ctrl+home": "\x1b[1;5H",
    "ctrl+end": "\x1b[1;5F",
    "tab": "\t",
    "shift+tab": "\x1b[Z",
    "enter": "\r",
    "escape": "\x1b",
    "f2": "\x1bOQ",
    "ctrl+q": "\x11",
}


class Terminal:
    """A terminal of this size with a program in it; leaving the context ends the program.

    Args:
        command: the program and its arguments.
        columns: width in cells.
        rows: height in cells.
        environment: variables besides those of this process.
        keeps_frames: whether it claims to hold updates back until they are whole.
    """

    def __init__(
        self,
        command: Sequence[str],
        columns: int,
        rows: int,
        environment: dict[str, str] | None = None,
        *,
        keeps_frames: bool = True,
    ) -> None:
        self.screen = pyte.Screen(columns, rows)
        self._stream = pyte.ByteStream(self.screen)
        self._keeps_frames = keeps_frames
        self.ended = False
        self.received = b""
        self.status: int | None = None
        given = {"TERM": "xterm-256color", "COLORTERM": "truecolor", **(environment or {})}
        inherited = {name: text for name, text in os.environ.items() if name != "NO_COLOR"}
        self.started = time.perf_counter()
        self.pid, self._fd = pty.fork()
        if self.pid == 0:
            size = struct.pack("HHHH", rows, columns, 0, 0)
            fcntl.ioctl(0, termios.TIOCSWINSZ, size)
            os.execvpe(command[0], list(command), {**inherited, **given})  # noqa: S606 - the point of it

    def __enter__(self) -> Self:
        return self

    def __exit__(self, *_: object) -> None:
        if self.status is None:
            with contextlib.suppress(ProcessLookupError):
                os.kill(self.pid, signal.SIGKILL)
            os.waitpid(self.pid, 0)
        os.close(self._fd)

    def read(self, seconds: float) -> bytes:
        """Return what arrives within so long; empty when nothing did or the program ended."""
        if not select.select([self._fd], [], [], seconds)[0]:
            return b""
        try:
            got = os.read(self._fd, 1 << 16)
        except OSError:
            self.ended = True
            return b""
        if self._keeps_frames and b"?2026$p" in got:
            os.write(self._fd, b"\x1b[?2026;2$y")
        self.received = (self.received + got)[-_KEPT:]
        self._stream.feed(_UNKNOWN.sub(b"", got))
        return got

    def press(self, keys: str, quiet: float = 0.12) -> tuple[int, float]:
        """Press a key, or type a text, and wait until nothing more comes.

        Returns:
            The bytes received, and the milliseconds until the last of them came.
        """
        begun = last = time.perf_counter()
        os.write(self._fd, KEYS.get(keys, keys).encode())
        count = 0
        while got := self.read(quiet if count else 1.0):
            count += len(got)
            last = time.perf_counter()
        return count, (last - begun) * 1000

    def wait_for(self, shown: Callable[[str], bool], seconds: float = 20) -> float:
        """Wait until the screen shows it; return the seconds since the program was started."""
        while not shown(self.text):
            if self.ended or time.perf_counter() - self.started > seconds:
                shows = self.text.rstrip()
                message = f"ended, or not shown within {seconds} s:\n{shows}"
                raise TimeoutError(message)
            self.read(0.05)
        return time.perf_counter() - self.started

    def wait_for_end(self, seconds: float = 20) -> int:
        """Wait until the program has ended by itself; return its exit status."""
        end = time.perf_counter() + seconds
        while self.status is None:
            if time.perf_counter() > end:
                message = f"goes on after {seconds} s:\n{self.text.rstrip()}"
                raise TimeoutError(message)
            if self.ended or not self.read(0.05):
                time.sleep(0.02)
            pid, status = os.waitpid(self.pid, os.WNOHANG)
            if pid:
                self.status = os.waitstatus_to_exitcode(status)
                while self.read(0.05):  # its last words
                    pass
        return self.status

    @property
    def text(self) -> str:
        """What the screen shows."""
        return "\n".join(self.screen.display)

    def memory(self) -> float:
        """Return the memory the program holds, in MB."""
        status = Path(f"/proc/{self.pid}/status").read_text(encoding="ascii")
        return int(status.split("VmRSS:")[1].split()[0]) / 1024
