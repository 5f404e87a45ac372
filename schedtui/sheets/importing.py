"""From grids to units with nothing lost: the one engine behind the command and behind a paste.

`read_grids` finds the schedules, matches their columns and places their cells. What the command
line or the screen does with the result is not known here.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.errors import FileError, UsageError
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.load import nearest_key
from schedtui.sheets.match import match, squashed
from schedtui.sheets.place import Placed, place_all
from schedtui.sheets.systems import system_of_tables
from schedtui.sheets.table import Loose, SheetTable
from schedtui.sheets.tables import Found, find_tables, other_equipment

if TYPE_CHECKING:
    from collections.abc import Iterable, Mapping, Sequence

    from schedtui.sheets.grid import Grid
    from schedtui.sheets.placement import Placement
    from schedtui.units import System

AS_COLUMN = "column"


@dataclass(frozen=True, slots=True)
class Matched:
    """A schedule and what its columns are taken for."""

    table: SheetTable
    placements: tuple[Placement, ...]


@dataclass(frozen=True, slots=True)
class Import:
    """What sheets say, read and placed.

    Args:
        matched: the schedules, each with its columns.
        placed: the units, the own columns, and what has no place.
        title: the title over the first schedule, empty where there is none.
        notes: the notes under the schedules.
        said: what is to be said of it as a whole.
    """

    matched: tuple[Matched, ...]
    placed: Placed
    title: str = ""
    notes: tuple[str, ...] = ()
    said: tuple[str, ...] = ()

    @property
    def lost(self) -> list[Loose]:
        """The cells that have no place."""
        return [one for one in self.placed.loose if not one.kept]


def read_grids(
    grids: Iterable[Grid],
    system: System | None = None,
    told: Mapping[str, str] | None = None,
    taken: frozenset[str] = frozenset(),
) -> Import:
    """Return what sheets say.

    Args:
        grids: the sheets.
        system: the project's unit system; told by the sheets' units where None.
        told: the key of a column by its heading, as a person says: "cool_eat_db",
            "cool_eat_db/cool_eat_wb" for two values a cell, "column" for none.
        taken: keys of own columns that are another's already.

    Raises:
        FileError: there is no schedule in them, or nothing tells their units.
        UsageError: `told` names a key or a heading that is none.
    """
    keys = {squashed(heading): _keys(text) for heading, text in (told or {}).items()}
    found = [find_tables(grid) for grid in grids]
    tables = [table for one in found for table in one.tables]
    ours = [table for table in tables if not other_equipment(table.titles)] or tables
    if not any(table.rows for table in ours):
        raise FileError("has no schedule in it: no headings that are known over a column of tags")
    _refuse_unknown(told or {}, ours)
    said: list[str] = []
    stated_in = _stated_in(ours, system, said)
    system = system or stated_in
    matched = tuple(Matched(one, tuple(match(one, system, keys, stated_in))) for one in ours)
    placed = place_all([(one.table, one.placements) for one in matched], system, taken)
    return _whole(found, matched, placed, said)


def _stated_in(tables: Sequence[SheetTable], system: System | None, said: list[str]) -> System:
    """Return the unit system of the sheets themselves, the project's where they do not tell."""
    try:
        stated_in, why = system_of_tables(tables)
    except FileError:
        if system is None:
            raise
        return system
    if system is None:
        said.append(f"units {stated_in}: {why}")
    elif system != stated_in:
        said.append(f"the sheet is in {stated_in} units, the schedule in {system}")
    return stated_in


def _keys(text: str) -> tuple[str, ...]:
    """Return the keys that a person names, none for a column to be kept."""
    if text.strip() == AS_COLUMN:
        return ()
    keys = tuple(part.strip() for part in text.split("/"))
    for key in keys:
        if key not in Unit.catalogue or key == "tag":
            close = nearest_key("unit", key)
            hint = f"; did you mean {close}?" if close else ""
            raise UsageError(f'"{key}" is no key of a unit that a column can have{hint}')
    return keys


def _refuse_unknown(told: Mapping[str, str], tables: Sequence[SheetTable]) -> None:
    names = {
        squashed(name)
        for table in tables
        for column in table.columns
        for name in (column.printed, " ".join(column.texts), column.heading, column.parts[-1])
    }
    for heading in told:
        if squashed(heading) not in names:
            raise UsageError(f'no column has the heading "{heading}"')


def _whole(
    found: Sequence[Found], matched: tuple[Matched, ...], placed: Placed, said: list[str]
) -> Import:
    """Gather title, notes and what has no place from every sheet."""
    ours = [one.table for one in matched]
    title = next((table.titles[0] for table in ours if table.titles), "")
    notes: list[str] = []
    for one in found:
        for table in one.tables:
            if table not in ours:
                placed.loose += _left_out(table)
                continue
            notes += [note for note in table.notes if note not in notes]
            placed.loose += [replace(loose, ref=table.where(loose.ref)) for loose in table.loose]
            placed.loose += [
                Loose(table.where(table.ref), text, "a title", kept=True)
                for text in table.titles
                if text != title
            ]
            said += [f"{table.sheet or 'sheet'}: {text}" for text in table.said]
        said += one.said
        placed.loose += [
            replace(loose, ref=f"{one.sheet}!{loose.ref}" if one.sheet else loose.ref)
            for loose in one.loose
        ]
    return Import(matched, placed, title, tuple(notes), tuple(said))


def _left_out(table: SheetTable) -> list[Loose]:
    """Return the rows of a schedule of other equipment, each told of."""
    title = " ".join(table.titles)
    rows = (list(row.values()) for row in table.rows)
    return [
        Loose(
            table.where(cells[0].ref),
            " | ".join(cell.text for cell in cells),
            f'in the schedule of other equipment "{title}"',
        )
        for cells in rows
    ]
