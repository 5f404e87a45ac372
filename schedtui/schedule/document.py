"""The document: what a person typed, cell by cell, and where in the file it came from.

A document is a value. An edit makes another one; nothing here changes in place, computes air or
draws. Rows have lasting ids; nothing is addressed by position.
"""

from __future__ import annotations

from dataclasses import dataclass, field, replace
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from schedtui.errors import Problem
    from schedtui.schedule.toml_source import Source
    from schedtui.schedule.typed import Typed
    from schedtui.units import System

# The tables that stand once, and those that stand as often as there are rows.
SINGLE = ("project", "limits", "defaults", "record")
ARRAYS = ("column", "condition", "plant", "unit", "accepted")

_NO_CELLS: Mapping[str, Typed] = {}


@dataclass(frozen=True, slots=True)
class Origin:
    """Where a row came from.

    Args:
        source: the file's text it was read from.
        index: its place in its array then; None for a table that stands once.
        cells: its cells as read, so that saving writes only what differs.
        accepted: how many acceptances it had.
    """

    source: Source = field(repr=False, compare=False)
    index: int | None
    cells: Mapping[str, Typed] = field(repr=False)
    accepted: int = 0


@dataclass(frozen=True, slots=True)
class Row:
    """One row of a table.

    Args:
        row_id: its lasting number.
        cells: its own cells by key, in the order of the file, unknown keys included.
        origin: where it came from; None for a row made here.
        accepted: a unit's acceptances, as rows of their own.
    """

    row_id: int
    cells: Mapping[str, Typed]
    origin: Origin | None = None
    accepted: tuple[Row, ...] = ()

    def text(self, key: str) -> str:
        """Return the cell's text, empty where there is none."""
        cell = self.cells.get(key)
        return cell.text if cell else ""


@dataclass(frozen=True, slots=True)
class Document:
    """A schedule file as typed.

    Args:
        source: the file's text as read or last saved.
        system: unit system of every number.
        single: the tables that stand once, by name; absent ones are not there.
        arrays: the rows of every other table, by its name.
        next_id: the id that the next new row gets.
        problems: what keeps the commands from accepting the file, in the order of its lines.
        unknown: paths of the tables and top-level keys that the catalogue does not know.
    """

    source: Source = field(repr=False)
    system: System
    single: Mapping[str, Row]
    arrays: Mapping[str, tuple[Row, ...]]
    next_id: int
    problems: tuple[Problem, ...] = ()
    unknown: tuple[str, ...] = ()

    def rows(self, table: str) -> tuple[Row, ...]:
        """Return the rows of a table, of one that stands once as well."""
        if table in SINGLE:
            return (self.single[table],) if table in self.single else ()
        return self.arrays.get(table, ())

    def row(self, table: str, row_id: int) -> Row:
        """Return the row with that id.

        Raises:
            KeyError: the table has no such row.
        """
        for row in self.rows(table):
            if row.row_id == row_id:
                return row
        raise KeyError(row_id)

    def position(self, table: str, row_id: int) -> int:
        """Return the row's present place in its table."""
        for place, row in enumerate(self.rows(table)):
            if row.row_id == row_id:
                return place
        raise KeyError(row_id)

    def own_columns(self) -> Iterator[str]:
        """Name the keys of the project's own columns."""
        return (row.text("key") for row in self.rows("column") if row.text("key"))

    def with_row(self, table: str, row: Row) -> Document:
        """Return the document with `row` in the place of the one with its id."""
        if table in SINGLE:
            return replace(self, single={**self.single, table: row})
        rows = tuple(row if one.row_id == row.row_id else one for one in self.arrays[table])
        return replace(self, arrays={**self.arrays, table: rows})

    def without_table(self, table: str) -> Document:
        """Return the document without a table that stands once."""
        single = {name: row for name, row in self.single.items() if name != table}
        return replace(self, single=single)

    def with_rows(self, table: str, rows: tuple[Row, ...]) -> Document:
        """Return the document with other rows in an array."""
        return replace(self, arrays={**self.arrays, table: rows})
