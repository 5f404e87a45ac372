"""Writing over a file's own bytes, where a renaming would make another file of it.

Before the first byte is touched, a copy of what it was and what it becomes is on the disk: a
writing that is broken off can be finished from it.
"""

from __future__ import annotations

import contextlib
import hashlib
import json
import os
import secrets
from pathlib import Path
from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.files.reading import read_bytes, real, stamp_of
from schedtui.files.system import reason_of, refusal, shown, sync_folder, write_all

if TYPE_CHECKING:
    from schedtui.files.reading import Stamp

_COPY_HEAD = 65536  # bytes, at most, of the line that says what a copy holds


def finish_broken_writing(path: Path, copies: Path) -> bool:
    """Finish a writing in place that was broken off, and tell whether there was one.

    A file that somebody has changed since then is left as it is, and so is the copy.

    Args:
        path: the file.
        copies: the folder for copies.

    Raises:
        FileError: the file cannot be written.
    """
    copy = _copy_of(real(path), copies)
    try:
        old, new = _in_copy(copy)
        found, _ = read_bytes(path)
    except (OSError, ValueError, KeyError, TypeError, FileError):
        return False
    broken_off = found not in (old, new) and _is_mixture(found, old, new)
    try:
        if broken_off:
            _overwrite(real(path), new)
        if broken_off or found in (old, new):
            os.unlink(copy)  # noqa: PTH108  a name as the system gave it
    except OSError as error:
        raise refusal(path, "written", error) from error
    return broken_off


def write_in_place(
    path: Path, target: Path, content: bytes, copies: Path | None, why: str
) -> Stamp:
    """Write over a file's own bytes, with a copy aside of what it was and what it becomes."""
    if copies is None:
        raise FileError(
            f"{shown(path)} cannot be written: {why} and there is no place for the copy that "
            "writing it in place needs"
        )
    old, _ = read_bytes(path)
    copy = _copy_of(target, copies)
    try:
        _make_copy(copy, target, old, content)
    except OSError as error:
        reason = reason_of(error)
        raise FileError(
            f"{shown(path)} cannot be written: {why} and the copy that writing it in place needs "
            f"cannot be made: {reason}"
        ) from error
    try:
        _overwrite(target, content)
    except OSError:
        _overwrite(target, old)  # what stood there has its room; should it fail, the copy stays
        os.unlink(copy)  # noqa: PTH108  a name as the system gave it
        raise
    os.unlink(copy)  # noqa: PTH108  a name as the system gave it
    return stamp_of(content, target.stat())


def _overwrite(target: Path, content: bytes) -> None:
    descriptor = os.open(target, os.O_WRONLY | os.O_CLOEXEC | os.O_NOFOLLOW)
    try:
        write_all(descriptor, content)
        os.ftruncate(descriptor, len(content))
        os.fsync(descriptor)
    finally:
        os.close(descriptor)


def _copy_of(target: Path, copies: Path) -> str:
    return str(copies / f"{hashlib.sha256(os.fsencode(target)).hexdigest()[:24]}.save")


def _make_copy(copy: str, target: Path, old: bytes, new: bytes) -> None:
    """Write both contents in one file, on the disk before anything else is touched."""
    head = {"file": str(target), "old": len(old), "new": len(new)}
    Path(copy).parent.mkdir(mode=0o700, parents=True, exist_ok=True)
    made = f"{copy}.{secrets.token_hex(4)}"
    descriptor = os.open(made, os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC, 0o600)
    try:
        try:
            write_all(descriptor, json.dumps(head).encode() + b"\n" + old + new)
            os.fsync(descriptor)
        finally:
            os.close(descriptor)
        os.replace(made, copy)  # noqa: PTH105  a name as the system gave it
    except BaseException:
        with contextlib.suppress(OSError):
            os.unlink(made)  # noqa: PTH108  a name as the system gave it
        raise
    sync_folder(Path(copy).parent)


def _in_copy(copy: str) -> tuple[bytes, bytes]:
    with open(copy, "rb") as file:  # noqa: PTH123  a name as the system gave it
        head = json.loads(file.readline(_COPY_HEAD))
        old, new = file.read(int(head["old"])), file.read(int(head["new"]))
    if (len(old), len(new)) != (head["old"], head["new"]):
        raise ValueError("a copy that is not whole")
    return old, new


def _is_mixture(found: bytes, old: bytes, new: bytes) -> bool:
    """Tell whether each byte is the old or the new one of its place."""
    if not min(len(old), len(new)) <= len(found) <= max(len(old), len(new)):
        return False
    return all(
        found[place : place + 1] in (old[place : place + 1], new[place : place + 1])
        for place in range(len(found))
    )
