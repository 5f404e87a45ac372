"""A page of a report as styled lines for a pane of any width.

Running text is wrapped; a table is set as closely as it must be, its last column of text wrapped,
and only where that does not do is it wider than the pane, which then scrolls sideways.
Pure. Must not know what a page is about.
"""

from __future__ import annotations

import textwrap
from typing import TYPE_CHECKING

from rich.segment import Segment
from textual.strip import Strip

from schedtui.report.page import Block, Entries, Entry, Heading, Page, Paragraph, Table
from schedtui.screen import looks
from schedtui.screen.looks import Look
from schedtui.text_width import fill, visible, width_of

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from rich.style import Style

_GAPS = (2, 1)
_LEAST_WRAP = 20
_LONGEST_LABEL = 16
_FAINT = looks.style_of(Look.SUBDUED)

# Labels that say how bad something is stand in the colour that their mark has in the table.
_LABELS = {
    "short": looks.style_of(Look.MARK_SHORT),
    "conflict": looks.style_of(Look.MARK_CONFLICT),
    "caution": looks.style_of(Look.MARK_CAUTION),
    "missing": looks.style_of(Look.MARK_MISSING),
}


def page_lines(page: Page, width: int) -> list[Strip]:
    """Return a page's lines; only a table's may be wider than so many cells."""
    return laid_out(page, width)[0]


def laid_out(page: Page, width: int) -> tuple[list[Strip], list[range]]:
    """Return a page's lines, and which of them each entry of its lists takes.

    Args:
        page: the page.
        width: cells there are; only a table may be wider.
    """
    lines: list[Strip] = []
    taken: list[range] = []
    before: Block | None = None
    for block in page.blocks:
        if lines and not isinstance(before, Heading):
            lines.append(_line(("", looks.GROUND)))
        if isinstance(block, Entries):
            indent = _indent(block)
            for one in block.entries:
                begun = len(lines)
                lines += _entry(one, indent, width)
                taken.append(range(begun, len(lines)))
        else:
            lines += _block(block, width)
        before = block
    return lines, taken


def _line(*parts: tuple[str, Style]) -> Strip:
    return Strip([Segment(text, style) for text, style in parts if text])


def _block(block: Block, width: int) -> Iterator[Strip]:
    match block:
        case Heading(text):
            for part in _wrapped(text, width):
                yield _line((part, looks.POINTER))
        case Paragraph(text):
            for part in _wrapped(text, width):
                yield _line((part, looks.GROUND))
        case Table():
            yield from _table(block, width)


def _indent(block: Entries) -> int:
    longest = max((width_of(visible(one.label)) for one in block.entries), default=0)
    return min(longest, _LONGEST_LABEL) + 2


def _entry(entry: Entry, indent: int, width: int) -> Iterator[Strip]:
    room = max(width - indent, 1)
    label = fill(fill(entry.label, indent - 2), indent)
    for part in _wrapped(entry.head, room):
        yield _line((label, _LABELS.get(entry.label, looks.GROUND)), (part, looks.STRONG))
        label = " " * indent
    for text in entry.lines:
        for part in _wrapped(text, room):
            yield _line((" " * indent + part, looks.GROUND))


def _table(table: Table, width: int) -> Iterator[Strip]:
    rows = [tuple(map(visible, row)) for row in (table.headings, *table.rows)]
    widths = [max(map(width_of, column)) for column in zip(*rows, strict=True)]
    last = len(widths) - 1
    gap = next((gap for gap in _GAPS if sum(widths) + gap * last <= width), _GAPS[-1])
    if sum(widths) + gap * last > width and last not in table.numeric:
        gap = _GAPS[0]
        room = width - sum(widths[:last]) - gap * last
        widths[last] = room if room >= _LEAST_WRAP else widths[last]
    style = _FAINT
    for row in rows:
        for cells in _broken(row, widths[last], wraps=last not in table.numeric):
            texts = (
                fill(cell, room, "right" if place in table.numeric else "left")
                for place, (cell, room) in enumerate(zip(cells, widths, strict=True))
            )
            yield _line(((" " * gap).join(texts).rstrip(), style))
        style = looks.GROUND


def _broken(row: Sequence[str], room: int, *, wraps: bool) -> Iterator[tuple[str, ...]]:
    """Yield a row's lines: one, or as many as its last text takes in so many cells."""
    if not wraps or width_of(row[-1]) <= room:
        yield tuple(row)
        return
    first = row[:-1]
    for part in _wrapped(row[-1], room):
        yield (*first, part)
        first = ("",) * len(first)


def _wrapped(text: str, width: int) -> list[str]:
    return textwrap.wrap(visible(text), width, break_on_hyphens=False) or [""]
