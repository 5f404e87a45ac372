"""A schedule with its fields down: the section titles among them become their group.

Works on the table once it is turned, where a section's title is a column without values.
"""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from schedtui.sheets.body import LONG, NOTES
from schedtui.sheets.table import Loose, SheetColumn

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence

    from schedtui.sheets.grid import Cell


def regrouped(
    columns: Sequence[SheetColumn], tag: int, rows: Sequence[Mapping[int, Cell]]
) -> tuple[list[SheetColumn], list[str], list[str], list[Loose]]:
    """Return a turned table's fields under the section titles that stood among them.

    A line without values is a section's title where fields follow, a note where none do.
    """
    filled_places = {place for row in rows for place in row}
    last = max(filled_places, default=tag)
    kept: list[SheetColumn] = []
    titles: list[str] = []
    notes: list[str] = []
    inside: list[Loose] = []
    group = ""
    for column in columns:
        text = column.printed
        if column.place in filled_places:
            parts = (group, *column.parts) if group and column.place > tag else column.parts
            carried = (
                frozenset({0, *(one + 1 for one in column.carried)}) if group else column.carried
            )
            kept.append(replace(column, parts=parts, carried=carried))
        elif column.place > last:
            if not NOTES.fullmatch(text) or len(text.split()) > LONG:
                notes.append(text)
            else:
                inside.append(Loose(column.ref, text, "heads the notes", kept=True))
        elif column.place < tag:
            titles.append(text)
        elif _is_section(column):
            group = column.heading
            inside.append(Loose(column.ref, text, "a section title, over what follows", kept=True))
        else:
            inside.append(Loose(column.ref, text, "has no value", kept=True))
    return kept, titles, notes, inside


def _is_section(column: SheetColumn) -> bool:
    return len(column.parts) == 1 or len(set(column.parts)) == 1
