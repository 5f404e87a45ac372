"""Whether the file on the disk is still the one that is open.

Its content has the say: a file may change with its time and size as they were, and be touched
without having changed.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import FileError, ScheduleError
from schedtui.files import looks_the_same, read_text
from schedtui.session.comparison import Comparison, compared

if TYPE_CHECKING:
    from pathlib import Path

    from schedtui.files import Stamp
    from schedtui.schedule.document import Document


def unchanged(path: Path, stamp: Stamp) -> Stamp | None:
    """Return what a file is that has the content it had; None for one that has another.

    Args:
        path: the file.
        stamp: what it was.
    """
    if looks_the_same(path, stamp):
        return stamp
    try:
        found = read_text(path).stamp
    except FileError:
        return None
    return found if found.digest == stamp.digest else None


def comparison(path: Path, document: Document) -> Comparison:
    """Hold a file on the disk against what is open.

    Args:
        path: the file.
        document: what is open.
    """
    try:
        found = read_text(path)
    except FileError as error:
        return Comparison(None, None, str(error))
    try:
        return compared(document, found.text, found.stamp, str(path))
    except ScheduleError as error:
        line = f"line {error.problems[0].line}: {error}"
        return Comparison(None, found.stamp, f"what is on the disk cannot be opened: {line}")
