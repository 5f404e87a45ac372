"""The rows below a heading: which are units, and what the others are.

Totals, section titles, repeated headings and notes are told apart and told of. Knows no key.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from schedtui.sheets.grid import filled
from schedtui.sheets.header import NOTHING, NUMBER, Header, is_heading
from schedtui.sheets.table import Loose, SheetColumn

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence

    from schedtui.sheets.grid import Cell, Grid, Merge

TAG = re.compile(r"[A-Z][A-Z.]{0,7}[-\s._]?[A-Z]?[-\s._]?[0-9].{0,60}", re.IGNORECASE | re.DOTALL)
NOTES = re.compile(
    r"(?:general\s+|schedule\s+|key\s*)?(?:notes?|remarks|legend|abbreviations)\s*[:.]?.{0,40}",
    re.IGNORECASE,
)
LONG = 4  # words from which a text is a note rather than a section's title
_TOTAL = re.compile(r"(?:grand\s+|sub-?\s*)?totals?\b.*|sum\b.*|average\b.*|avg\b.*", re.IGNORECASE)
_NUMBERED = re.compile(r"\(?(?:[0-9]{1,2}|[A-Z*†‡])\s*[.):]\s*\S.*|[*†‡].+", re.DOTALL)
_NUMBER_OF_NOTE = re.compile(r"\(?(?:[0-9]{1,2}|[A-Z*†‡])\s*[.):]?\)?")
_SAME = 0.6


@dataclass(slots=True)
class Body:
    """The rows below a heading, sorted on the way."""

    rows: list[Mapping[int, Cell]] = field(default_factory=list)
    notes: list[str] = field(default_factory=list)
    loose: list[Loose] = field(default_factory=list)
    hidden: list[str] = field(default_factory=list)
    in_notes: bool = False


def repeats(cells: Mapping[int, Cell], headings: Mapping[int, Cell]) -> bool:
    """Tell whether a row has the same texts as a row of headings."""
    texts = [cell.text for _, cell in filled(cells)]
    same = sum(
        place in headings and headings[place].text.casefold() == cell.text.casefold()
        for place, cell in filled(cells)
    )
    return bool(texts) and same >= _SAME * len(texts)


def sort_row(
    grid: Grid,
    header: Header,
    columns: Sequence[SheetColumn],
    tag: int,
    row: int,
    spread: Mapping[tuple[int, int], Merge],
    body: Body,
) -> None:
    """Say what a row below the headings is, and put it where it belongs."""
    places = {column.place for column in columns}
    inside = {place: cell for place, cell in filled(grid.rows[row]) if place in places}
    cells = _whole_row(grid, row, columns, spread, inside)
    own = {place: cell for place, cell in cells.items() if place in inside}
    texts = [cell.text for cell in own.values() if cell.text]
    joined = " ".join(texts)
    refs = next((cell.ref for cell in own.values()), "")
    first = texts[0] if texts else ""
    tagged = tag in cells and bool(cells[tag].text) and not NOTHING.fullmatch(cells[tag].text)
    if not own:
        pass
    elif repeats(own, grid.rows[header.base]) or _is_heading_again(grid, header, own):
        body.loose.append(Loose(refs, joined, "headings that repeat", kept=True))
        body.in_notes = False
    elif NOTES.fullmatch(first) and len(own) == 1 and not TAG.fullmatch(first):
        body.in_notes = True
        body.loose.append(Loose(refs, first, "heads the notes", kept=True))
    elif _TOTAL.fullmatch(first):
        body.loose.append(Loose(refs, joined, "a total, not a unit", kept=True))
    elif body.in_notes or _is_note(texts, own, tag, body):
        body.notes.append(joined)
        body.in_notes = body.in_notes or bool(NOTES.match(first))
    elif len(own) == 1 and not (tagged and TAG.fullmatch(first)) and not _is_value(own, tag):
        body.loose.append(Loose(refs, joined, "a section title, not a unit", kept=True))
    elif tagged:
        body.rows.append(cells)
        if row in grid.hidden_rows:
            body.hidden.append(cells[tag].text)
    else:
        body.loose += [Loose(c.ref, c.text, "in a row without a tag") for c in own.values()]


def _is_value(own: Mapping[int, Cell], tag: int) -> bool:
    """Tell whether a row's one cell is a value that lost its tag, and no title."""
    place, cell = next(iter(own.items()))
    return place != tag and bool(NUMBER.fullmatch(cell.text))


def _is_heading_again(grid: Grid, header: Header, own: Mapping[int, Cell]) -> bool:
    """Tell whether a row repeats any one of the heading rows."""
    return any(repeats(own, grid.rows[row]) for row in header.rows) and all(
        is_heading(cell.text) for cell in own.values()
    )


def _is_note(texts: Sequence[str], own: Mapping[int, Cell], tag: int, body: Body) -> bool:
    """Tell whether a row under the units is a note although nothing heads the notes."""
    if not body.rows or len(texts) > 2:  # noqa: PLR2004  a number and its note
        return False
    if len(texts) == 2:  # noqa: PLR2004
        return bool(_NUMBER_OF_NOTE.fullmatch(texts[0])) and len(texts[1].split()) >= LONG - 1
    text = texts[0] if texts else ""
    if TAG.fullmatch(text) and tag in own and len(text.split()) < LONG:
        return False
    return bool(_NUMBERED.fullmatch(text) or NOTES.match(text)) or len(text.split()) > LONG


def _whole_row(
    grid: Grid,
    row: int,
    columns: Sequence[SheetColumn],
    spread: Mapping[tuple[int, int], Merge],
    inside: Mapping[int, Cell],
) -> dict[int, Cell]:
    """Return a row's cells with those that blocks merged downwards give it."""
    cells = dict(inside)
    for column in columns:
        merge = spread.get((row, column.place))
        if merge is None or merge.top == row or merge.left != column.place:
            continue
        above = grid.cell(merge.top, merge.left)
        if above is not None:
            cells[column.place] = above
    return dict(sorted(cells.items()))
