"""Reads files whole and writes them so that no crash leaves half of one.

A file that was read has a stamp, and is written over only while its content is still that. What
stands in a file is not known here, and no line ending is ever translated.
"""

from __future__ import annotations

import contextlib
import errno
import hashlib
import os
import secrets
import stat
from dataclasses import dataclass
from pathlib import Path

from schedtui.errors import FileChanged, FileError

LARGEST = 20_000_000  # bytes

_KINDS = (
    (stat.S_ISDIR, "a folder"),
    (stat.S_ISFIFO, "a pipe"),
    (stat.S_ISSOCK, "a socket"),
    (stat.S_ISCHR, "a device"),
    (stat.S_ISBLK, "a device"),
)


@dataclass(frozen=True, slots=True)
class Stamp:
    """What a file was when it was read or written.

    Args:
        digest: SHA-256 of its bytes, in hexadecimal.
        mtime_ns: its time of modification [ns].
        size: its length [bytes].
        device: number of the device it lies on.
        inode: its number there.
    """

    digest: str
    mtime_ns: int
    size: int
    device: int
    inode: int


@dataclass(frozen=True, slots=True)
class FileText:
    """A file's characters, a byte order mark and line endings included, and its stamp."""

    text: str
    stamp: Stamp


def read_text(path: Path) -> FileText:
    """Return the text of a file and what the file was.

    Args:
        path: a regular file, or a link to one, of UTF-8 text.

    Raises:
        FileError: it is not there, no regular file, too large, not to be read, or no UTF-8.
    """
    content, stamp = _read(path)
    try:
        return FileText(content.decode("utf-8"), stamp)
    except UnicodeDecodeError as error:
        line = content.count(b"\n", 0, error.start) + 1
        raise FileError(f"{_shown(path)} is no UTF-8 text: line {line} is not") from error


def write_text(path: Path, text: str, expected: Stamp | None, *, replace: bool = False) -> Stamp:
    """Put a text in a file, whole or not at all, and return what the file then is.

    A link is followed; the file keeps its mode, and its owner where the system allows it.

    Args:
        path: where to write.
        text: the characters, written as UTF-8 and without any translation.
        expected: what the file was when it was read; None for one that was not read.
        replace: whether a file that was not read, or is another by now, may be written over.

    Raises:
        FileChanged: the file is not the one that was read.
        FileError: it exists already and was not read, or cannot be written.
    """
    try:
        content = text.encode("utf-8")
    except UnicodeEncodeError as error:
        raise FileError(f"{_shown(path)} cannot hold this text: {error.reason}") from error
    try:
        target = Path(os.path.realpath(path, strict=False))
        if expected is not None and not replace:
            _refuse_changed(path, expected)
        return _write(path, target, content, new=expected is None and not replace)
    except OSError as error:
        raise _refusal(path, "written", error) from error
    except ValueError as error:
        raise FileError(f"{_shown(path)} is no name of a file") from error


def _refuse_changed(path: Path, expected: Stamp) -> None:
    try:
        _, found = _read(path)
    except FileError as error:
        raise FileChanged(f"{_shown(path)} is no longer what was read: {error}") from error
    if found.digest != expected.digest:
        raise FileChanged(f"{_shown(path)} has been changed by something else since it was read")


def _read(path: Path) -> tuple[bytes, Stamp]:
    try:
        _refuse_irregular(path, os.stat(path))  # noqa: PTH116  what is no file must not be opened
        # Should a pipe take the file's place meanwhile, opening it must not wait.
        descriptor = os.open(path, os.O_RDONLY | os.O_NONBLOCK | os.O_CLOEXEC)
        with open(descriptor, "rb") as file:  # noqa: PTH123  a descriptor, not a path
            found = os.fstat(descriptor)
            _refuse_irregular(path, found)
            content = file.read(LARGEST + 1)
    except OSError as error:
        raise _refusal(path, "read", error) from error
    except ValueError as error:
        raise FileError(f"{_shown(path)} is no name of a file") from error
    if len(content) > LARGEST:
        raise FileError(_too_large(path))
    return content, _stamp(content, found)


def _refuse_irregular(path: Path, found: os.stat_result) -> None:
    for is_kind, name in _KINDS:
        if is_kind(found.st_mode):
            raise FileError(f"{_shown(path)} is {name}, not a file")
    if not stat.S_ISREG(found.st_mode):
        raise FileError(f"{_shown(path)} is not a file")
    if found.st_size > LARGEST:
        raise FileError(_too_large(path))


def _too_large(path: Path) -> str:
    return f"{_shown(path)} is larger than {LARGEST // 1_000_000} MB"


def _stamp(content: bytes, found: os.stat_result) -> Stamp:
    digest = hashlib.sha256(content).hexdigest()
    return Stamp(digest, found.st_mtime_ns, len(content), found.st_dev, found.st_ino)


def _write(path: Path, target: Path, content: bytes, *, new: bool) -> Stamp:
    before = _present(target)
    if before is not None:
        if new:
            raise FileError(f"{_shown(path)} exists already")
        _refuse_irregular(path, before)
        if not os.access(target, os.W_OK):
            raise FileError(f"{_shown(path)} is marked read-only")
    name = str(target.parent / f".{target.name[:60]}.{secrets.token_hex(8)}")
    mode = 0o666 if before is None else 0o600  # the system takes its mask off
    descriptor = os.open(name, os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC, mode)
    try:
        with open(descriptor, "wb") as file:  # noqa: PTH123  a descriptor, not a path
            if before is not None:
                _take_over(descriptor, before)
            file.write(content)
            file.flush()
            os.fsync(descriptor)
            after = os.fstat(descriptor)
        _into_place(path, name, target, new=new)
    except BaseException:
        with contextlib.suppress(OSError):
            os.unlink(name)  # noqa: PTH108  a name as the system gave it
        raise
    _sync_folder(target.parent)
    return _stamp(content, after)


def _present(target: Path) -> os.stat_result | None:
    try:
        return target.stat()
    except FileNotFoundError:
        return None


def _take_over(descriptor: int, before: os.stat_result) -> None:
    """Give the new file the old one's owner and mode."""
    with contextlib.suppress(PermissionError):  # only the superuser gives files away
        os.fchown(descriptor, before.st_uid, before.st_gid)
    os.fchmod(descriptor, stat.S_IMODE(before.st_mode))


def _into_place(path: Path, name: str, target: Path, *, new: bool) -> None:
    if not new:
        os.replace(name, target)  # noqa: PTH105  a name as the system gave it
        return
    try:
        # A link fails where a file has come to be meanwhile; a renaming would write over it.
        os.link(name, target)  # noqa: PTH108, RUF100
        os.unlink(name)  # noqa: PTH108  a name as the system gave it
    except FileExistsError as error:
        raise FileError(f"{_shown(path)} exists already") from error
    except OSError:
        # Some file systems have no links.
        os.replace(name, target)  # noqa: PTH105  a name as the system gave it


def _sync_folder(folder: Path) -> None:
    """Have the renaming itself on the disk; not every system can."""
    with contextlib.suppress(OSError):
        descriptor = os.open(folder, os.O_RDONLY | os.O_DIRECTORY | os.O_CLOEXEC)
        try:
            os.fsync(descriptor)
        finally:
            os.close(descriptor)


def _refusal(path: Path, done: str, error: OSError) -> FileError:
    reasons = {
        errno.ENOENT: "there is no such file or folder",
        errno.EACCES: "permission is denied",
        errno.EPERM: "permission is denied",
        errno.ENOSPC: "the disk is full",
        errno.EROFS: "the disk is read-only",
        errno.ELOOP: "its links go in a circle",
        errno.ENAMETOOLONG: "the name is too long",
        errno.ENOTDIR: "a part of its path is no folder",
    }
    reason = reasons.get(error.errno or 0, error.strerror or "the system refuses")
    return FileError(f"{_shown(path)} cannot be {done}: {reason}")


def _shown(path: Path) -> str:
    """Return a path with what a terminal would act on, or cannot show, replaced."""
    return "".join(
        char if char.isprintable() else "\N{REPLACEMENT CHARACTER}" for char in str(path)
    )
