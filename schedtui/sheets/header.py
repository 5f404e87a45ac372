"""Which rows of a grid are headings, and what stands over each column.

Works on rows; a sheet with its fields down is turned before. Knows no key.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import lru_cache
from typing import TYPE_CHECKING

from schedtui.sheets.grid import filled
from schedtui.sheets.heading import part_reading
from schedtui.sheets.known import known_fields, vocabulary
from schedtui.sheets.table import SheetColumn
from schedtui.sheets.words import unit_alone

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence

    from schedtui.sheets.grid import Cell, Grid, Merge

_LONGEST_HEADING = 70
_SHARE = 0.5
_LESS, _MANY = 0.3, 4  # a row with a heading of tags may have more that is not known here
_FEWEST, _FEWEST_WITH_TAG = 3, 2
_MOST_ROWS = 5
_TITLE = re.compile(r"\bschedule\b|\bair[\s-]*handling\s+units?\b", re.IGNORECASE)

# Headings of columns that nothing here computes with, by which a heading row is told all the same.
_OTHERS = frozenset((
    "weight", "lb", "lbs", "kg", "volts", "voltage", "volt", "v", "hz", "phase", "phases",
    "mca", "mocp", "mop", "fla", "model", "manufacturer", "make", "filter", "merv", "type",
    "size", "rpm", "drive", "vfd", "starter", "dimension", "dimensions", "length", "width",
    "height", "depth", "sound", "nc", "speed", "circuit", "panel", "emergency", "power",
    "arrangement", "efficiency", "status", "wheel", "class", "material", "operating", "feed",
    "fed", "from", "electrical", "connection", "pipe", "diameter", "control", "mm",
))  # fmt: skip
NOTHING = re.compile(r"[-–—_.]{1,6}|n\.?\s*/?\s*a\.?|none|nil|not applicable", re.IGNORECASE)
NUMBER = re.compile(r"[+-]?[0-9][0-9.,'  ]*(?:\s*%)?|[+-]?[0-9]+(?:[ -][0-9]+/[0-9]+)|[0-9.,/ -]+")


@dataclass(frozen=True, slots=True)
class Header:
    """The heading rows of a table.

    Args:
        rows: their numbers.
        base: the one with the most headings.
        titles: rows just above that are titles.
    """

    rows: tuple[int, ...]
    base: int
    titles: tuple[int, ...] = ()


@lru_cache(maxsize=8192)
def is_heading(text: str) -> bool:
    """Tell whether a text reads like a heading of a schedule."""
    if len(text) > _LONGEST_HEADING or NUMBER.fullmatch(text):
        return False
    if unit_alone(text):
        return True
    reading = part_reading(text)
    words = reading.words
    if not words:
        return bool(reading.units) and not any(sign.isdigit() for sign in text)
    known = sum(word in vocabulary() or word in _OTHERS for word in words)
    return known * 2 >= len(words) and not any(word[0].isdigit() for word in words)


@lru_cache(maxsize=8192)
def is_tag_heading(text: str) -> bool:
    """Tell whether a text is what the column of tags is called."""
    return bool(known_fields()[0].fits(part_reading(text)))


def score(cells: Mapping[int, Cell]) -> int:
    """Return how many headings stand in a row; 0 where it is no heading row."""
    texts = [cell.text for _, cell in filled(cells) if not NOTHING.fullmatch(cell.text)]
    headings = sum(map(is_heading, texts))
    if any(cell.number is not None for cell in cells.values()):
        return 0
    many = headings >= _MANY and any(map(is_tag_heading, texts))
    return headings if headings and headings >= (_LESS if many else _SHARE) * len(texts) else 0


def find_headers(grid: Grid) -> list[Header]:
    """Return the heading rows of every table of a grid, those of repeated headings too."""
    scores = {row: score(cells) for row, cells in grid.rows.items()}
    found: list[Header] = []
    run: list[int] = []
    for row in [*grid.rows, 0]:
        if row and scores[row] and (not run or row == run[-1] + 1):
            run.append(row)
            continue
        found += _headers_of(grid, run, scores)
        run = [row] if row and scores[row] else []
    return found


def _headers_of(grid: Grid, run: Sequence[int], scores: Mapping[int, int]) -> list[Header]:
    bases = [row for row in run if _is_base(grid.rows[row], scores[row])]
    if not bases:
        return []
    base = max(bases, key=lambda row: scores[row])
    first = min(grid.rows[base])
    rows = [row for row in run if row <= base or _goes_on(grid, row, base)]
    while rows[0] - 1 in grid.rows and _is_group_row(grid.rows[rows[0] - 1], first):
        rows.insert(0, rows[0] - 1)
    titles = []
    while rows[0] < base and _is_title(grid, rows[0], first):
        titles.append(rows.pop(0))
    return [Header(tuple(rows[-_MOST_ROWS:]), base, tuple(titles))]


def _is_base(cells: Mapping[int, Cell], headings: int) -> bool:
    tagged = any(is_tag_heading(cell.text) for cell in cells.values())
    return headings >= (_FEWEST_WITH_TAG if tagged else _FEWEST)


def _goes_on(grid: Grid, row: int, base: int) -> bool:
    """Tell whether a row below the base is one of units or narrower headings, and no unit's."""
    places = [place for place, cell in grid.rows[base].items() if is_tag_heading(cell.text)]
    tag = grid.text(row, places[0]) if places else ""
    return not tag or is_heading(tag)


def _is_group_row(cells: Mapping[int, Cell], first: int) -> bool:
    """Tell whether the row over headings names groups that are not known here."""
    texts = [cell.text for _, cell in filled(cells)]
    if any(NUMBER.fullmatch(text) or len(text) > _LONGEST_HEADING for text in texts):
        return False
    return len(texts) > 1 and min(cells) > first


def _is_title(grid: Grid, row: int, first: int) -> bool:
    """Tell whether a row above the headings is a title: one text that begins with the table."""
    texts = {cell.text for _, cell in filled(grid.rows[row])}
    if len(texts) != 1:
        return False
    return min(grid.rows[row]) <= first or bool(_TITLE.search(texts.pop()))


def read_columns(
    grid: Grid, header: Header, spread: Mapping[tuple[int, int], Merge]
) -> list[SheetColumn]:
    """Return the columns of a table with every heading that stands over each.

    Args:
        grid: the grid.
        header: its heading rows.
        spread: the merged block of each cell.
    """
    places = sorted({place for row in header.rows for place in grid.rows[row]})
    widest = max(
        [*places]
        + [m.right for row in header.rows for place in places if (m := spread.get((row, place)))]
    )
    last = min(widest, max((max(cells) for cells in grid.rows.values() if cells), default=widest))
    parts: dict[int, list[tuple[str, bool]]] = {place: [] for place in range(min(places), last + 1)}
    for row in header.rows:
        _read_row(grid, row, header, spread, parts)
    units = _is_units_row(grid.rows[header.rows[-1]]) and len(header.rows) > 1
    return [
        _column(grid, header, place, texts, units=units) for place, texts in parts.items() if texts
    ]


def _is_units_row(cells: Mapping[int, Cell]) -> bool:
    texts = [cell.text for _, cell in filled(cells) if not NOTHING.fullmatch(cell.text)]
    units = sum(unit_alone(text) is not None for text in texts)
    return units > 0 and units >= _SHARE * len(texts)


def _read_row(
    grid: Grid,
    row: int,
    header: Header,
    spread: Mapping[tuple[int, int], Merge],
    parts: dict[int, list[tuple[str, bool]]],
) -> None:
    """Add the texts of one heading row to the columns under them."""
    over, outer = "", tuple[str, ...]()
    for place, texts in parts.items():
        merge = spread.get((row, place))
        text = grid.text(row, place)
        if merge is not None and (merge.top, merge.left) != (row, place):
            if merge.top == row:  # within a block that began to the left
                texts.append((grid.text(row, merge.left), False))
            over = ""
            continue
        if text and not NOTHING.fullmatch(text):
            here = tuple(one for one, _ in texts)
            is_group = row != header.rows[-1] and _has_below(grid, header, row, place)
            over, outer = (text, here) if is_group and merge is None else ("", ())
            texts.append((text, False))
        elif over and _carries(grid, header, row, place, tuple(one for one, _ in texts), outer):
            texts.append((over, True))
        else:
            over = ""


def _has_below(grid: Grid, header: Header, row: int, place: int) -> bool:
    return any(grid.text(below, place) for below in header.rows if below > row)


def _carries(
    grid: Grid, header: Header, row: int, place: int, here: tuple[str, ...], outer: tuple[str, ...]
) -> bool:
    """Tell whether a group goes on over a column: nothing new began there, and it has a name."""
    return here == outer and _has_below(grid, header, row, place)


def _column(
    grid: Grid, header: Header, place: int, texts: Sequence[tuple[str, bool]], *, units: bool
) -> SheetColumn:
    plain: list[tuple[str, bool]] = []
    for text, carried in texts:
        if not plain or plain[-1][0] != text:
            plain.append((text, carried))
    refs = [cell.ref for row in header.rows if (cell := grid.cell(row, place))]
    unit = ""
    if units and len(plain) > 1 and plain[-1][0] == grid.text(header.rows[-1], place):
        unit = plain.pop()[0]
    return SheetColumn(
        place,
        tuple(" ".join(text.split()) for text, _ in plain),
        frozenset(index for index, (_, carried) in enumerate(plain) if carried),
        refs[-1] if refs else "",
        place in grid.hidden_columns,
        unit,
    )
