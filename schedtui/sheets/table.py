"""A schedule on a sheet, once it is found: columns with their headings, rows of units.

Plain values that finding makes and matching and placing read.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.sheets.grid import Cell


@dataclass(frozen=True, slots=True)
class SheetColumn:
    """A column of a schedule.

    Args:
        place: its place in the table's grid.
        parts: the printed headings over it, the outermost first.
        carried: which of its parts only stand over it because nothing ended them, as in text
            without merged cells.
        ref: where its heading stands.
        hidden: whether the sheet hides it.
        unit: what stands under it in a row of units.
    """

    place: int
    parts: tuple[str, ...]
    carried: frozenset[int] = frozenset()
    ref: str = ""
    hidden: bool = False
    unit: str = ""

    @property
    def group(self) -> str:
        """The headings over its own, as printed."""
        return " / ".join(self.parts[:-1])

    @property
    def heading(self) -> str:
        """Its own heading, as printed."""
        name = self.parts[-1] if self.parts else ""
        return f"{name} ({self.unit.strip('()[] ')})" if self.unit else name

    @property
    def printed(self) -> str:
        """Group and name as printed."""
        return " / ".join((*self.parts[:-1], self.heading))

    @property
    def texts(self) -> tuple[str, ...]:
        """Every text over its values, the row of units included."""
        return (*self.parts, self.unit) if self.unit else self.parts


@dataclass(frozen=True, slots=True)
class Loose:
    """Something on a sheet that is no unit's value, and what became of it.

    Args:
        ref: where it stands.
        text: what stands there.
        said: what it was taken for, or why it has no place.
        kept: whether nothing is lost by it: a heading that repeats, a title.
    """

    ref: str
    text: str
    said: str
    kept: bool = False


@dataclass(frozen=True, slots=True)
class SheetTable:
    """A schedule on a sheet.

    Args:
        sheet: name of its sheet.
        ref: where its heading begins.
        columns: its columns, that of the tags among them.
        tag: place of the tags' column.
        rows: the units' rows: cells by the place of the column.
        turned: whether units stand across and fields down.
        titles: the titles over it.
        notes: the notes under it.
        loose: what else stood in it.
        said: what is to be said of it as a whole.
        decimal_comma: whether its texts have the comma for decimal sign.
    """

    sheet: str
    ref: str
    columns: tuple[SheetColumn, ...]
    tag: int
    rows: tuple[Mapping[int, Cell], ...]
    turned: bool = False
    titles: tuple[str, ...] = ()
    notes: tuple[str, ...] = ()
    loose: tuple[Loose, ...] = ()
    said: tuple[str, ...] = ()
    decimal_comma: bool = False

    def cells(self, place: int) -> list[Cell]:
        """Return the cells of a column that have something in them."""
        return [row[place] for row in self.rows if place in row]

    def where(self, ref: str) -> str:
        """Return a cell's place with the sheet it is on."""
        return f"{self.sheet}!{ref}" if self.sheet else ref
