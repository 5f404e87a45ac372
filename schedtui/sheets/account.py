"""The account of an import: what every column was taken for, and every cell that has no place.

Words only; where they are printed is not known here.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.sheets.figures import is_nothing

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from schedtui.sheets.importing import Import, Matched
    from schedtui.sheets.placement import Placement
    from schedtui.sheets.table import Loose

_LONGEST = 100


def account(read: Import, changes: Sequence[str] = ()) -> list[str]:
    """Return the lines of the account.

    Args:
        read: what the sheets say.
        changes: what was changed in a schedule that was there, each in words.
    """
    lines: list[str] = []
    for one in read.matched:
        lines += _table(read, one)
    lines += read.said
    if read.title:
        lines.append(f"title: {_shown(read.title)}")
    if read.notes:
        lines.append(f"notes: {len(read.notes)}")
    told = [one for one in read.placed.loose if one.kept]
    if told:
        lines += ["", "no unit's values:", *map(_loose, told)]
    if read.lost:
        lines += ["", "not placed:", *map(_loose, read.lost)]
    if changes:
        lines += ["", "changes:", *(f"  {change}" for change in changes)]
    return [*lines, "", counts(read)]


def counts(read: Import) -> str:
    """Return the counts in one line."""
    placed = read.placed
    units = len(placed.units)
    return (
        f"{units} {'unit' if units == 1 else 'units'}, {placed.placed} cells placed, "
        f"{placed.kept} kept as columns, {len(read.lost)} not placed"
    )


def _table(read: Import, one: Matched) -> Iterator[str]:
    table = one.table
    where = table.where(table.ref)
    across = ", units across" if table.turned else ""
    yield f"{where}: {len(table.rows)} rows of units{across}"
    for placement in one.placements:
        yield f"  {_column(read, one, placement)}"


def _column(read: Import, one: Matched, placement: Placement) -> str:
    column = placement.column
    if placement.keys:
        units = dict.fromkeys(unit for unit in placement.units if unit)
        unit = f" in {' and '.join(units)}" if units else ""
        why = f" ({placement.why})" if placement.why else ""
        keys = " and ".join(placement.keys)
        return f"{_shown(column.printed)} → {keys}{unit}, {placement.sure}{why}"
    empty = all(is_nothing(cell.text) for cell in one.table.cells(column.place))
    key = read.placed.own_keys[read.matched.index(one)].get(column.place)
    kept = f"kept as column {key}" if key and not empty else "nothing in it"
    return f"{_shown(column.printed)}: {kept}; {placement.why}"


def _loose(one: Loose) -> str:
    return f'  {one.ref} "{_shown(one.text)}": {one.said}'


def _shown(text: str) -> str:
    text = " ".join(text.split())
    return text if len(text) <= _LONGEST else f"{text[: _LONGEST - 1]}…"
