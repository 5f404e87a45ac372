"""From a document back to its file's text: only what was edited differs.

The edits are spliced into the source all at once; the result is read again and must hold exactly
the document's cells, or nothing is written.
"""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from schedtui.errors import SpliceError
from schedtui.schedule.document import ARRAYS, SINGLE, Document, Row
from schedtui.schedule.load import load
from schedtui.schedule.toml_source import (
    Append,
    Arrange,
    Change,
    Drop,
    Path,
    Piece,
    Put,
    Remove,
    splice,
)
from schedtui.schedule.typed import toml_text

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from schedtui.schedule.typed import Typed

# Where a table that is not there yet goes.
_ORDER = ("format", "project", "limits", "defaults", *ARRAYS, "record")
_NO_CELLS: Mapping[str, Typed] = {}


def source_text(document: Document) -> str:
    """Return the text that the document's file shall have.

    Raises:
        SpliceError: the edits could not be written without touching something else.
    """
    changes: list[Change | Arrange] = []
    for table in SINGLE:
        for row in document.rows(table):
            changes += _differences(row, (table,))
    for table in ARRAYS:
        rows = document.rows(table)
        if _in_place(document, table):
            for index, row in enumerate(rows):
                changes += _differences(row, (table, index))
        else:
            changes.append(Arrange(table, tuple(_piece(document, table, row) for row in rows)))
    return splice(document.source, changes, order=_ORDER) if changes else document.source.text


def saved(document: Document, text: str) -> Document:
    """Return the document with `text` for its source, its rows and their ids as they are.

    Raises:
        SpliceError: `text` does not hold exactly the document's cells.
    """
    again = load(text)
    _prove_equal(document, again)
    single = {
        name: _placed(row, again.single[name])
        for name, row in document.single.items()
        if name in again.single
    }
    arrays = {table: _all_placed(document.rows(table), again.rows(table)) for table in ARRAYS}
    return replace(again, single=single, arrays=arrays, next_id=document.next_id)


def _placed(row: Row, found: Row) -> Row:
    """Return a row with the place that it was found at in the new text."""
    return replace(row, origin=found.origin, accepted=_all_placed(row.accepted, found.accepted))


def _all_placed(rows: tuple[Row, ...], found: tuple[Row, ...]) -> tuple[Row, ...]:
    return tuple(map(_placed, rows, found))


def _prove_equal(document: Document, again: Document) -> None:
    for table in (*SINGLE, *ARRAYS):
        wanted, found = (map(_content, one.rows(table)) for one in (document, again))
        if list(wanted) != list(found):
            raise SpliceError(f"writing the edits would not have held what is in [{table}]")


def _content(row: Row) -> tuple[Mapping[str, Typed], list[Mapping[str, Typed]]]:
    return row.cells, [one.cells for one in row.accepted]


def _in_place(document: Document, table: str) -> bool:
    """Tell whether every row of an array still stands where the source has it."""
    rows = document.rows(table)
    return len(rows) == len(document.source.values.get(table, [])) and all(
        row.origin is not None
        and row.origin.source is document.source
        and row.origin.index == index
        for index, row in enumerate(rows)
    )


def _piece(document: Document, table: str, row: Row) -> Piece:
    changes = tuple(_differences(row, ()))
    origin = row.origin
    if origin is None or origin.index is None:
        return Piece(None, None, changes)
    if origin.source is document.source:
        return Piece(origin.index, None, changes)
    return Piece(None, origin.source.block(table, origin.index), changes)


def _differences(row: Row, path: Path) -> Iterator[Change]:
    """Say what must change for the row's place in the source to hold its cells."""
    before = row.origin.cells if row.origin else _NO_CELLS
    for key in before:
        if key not in row.cells:
            yield Drop((*path, key))
    for key, cell in row.cells.items():
        if before.get(key) != cell:
            yield from _put((*path, key), before.get(key), cell)
    yield from _differences_in_accepted(row, (*path, "accepted"))


def _put(path: Path, before: Typed | None, cell: Typed) -> Iterator[Put]:
    """Put a cell in its place; in a list of as many texts as before, only those that differ."""
    old, new = before.value if before else None, cell.value
    if isinstance(old, tuple) and isinstance(new, tuple) and len(old) == len(new):
        for index, (one, other) in enumerate(zip(old, new, strict=True)):
            if one != other:
                yield Put((*path, index), toml_text(other))
    else:
        yield Put(path, cell.toml)


def _differences_in_accepted(row: Row, path: Path) -> Iterator[Change]:
    there = row.origin.accepted if row.origin else 0
    kept = {one.origin.index: one for one in row.accepted if one.origin}
    for index in range(there):
        if index in kept:
            yield from _differences(kept[index], (*path, index))
        else:
            yield Remove((*path, index))
    for one in row.accepted:
        if one.origin is None:
            yield Append(path, tuple((key, cell.toml) for key, cell in one.cells.items()))
