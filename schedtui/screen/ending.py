"""How the program ends when it is told to, or when its terminal has gone.

Told to end, it leaves as it would by a key, and gives the terminal back. Where it cannot leave so,
because the terminal takes nothing any more or is no longer there, it ends all the same: what is
unsaved is in the journal. Must not know of schedules.
"""

from __future__ import annotations

import contextlib
import os
import select
import signal
import sys
import termios
import threading
from typing import TYPE_CHECKING, Any

if TYPE_CHECKING:
    from collections.abc import Callable

_PATIENCE = 1.0  # s that leaving in good order may take
_SIGNALS = (signal.SIGTERM, signal.SIGHUP)
_GONE = 128 + signal.SIGHUP

# Back to the main screen, the cursor shown, lines wrapped, no mouse, no focus, no paste reported.
_GIVE_BACK = (
    b"\x1b[?2004l\x1b[?7h\x1b[?1000l\x1b[?1003l\x1b[?1006l\x1b[?1015l"
    b"\x1b[<u\x1b[?1049l\x1b[?25h\x1b[?1004l"
)


class Ending:
    """Watches for the end of a program that holds a terminal.

    Args:
        terminal: the descriptor that keys come from.
    """

    def __init__(self, terminal: int) -> None:
        self._terminal = terminal
        self._before: list[Any] | None = None
        self._leave: Callable[[int], object] | None = None
        self.abandon: Callable[[], object] = lambda: None
        self.status: int | None = None

    def watch(self) -> None:
        """Begin to watch, before the terminal is changed."""
        with contextlib.suppress(termios.error):
            self._before = termios.tcgetattr(self._terminal)
        for number in _SIGNALS:
            signal.signal(number, self._told)
        threading.Thread(target=self._see_it_go, name="terminal-gone", daemon=True).start()

    def by(self, leave: Callable[[int], object] | None) -> None:
        """Say how to leave in good order.

        Args:
            leave: asks the program to leave with an exit status; None while nothing runs.
        """
        self._leave = leave
        if leave is not None and self.status is not None:
            leave(self.status)

    def _told(self, number: int, _: object) -> None:
        """Answer a signal; this runs between two steps of whatever the program is doing."""
        if self.status is not None:
            return
        self.status = 128 + number
        late = threading.Timer(_PATIENCE, self._end)
        late.daemon = True
        late.start()
        if self._leave is not None:
            self._leave(self.status)
        else:
            raise SystemExit(self.status)

    def _see_it_go(self) -> None:
        """Wait, without doing anything, until the terminal is no longer there."""
        poll = select.poll()
        poll.register(self._terminal, 0)  # a hang-up and an error are told in any case
        while True:
            try:
                events = poll.poll()
            except OSError:
                return
            if any(
                event & (select.POLLHUP | select.POLLERR | select.POLLNVAL) for _, event in events
            ):
                break
        # Whatever would write to it could wait for ever, or fail in many ways.
        self.status = _GONE
        with contextlib.suppress(Exception):
            self.abandon()
        os._exit(_GONE)

    def _end(self) -> None:
        """End now; the terminal is given back if it takes that much."""
        with contextlib.suppress(Exception):
            self.abandon()
        with contextlib.suppress(OSError, ValueError, termios.error):
            output = sys.__stdout__.fileno() if sys.__stdout__ else self._terminal
            if self._before is not None:
                termios.tcsetattr(self._terminal, termios.TCSANOW, self._before)
            if select.select([], [output], [], 0)[1]:
                os.write(output, _GIVE_BACK)
        os._exit(self.status or _GONE)
