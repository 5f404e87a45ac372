"""A page as Markdown, which reads well as it stands and prints well on paper."""

from __future__ import annotations

import re
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
from schedtui.text_width import visible

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

# Whatever could act as markup in running text: a text from a file is data.
_ACTING = re.compile(r"([\\`*_{}\[\]<>#|~!&])")

# At the start of a paragraph, what would make a list or underline a heading.
_LEADING = re.compile(r"^(\s*)([-+=]|\d+[.)])")


def render(page: Page) -> str:
    """Return the page as Markdown, ending with a line break."""
    return "\n\n".join("\n".join(_block(block)) for block in page.blocks) + "\n"


def _block(block: Block) -> Iterable[str]:
    match block:
        case Heading(text, level):
            return [f"{'#' * level} {plain(text)}"]
        case Paragraph(text):
            return [_LEADING.sub(_escaped, plain(text))]
        case Calculations(entries):
            return (line for one in entries for line in _calculation(one))
        case Entries(entries):
            return (line for one in entries for line in _entry(one.label, one.head, one.lines))
        case Table():
            return _table(block)


def _escaped(start: re.Match[str]) -> str:
    """Return the start of a paragraph with its last character made harmless."""
    return f"{start[1]}{start[2][:-1]}\\{start[2][-1]}"


def _entry(label: str, head: str, lines: tuple[str, ...]) -> Iterator[str]:
    yield f"- **{plain(label)}** {plain(head)}"
    for line in lines:
        yield f"  {plain(line)}"


def _calculation(entry: Entry) -> Iterator[str]:
    """Set a result with its formulas as they stand, each on a line of its own."""
    lines = [f"- **{plain(entry.label)}** = {plain(entry.head)}"]
    lines += [f"  `{visible(text)}`" for text in entry.lines]
    yield from (f"{line}\\" for line in lines[:-1])
    yield lines[-1]


def _table(table: Table) -> Iterator[str]:
    yield _row(table.headings)
    yield _row(
        tuple("---:" if place in table.numeric else "---" for place in range(len(table.headings))),
        escaped=True,
    )
    for row in table.rows:
        yield _row(row)


def _row(cells: tuple[str, ...], *, escaped: bool = False) -> str:
    return f"| {' | '.join(cell if escaped else plain(cell) for cell in cells)} |"


def plain(text: str) -> str:
    r"""Return a text that Markdown shows as it stands.

    >>> plain("AHU-1 [alt]")
    'AHU-1 \\[alt\\]'
    """
    return _ACTING.sub(r"\\\1", visible(text))
