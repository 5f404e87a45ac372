"""Writing a file, whole or not at all."""

from __future__ import annotations

import contextlib
import os
import re
import secrets
import stat
from typing import TYPE_CHECKING

from schedtui.errors import FileChanged, FileError
from schedtui.files.in_place import write_in_place
from schedtui.files.reading import looks_the_same, read_bytes, real, refuse_irregular, stamp_of
from schedtui.files.system import refusal, shown, sync_folder, write_all

if TYPE_CHECKING:
    from pathlib import Path

    from schedtui.files.reading import Stamp


def write_text(
    path: Path,
    text: str,
    expected: Stamp | None,
    *,
    replace: bool = False,
    copies: Path | None = None,
) -> Stamp:
    """Put a text in a file, whole or not at all, and return what the file then is.

    A link is followed; the file keeps its mode, its owner and its other names.

    Args:
        path: where to write.
        text: the characters, written as UTF-8 and without any translation.
        expected: what the file was when it was read; None for one that was not read.
        replace: whether a file that was not read, or is another by now, may be written over.
        copies: folder for the copy that a writing in place needs; None where there is none, and
            then a file that would have to be written in place is refused.

    Raises:
        FileChanged: the file is not the one that was read.
        FileError: it exists already and was not read, or cannot be written.
    """
    try:
        content = text.encode("utf-8")
    except UnicodeEncodeError as error:
        raise FileError(f"{shown(path)} cannot hold this text: {error.reason}") from error
    try:
        target = real(path)
        if replace:
            return _write(path, target, content, None, copies)
        checked = None if expected is None else _unchanged(path, expected)
        if checked is None and _present(target) is not None:
            raise FileError(f"{shown(path)} exists already")
        return _write(path, target, content, checked, copies)
    except OSError as error:
        raise refusal(path, "written", error) from error
    except ValueError as error:
        raise FileError(f"{shown(path)} is no name of a file") from error


def _unchanged(path: Path, expected: Stamp) -> Stamp:
    """Return what a file is that still has the content it had."""
    try:
        _, found = read_bytes(path)
    except FileError as error:
        raise FileChanged(f"{shown(path)} is no longer what was read: {error}") from error
    if found.digest != expected.digest:
        raise FileChanged(f"{shown(path)} has been changed by something else since it was read")
    return found


_TOKEN = re.compile("[0-9a-f]{16}")


class _NotBesideError(Exception):
    """A file cannot be written beside itself and renamed; the text says why."""


def _write(
    path: Path, target: Path, content: bytes, checked: Stamp | None, copies: Path | None
) -> Stamp:
    before = _present(target)
    if before is not None:
        refuse_irregular(path, before)
        if not os.access(target, os.W_OK):
            raise FileError(f"{shown(path)} is marked read-only")
    try:
        if before is not None and before.st_nlink > 1:
            raise _NotBesideError("it has other names, hard links,")  # noqa: TRY301  one answer to all
        return _write_beside(path, target, content, before, checked)
    except _NotBesideError as why:
        return write_in_place(path, target, content, copies, str(why))


def _write_beside(
    path: Path,
    target: Path,
    content: bytes,
    before: os.stat_result | None,
    checked: Stamp | None,
) -> Stamp:
    """Write another file in the same folder, and give it the file's name once it is on the disk."""
    name = str(target.parent / f".{target.name[:60]}.{secrets.token_hex(8)}")
    mode = 0o666 if before is None else 0o600  # the system takes its mask off
    try:
        descriptor = os.open(name, os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC, mode)
    except PermissionError as error:
        if before is None:
            raise
        raise _NotBesideError("its folder takes no new file") from error
    try:
        try:
            if before is not None:
                _take_over(descriptor, before)
            write_all(descriptor, content)
            os.fsync(descriptor)
            after = os.fstat(descriptor)
        finally:
            os.close(descriptor)
        _into_place(path, name, target, checked, new=before is None)
    except BaseException:
        with contextlib.suppress(OSError):
            os.unlink(name)  # noqa: PTH108  a name as the system gave it
        raise
    sync_folder(target.parent)
    return stamp_of(content, after)


def sweep(path: Path, before: float) -> None:
    """Remove what writings of a file have left beside it whose process was killed.

    Args:
        path: the file.
        before: when it must have been written last [s since 1970]: not by a live process.
    """
    target = real(path)
    with contextlib.suppress(OSError), os.scandir(target.parent) as entries:
        for entry in entries:
            start, _, token = entry.name.rpartition(".")
            if start != f".{target.name[:60]}" or not _TOKEN.fullmatch(token):
                continue
            if entry.is_file(follow_symlinks=False) and entry.stat().st_mtime < before:
                os.unlink(entry.path)  # noqa: PTH108  a name as the system gave it


def _present(target: Path) -> os.stat_result | None:
    try:
        return target.stat()
    except FileNotFoundError:
        return None


def _take_over(descriptor: int, before: os.stat_result) -> None:
    """Give the new file the old one's owner and mode."""
    now = os.fstat(descriptor)
    if (now.st_uid, now.st_gid) != (before.st_uid, before.st_gid):
        try:
            os.fchown(descriptor, before.st_uid, before.st_gid)
        except PermissionError as error:  # only the superuser gives files away
            raise _NotBesideError("its owner cannot be kept") from error
    os.fchmod(descriptor, stat.S_IMODE(before.st_mode))


def _into_place(path: Path, name: str, target: Path, checked: Stamp | None, *, new: bool) -> None:
    if checked is not None and not looks_the_same(target, checked):
        raise FileChanged(f"{shown(path)} has been changed by something else just now")
    if not new:
        os.replace(name, target)  # noqa: PTH105  a name as the system gave it
        return
    try:
        # A link fails where a file has come to be meanwhile; a renaming would write over it.
        os.link(name, target)  # noqa: PTH108, RUF100
        os.unlink(name)  # noqa: PTH108  a name as the system gave it
    except FileExistsError as error:
        raise FileError(f"{shown(path)} exists already") from error
    except OSError:
        # Some file systems have no links.
        os.replace(name, target)  # noqa: PTH105  a name as the system gave it
