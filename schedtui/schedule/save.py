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
from schedtui.schedule.toml_source import Arrange, Drop, Path, Piece, Put, splice

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
    changes: list[Put | Drop | Arrange] = []
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
        name: replace(row, origin=again.single[name].origin)
        for name, row in document.single.items()
        if name in again.single
    }
    arrays = {
        table: tuple(
            replace(row, origin=new.origin)
            for row, new in zip(document.rows(table), again.rows(table), strict=True)
        )
        for table in ARRAYS
    }
    return replace(
        document, source=again.source, single=single, arrays=arrays, problems=again.problems
    )


def _prove_equal(document: Document, again: Document) -> None:
    for table in (*SINGLE, *ARRAYS):
        # A table that came to be with a key and lost it again is not written.
        wanted = [dict(row.cells) for row in document.rows(table) if row.cells or row.origin]
        found = [dict(row.cells) for row in again.rows(table)]
        if wanted != found:
            raise SpliceError(f"writing the edits would not have held what is in [{table}]")


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


def _differences(row: Row, path: Path) -> Iterator[Put | Drop]:
    """Say what must change for the row's place in the source to hold its cells."""
    before = row.origin.cells if row.origin else _NO_CELLS
    for key in before:
        if key not in row.cells:
            yield Drop((*path, key))
    for key, cell in row.cells.items():
        if before.get(key) != cell:
            yield Put((*path, key), cell.toml)
