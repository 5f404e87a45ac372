"""Opening a schedule in the terminal."""

from __future__ import annotations

import gc
import os
import sys
from pathlib import Path

from schedtui.errors import UsageError
from schedtui.session.session import Session

_AT_ONCE = 60  # units reviewed before the first is shown: as many as any screen has lines


def open_schedule(file: str) -> int:
    """Open a schedule in the terminal and return when it is closed.

    Returns:
        The exit status.

    Raises:
        UsageError: there is no terminal that can move a cursor.
        FileError: the file cannot be read.
        ScheduleError: it is no schedule at all.
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
    session = Session.open(Path(file), _AT_ONCE)
    from schedtui.screen.app import ScheduleApp  # noqa: PLC0415  loaded when there is a terminal

    app = ScheduleApp(session)
    gc.freeze()
    gc.enable()
    app.run()
    return app.return_code or 0
