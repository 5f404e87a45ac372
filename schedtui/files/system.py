"""What the operating system is asked for, and how its refusals are worded.

Knows nothing of what a file is for.
"""

from __future__ import annotations

import contextlib
import errno
import os
from typing import TYPE_CHECKING

from schedtui.errors import FileError

if TYPE_CHECKING:
    from pathlib import Path


def write_all(descriptor: int, content: bytes) -> None:
    """Write the whole content where the descriptor stands.

    Raises:
        OSError: it cannot be written, or only a part of it.
    """
    rest = memoryview(content)
    while rest:
        rest = rest[os.write(descriptor, rest) :]


def sync_folder(folder: Path) -> None:
    """Have the renaming itself on the disk; not every system can."""
    with contextlib.suppress(OSError):
        descriptor = os.open(folder, os.O_RDONLY | os.O_DIRECTORY | os.O_CLOEXEC)
        try:
            os.fsync(descriptor)
        finally:
            os.close(descriptor)


def refusal(path: Path, done: str, error: OSError) -> FileError:
    """Return the exception that says what could not be done to a file, and why."""
    return FileError(f"{shown(path)} cannot be {done}: {reason_of(error)}")


def reason_of(error: OSError) -> str:
    """Return why the system refuses, in words."""
    reasons = {
        errno.ENOENT: "there is no such file or folder",
        errno.EACCES: "permission is denied",
        errno.EPERM: "permission is denied",
        errno.ENOSPC: "the disk is full",
        errno.EDQUOT: "no more room is allowed",
        errno.EFBIG: "no larger file is allowed",
        errno.EROFS: "the disk is read-only",
        errno.ELOOP: "its links go in a circle",
        errno.ENAMETOOLONG: "the name is too long",
        errno.ENOTDIR: "a part of its path is no folder",
    }
    return reasons.get(error.errno or 0, error.strerror or "the system refuses")


def shown(path: Path) -> str:
    """Return a path with what a terminal would act on, or cannot show, replaced."""
    return "".join(
        char if char.isprintable() else "\N{REPLACEMENT CHARACTER}" for char in str(path)
    )
