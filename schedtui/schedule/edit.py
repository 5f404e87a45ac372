"""Edits: values that know how to be applied and what takes them back.

`apply(document)` returns the new document and the edit that undoes it. This is the one way a
document changes; the history of edits is kept elsewhere.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING, Protocol

from schedtui.schedule.document import SINGLE, Document, Origin, Row

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.schedule.typed import Typed


class Edit(Protocol):
    """A change to a document."""

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Return the changed document, and the edit that takes the change back."""

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the rows it changes, as table and row id."""


@dataclass(frozen=True, slots=True)
class SetCell:
    """Set a cell, or clear it.

    Args:
        table: name of the table.
        row_id: id of the row; ignored for a table that stands once and is not there yet.
        key: the cell's key.
        cell: what it shall hold; None to clear it.
        order: the row's keys in their order, to restore a cleared cell's place; None for the end.
    """

    table: str
    row_id: int
    key: str
    cell: Typed | None
    order: tuple[str, ...] | None = None

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Set the cell."""
        rows = document.rows(self.table)
        if not rows:  # a table that stands once comes to be with its first key, and goes with it
            row = Row(self.row_id, {})
            document = replace(document, next_id=max(document.next_id, self.row_id + 1))
        else:
            row = document.row(self.table, self.row_id)
        before = row.cells.get(self.key)
        cells = {key: cell for key, cell in row.cells.items() if key != self.key or self.cell}
        if self.cell is not None:
            cells[self.key] = self.cell
        if self.order is not None:
            cells = _in_order(cells, self.order)
        inverse = SetCell(self.table, row.row_id, self.key, before, tuple(row.cells))
        if self.table in SINGLE and not cells and row.origin is None:
            return document.without_table(self.table), inverse
        return document.with_row(self.table, replace(row, cells=cells)), inverse

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the one row."""
        return frozenset({(self.table, self.row_id)})


@dataclass(frozen=True, slots=True)
class SetAccepted:
    """Give a unit other acceptances.

    Args:
        row_id: id of the unit.
        accepted: all that it shall have, as rows.
    """

    row_id: int
    accepted: tuple[Row, ...]

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Set the acceptances; those of the file stand first, as they will when it is saved."""
        unit = document.row("unit", self.row_id)
        now = {one.row_id: one.origin for one in unit.accepted}
        placed = [
            replace(one, origin=now.get(one.row_id, _still(one.origin, unit.origin)))
            for one in self.accepted
        ]
        placed.sort(key=_place_in_file)
        changed = document.with_row("unit", replace(unit, accepted=tuple(placed)))
        ids = (document.next_id - 1, *(one.row_id for one in self.accepted))
        return replace(changed, next_id=max(ids) + 1), SetAccepted(self.row_id, unit.accepted)

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the unit."""
        return frozenset({("unit", self.row_id)})


def _still(origin: Origin | None, unit: Origin | None) -> Origin | None:
    """Return where an acceptance came from, if its unit is of the same text still."""
    return origin if origin and unit and origin.source is unit.source else None


def _place_in_file(row: Row) -> tuple[bool, int]:
    return row.origin is None, row.origin.index or 0 if row.origin else 0


@dataclass(frozen=True, slots=True)
class InsertRow:
    """Put a row into an array.

    Args:
        table: name of the array.
        row: the row, its id not yet in use.
        place: where it shall stand, from 0.
    """

    table: str
    row: Row
    place: int

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Insert the row."""
        rows = document.rows(self.table)
        changed = document.with_rows(
            self.table, (*rows[: self.place], self.row, *rows[self.place :])
        )
        changed = replace(changed, next_id=max(changed.next_id, self.row.row_id + 1))
        return changed, DeleteRow(self.table, self.row.row_id)

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the new row."""
        return frozenset({(self.table, self.row.row_id)})


@dataclass(frozen=True, slots=True)
class DeleteRow:
    """Take a row out of an array; its text goes with it and comes back with the undo.

    Args:
        table: name of the array.
        row_id: id of the row.
    """

    table: str
    row_id: int

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Delete the row."""
        place = document.position(self.table, self.row_id)
        row = document.rows(self.table)[place]
        rest = tuple(one for one in document.rows(self.table) if one is not row)
        return document.with_rows(self.table, rest), InsertRow(self.table, row, place)

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the row that goes."""
        return frozenset({(self.table, self.row_id)})


@dataclass(frozen=True, slots=True)
class MoveRow:
    """Move a row to another place of its array.

    Args:
        table: name of the array.
        row_id: id of the row.
        place: where it shall stand afterwards, from 0.
    """

    table: str
    row_id: int
    place: int

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Move the row."""
        before = document.position(self.table, self.row_id)
        rows = list(document.rows(self.table))
        rows.insert(self.place, rows.pop(before))
        return document.with_rows(self.table, tuple(rows)), replace(self, place=before)

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the moved row."""
        return frozenset({(self.table, self.row_id)})


@dataclass(frozen=True, slots=True)
class Together:
    """Several edits that are one step of a person's work.

    Args:
        edits: the edits, in the order they are applied.
    """

    edits: tuple[Edit, ...]

    def apply(self, document: Document) -> tuple[Document, Edit]:
        """Apply each, and gather what takes them back in the opposite order."""
        inverses: list[Edit] = []
        for edit in self.edits:
            document, inverse = edit.apply(document)
            inverses.append(inverse)
        return document, Together(tuple(reversed(inverses)))

    def touches(self) -> frozenset[tuple[str, int]]:
        """Name the rows that any of them changes."""
        return frozenset().union(*(edit.touches() for edit in self.edits))


def _in_order(cells: Mapping[str, Typed], order: tuple[str, ...]) -> dict[str, Typed]:
    """Return `cells` with the keys of `order` first and in that order."""
    known = {key: cells[key] for key in order if key in cells}
    return known | {key: cell for key, cell in cells.items() if key not in known}
