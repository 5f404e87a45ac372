"""Reading a file whole, and what it was then.

A pipe, a device or a folder is never opened to find out what it is.
"""

from __future__ import annotations

import hashlib
import os
import stat
from dataclasses import dataclass
from pathlib import Path

from schedtui.errors import FileError
from schedtui.files.system import refusal, shown

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
    content, stamp = read_bytes(path)
    try:
        return FileText(content.decode("utf-8"), stamp)
    except UnicodeDecodeError as error:
        line = content.count(b"\n", 0, error.start) + 1
        raise FileError(f"{shown(path)} is no UTF-8 text: line {line} is not") from error


def real(path: Path) -> Path:
    """Return where a file lies once every link on the way is followed."""
    return Path(os.path.realpath(path, strict=False))


def digest_of(text: str) -> str:
    """Return the digest that a file of this text has."""
    return hashlib.sha256(text.encode("utf-8", "surrogatepass")).hexdigest()


def looks_the_same(path: Path, stamp: Stamp) -> bool:
    """Tell, without reading it, whether a file seems to be what it was; its content has the say.

    Args:
        path: the file.
        stamp: what it was.
    """
    try:
        found = os.stat(path)  # noqa: PTH116  asked often
    except (OSError, ValueError):
        return False
    return (found.st_mtime_ns, found.st_size, found.st_dev, found.st_ino) == (
        stamp.mtime_ns, stamp.size, stamp.device, stamp.inode,
    )  # fmt: skip


def read_bytes(path: Path) -> tuple[bytes, Stamp]:
    """Return a file's bytes and what the file was.

    Raises:
        FileError: it is not there, no regular file, too large, or not to be read.
    """
    try:
        refuse_irregular(path, os.stat(path))  # noqa: PTH116  what is no file must not be opened
        # Should a pipe take the file's place meanwhile, opening it must not wait.
        descriptor = os.open(path, os.O_RDONLY | os.O_NONBLOCK | os.O_CLOEXEC)
        with open(descriptor, "rb") as file:  # noqa: PTH123  a descriptor, not a path
            found = os.fstat(descriptor)
            refuse_irregular(path, found)
            content = file.read(LARGEST + 1)
    except OSError as error:
        raise refusal(path, "read", error) from error
    except ValueError as error:
        raise FileError(f"{shown(path)} is no name of a file") from error
    if len(content) > LARGEST:
        raise FileError(_too_large(path))
    return content, stamp_of(content, found)


def refuse_irregular(path: Path, found: os.stat_result) -> None:
    """Raise for what is no regular file, or one that is too large.

    Raises:
        FileError: it is none.
    """
    for is_kind, name in _KINDS:
        if is_kind(found.st_mode):
            raise FileError(f"{shown(path)} is {name}, not a file")
    if not stat.S_ISREG(found.st_mode):
        raise FileError(f"{shown(path)} is not a file")
    if found.st_size > LARGEST:
        raise FileError(_too_large(path))


def _too_large(path: Path) -> str:
    return f"{shown(path)} is larger than {LARGEST // 1_000_000} MB"


def stamp_of(content: bytes, found: os.stat_result) -> Stamp:
    """Return what a file is that has this content."""
    digest = hashlib.sha256(content).hexdigest()
    return Stamp(digest, found.st_mtime_ns, len(content), found.st_dev, found.st_ino)
