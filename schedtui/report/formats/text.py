"""A page as plain text for a terminal, 80 columns wide."""

from __future__ import annotations

import textwrap
from typing import TYPE_CHECKING

from schedtui.report.page import (
    Block,
    Calculations,
    Entries,
    Entry,
    Heading,
    Page,
    Paragraph,
    Table,
)
from schedtui.text_width import cut, fill, visible, width_of

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

WIDTH = 80
_LABEL_WIDTH = 16
_SYMBOL_WIDTH = 8
_KEPT_TOGETHER = "\N{NO-BREAK SPACE}·\N{NO-BREAK SPACE}"  # a product stays on its line
_LONGEST_CELL = 24
_GAP = "  "


def render(page: Page) -> str:
    """Return the page as text, ending with a line break."""
    parts = ["\n".join(block_lines(block, WIDTH)) for block in page.blocks]
    return "\n\n".join(part for part in parts if part) + "\n"


def block_lines(block: Block, width: int) -> Iterable[str]:
    """Return the lines of one block; only a table's may be longer than `width`."""
    match block:
        case Heading(text, level):
            return _heading(visible(text), level, width)
        case Paragraph(text):
            return _wrapped(visible(text), width)
        case Calculations(entries):
            return (line for one in entries for line in _calculation(one, width))
        case Entries(entries):
            return (line for one in entries for line in _entry(one, width))
        case Table():
            return _table(block)


def _heading(text: str, level: int, width: int) -> Iterator[str]:
    yield cut(text, width)
    if level == 1:
        yield "=" * min(width_of(text), width)


def _entry(entry: Entry, width: int) -> Iterator[str]:
    """Give the label its column; what is too long for it has the line to itself."""
    shown, room = visible(entry.label), width - _LABEL_WIDTH
    first, *rest = _wrapped(visible(entry.head), room) or [""]
    if width_of(shown) < _LABEL_WIDTH:
        yield fill(shown, _LABEL_WIDTH) + first
    else:
        yield cut(shown, width)
        yield " " * _LABEL_WIDTH + first
    for line in rest + [part for text in entry.lines for part in _wrapped(visible(text), room)]:
        yield " " * _LABEL_WIDTH + line


def _calculation(entry: Entry, width: int) -> Iterator[str]:
    """Give the result the line's head, and break its formulas between their terms."""
    shown = f"{fill(visible(entry.label), _SYMBOL_WIDTH)}= {visible(entry.head)}"
    first, hanging = " " * _SYMBOL_WIDTH, " " * (_SYMBOL_WIDTH + 2)
    yield from textwrap.wrap(shown, width, subsequent_indent=hanging, break_on_hyphens=False)
    for text in entry.lines:
        joined = visible(text).replace(" · ", _KEPT_TOGETHER)
        for line in textwrap.wrap(joined, width, initial_indent=first, subsequent_indent=hanging):
            yield line.replace(_KEPT_TOGETHER, " · ")


def _table(table: Table) -> Iterator[str]:
    rows = [tuple(cut(visible(cell), _LONGEST_CELL) for cell in row) for row in table.rows]
    headings = tuple(cut(visible(one), _LONGEST_CELL) for one in table.headings)
    widths = [max(map(width_of, column)) for column in zip(headings, *rows, strict=True)]
    for row in (headings, *rows):
        cells = (
            fill(cell, width, "right" if place in table.numeric else "left")
            for place, (cell, width) in enumerate(zip(row, widths, strict=True))
        )
        yield _GAP.join(cells).rstrip()


def _wrapped(text: str, width: int) -> list[str]:
    return textwrap.wrap(text, width, break_on_hyphens=False)
