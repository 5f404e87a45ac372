"""Says for each key and table of a scanned text where it stands: a map from path to place.

It takes the statements to be lawful TOML (`recover` has parsed them by then), and knows
nothing of values or of schedules.
"""

from __future__ import annotations

import re
from bisect import bisect_right
from dataclasses import dataclass
from enum import Enum
from typing import TYPE_CHECKING

from schedtui.schedule.toml_source.scan import Head, Pair, Value, line_start, next_line

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from schedtui.schedule.toml_source.changes import Path

_LINE_FEED = re.compile("\n")


class Kind(Enum):
    """How a key or table comes to be in the text."""

    VALUE = "a value after ="
    ITEM = "an element of an array in brackets"
    HEAD = "a table with a head of its own"
    HEADS = "an array of tables with heads"
    IMPLIED = "a table that only the heads of its sub-tables name"
    DOTTED = "a table that only dotted keys name"


@dataclass(frozen=True, slots=True)
class Place:
    """Where something stands.

    Args:
        kind: how it comes to be there.
        start: offset of a value's first character, else of the head or key that first names it.
        value: its characters, where it has any of its own.
        pair: the pair that states it, where one does.
        holder: path of the table, with a head or inline, in which that pair stands.
    """

    kind: Kind
    start: int
    value: Value | None = None
    pair: Pair | None = None
    holder: Path = ()


@dataclass(frozen=True, slots=True)
class Section:
    """A head with what follows it, from the comment lines that touch it to those of the next.

    Args:
        start: offset of its first character, comment lines that touch the head included.
        end: offset past its last.
        head: its head; None for what stands before the first.
        path: path of its table.
        pairs: its own keys.
    """

    start: int
    end: int
    head: Head | None
    path: Path
    pairs: tuple[Pair, ...]


@dataclass(frozen=True, slots=True)
class Layout:
    """A text's sections in order, its places by path, and where its lines end."""

    sections: tuple[Section, ...]
    places: dict[Path, Place]
    newlines: tuple[int, ...]

    def line(self, offset: int) -> int:
        """Return the line, from 1, that holds an offset."""
        return 1 + bisect_right(self.newlines, offset - 1)


def locate(text: str, statements: Sequence[Head | Pair], lines: tuple[int, ...]) -> Layout:
    """Return where everything stands in a text with these statements and line feeds."""
    places: dict[Path, Place] = {}
    counts: dict[Path, int] = {}
    sections: list[Section] = []
    for head, pairs, start, end in _cut(text, statements):
        path = _open(head, places, counts) if head else ()
        for pair in pairs:
            _place(pair, path, places)
        sections.append(Section(start, end, head, path, pairs))
    return Layout(tuple(sections), places, lines)


def newlines(text: str) -> tuple[int, ...]:
    """Return the offsets of all line feeds."""
    return tuple(found.start() for found in _LINE_FEED.finditer(text))


def _cut(
    text: str,
    statements: Sequence[Head | Pair],
) -> Iterable[tuple[Head | None, tuple[Pair, ...], int, int]]:
    start = 1 if text.startswith("\ufeff") else 0
    head: Head | None = None
    pairs: list[Pair] = []
    last_end = start
    for statement in statements:
        if isinstance(statement, Pair):
            pairs.append(statement)
        else:
            cut = _with_comments(text, statement.start, last_end)
            yield head, tuple(pairs), start, cut
            head, pairs, start = statement, [], cut
        last_end = next_line(text, statement.end)
    yield head, tuple(pairs), start, len(text)


def _with_comments(text: str, head: int, bound: int) -> int:
    """Return the start of the comment lines that touch a head, or of the head's own line."""
    start = line_start(text, head)
    while start > bound:
        above = line_start(text, start - 1)
        if above < bound or not text[above:start].lstrip(" \t").startswith("#"):
            break
        start = above
    return start


def _open(head: Head, places: dict[Path, Place], counts: dict[Path, int]) -> Path:
    path: Path = ()
    for key in head.keys[:-1]:
        path = (*path, key)
        if path in counts:
            path = (*path, counts[path] - 1)
        elif path not in places:
            places[path] = Place(Kind.IMPLIED, head.start)
    path = (*path, head.keys[-1])
    if head.array:
        places.setdefault(path, Place(Kind.HEADS, head.start))
        counts[path] = counts.get(path, 0) + 1
        path = (*path, counts[path] - 1)
    places[path] = Place(Kind.HEAD, head.start)
    return path


def _place(pair: Pair, holder: Path, places: dict[Path, Place]) -> None:
    path = holder
    for key in pair.keys[:-1]:
        path = (*path, key)
        if path not in places:
            places[path] = Place(Kind.DOTTED, pair.start, None, pair, holder)
    path = (*path, pair.keys[-1])
    places[path] = Place(Kind.VALUE, pair.value.start, pair.value, pair, holder)
    if pair.value.kind != "scalar":
        _place_inside(pair.value, path, places)


def _place_inside(value: Value, path: Path, places: dict[Path, Place]) -> None:
    for index, item in enumerate(value.items):
        places[*path, index] = Place(Kind.ITEM, item.start, item, None, path)
        _place_inside(item, (*path, index), places)
    for pair in value.pairs:
        _place(pair, path, places)
