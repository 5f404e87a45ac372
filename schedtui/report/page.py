"""A page: what a report says, before any format has decided how it looks.

Blocks of headings, paragraphs, lists and tables, in the order they are read. Texts are plain: a
format makes them harmless and breaks their lines.
"""

from __future__ import annotations

from dataclasses import dataclass

CAUTION = (
    "Results support a check and are no design: local codes, the manufacturer's certified "
    "selection and a licensed engineer decide."
)


@dataclass(frozen=True, slots=True)
class Heading:
    """A heading.

    Args:
        text: what it says.
        level: 1 for the page's own, 2 for a part, 3 for a part of that.
    """

    text: str
    level: int = 2


@dataclass(frozen=True, slots=True)
class Paragraph:
    """A paragraph of running text."""

    text: str


@dataclass(frozen=True, slots=True)
class Entry:
    """An entry of a list.

    Args:
        label: what it is about, short.
        head: its first line.
        lines: what is said below.
    """

    label: str
    head: str
    lines: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class Entries:
    """A list of entries with their labels in one column."""

    entries: tuple[Entry, ...]


@dataclass(frozen=True, slots=True)
class Calculations(Entries):
    """A list of results, each with the formulas behind it, every one a line by itself."""


@dataclass(frozen=True, slots=True)
class Table:
    """A table.

    Args:
        headings: one for each column.
        rows: the cells' texts.
        numeric: places of the columns that hold numbers, set flush right.
    """

    headings: tuple[str, ...]
    rows: tuple[tuple[str, ...], ...]
    numeric: frozenset[int] = frozenset()


Block = Heading | Paragraph | Entries | Table


@dataclass(frozen=True, slots=True)
class Page:
    """A report.

    Args:
        blocks: what it says, in reading order.
    """

    blocks: tuple[Block, ...]
