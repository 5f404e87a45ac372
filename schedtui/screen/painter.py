"""Turns columns and cells into strips of styled text; every table of the program is painted here.

Pure: no widget, no state. Every segment has a style, and no text is read as markup.
Must not know what the table is about.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import groupby, takewhile
from typing import TYPE_CHECKING, Protocol

from rich.segment import Segment
from textual.strip import Strip

from schedtui.screen import looks
from schedtui.screen.layout import (
    Column,
    Layout,
    Place,
    arrange,
    column_width,
    first_showing,
)
from schedtui.screen.looks import Look
from schedtui.text_width import ELLIPSIS, cut, fill, head, visible, width_of

if TYPE_CHECKING:
    from collections.abc import Collection, Iterable, Iterator, Sequence

    from rich.style import Style

    from schedtui.screen.cell_editor import CellEdit

__all__ = [
    "HEADING_LINES",
    "Cell",
    "Column",
    "EditField",
    "Layout",
    "Look",
    "Place",
    "TableSource",
    "arrange",
    "changed_cells",
    "column_width",
    "cursor_over",
    "edit_over",
    "first_showing",
    "heading_strips",
    "message_strip",
    "row_strip",
]

HEADING_LINES = 2
_POINTER = ">"
_RULE = "│"
_MORE_LEFT = "‹"
_MORE_RIGHT = "›"
_LEAST_NOTE = 24  # narrower than this, a refusal is better put on the cell's other side


@dataclass(frozen=True, slots=True)
class Cell:
    """What stands in a cell; a severity mark needs no text, its look has one."""

    text: str
    look: Look


class TableSource(Protocol):
    """What a table has to tell to be drawn."""

    @property
    def columns(self) -> Sequence[Column]:
        """The columns, the frozen ones first."""
        ...

    @property
    def row_keys(self) -> Sequence[int]:
        """Lasting identities of the rows, in the order shown."""
        ...

    def version(self, row_key: int) -> int:
        """Return a number that is another whenever the row has to be painted anew."""
        ...

    def cell(self, row_key: int, column_key: str) -> Cell:
        """Return what stands in a cell."""
        ...


class _Line:
    """A line under construction that starts a new segment only where it has to look different."""

    def __init__(self) -> None:
        self._texts: list[list[str]] = []
        self._styles: list[Style] = []
        self.width = 0

    def put(self, text: str, style: Style) -> None:
        """Add a text whose blanks may take the style of what stands before them."""
        if looks.carries_blanks(style):
            lead = len(text) - len(text.lstrip(" "))
            if lead and self._styles and looks.carries_blanks(self._styles[-1]):
                self._add(text[:lead], self._styles[-1])
                text = text[lead:]
        if text:
            self._add(text, style)

    def _add(self, text: str, style: Style) -> None:
        self.width += width_of(text)
        if self._styles and self._styles[-1] == style:
            self._texts[-1].append(text)
        else:
            self._texts.append([text])
            self._styles.append(style)

    def pad_to(self, x: int, style: Style) -> None:
        """Add blanks up to a cell."""
        self.put(" " * (x - self.width), style)

    def strip(self) -> Strip:
        """Return the line."""
        pairs = zip(self._texts, self._styles, strict=True)
        return Strip([Segment("".join(texts), style) for texts, style in pairs], self.width)


def _shown(cell: Cell, place: Place) -> str:
    mark = looks.mark_of(cell.look)
    text = fill(cell.text or mark, place.width, place.column.align)
    return text + looks.sign_of(cell.look)


def row_strip(
    layout: Layout, cells: Sequence[Cell], marked: Collection[str] = frozenset()
) -> Strip:
    """Return a row.

    Args:
        layout: where its columns stand.
        cells: what stands in each of them, in the layout's order.
        marked: the columns that belong to a marked block in this row.
    """
    line = _Line()
    line.put(" ", looks.GROUND)
    for place, cell in zip(layout.places, cells, strict=True):
        if place.x > layout.rule and line.width == layout.rule:
            line.put(_RULE, looks.GROUND)  # one style less to switch in every row
        line.pad_to(place.x, looks.GROUND)
        style = looks.style_of(cell.look)
        if place.column.key in marked:
            style = looks.marked(style)
        line.put(_shown(cell, place), style)
    line.pad_to(layout.width, looks.GROUND)
    return line.strip().crop(0, layout.width)


def _groups(layout: Layout) -> Iterator[tuple[str, int, int]]:
    """Yield each group's name with the cells its shown columns span; frozen ones by themselves."""
    for (group, _), run in groupby(layout.places, lambda p: (p.column.group, p.column.frozen)):
        places = list(run)
        yield group, places[0].x, places[-1].end


def heading_strips(layout: Layout) -> tuple[Strip, Strip]:
    """Return the two heading lines: groups, then fields with their units.

    A group that begins left of the first column shown still has its name above what is left.
    """
    upper, lower = _Line(), _Line()
    for group, start, end in _groups(layout):
        upper.pad_to(start, looks.HEADING)
        name = cut(visible(group), end - start - 1)
        upper.put(name, looks.GROUP)
        rest = end - start - 1 - width_of(name)
        ruled = name != "" and rest > 1
        upper.put(" " + "─" * (rest - 1) if ruled else " " * rest, looks.UNIT)
    for place in layout.places:
        lower.pad_to(place.x, looks.HEADING)
        _put_heading(lower, place)
    return _ended(upper, layout), _ended(lower, layout)


def _ended(line: _Line, layout: Layout) -> Strip:
    """Return a heading line with the signs that say where more columns are."""
    line.pad_to(layout.width - 1, looks.HEADING)
    line.put(_MORE_RIGHT if layout.more_right else " ", looks.GROUP)
    sign = _MORE_LEFT if layout.more_left else _RULE
    rule = Strip([Segment(sign, looks.GROUP)], 1)
    return _over(line.strip().crop(0, layout.width), layout.rule, rule)


def _put_heading(line: _Line, place: Place) -> None:
    """Add a field and its unit; the sign of a computed one stands between them, or behind."""
    heading, unit = visible(place.column.heading), visible(place.column.unit)
    sign = looks.sign_of(Look.COMPUTED) if place.column.computed and heading else " "
    blanks = place.width - width_of(heading) - width_of(unit) - 1
    if not unit or blanks < 0:
        line.put(fill(heading, place.width, place.column.align), looks.HEADING)
        line.put(sign, looks.UNIT)
        return
    before, behind = (blanks, 1) if place.column.align == "right" else (0, blanks + 1)
    line.put(" " * before + heading, looks.HEADING)
    line.put(sign + unit + " " * behind, looks.UNIT)


def message_strip(text: str, width: int) -> Strip:
    """Return a line with nothing but a text, for a table without rows."""
    return Strip([Segment(fill("  " + text, width), looks.style_of(Look.SUBDUED))], width)


def _over(strip: Strip, x: int, patch: Strip) -> Strip:
    width = strip.cell_length
    patch = patch.crop(0, width - x)
    end = x + patch.cell_length
    return Strip.join([strip.crop(0, x), patch, strip.crop(end, width)])


def cursor_over(strip: Strip, place: Place, cell: Cell) -> Strip:
    """Return a row's strip with the pointer at its beginning and the cursor on a cell."""
    style = looks.under_cursor(looks.style_of(cell.look))
    patch = Strip([Segment(_shown(cell, place), style)], place.width + 1)
    pointed = _over(strip, 0, Strip([Segment(_POINTER, looks.POINTER)], 1))
    return _over(pointed, place.x, patch)


@dataclass(frozen=True, slots=True)
class EditField:
    """An edit as it stands in a row.

    Args:
        x: the first cell it covers, a refusal beside it included.
        strip: the field, and the refusal.
        caret: the cell of the caret.
    """

    x: int
    strip: Strip
    caret: int

    @property
    def end(self) -> int:
        """The first cell behind it."""
        return self.x + self.strip.cell_length

    def over(self, strip: Strip) -> Strip:
        """Return a row's strip with the field in its place."""
        return _over(strip, self.x, self.strip)

    def difference(self, other: EditField) -> tuple[int, int]:
        """Return the first cell in which another state of the field differs, and where it ends."""
        start, end = min(self.x, other.x), max(self.end, other.end)
        if self.x != other.x:
            return start, end
        first, last = changed_cells(self.strip, other.strip)
        return start + first, start + last


def changed_cells(old: Strip, new: Strip) -> tuple[int, int]:
    """Return the first cell in which two lines differ, and where that ends."""
    some, others = _one_by_one(old), _one_by_one(new)
    start, end = _same(some, others), max(old.cell_length, new.cell_length)
    if old.cell_length == new.cell_length:
        end -= _same(reversed(some), reversed(others))
    return start, max(start, end)


def _one_by_one(strip: Strip) -> list[tuple[str, Style | None]]:
    return [(character, style) for text, style, _ in strip for character in text]


def _same(
    some: Iterable[tuple[str, Style | None]], others: Iterable[tuple[str, Style | None]]
) -> int:
    """Return how many cells two lines have in common from where they begin."""
    alike = takewhile(lambda pair: pair[0] == pair[1], zip(some, others, strict=False))
    return sum(width_of(character) for (character, _), _ in alike)


def edit_over(layout: Layout, place: Place, edit: CellEdit) -> EditField:
    """Return the field in which a cell is edited.

    A text longer than the cell goes on over the cells to the right of it; where the line ends
    it scrolls, with a sign at the end that is cut.
    """
    text = visible(edit.text)
    caret = width_of(visible(edit.text[: edit.caret]))
    room = max(1, layout.width - 1 - place.x)
    width = min(room, max(place.width + 1, width_of(text) + 1))
    text, caret = _scrolled(text, caret, width)
    before = head(text, caret)
    under, after = _first_character(text[len(before) :])
    behind = fill(after, width - caret - width_of(under))
    field = Strip(
        [
            Segment(part, style)
            for part, style in (
                (before, looks.EDIT),
                (under, looks.CARET),
                (behind, looks.EDIT),
            )
            if part
        ]
    )
    if not edit.refused:
        return EditField(place.x, field, place.x + caret)
    return _with_note(layout, place.x, field, place.x + caret, edit.refused)


def _first_character(text: str) -> tuple[str, str]:
    """Return the character under the caret with its combining marks, and what follows."""
    end = 1
    while end < len(text) and width_of(text[end]) == 0:
        end += 1
    return text[:end] or " ", text[end:]


def _scrolled(text: str, caret: int, width: int) -> tuple[str, int]:
    """Return the part of the text that has the caret in it, and where it is therein."""
    if width_of(text) < width:
        return text, caret
    skip = max(0, caret - width + 2)
    if not skip:
        return text, caret
    gone = head(text, skip + 1)  # the sign takes one cell of what is shown
    while width_of(gone) < skip + 1:
        gone = text[: len(gone) + 1]
    return ELLIPSIS + text[len(gone) :], caret - width_of(gone) + 1


def _with_note(layout: Layout, x: int, field: Strip, caret: int, why: str) -> EditField:
    note = f" {visible(why)} "
    end = x + field.cell_length
    room = layout.width - 1 - end
    if room >= min(_LEAST_NOTE, width_of(note)) or room >= x - 1:
        shown = Strip([Segment(cut(note, room), looks.REFUSED)])
        return EditField(x, Strip.join([field, shown]), caret)
    shown = Strip([Segment(cut(note, x - 1), looks.REFUSED)])
    return EditField(x - shown.cell_length, Strip.join([shown, field]), caret)
