"""A grid: the text cells of one sheet, whatever file or paste they came from.

Sparse on purpose: no size that a sheet states is ever believed or walked to, only cells that are
there. Knows nothing of what the cells mean.
"""

from __future__ import annotations

from bisect import bisect_left, bisect_right
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.errors import FileError

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

MOST_CELLS = 250_000
MOST_ROWS = 10_000  # with something in them; no project has as many units
MOST_COLUMNS = 1_000
MOST_CHARACTERS = 8_000_000
LONGEST_CELL = 32_767  # characters; a spreadsheet's own limit
MOST_MERGES = 20_000


@dataclass(frozen=True, slots=True)
class Cell:
    """One cell with something in it.

    Args:
        text: what it shows.
        ref: where it stands, "B7".
        number: the same as a plain decimal number, where the sheet stores a number.
        problem: why what it shows cannot be relied on; empty for a good cell.
    """

    text: str
    ref: str
    number: str | None = None
    problem: str = ""


@dataclass(frozen=True, slots=True)
class Merge:
    """A block of cells that shows as one; bounds are inclusive and counted from 1."""

    top: int
    left: int
    bottom: int
    right: int


@dataclass(frozen=True, slots=True)
class Grid:
    """The cells of one sheet.

    Args:
        name: the sheet's name, empty where there is but one.
        rows: cells by row and column, both counted from 1.
        merges: its merged blocks.
        hidden_rows: rows that the sheet does not show.
        hidden_columns: columns that it does not show.
        hidden: whether the sheet itself is hidden.
        decimal_comma: whether its texts were written where the comma is the decimal sign.
    """

    name: str
    rows: Mapping[int, Mapping[int, Cell]]
    merges: tuple[Merge, ...] = ()
    hidden_rows: frozenset[int] = frozenset()
    hidden_columns: frozenset[int] = frozenset()
    hidden: bool = False
    decimal_comma: bool = False

    def cell(self, row: int, column: int) -> Cell | None:
        """Return the cell that stands there, None for an empty one."""
        return self.rows.get(row, {}).get(column)

    def text(self, row: int, column: int) -> str:
        """Return the text that stands there."""
        found = self.cell(row, column)
        return found.text if found else ""

    def turned(self) -> Grid:
        """Return the grid with its rows for columns; cells keep where they stand."""
        rows: dict[int, dict[int, Cell]] = {}
        for row, cells in self.rows.items():
            for column, cell in cells.items():
                rows.setdefault(column, {})[row] = cell
        merges = tuple(Merge(m.left, m.top, m.right, m.bottom) for m in self.merges)
        return replace(
            self,
            rows={row: rows[row] for row in sorted(rows)},
            merges=merges,
            hidden_rows=self.hidden_columns,
            hidden_columns=self.hidden_rows,
        )

    def spread(self) -> dict[tuple[int, int], Merge]:
        """Return the merged block of every cell inside one, as far as cells or rows are there."""
        present = sorted(self.rows)
        widest = max((max(cells) for cells in self.rows.values() if cells), default=0)
        found: dict[tuple[int, int], Merge] = {}
        for merge in self.merges:
            rows = present[bisect_left(present, merge.top) : bisect_right(present, merge.bottom)]
            columns = range(merge.left, min(merge.right, widest) + 1)
            if len(found) + len(rows) * len(columns) > MOST_CELLS:
                raise FileError(f"more than {MOST_CELLS} cells are merged")
            found.update({(row, column): merge for row in rows for column in columns})
        return found


class Gathering:
    """Cells on their way into a grid, counted so that no sheet takes more than its share."""

    def __init__(self) -> None:
        self.rows: dict[int, dict[int, Cell]] = {}
        self._cells = 0
        self._characters = 0

    def add(self, row: int, column: int, cell: Cell) -> None:
        """Add a cell.

        Raises:
            FileError: there are too many, or too much text in them.
        """
        self._cells += 1
        self._characters += len(cell.text)
        if self._cells > MOST_CELLS:
            raise FileError(f"has more than {MOST_CELLS} filled cells")
        if len(self.rows) > MOST_ROWS or len(self.rows.get(row, ())) > MOST_COLUMNS:
            raise FileError(f"has more than {MOST_ROWS} rows or {MOST_COLUMNS} columns")
        if len(cell.text) > LONGEST_CELL:
            raise FileError(f"cell {cell.ref} has more than {LONGEST_CELL} characters")
        if self._characters > MOST_CHARACTERS:
            raise FileError(f"has more than {MOST_CHARACTERS} characters of text")
        self.rows.setdefault(row, {})[column] = cell

    def sorted(self) -> dict[int, dict[int, Cell]]:
        """Return the rows in their order, their cells in theirs."""
        return {row: dict(sorted(self.rows[row].items())) for row in sorted(self.rows)}


def column_letters(column: int) -> str:
    """Return the letters of a column counted from 1.

    >>> column_letters(1), column_letters(28)
    ('A', 'AB')
    """
    letters = ""
    while column:
        column, rest = divmod(column - 1, 26)
        letters = chr(ord("A") + rest) + letters
    return letters


def filled(cells: Mapping[int, Cell]) -> Iterator[tuple[int, Cell]]:
    """Yield the column and cell of all that is not blank."""
    return ((column, cell) for column, cell in cells.items() if cell.text or cell.problem)
