"""The exit statuses, known here alone."""

from __future__ import annotations

from enum import IntEnum


class ExitStatus(IntEnum):
    """How a command ended.

    CLEAR: nothing at or above the severity asked for.
    FOUND: something is.
    FAILED: the command could not do its work.
    """

    CLEAR = 0
    FOUND = 1
    FAILED = 2
