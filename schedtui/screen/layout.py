"""Which columns of a table are on the screen, and where each stands.

Whole columns only; the frozen ones stay while the others scroll. Pure, and nothing about cells,
colours or widgets.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Literal

from schedtui.text_width import visible, width_of

if TYPE_CHECKING:
    from collections.abc import Sequence


@dataclass(frozen=True, slots=True)
class Column:
    """A column of a table.

    Args:
        key: what it is addressed by.
        group: the name that stands above it and its neighbours of the same group.
        heading: the field's short label.
        unit: the unit its numbers are in, or empty.
        width: cells its text may take; the sign behind it is not counted.
        align: which side the text keeps to.
        computed: whether it cannot be typed into.
        frozen: whether it stays while the others scroll; frozen columns come first.
    """

    key: str
    group: str
    heading: str
    unit: str
    width: int
    align: Literal["left", "right"]
    computed: bool = False
    frozen: bool = False


@dataclass(frozen=True, slots=True)
class Place:
    """A column and where it stands on the screen.

    Args:
        column: the column.
        x: its first cell.
        width: cells for its text; the cell after them holds the sign.
    """

    column: Column
    x: int
    width: int

    @property
    def end(self) -> int:
        """The first cell behind it."""
        return self.x + self.width + 1


@dataclass(frozen=True, slots=True)
class Layout:
    """Which columns are on the screen and where.

    Args:
        places: the columns shown, from left to right.
        rule: where the line between the frozen columns and the others stands.
        width: cells of the whole line.
        more_left: whether columns are hidden between the frozen ones and the first other.
        more_right: whether columns are hidden beyond the last.
    """

    places: tuple[Place, ...]
    rule: int
    width: int
    more_left: bool
    more_right: bool

    def place_of(self, column_key: str) -> Place | None:
        """Return where a column stands, or None while it is out of sight."""
        return next((place for place in self.places if place.column.key == column_key), None)

    def at(self, x: int) -> Place | None:
        """Return the column that stands at a cell, if any."""
        return next((place for place in self.places if place.x <= x < place.end), None)


def column_width(heading: str, unit: str, text: int) -> int:
    """Return a column's width so that its heading, its unit and texts of so many cells fit.

    >>> column_width("total", "MBH", 7)
    9
    """
    return max(width_of(visible(f"{heading} {unit}".rstrip())), text)


def _first_free(columns: Sequence[Column]) -> int:
    # One cell for the pointer, one behind the frozen columns for the rule.
    return 2 + sum(column.width + 1 for column in columns if column.frozen)


def _gap(before: Column | None, column: Column) -> int:
    """Return the blanks that keep a text from touching the sign of the number before it."""
    return int(before is not None and before.align == "right" and column.align == "left")


def arrange(columns: Sequence[Column], first: int, width: int) -> Layout:
    """Return the layout of a line.

    Args:
        columns: all columns, the frozen ones first.
        first: how many of those that are not frozen are scrolled out on the left.
        width: cells of the line.
    """
    places = []
    x = 1
    for column in columns:
        if column.frozen:
            places.append(Place(column, x, column.width))
            x += column.width + 1
    rule = x
    x += 1
    limit = width - 1  # the last cell says whether there is more
    loose = [column for column in columns if not column.frozen]
    shown = 0
    before = None
    for column in loose[first:]:
        room = column.width
        x += _gap(before, column)
        before = column
        if x + room + 1 > limit:
            if shown or limit - x - 1 < 1:
                break
            room = limit - x - 1  # wider than the screen: cut, and each text says so
        places.append(Place(column, x, room))
        x += room + 1
        shown += 1
    return Layout(tuple(places), rule, width, first > 0, first + shown < len(loose))


def first_showing(columns: Sequence[Column], column_key: str, first: int, width: int) -> int:
    """Return which column to begin with so that the named one is on the screen.

    Going right it brings in a little more than is needed, for every scroll repaints the page.
    """
    loose = [column for column in columns if not column.frozen]
    wanted = next((i for i, column in enumerate(loose) if column.key == column_key), None)
    if wanted is None:
        return min(first, max(0, len(loose) - 1))
    room = width - 1 - _first_free(columns)

    def spans(start: int, end: int) -> int:
        run = loose[start : end + 1]
        return sum(column.width + 1 for column in run) + sum(map(_gap, run, run[1:]))

    if wanted < first:
        return wanted - 1 if wanted and spans(wanted - 1, wanted) <= room else wanted
    if spans(first, wanted) <= room:
        return first
    ahead = min(len(loose) - 1, wanted + 2)
    while first < wanted and spans(first, ahead) > room:
        first += 1
    return first
