"""Finds the schedules in a grid: where their headings are, which rows are units, what is notes.

Whatever is no unit's value is told of: titles, totals, section titles, repeated headings, notes.
Knows the heading of the tags and no other key.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from itertools import pairwise
from typing import TYPE_CHECKING

from schedtui.sheets.body import TAG, Body, repeats, sort_row
from schedtui.sheets.grid import filled
from schedtui.sheets.header import Header, find_headers, is_tag_heading, read_columns, score
from schedtui.sheets.table import Loose, SheetColumn, SheetTable
from schedtui.sheets.turned import regrouped

if TYPE_CHECKING:
    from collections.abc import Iterable, Mapping, Sequence

    from schedtui.sheets.grid import Grid, Merge

_TURNED_FROM = 4
_OUTSIDE = "not in a schedule"
_SHARE_OF_TAGS = 0.5

# Schedules of other equipment, told by their titles.
_OTHER = re.compile(
    r"\b(?:pumps?|chillers?|boilers?|cooling\s+towers?|vav|terminal|exhaust\s+fans?|diffusers?|"
    r"grilles?|louvers?|expansion\s+tanks?|fan[\s-]coils?|unit\s+heaters?|humidity\s+sensors?|"
    r"plumbing|valves?|dampers?|heat\s+exchangers?|condensing\s+units?)\b",
    re.IGNORECASE,
)
_OURS = re.compile(r"\bair[\s-]*handl|\bahu|\brtu\b|rooftop|make-?up\s+air|\bdoas\b", re.IGNORECASE)


@dataclass(frozen=True, slots=True)
class Found:
    """What was found in a grid.

    Args:
        sheet: the grid's name.
        tables: its schedules.
        loose: what stands outside every one of them.
        said: what is to be said of the sheet as a whole.
    """

    sheet: str
    tables: tuple[SheetTable, ...]
    loose: tuple[Loose, ...] = ()
    said: tuple[str, ...] = ()


def find_tables(grid: Grid) -> Found:
    """Return the schedules of a grid, whichever way it runs, and all that is in none of them."""
    across = max((score(cells) for cells in grid.rows.values()), default=0)
    turned = grid.turned()
    down = max((score(cells) for cells in turned.rows.values()), default=0)
    if down > across and down >= _TURNED_FROM and _tags_beside(turned) > _tags_beside(grid):
        return _found(turned, turned_over=True)
    return _found(grid, turned_over=False)


def _tags_beside(grid: Grid) -> int:
    """Return how many tags stand below the headings of a column of tags."""
    columns = {
        place: row
        for row, cells in reversed(list(grid.rows.items()))
        for place, cell in filled(cells)
        if is_tag_heading(cell.text)
    }
    return sum(
        place in columns and row > columns[place] and bool(TAG.fullmatch(cell.text))
        for row, cells in grid.rows.items()
        for place, cell in filled(cells)
    )


def _found(grid: Grid, *, turned_over: bool) -> Found:
    spread = grid.spread()
    headers = find_headers(grid)
    tables: list[SheetTable] = []
    loose: list[Loose] = []
    used: set[int] = set()
    starts = _starts(grid, headers)
    for place, header in enumerate(starts):
        end = min((one.rows[0] - len(one.titles) for one in starts[place + 1 :]), default=None)
        rows = [row for row in grid.rows if row > header.rows[-1] and (end is None or row < end)]
        titles = _titles(grid, header, used)
        places: set[int] = set()
        for part, within in _side_by_side(grid, header, spread):
            rows_of_it = _within(grid, within)
            table = _table(rows_of_it, header, part, rows, spread, turned_over=turned_over)
            if table is not None:
                tables.append(replace(table[0], titles=(*titles, *table[0].titles)))
                places |= table[1]
        if not places:
            continue
        loose += _beside(grid, [*header.rows, *rows], places)
        used.update(header.rows, header.titles, rows, _title_rows(grid, header, used))
    rest = (cells for row, cells in grid.rows.items() if row not in used)
    loose += [Loose(cell.ref, cell.text, _OUTSIDE) for cells in rest for _, cell in filled(cells)]
    if tables and not tables[0].titles:
        title = next((one for one in loose if _is_title(one)), None)
        if title is not None:
            loose.remove(title)
            tables[0] = replace(tables[0], titles=(title.text,))
    said = ("the sheet is hidden in its workbook",) if grid.hidden and tables else ()
    return Found(grid.name, tuple(tables), tuple(loose), said)


def _beside(grid: Grid, rows: Sequence[int], places: set[int]) -> list[Loose]:
    """Return what stands in the rows of a table and in no column of it."""
    return [
        Loose(cell.ref, cell.text, "beside the schedule")
        for row in rows
        for place, cell in filled(grid.rows[row])
        if place not in places
    ]


def _is_title(one: Loose) -> bool:
    """Tell whether a text outside the schedules is the title of one, beside a date or a number."""
    return one.said == _OUTSIDE and bool(
        _OURS.search(one.text) or "schedule" in one.text.casefold()
    )


def _starts(grid: Grid, headers: Sequence[Header]) -> list[Header]:
    """Return the headings that begin a table: those that only repeat the one before do not."""
    starts: list[Header] = []
    for header in headers:
        if (
            starts
            and not header.titles
            and repeats(grid.rows[header.base], grid.rows[starts[-1].base])
        ):
            continue
        starts.append(header)
    return starts


def _title_rows(grid: Grid, header: Header, used: set[int]) -> list[int]:
    """Return the rows over a heading that are its titles: the nearest texts that stand alone."""
    rows = [*header.titles]
    above = [
        row for row in grid.rows if row < header.rows[0] and row not in used and row not in rows
    ]
    for row in reversed(above):
        texts = {cell.text for _, cell in filled(grid.rows[row])}
        if len(texts) != 1:
            break
        rows.insert(0, row)
    return rows


def _titles(grid: Grid, header: Header, used: set[int]) -> tuple[str, ...]:
    rows = _title_rows(grid, header, used)
    return tuple(next(cell.text for _, cell in filled(grid.rows[row])) for row in rows)


def _side_by_side(
    grid: Grid, header: Header, spread: Mapping[tuple[int, int], Merge]
) -> list[tuple[list[SheetColumn], range | None]]:
    """Return the columns of each table under one heading: tables may stand beside each other.

    With each go the columns of the grid that are its own, None where it has all.
    """
    columns = read_columns(grid, header, spread)
    tags = [place for place, one in enumerate(columns) if is_tag_heading(one.heading)]
    first = columns[tags[0]].heading.casefold() if tags else ""
    cuts = [tag for tag in tags[1:] if columns[tag].heading.casefold() == first]
    if not cuts:
        return [(columns, None)]
    bounds = [0, *cuts, len(columns)]
    starts = [0, *(columns[cut].place for cut in cuts), columns[-1].place + 2]
    return [
        (columns[a:b], range(first, last))
        for (a, b), (first, last) in zip(pairwise(bounds), pairwise(starts), strict=True)
    ]


def _within(grid: Grid, columns: range | None) -> Grid:
    """Return a grid with the cells of some columns alone."""
    if columns is None:
        return grid
    rows = {
        row: {place: cell for place, cell in cells.items() if place in columns}
        for row, cells in grid.rows.items()
    }
    return replace(grid, rows=rows)


def _table(
    grid: Grid,
    header: Header,
    columns: list[SheetColumn],
    rows: Sequence[int],
    spread: Mapping[tuple[int, int], Merge],
    *,
    turned_over: bool,
) -> tuple[SheetTable, set[int]] | None:
    """Return a table and the places of its columns, None where nothing is a column of tags."""
    tag, said = _tag_column(grid, columns, rows)
    if tag is None:
        return None
    if not columns:
        return None
    columns = _with_unheaded(grid, columns, rows, spread)
    places = {column.place for column in columns}
    body = Body()
    for row in rows:
        sort_row(grid, header, columns, tag, row, spread, body)
    loose = body.loose
    notes = body.notes
    titles: list[str] = []
    if turned_over and body.rows:
        columns, titles, more, inside = regrouped(columns, tag, body.rows)
        notes, loose = [*notes, *more], [*loose, *inside]
    said += _hidden(body.hidden, columns, turned_over=turned_over)
    table = SheetTable(
        grid.name, columns[0].ref, tuple(columns), tag, tuple(body.rows), turned_over,
        tuple(titles), tuple(notes), tuple(loose), said, grid.decimal_comma,
    )  # fmt: skip
    return table, places


def _tag_column(
    grid: Grid, columns: Sequence[SheetColumn], rows: Sequence[int]
) -> tuple[int | None, tuple[str, ...]]:
    """Return the place of the tags: the column so headed, else the first whose texts are tags."""
    headed = [c for c in columns if is_tag_heading(c.heading) or is_tag_heading(c.printed)]
    if headed:  # of "NO." and "TAG" it is the one whose texts are tags
        shares = [_share_of_tags(grid, column.place, rows) for column in headed]
        return headed[shares.index(max(shares))].place, ()
    places = sorted({place for row in rows for place in grid.rows[row]})
    for place in places:
        if _share_of_tags(grid, place, rows) >= _SHARE_OF_TAGS:
            heading = next((one.heading for one in columns if one.place == place), "no heading")
            return place, (f'"{heading}" is taken for the tags: no heading says which column is',)
    return None, ()


def _share_of_tags(grid: Grid, place: int, rows: Sequence[int]) -> float:
    texts = [text for row in rows if (text := grid.text(row, place))]
    return sum(bool(TAG.fullmatch(text)) for text in texts) / len(texts) if texts else 0.0


def _with_unheaded(
    grid: Grid,
    columns: Sequence[SheetColumn],
    rows: Sequence[int],
    spread: Mapping[tuple[int, int], Merge],
) -> list[SheetColumn]:
    """Return the columns with those between or beside them that have values and no heading."""
    first, last = columns[0].place, columns[-1].place
    known = {column.place for column in columns}
    counts: dict[int, list[str]] = {}
    for row in rows:
        texts = {cell.text for _, cell in filled(grid.rows[row])}
        if len(texts) < 2:  # noqa: PLR2004  a text alone heads no column
            continue
        for place, cell in filled(grid.rows[row]):
            beside = first - 1 <= place <= last + 1
            if beside and place not in known and (row, place) not in spread:
                counts.setdefault(place, []).append(cell.ref)
    more = [
        SheetColumn(place, (f"column {re.sub('[0-9]', '', refs[0])}",), ref=refs[0])
        for place, refs in counts.items()
        if len(refs) > 1 or len(rows) < 3  # noqa: PLR2004  one stray cell is no column
    ]
    return sorted([*columns, *more], key=lambda column: column.place)


def _hidden(
    rows: Sequence[str], columns: Iterable[SheetColumn], *, turned_over: bool
) -> tuple[str, ...]:
    """Say which units and columns come from what the sheet hides."""
    said = []
    if rows:
        what = "columns" if turned_over else "rows"
        said.append(f"hidden {what} came in: {', '.join(rows)}")
    hidden = [column.printed for column in columns if column.hidden]
    if hidden:
        what = "rows" if turned_over else "columns"
        said.append(f"hidden {what} came in: {', '.join(hidden)}")
    return tuple(said)


def other_equipment(titles: Sequence[str]) -> bool:
    """Tell whether titles are those of a schedule of other equipment.

    >>> other_equipment(["PUMP SCHEDULE"]), other_equipment(["AHU SCHEDULE"])
    (True, False)
    """
    joined = " ".join(titles)
    return bool(_OTHER.search(joined)) and not _OURS.search(joined)
