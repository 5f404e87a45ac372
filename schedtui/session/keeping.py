"""Where a session keeps what must outlive it: the state folder, the clock, whose session it is.

Handed to a session, so that it can be tried without a person's own folders and without waiting.
"""

from __future__ import annotations

import os
import time
from dataclasses import dataclass, field
from pathlib import Path
from typing import TYPE_CHECKING

from schedtui.session.lock import Holder

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping


def state_folder(environment: Mapping[str, str]) -> Path:
    """Return the folder for what the program keeps for a person between two sessions.

    Args:
        environment: the process's variables.

    >>> state_folder({"XDG_STATE_HOME": "/var/lib/states", "HOME": "/home/ann"}).as_posix()
    '/var/lib/states/schedtui'
    >>> state_folder({"XDG_STATE_HOME": "not/absolute", "HOME": "/home/ann"}).as_posix()
    '/home/ann/.local/state/schedtui'
    """
    stated = environment.get("XDG_STATE_HOME", "")
    if stated.startswith("/"):  # a relative one is to be ignored, says the XDG specification
        return Path(stated) / "schedtui"
    home = environment.get("HOME") or os.path.expanduser("~")  # noqa: PTH111  the same rule
    return Path(home) / ".local" / "state" / "schedtui"


@dataclass(frozen=True, slots=True)
class Keeping:
    """What a session needs for its journal, its lock and its copies.

    Args:
        folder: the state folder; it is made when it is first needed.
        clock: tells the time [s since 1970].
        holder: whose session it is; that of this process if not given.
    """

    folder: Path
    clock: Callable[[], float] = time.time
    holder: Holder = field(default_factory=lambda: Holder.this(time.time()))

    @property
    def copies(self) -> Path:
        """The folder for copies of files that are written in place."""
        return self.folder / "copies"
