"""Opening a schedule in the terminal."""

from __future__ import annotations

import gc
import os
import sys
from pathlib import Path

from schedtui.errors import ScheduleError, UsageError
from schedtui.screen.ending import Ending
from schedtui.session.keeping import Keeping, state_folder
from schedtui.session.session import Session

_AT_ONCE = 60  # units reviewed before the first is shown: as many as any screen has lines


def open_schedule(file: str) -> int:
    """Open a schedule in the terminal and return when it is closed.

    Returns:
        The exit status.

    Raises:
        UsageError: there is no terminal that can move a cursor.
        FileError: the file cannot be read.
        ScheduleError: it is no schedule at all, and the person has left it so.
    """
    # The library takes a dumb terminal for a good one, so it is asked before that is loaded.
    if os.environ.get("TERM", "dumb") in ("", "dumb") or not (
        sys.stdin.isatty() and sys.stdout.isatty() and sys.stderr.isatty()
    ):
        raise UsageError(
            f"schedtui needs a terminal that can move a cursor; without one: schedtui check {file}"
        )
    # What is made now lasts: looking through it for garbage would cost a tenth of the start, and
    # with thousands of units a third of a second in the middle of somebody's typing.
    gc.disable()
    keeping = Keeping(state_folder(os.environ))
    ending = Ending(sys.stdin.fileno())
    ending.watch()
    session = _opened(Path(file), keeping, ending)
    if session is None:
        return ending.status or 0
    ending.abandon = lambda: session.close(keep=True)
    from schedtui.screen.app import ScheduleApp  # noqa: PLC0415  loaded when there is a terminal

    status = 1
    try:
        app = ScheduleApp(session, ending)
        gc.freeze()
        gc.enable()
        app.run()
        status = app.return_code or 0
    finally:
        # Whoever left by a key has been asked; any other end keeps what is unsaved.
        session.close(keep=status != 0)
    return status


def _opened(path: Path, keeping: Keeping, ending: Ending) -> Session | None:
    """Open a file, once it is mended if it is broken; None where the program was told to end."""

    def opened() -> Session:
        return Session.open(path, _AT_ONCE, keeping)

    try:
        return opened()
    except ScheduleError as error:
        from schedtui.screen.broken_page import BrokenPage  # noqa: PLC0415  seldom needed

        page = BrokenPage(path, error, opened, ending)
        session = page.run()
        if session is None and ending.status is None:
            raise page.error from None
        return session
