"""Renaming a condition, a plant or a column with every reference to it, as one edit.

Knows which keys refer to which names, and nothing of what they are for.
"""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from schedtui.schedule.catalogue.kinds import TextsKind
from schedtui.schedule.edit import Edit, SetAccepted, SetCell, Together
from schedtui.schedule.load import NAMES
from schedtui.schedule.typed import Typed, toml_text, toml_texts

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from schedtui.schedule.document import Document, Row

# The key by which units, and the defaults, list the names of a table's rows.
_LISTED = {"condition": "conditions", "plant": "plants"}


def rename(document: Document, table: str, row_id: int, cell: Typed) -> Edit:
    """Return the edit that gives a row another name and rewrites every reference to the old one.

    Args:
        document: the document as it is.
        table: "condition", "plant" or "column".
        row_id: id of the row.
        cell: its new name, as the catalogue's kind read it.
    """
    old, new = document.row(table, row_id).text(NAMES[table]), str(cell.value)
    own = SetCell(table, row_id, NAMES[table], cell)
    if not old:
        return own
    if table == "column":
        return Together((own, *_cells_of_column(document, old, new)))
    references = (*_in_lists(document, table, old, new), *_in_accepted(document, table, old, new))
    return Together((own, *references))


def _cells_of_column(document: Document, old: str, new: str) -> Iterator[Edit]:
    for row in document.rows("unit"):
        if old in row.cells:
            order = tuple(new if key == old else key for key in row.cells)
            yield SetCell("unit", row.row_id, new, row.cells[old])
            yield SetCell("unit", row.row_id, old, None, order)


def _in_lists(document: Document, table: str, old: str, new: str) -> Iterator[Edit]:
    key = _LISTED[table]
    for holder in ("defaults", "unit"):
        for row in document.rows(holder):
            cell = row.cells.get(key)
            if cell is not None and (other := _listed(cell, {old: new})) != cell:
                yield SetCell(holder, row.row_id, key, other)


def _in_accepted(document: Document, table: str, old: str, new: str) -> Iterator[Edit]:
    for row in document.rows("accepted"):
        for key, cell in _references(row, table, old, new).items():
            yield SetCell("accepted", row.row_id, key, cell)
    for unit in document.rows("unit"):
        accepted = tuple(
            replace(one, cells={**one.cells, **_references(one, table, old, new)})
            for one in unit.accepted
        )
        if accepted != unit.accepted:
            yield SetAccepted(unit.row_id, accepted)


def _references(row: Row, table: str, old: str, new: str) -> Mapping[str, Typed]:
    """Return the cells of an acceptance that name the row, with its new name."""
    found = {}
    if row.text("of") == f"{table} {old}":
        found["of"] = _text(f"{table} {new}")
    if table == "condition" and row.text("condition") == old:
        found["condition"] = _text(new)
    fields = row.cells.get("fields")
    if fields is not None and isinstance(fields.value, tuple):
        before, after = f"{table}[{old}]", f"{table}[{new}]"
        named = (one for one in fields.value if one.startswith(before))
        other = _listed(fields, {one: after + one.removeprefix(before) for one in named})
        if other != fields:
            found["fields"] = other
    return found


def _text(text: str) -> Typed:
    return Typed(text, text, toml_text(text))


def _listed(cell: Typed, names: Mapping[str, str]) -> Typed:
    """Return a list of texts with other names for some; a cell that is no list as it is."""
    if not isinstance(cell.value, tuple):
        return cell
    texts = [names.get(one, one) for one in cell.value]
    return TextsKind().read(texts, toml_texts(tuple(texts)), "IP")  # in SI a text is the same
