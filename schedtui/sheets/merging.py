"""Units from a sheet into a schedule that is there: what the sheet has changes, the rest stays.

Every change is an edit, and is listed. Acceptances stay with their units; whether their basis
still holds is for the review to say.
"""

from __future__ import annotations

from collections import Counter
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.errors import SpliceError
from schedtui.schedule.catalogue.kinds import TextsKind
from schedtui.schedule.document import Document, Row
from schedtui.schedule.edit import DeleteRow, Edit, InsertRow, SetCell, Together
from schedtui.schedule.load import load
from schedtui.schedule.save import source_text
from schedtui.schedule.typed import Typed, toml_text, toml_texts
from schedtui.sheets.writing import checked, schedule_text, value_text

if TYPE_CHECKING:
    from schedtui.sheets.figures import Stated
    from schedtui.sheets.importing import Import
    from schedtui.sheets.place import OwnColumn, SheetUnit


@dataclass(frozen=True, slots=True)
class Merge:
    """A schedule with a sheet's units in it.

    Args:
        edit: what was done to it.
        text: the text of its file.
        changes: each change in words.
    """

    edit: Edit
    text: str
    changes: tuple[str, ...]


@dataclass(slots=True)
class _Merging:
    """One merge on its way."""

    document: Document
    read: Import
    edits: list[Edit]
    changes: list[str]
    commented: bool

    def do(self, edit: Edit, change: str = "") -> None:
        """Carry out an edit and note it."""
        self.document, _ = edit.apply(self.document)
        self.edits.append(edit)
        if change:
            self.changes.append(change)


def merged(document: Document, read: Import) -> Merge:
    """Return a schedule with what a sheet says in it.

    Args:
        document: the schedule.
        read: what the sheet says, in the schedule's unit system.

    Raises:
        ScheduleError: the result would not be accepted.
        SpliceError: the changes cannot be written without touching something else.
    """
    return _written(document, read, only_sheet=False)


def based_on(document: Document, read: Import) -> Merge:
    """Return a schedule's project, conditions, limits, defaults and plants with a sheet's units.

    Args:
        document: the schedule whose units, columns, acceptances and record go.
        read: what the sheet says.

    Raises:
        ScheduleError: the result would not be accepted.
        SpliceError: the changes cannot be written without touching something else.
    """
    return _written(document, read, only_sheet=True)


def _written(document: Document, read: Import, *, only_sheet: bool) -> Merge:
    """Carry out the edits and write them; without comments where a form has no room for them."""
    for commented in (True, False):
        merging = _Merging(document, read, [], [], commented)
        if only_sheet:
            _empty(merging)
        columns = _columns(merging)
        _units(merging, columns)
        _notes(merging)
        try:
            text = source_text(merging.document)
        except SpliceError:
            if commented:
                continue
            raise
        checked(load(text))
        return Merge(Together(tuple(merging.edits)), text, tuple(merging.changes))
    raise SpliceError("the sheet's values cannot be written into this file")


def _empty(merging: _Merging) -> None:
    for table in ("unit", "column", "accepted"):
        for row in merging.document.rows(table):
            merging.do(DeleteRow(table, row.row_id))
    for row in merging.document.rows("record"):
        for key in row.cells:
            merging.do(SetCell("record", row.row_id, key, None))


def _columns(merging: _Merging) -> dict[str, str]:
    """Return the key that each of the sheet's own columns has in the file, made where it is new."""
    keys: dict[str, str] = {}
    there: dict[tuple[str, str], list[str]] = {}
    for row in merging.document.rows("column"):
        there.setdefault((row.text("heading"), row.text("group")), []).append(row.text("key"))
    for column in merging.read.placed.columns:
        same = there.get((column.heading, column.group))
        if same:
            keys[column.key] = same.pop(0)
            continue
        keys[column.key] = column.key
        made = Row(merging.document.next_id, _column_cells(column))
        place = len(merging.document.rows("column"))
        merging.do(InsertRow("column", made, place), f"column {column.key}: new")
    return keys


def _column_cells(column: OwnColumn) -> dict[str, Typed]:
    texts = {"key": column.key, "heading": column.heading, "group": column.group}
    return {key: Typed(text, text, toml_text(text)) for key, text in texts.items() if text}


def _units(merging: _Merging, columns: dict[str, str]) -> None:
    there: dict[tuple[str, int], Row] = {}
    seen: Counter[str] = Counter()
    for row in merging.document.rows("unit"):
        tag = row.text("tag")
        there[tag, seen[tag]] = row
        seen[tag] += 1
    met: Counter[str] = Counter()
    new: list[SheetUnit] = []
    for unit in merging.read.placed.units:
        row_there = there.get((unit.tag, met[unit.tag]))
        met[unit.tag] += 1
        if row_there is None:
            new.append(unit)
        else:
            _change(merging, unit, row_there, columns)
    if new:
        _insert(merging, new, columns)
    left = [tag for tag, number in there if number >= met[tag]]
    if left:
        merging.changes.append(f"not on the sheet, as they were: {', '.join(left)}")


def _insert(merging: _Merging, new: list[SheetUnit], columns: dict[str, str]) -> None:
    """Add units as blocks of a text of their own, so that they come with groups and comments."""
    own = [replace(one, key=columns[one.key]) for one in merging.read.placed.columns]
    placed = replace(merging.read.placed, units=_renamed(new, columns), columns=own)
    read = replace(merging.read, placed=placed)
    made = load(schedule_text(read, "sheet", "sheet")).rows("unit")
    for unit, row in zip(new, made, strict=True):
        row_of_its_own = replace(row, row_id=merging.document.next_id)
        place = len(merging.document.rows("unit"))
        merging.do(InsertRow("unit", row_of_its_own, place), f"{unit.tag}: new")


def _renamed(units: list[SheetUnit], columns: dict[str, str]) -> list[SheetUnit]:
    """Return units with the file's keys for their own columns."""
    return [
        replace(unit, own={columns[key]: text for key, text in unit.own.items()}) for unit in units
    ]


def _change(merging: _Merging, unit: SheetUnit, row: Row, columns: dict[str, str]) -> None:
    for key, stated in unit.cells.items():
        _set(merging, unit, row, key, _typed(stated, commented=merging.commented))
    for key, text in unit.own.items():
        _set(merging, unit, row, columns[key], Typed(text, text, toml_text(text)))


def _typed(stated: Stated, *, commented: bool) -> Typed:
    if not commented:
        return stated.typed
    return replace(stated.typed, toml=value_text(stated.typed.toml, stated.was))


def _set(merging: _Merging, unit: SheetUnit, row: Row, key: str, cell: Typed) -> None:
    before = row.cells.get(key)
    if before is not None and before.text == cell.text:
        return
    old = before.text if before else "not stated"
    merging.do(SetCell("unit", row.row_id, key, cell), f"{unit.tag} {key}: {old} → {cell.text}")


def _notes(merging: _Merging) -> None:
    """Add the sheet's notes that the project does not have."""
    project = merging.document.rows("project")[0]
    cell = project.cells.get("notes")
    there = cell.value if cell is not None and isinstance(cell.value, tuple) else ()
    new = tuple(note for note in merging.read.notes if note not in there)
    if not new or (cell is not None and cell.bad):
        return
    texts = [*there, *new]
    typed = TextsKind().read(texts, toml_texts(tuple(texts)), merging.document.system)
    merging.do(
        SetCell("project", project.row_id, "notes", typed), f"project notes: {len(new)} more"
    )
