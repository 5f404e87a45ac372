"""The part of a table that is on the screen, and where the cursor is in it.

State of the grid without the widget: rows and columns as last read from the source, the cursor,
what is scrolled out, and the lines painted already. Must not know of keys, messages or the app.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from rich.segment import Segment
from textual.strip import Strip

from schedtui.screen import looks
from schedtui.screen.painter import (
    HEADING_LINES,
    Cell,
    Column,
    EditField,
    Layout,
    Place,
    TableSource,
    arrange,
    cursor_over,
    first_showing,
    heading_strips,
    message_strip,
    row_strip,
)

if TYPE_CHECKING:
    from collections.abc import Sequence

_PAGES_KEPT = 4  # painted lines are kept for so many pages


@dataclass(frozen=True, slots=True)
class Painted:
    """A row as it was painted.

    Args:
        state: what it depends on: the row's version, the layout, the marked columns.
        cells: what stood in each column of the layout.
        strip: the line, without cursor and edit.
    """

    state: tuple[int, Layout, frozenset[str]]
    cells: tuple[Cell, ...]
    strip: Strip


class Viewport:
    """What is on the screen of one table.

    Args:
        source: the table.
        empty: what is said where there are no rows.
    """

    def __init__(self, source: TableSource, empty: str) -> None:
        self.source = source
        self.columns: tuple[Column, ...] = ()
        self.rows: tuple[int, ...] = ()
        self.row = 0
        self.column = 0
        self.top = 0
        self.layout = arrange((), 0, 0)
        self.marked: tuple[frozenset[int], frozenset[str]] = (frozenset(), frozenset())
        self._empty = empty
        self._index: dict[int, int] = {}
        self._first = 0
        self._width = 0
        self._height = 0
        self._headings = heading_strips(self.layout)
        self._painted: dict[int, Painted] = {}
        self.read_rows()
        self.read_columns()

    @property
    def cursor(self) -> tuple[int, str] | None:
        """The row and the column of the cursor; None while there are no rows or no columns."""
        if not self.rows or not self.columns:
            return None
        return self.rows[self.row], self.columns[self.column].key

    @property
    def place(self) -> Place | None:
        """Where the cursor's column stands."""
        return self.layout.place_of(self.columns[self.column].key) if self.columns else None

    @property
    def page(self) -> int:
        """How many rows fit."""
        return max(1, self._height - HEADING_LINES)

    @property
    def rows_shown(self) -> Sequence[int]:
        """The rows on the screen, from the top."""
        return self.rows[self.top : self.top + self.page]

    def row_of(self, row_key: int, otherwise: int = -1) -> int:
        """Return the place of a row in the order shown."""
        return self._index.get(row_key, otherwise)

    def column_of(self, column_key: str, otherwise: int = -1) -> int:
        """Return the place of a column."""
        found = (i for i, column in enumerate(self.columns) if column.key == column_key)
        return next(found, otherwise)

    def line_of(self, row: int) -> int | None:
        """Return the line on which a row stands, or None while it is out of sight."""
        y = row - self.top
        return y + HEADING_LINES if 0 <= y < self.page and row < len(self.rows) else None

    def next_typed(self, column: int, direction: int) -> int:
        """Return the next column in this direction that can be typed into, or the same one."""
        end = len(self.columns) if direction > 0 else -1
        ahead = range(column + direction, end, direction)
        return next((i for i in ahead if not self.columns[i].computed), max(0, column))

    def next_group(self, direction: int) -> int:
        """Return the first column of the next group of columns, or the outermost column."""
        groups = [column.group for column in self.columns]
        starts = [i for i in range(1, len(groups)) if groups[i] != groups[i - 1]]
        starts.insert(0, self.next_typed(-1, 1))
        ahead = [i for i in starts if (i - self.column) * direction > 0]
        outermost = len(self.columns) - 1 if direction > 0 else self.next_typed(-1, 1)
        return (ahead[0] if direction > 0 else ahead[-1]) if ahead else outermost

    # -- taking what the source has --------------------------------------------------------

    def read_rows(self) -> bool:
        """Take the rows from the source; return whether they are others than before.

        The cursor stays with its row; where that is gone, with its place.
        """
        rows = tuple(self.source.row_keys)
        if rows == self.rows:
            return False
        held = self.rows[self.row] if self.rows else None
        self.rows = rows
        self._index = {row_key: position for position, row_key in enumerate(rows)}
        self.row = 0 if held is None else self._index.get(held, self.row)
        self.row = max(0, min(self.row, len(rows) - 1))
        return True

    def read_columns(self) -> None:
        """Take the columns from the source; the cursor stays with its column if it is there."""
        held = self.columns[self.column].key if self.columns else None
        self.columns = tuple(sorted(self.source.columns, key=lambda column: not column.frozen))
        column = self.next_typed(-1, 1) if held is None else self.column_of(held, self.column)
        self.column = max(0, min(column, len(self.columns) - 1))

    # -- scrolling -------------------------------------------------------------------------

    def resize(self, width: int, height: int) -> None:
        """Take a new size in cells."""
        if not self._height:  # shown for the first time: from the top, whatever was looked for
            self.top = self._first = 0
        self._width, self._height = width, height

    def turn_page(self, pages: int) -> bool:
        """Scroll by whole pages; return whether anything moved."""
        return self._scroll_to(self.top + pages * self.page)

    def bring_into_sight(self) -> tuple[bool, bool]:
        """Scroll as far as the cursor needs; return whether rows moved, and whether columns did.

        It scrolls by a third of a page where one row would do: every scroll sends all of it.
        """
        stride = self.page // 3
        top = self.top
        if self.row < top:
            top = self.row - stride
        elif self.row >= top + self.page:
            top = self.row - self.page + 1 + stride
        rows_moved = self._scroll_to(top)
        if self.columns:
            key = self.columns[self.column].key
            self._first = first_showing(self.columns, key, self._first, self._width)
        layout = arrange(self.columns, self._first, self._width)
        if layout == self.layout:
            return rows_moved, False
        self.layout = layout
        self._headings = heading_strips(layout)
        return rows_moved, True

    def _scroll_to(self, top: int) -> bool:
        top = max(0, min(top, len(self.rows) - self.page))
        moved = top != self.top
        self.top = top
        return moved

    # -- painting --------------------------------------------------------------------------

    def forget_painted(self) -> None:
        """Ask the source for every cell again."""
        self._painted.clear()

    def line(self, y: int, field: EditField | None) -> Strip:
        """Return a line of the screen.

        Args:
            y: the line, from the top.
            field: the edit under way.
        """
        if y < HEADING_LINES:
            return self._headings[y]
        row = self.top + y - HEADING_LINES
        if row < len(self.rows):
            return self._row_line(row, field)
        if not self.rows and y == HEADING_LINES:
            return message_strip(self._empty, self._width)
        return Strip([Segment(" " * self._width, looks.GROUND)], self._width)

    def _row_line(self, row: int, field: EditField | None) -> Strip:
        painted, place = self.paint(self.rows[row]), self.place
        if row != self.row or place is None:
            return painted.strip
        cell = painted.cells[self.layout.places.index(place)]
        strip = cursor_over(painted.strip, place, cell)
        return strip if field is None else field.over(strip)

    def paint(self, row_key: int) -> Painted:
        """Return a row painted; the source is asked only if the row is another than last time."""
        marked = self.marked[1] if row_key in self.marked[0] else frozenset()
        state = (self.source.version(row_key), self.layout, marked)
        painted = self._painted.get(row_key)
        if painted is None or painted.state != state:
            keys = (place.column.key for place in self.layout.places)
            cells = tuple(self.source.cell(row_key, key) for key in keys)
            if len(self._painted) > _PAGES_KEPT * self.page:
                self._painted.clear()
            painted = Painted(state, cells, row_strip(self.layout, cells, marked))
            self._painted[row_key] = painted
        return painted

    def changed_places(self, row_key: int) -> Sequence[Place] | None:
        """Return where a row's cells are others than painted last, or None if that is unknown."""
        before = self._painted.get(row_key)
        now = self.paint(row_key)
        if before is None or before.state[1] != now.state[1]:
            return None
        trio = zip(self.layout.places, before.cells, now.cells, strict=True)
        return [place for place, old, new in trio if old != new]
