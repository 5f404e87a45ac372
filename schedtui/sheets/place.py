"""Units of the rows: each cell goes to its key, to a column of the project's own, or is told of.

What cannot be a key's value stays out and is listed with the reason.
"""

from __future__ import annotations

import re
import unicodedata
from collections import Counter
from dataclasses import dataclass, field, replace
from typing import TYPE_CHECKING

from schedtui.errors import AmountError
from schedtui.schedule.catalogue.unit import Unit
from schedtui.sheets.figures import Stated, halves, is_nothing, stated
from schedtui.sheets.table import Loose
from schedtui.sheets.tags import read_tags

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence

    from schedtui.sheets.grid import Cell
    from schedtui.sheets.placement import Placement
    from schedtui.sheets.table import SheetTable
    from schedtui.units import System

_LONGEST_KEY = 40
_SHARED = 0.5
_NO_COLUMN = {"accepted"}


@dataclass(frozen=True, slots=True)
class OwnColumn:
    """A column that is no key: key in the file, heading and group as printed."""

    key: str
    heading: str
    group: str


@dataclass(slots=True)
class SheetUnit:
    """A unit as the sheet has it.

    Args:
        tag: its tag.
        ref: where its row begins.
        cells: what is stated, by key.
        own: its cells in the project's own columns.
        table: number of the table it was first in.
    """

    tag: str
    ref: str
    cells: dict[str, Stated] = field(default_factory=dict)
    own: dict[str, str] = field(default_factory=dict)
    table: int = 0


@dataclass(slots=True)
class Placed:
    """All that was placed, and all that was not.

    Args:
        system: the unit system of the numbers.
        units: the units in the order of the sheet.
        columns: the project's own columns.
        loose: cells that have no place, and what was no unit's value.
        placed: how many cells went to a key.
        kept: how many went to an own column.
        own_keys: the key of the own column of each table's column, by their numbers.
    """

    system: System
    units: list[SheetUnit] = field(default_factory=list)
    columns: list[OwnColumn] = field(default_factory=list)
    loose: list[Loose] = field(default_factory=list)
    placed: int = 0
    kept: int = 0
    own_keys: list[dict[int, str]] = field(default_factory=list)

    def own_columns(self, placements: Sequence[Placement], taken: frozenset[str]) -> dict[int, str]:
        """Return the key of the own column of each column that is no key, by its place.

        Of equal headings in one table the first is the first of that heading in the file, and
        so on, so that tables of one form share their columns.
        """
        keys: dict[int, str] = {}
        met: Counter[tuple[str, str]] = Counter()
        for column in (one.column for one in placements if not one.keys):
            name = (column.heading, column.group)
            same = [one.key for one in self.columns if (one.heading, one.group) == name]
            if met[name] == len(same):
                used = {one.key for one in self.columns} | set(Unit.catalogue) | _NO_COLUMN | taken
                same.append(_free_key(*name, used))
                self.columns.append(OwnColumn(same[-1], *name))
            keys[column.place] = same[met[name]]
            met[name] += 1
        return keys


def _free_key(heading: str, group: str, used: set[str]) -> str:
    """Return a key made of a heading that no other column and no catalogue has."""
    name, wider = _slug(heading), _slug(f"{group} {heading}")
    for key in (name, wider):
        if key and key not in used:
            return key
    number = 2
    while f"{wider or 'column'}_{number}" in used:
        number += 1
    return f"{wider or 'column'}_{number}"


def _slug(text: str) -> str:
    plain = unicodedata.normalize("NFKD", text).encode("ascii", "ignore").decode().casefold()
    return re.sub(r"[^a-z0-9]+", "_", plain)[:_LONGEST_KEY].strip("_")


def place_all(
    tables: Sequence[tuple[SheetTable, Sequence[Placement]]],
    system: System,
    taken: frozenset[str] = frozenset(),
) -> Placed:
    """Make units of the rows of tables, with what more tables say of a unit in one.

    Args:
        tables: the tables, each with what its columns are.
        system: the unit system of the numbers.
        taken: keys of own columns that the file to be imported into has.
    """
    placed = Placed(system)
    keys: list[set[str]] = []
    for number, (table, placements) in enumerate(tables):
        own = {key for one in placements for key in one.keys} - {"tag", "serves", "location"}
        joins = [place for place, earlier in enumerate(keys) if _complements(own, earlier)]
        keys.append(own)
        placed.own_keys.append(placed.own_columns(placements, taken))
        earlier = _by_tag(placed.units, joins)
        seen: Counter[str] = Counter()
        for row in table.rows:
            for unit in _units(table, placements, row, placed, number):
                known = earlier.get((unit.tag, seen[unit.tag]))
                seen[unit.tag] += 1
                if known is None:
                    placed.units.append(unit)
                else:
                    _join(known, unit, placed)
    used = {key for unit in placed.units for key in unit.own}
    placed.columns = [column for column in placed.columns if column.key in used]
    return placed


def _complements(own: set[str], earlier: set[str]) -> bool:
    """Tell whether two tables say different things, so that a tag in both is one unit."""
    fewer = min(len(own), len(earlier))
    return not fewer or len(own & earlier) <= _SHARED * fewer


def _by_tag(units: Sequence[SheetUnit], joins: Sequence[int]) -> dict[tuple[str, int], SheetUnit]:
    found: dict[tuple[str, int], SheetUnit] = {}
    seen: Counter[str] = Counter()
    for unit in units:
        if unit.table in joins:
            found[unit.tag, seen[unit.tag]] = unit
            seen[unit.tag] += 1
    return found


def _join(known: SheetUnit, unit: SheetUnit, placed: Placed) -> None:
    """Add what another table says of a unit; where it contradicts, the first stays."""
    for key, one in unit.cells.items():
        if key not in known.cells:
            known.cells[key] = one
        elif known.cells[key].typed != one.typed and key != "tag":
            said = f"{known.tag} {key}: the table before has {known.cells[key].typed.text}"
            placed.loose.append(Loose(unit.ref, one.was or one.typed.text, said))
            placed.placed -= 1
    for key, text in unit.own.items():
        if known.own.setdefault(key, text) != text:
            said = f"{known.tag} {key}: the table before has {known.own[key]}"
            placed.loose.append(Loose(unit.ref, text, said))
            placed.kept -= 1


def _units(
    table: SheetTable,
    placements: Sequence[Placement],
    row: Mapping[int, Cell],
    placed: Placed,
    number: int,
) -> list[SheetUnit]:
    """Return the units that a row stands for: one, or one for each tag that it lists."""
    tag = row[table.tag]
    tags, said = read_tags(tag.text)
    ref = table.where(tag.ref)
    if said:
        placed.loose.append(Loose(ref, tag.text, said, kept=True))
    first = SheetUnit(tags[0], ref, table=number)
    for placement in placements:
        cell = row.get(placement.column.place)
        if cell is None or placement.keys == ("tag",):
            continue
        if is_nothing(cell.text) and not cell.problem:
            continue
        if placement.keys:
            _to_keys(table, placement, cell, first, placed, len(tags))
        else:
            _to_own(table, placement, cell, first, placed)
    first.cells = _in_catalogue_order(first.cells)
    return [
        first,
        *(replace(first, tag=t, cells=dict(first.cells), own=dict(first.own)) for t in tags[1:]),
    ]


def _in_catalogue_order(cells: Mapping[str, Stated]) -> dict[str, Stated]:
    return {key: cells[key] for key in Unit.catalogue if key in cells}


def _to_own(
    table: SheetTable, placement: Placement, cell: Cell, unit: SheetUnit, placed: Placed
) -> None:
    if cell.problem:
        placed.loose.append(Loose(table.where(cell.ref), cell.text, cell.problem))
        return
    unit.own[placed.own_keys[unit.table][placement.column.place]] = " ".join(cell.text.split())
    placed.kept += 1


def _to_keys(
    table: SheetTable,
    placement: Placement,
    cell: Cell,
    unit: SheetUnit,
    placed: Placed,
    tags: int,
) -> None:
    """Put a cell's value, or values, in its keys; what cannot be one is listed."""
    keys = placement.keys
    texts = [cell.text] if len(keys) == 1 else halves(cell.text, len(keys))
    ref = table.where(cell.ref)
    if texts is None:
        said = f"has not {len(keys)} values, for {' and '.join(keys)}"
        placed.loose.append(Loose(ref, cell.text, said))
        return
    good = True
    for key, unit_word, text in zip(keys, placement.units, texts, strict=True):
        if is_nothing(text) and not cell.problem:
            continue
        part = cell if len(keys) == 1 else replace(cell, text=text, number=None)
        try:
            one = stated(
                part, Unit.catalogue[key], placed.system, unit_word, comma=table.decimal_comma
            )
        except AmountError as error:
            good = False
            placed.loose.append(
                Loose(ref, text or cell.text, f"{unit.tag} {key}: {_reason(error, text)}")
            )
            continue
        if key == "quantity" and tags > 1:
            if one.typed.value != tags:
                said = f"{unit.tag} quantity: the row lists {tags} tags, each one unit"
                placed.loose.append(Loose(ref, text, said))
                good = False
            continue
        unit.cells[key] = one
    placed.placed += good


def _reason(error: AmountError, text: str) -> str:
    return str(error).removeprefix(text).strip()
