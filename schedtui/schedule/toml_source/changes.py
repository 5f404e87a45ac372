"""The changes that can be written into a TOML text, as values.

A path names a key or table by its keys and its places in arrays: `("unit", 3, "supply_airflow")`.
Values are TOML text, already quoted. What they mean to a schedule is not known here.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import TypeAlias

Path: TypeAlias = tuple[str | int, ...]


@dataclass(frozen=True, slots=True)
class Put:
    """Sets a key, or adds it where it is not there.

    Args:
        path: path of the key.
        raw: the value, as TOML text.
    """

    path: Path
    raw: str


@dataclass(frozen=True, slots=True)
class Drop:
    """Clears a key, with its line and the comment on it, or a whole table; not there is no fault.

    Args:
        path: path of the key or table.
    """

    path: Path


@dataclass(frozen=True, slots=True)
class Append:
    """Adds an element at the end of an array of tables, which need not be there yet.

    Args:
        path: path of the array, `("unit", 3, "accepted")`.
        entries: keys and values (TOML text) of the new element.
    """

    path: Path
    entries: tuple[tuple[str, str], ...]


@dataclass(frozen=True, slots=True)
class Remove:
    """Takes one element out of an array of tables.

    Args:
        path: path of the element, `("unit", 3, "accepted", 0)`.
    """

    path: Path


Change: TypeAlias = Put | Drop | Append | Remove


@dataclass(frozen=True, slots=True)
class Piece:
    """One element of an array of tables in its new order.

    Args:
        origin: its place in the array as read; None for a new one.
        block: the text of a new one, as `Source.block` gives it; None for a bare one.
        changes: what changes in it, with paths that begin inside the element.
    """

    origin: int | None = None
    block: str | None = None
    changes: tuple[Change, ...] = ()


@dataclass(frozen=True, slots=True)
class Arrange:
    """Gives the elements of a top-level array of tables, all of them, in their new order.

    Args:
        array: key of the array.
        pieces: its elements. The first with an origin is the original, further ones are copies.
    """

    array: str
    pieces: tuple[Piece, ...]


_BARE = re.compile(r"[A-Za-z0-9_-]+")
_TO_ESCAPE = re.compile(r'["\\\x00-\x1f\x7f]')


def key_text(*keys: str) -> str:
    r"""Return a dotted key as TOML text, its parts quoted where they must be.

    >>> print(key_text("unit", "accepted"), key_text('6" duct'))
    unit.accepted "6\u0022 duct"
    """
    return ".".join(
        key
        if _BARE.fullmatch(key)
        else '"' + _TO_ESCAPE.sub(lambda found: f"\\u{ord(found.group()):04X}", key) + '"'
        for key in keys
    )
