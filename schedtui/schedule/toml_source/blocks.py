"""Edits that add, copy, move and take out whole elements of a top-level array of tables.

Elements in the longest run that keeps its order stay where they are; each other one is cut and
put after its new predecessor, as a block. What changes inside a block is written by the caller.
"""

from __future__ import annotations

from bisect import bisect_left
from collections.abc import Callable, Sequence
from dataclasses import dataclass, field, replace

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source.changes import Arrange, Change, Drop, Path, Piece, Put, key_text
from schedtui.schedule.toml_source.edits import Edit, Rank
from schedtui.schedule.toml_source.expect import read_block
from schedtui.schedule.toml_source.lists import rearranged
from schedtui.schedule.toml_source.locate import Kind
from schedtui.schedule.toml_source.source import Source, read_source

# Writes changes, with paths from the root, into a text of its own.
Writer = Callable[[Source, Sequence[Change]], str]
# Gives the text of a new element with these keys and values.
Bare = Callable[[Sequence[tuple[str, str]]], str]


@dataclass(frozen=True, slots=True)
class Moves:
    """What an arrangement comes to.

    Args:
        changes: changes in elements that stay, with paths from the root.
        gone: paths of the elements that leave their place.
        inserted: for each block that is put in, the element it follows (None: before all that
            stay) and its text.
        edits: edits that are complete already, of an array in brackets.
    """

    changes: tuple[Change, ...] = ()
    gone: frozenset[Path] = frozenset()
    inserted: tuple[tuple[int | None, str], ...] = ()
    edits: tuple[Edit, ...] = ()
    first_staying: int | None = field(default=None)


def arranged(
    source: Source,
    arrange: Arrange,
    bare: Bare,
    newline: str,
    write: Writer,
) -> Moves:
    """Return what must be done for the elements of an array to stand in their new order.

    Args:
        source: the text.
        arrange: the new order.
        bare: gives the text of a new element with some keys.
        newline: line ending of the text.
        write: writes the changes of a block into the block.

    Raises:
        SpliceError: a piece has a block of another form than the array.
    """
    place = source.layout.places.get((arrange.array,))
    if place and place.kind is not Kind.HEADS:
        return _inline(source, arrange, newline, write)
    return _headed(source, arrange, bare, write)


def _count(source: Source, array: str) -> int:
    elements = source.values.get(array, [])
    return len(elements) if isinstance(elements, list) else 0


def longest_run(origins: Sequence[int]) -> set[int]:
    """Return the members of a longest increasing run (patience sorting).

    >>> sorted(longest_run([3, 0, 1, 2]))
    [0, 1, 2]
    """
    tails: list[int] = []
    before: dict[int, int | None] = {}
    for origin in origins:
        at = bisect_left(tails, origin)
        before[origin] = tails[at - 1] if at else None
        tails[at : at + 1] = [origin]
    run: set[int] = set()
    last = tails[-1] if tails else None
    while last is not None:
        run.add(last)
        last = before[last]
    return run


def _headed(source: Source, arrange: Arrange, bare: Bare, write: Writer) -> Moves:
    array = arrange.array
    stay = longest_run(_firsts(arrange.pieces))
    changes: list[Change] = []
    inserted: list[tuple[int | None, str]] = []
    after: int | None = None
    seen: set[int] = set()
    for piece in arrange.pieces:
        origin = piece.origin
        if origin in stay and origin not in seen:
            changes += [under(change, (array, origin)) for change in piece.changes]
            after = origin
        else:
            inserted.append((after, _inserted(source, array, piece, bare, write)))
        if origin is not None:
            seen.add(origin)
    gone = frozenset((array, i) for i in range(_count(source, array)) if i not in stay)
    return Moves(tuple(changes), gone, tuple(inserted), (), min(stay, default=None))


def _inserted(source: Source, array: str, piece: Piece, bare: Bare, write: Writer) -> str:
    if piece.origin is not None:
        return _block(array, source.block(array, piece.origin), piece.changes, write)
    if piece.block is not None:
        read_block(array, piece.block)
        return _block(array, piece.block, piece.changes, write)
    own: dict[str, str] = {}
    rest: list[Change] = []
    for change in piece.changes:
        key = change.path[0]
        if isinstance(change, Put) and len(change.path) == 1 and isinstance(key, str):
            own[key] = change.raw
        elif not isinstance(change, Drop):
            rest.append(change)
    return _block(array, bare(list(own.items())), rest, write)


def _firsts(pieces: Sequence[Piece]) -> list[int]:
    """Return each origin once, in the order of its first piece."""
    return list(dict.fromkeys(piece.origin for piece in pieces if piece.origin is not None))


def _block(array: str, text: str, changes: Sequence[Change], write: Writer) -> str:
    if text.lstrip(" \t").startswith("{"):
        raise SpliceError(
            f"a block of {array} in braces cannot be put among elements with a head [[{array}]]",
        )
    if not changes:
        return text
    return write(read_source(text), [under(change, (array, 0)) for change in changes])


def under(change: Change, path: Path) -> Change:
    """Return a change with a path put before its own."""
    return replace(change, path=(*path, *change.path))


def _inline(source: Source, arrange: Arrange, newline: str, write: Writer) -> Moves:
    array = arrange.array
    value = source.layout.places[array,].value
    if value is None or value.kind != "array" or value.bad:
        raise SpliceError(f"{array} is no array of tables")
    if [piece.origin for piece in arrange.pieces] == list(range(len(value.items))):
        return Moves(
            tuple(
                under(change, (array, piece.origin))
                for piece in arrange.pieces
                if piece.origin is not None
                for change in piece.changes
            ),
        )
    seen: set[int] = set()
    elements: list[tuple[int | None, str]] = []
    for piece in arrange.pieces:
        text = "{}" if piece.block is None else piece.block
        if piece.origin is not None:
            text = source.block(array, piece.origin)
        elements.append((piece.origin, _element(array, text, piece.changes, write)))
        seen |= {piece.origin} if piece.origin is not None else set()
    text = rearranged(source.text, value, elements, newline)
    return Moves(edits=(Edit(value.start, value.end, text, Rank.VALUE),))


def _element(array: str, text: str, changes: Sequence[Change], write: Writer) -> str:
    if not text.startswith("{"):
        raise SpliceError(
            f"a block with a head [[{array}]] cannot be put among elements of {array} in braces",
        )
    source = read_source(f"{key_text(array)} = [{text}]\n")
    written = write(source, [under(change, (array, 0)) for change in changes])
    return read_source(written).raw((array, 0))
