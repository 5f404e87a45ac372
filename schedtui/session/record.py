"""Edits as plain values that can be written down, and read back in another process.

Row ids hold for one session only, so a row is named by its table and its place at the time: an
edit read back is applied to a document in the same state. Knows nothing of files or of time.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from datetime import date
from typing import TYPE_CHECKING, Any

from schedtui.errors import ScheduleError
from schedtui.schedule.document import Document, Origin, Row
from schedtui.schedule.edit import (
    DeleteRow,
    Edit,
    InsertRow,
    MoveRow,
    SetAccepted,
    SetCell,
    Together,
)
from schedtui.schedule.load import load
from schedtui.schedule.typed import Typed, Value

if TYPE_CHECKING:
    from collections.abc import Iterable, Mapping

Plain = dict[str, Any]


def written(document: Document, edit: Edit) -> Plain:
    """Return an edit as plain values.

    Args:
        document: the document that it is about to be applied to.
        edit: the edit.

    Raises:
        TypeError: it is of a kind that cannot be written down.
    """
    match edit:
        case SetCell(table, row_id, key, cell, order):
            place = document.position(table, row_id) if document.rows(table) else None
            plain = {"set": table, "at": place, "key": key, "cell": _cell(cell)}
            there = place is not None and key in document.rows(table)[place].cells
            return plain if there else {**plain, "order": order}  # else its place is to be restored
        case SetAccepted(row_id, accepted):
            unit = document.row("unit", row_id)
            rows = [_accepted(document, unit, one) for one in accepted]
            return {"accepted": document.position("unit", row_id), "rows": rows}
        case InsertRow(table, row, place):
            return {"insert": table, "at": place, "row": _row(document, table, row)}
        case DeleteRow(table, row_id):
            return {"delete": table, "at": document.position(table, row_id)}
        case MoveRow(table, row_id, place):
            return {"move": table, "from": document.position(table, row_id), "to": place}
        case Together(edits):
            parts = []
            for one in edits:
                parts.append(written(document, one))
                document, _ = one.apply(document)
            return {"together": parts}
    raise TypeError(edit)


def _cell(cell: Typed | None) -> Plain | None:
    if cell is None:
        return None
    value: Any = cell.value
    if isinstance(value, date):
        value = {"date": value.isoformat()}
    elif isinstance(value, tuple):
        value = {"texts": list(value)}
    return {"text": cell.text, "value": value, "toml": cell.toml, "problem": cell.problem}


def _cells(cells: Mapping[str, Typed]) -> Plain:
    return {key: _cell(cell) for key, cell in cells.items()}


def _row(document: Document, table: str, row: Row) -> Plain:
    origin = row.origin
    plain: Plain = {"cells": _cells(row.cells)}
    if origin is not None and origin.index is not None:
        if origin.source is document.source:
            plain["index"] = origin.index
        else:  # of a text that is on no disk any more
            plain["block"] = origin.source.block(table, origin.index)
    plain["accepted"] = [_accepted(document, row, one) for one in row.accepted]
    return plain


def _accepted(document: Document, unit: Row, one: Row) -> Plain:
    """Return an acceptance, and which one of its unit's it is, now and in the text."""
    now = [other.row_id for other in unit.accepted]
    plain: Plain = {"cells": _cells(one.cells)}
    if one.row_id in now and unit.row_id in (row.row_id for row in document.rows("unit")):
        plain["now"] = now.index(one.row_id)
    if one.origin and unit.origin and one.origin.source is unit.origin.source:
        plain["index"] = one.origin.index
    return plain


@dataclass(frozen=True, slots=True)
class Reader:
    """Reads edits back that were written down.

    Args:
        base: the document as it was loaded from the text that the first edit was made to.
    """

    base: Document

    def edit(self, document: Document, plain: Plain) -> Edit:
        """Return an edit from its plain values.

        Args:
            document: the document that it is about to be applied to.
            plain: what `written` made of it.

        Raises:
            LookupError, TypeError, ValueError: the values are of no edit of this document.
        """
        match plain:
            case {"set": str(table), "at": place, "key": str(key), "cell": cell}:
                row_id = document.next_id if place is None else _id(document, table, place)
                order = plain.get("order")
                keys = None if order is None else tuple(map(str, order))
                return SetCell(table, row_id, key, _read_cell(cell), keys)
            case {"accepted": int(place), "rows": list(rows)}:
                return self._set_accepted(document, place, rows)
            case {"insert": str(table), "at": int(place), "row": dict(row)}:
                return InsertRow(table, self._row(document, table, row), place)
            case {"delete": str(table), "at": int(place)}:
                return DeleteRow(table, _id(document, table, place))
            case {"move": str(table), "from": int(place), "to": int(to)}:
                return MoveRow(table, _id(document, table, place), to)
            case {"together": list(parts)}:
                edits = []
                for part in parts:
                    edits.append(self.edit(document, part))
                    document, _ = edits[-1].apply(document)
                return Together(tuple(edits))
        raise ValueError("of no edit")

    def _set_accepted(self, document: Document, place: int, rows: list[Plain]) -> SetAccepted:
        unit = document.rows("unit")[place]
        origins = _origins(self._original("unit", unit.origin))
        ids = _fresh(document.next_id, rows, unit)
        accepted = (
            _acceptance(row_id, plain, origins) for row_id, plain in zip(ids, rows, strict=True)
        )
        return SetAccepted(unit.row_id, tuple(accepted))

    def _row(self, document: Document, table: str, plain: Plain) -> Row:
        original = None
        if "index" in plain:
            original = self.base.rows(table)[plain["index"]]
        elif "block" in plain:
            original = _of_block(table, plain["block"], self.base.system)
        row = Row(
            document.next_id, _read_cells(plain["cells"]), original.origin if original else None
        )
        origins = _origins(original)
        accepted = (
            _acceptance(row_id, one, origins)
            for row_id, one in enumerate(plain["accepted"], document.next_id + 1)
        )
        return replace(row, accepted=tuple(accepted))

    def _original(self, table: str, origin: Origin | None) -> Row | None:
        """Return the row as loaded that comes from the same place."""
        if origin is None or origin.index is None:
            return None
        if origin.source is self.base.source:
            return self.base.rows(table)[origin.index]
        block = origin.source.block(table, origin.index)
        found = _of_block(table, block, self.base.system)
        return None if found is None else _with_origin(found, origin)


def _with_origin(row: Row, origin: Origin) -> Row:
    accepted = tuple(
        replace(one, origin=replace(one.origin, source=origin.source))
        for one in row.accepted
        if one.origin is not None
    )
    return replace(row, origin=origin, accepted=accepted)


def _id(document: Document, table: str, place: int) -> int:
    if place < 0:
        raise IndexError(place)
    return document.rows(table)[place].row_id


def _fresh(next_id: int, rows: Iterable[Plain], unit: Row) -> list[int]:
    """Return the row id of each acceptance: that of one which is there, or a new one."""
    ids = []
    for plain in rows:
        if "now" in plain:
            ids.append(unit.accepted[plain["now"]].row_id)
        else:
            ids.append(next_id)
            next_id += 1
    return ids


def _origins(row: Row | None) -> dict[int | None, Origin]:
    accepted = row.accepted if row else ()
    return {one.origin.index: one.origin for one in accepted if one.origin}


def _acceptance(row_id: int, plain: Plain, origins: dict[int | None, Origin]) -> Row:
    origin = origins.get(plain["index"]) if "index" in plain else None
    return Row(row_id, _read_cells(plain["cells"]), origin)


def _of_block(table: str, block: str, system: str) -> Row | None:
    """Return the row that a block of a text now gone held, None where it cannot be read."""
    head = f'[project]\ntitle = "-"\nunits = "{system}"\n'
    inline = block.lstrip().startswith("{")
    text = f"{table} = [{block}]\n{head}" if inline else f"{head}\n{block}"
    try:
        rows = load(text).rows(table)
    except ScheduleError:
        return None
    return rows[0] if rows else None


def _read_cells(plain: Plain) -> dict[str, Typed]:
    return {str(key): cell for key, one in plain.items() if (cell := _read_cell(one)) is not None}


def _read_cell(plain: Plain | None) -> Typed | None:
    if plain is None:
        return None
    text, toml, problem = plain["text"], plain["toml"], plain["problem"]
    if not (isinstance(text, str) and isinstance(toml, str) and isinstance(problem, str | None)):
        raise TypeError("of no cell")
    return Typed(text, _read_value(plain["value"]), toml, problem)


def _read_value(plain: Any) -> Value:
    match plain:
        case {"date": str(day)}:
            return date.fromisoformat(day)
        case {"texts": list(texts)}:
            return tuple(map(str, texts))
        case None | str() | bool() | int() | float():
            return plain
    raise TypeError("of no value")
