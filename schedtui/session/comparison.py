"""What somebody else has made of an open file, held against what is here.

Three documents: the one both began with, the one on the disk, the one here. Rows are the same
where they have the same name, so that a row put in above does not make all others differ. Changes
nothing; a merge is an edit of the disk's document.
"""

from __future__ import annotations

from collections import Counter
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.schedule.document import ARRAYS, SINGLE, Document, Row
from schedtui.schedule.edit import DeleteRow, Edit, InsertRow, MoveRow, SetAccepted, SetCell
from schedtui.schedule.load import CATALOGUES, NAMES, load
from schedtui.session import naming

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence

    from schedtui.files import Stamp
    from schedtui.schedule.typed import Typed

_BLANK = "blank"
_ACCEPTED = "accepted"
_ORDER = "order of the rows"


@dataclass(frozen=True, slots=True)
class Difference:
    """One thing in which the disk's file and what is here are not the same.

    Args:
        where: the row and the key, or what it is about.
        before: what both began with.
        disk: what the file on the disk has.
        here: what is here.
        both: whether both changed it, so that only one of them can stay.
    """

    where: str
    before: str
    disk: str
    here: str
    both: bool = False


@dataclass(frozen=True, slots=True)
class Comparison:
    """A file on the disk held against the document that is open.

    Args:
        theirs: the disk's document, its rows with the ids they have here; None where the file has
            gone or cannot be opened.
        stamp: what the file on the disk is; None where it has gone.
        why: why it cannot be opened; empty where it can.
        differences: what differs, in the order of the file; those that both changed first.
        edits: what was done here, as edits of the disk's document; None where the two cannot be
            had together.
    """

    theirs: Document | None
    stamp: Stamp | None
    why: str = ""
    differences: tuple[Difference, ...] = ()
    edits: tuple[Edit, ...] | None = None


def compared(document: Document, their_text: str, stamp: Stamp, file: str) -> Comparison:
    """Hold the text on the disk against the document here.

    Args:
        document: what is here; its source is what was read.
        their_text: what is on the disk now.
        stamp: what the file on the disk is.
        file: its name, for the exception.

    Raises:
        ScheduleError: what is on the disk cannot be opened.
    """
    base = _like(load(document.source.text), document, _by_origin(document))
    theirs = load(their_text, file)
    theirs = _like(theirs, base, _by_name(theirs, base), document.next_id)
    found = _Differences(base, theirs, document)
    found.look()
    differences = sorted(found.differences, key=lambda one: not one.both)
    if not any(one.disk != one.before for one in differences):
        rest = "comments, spacing or tables that nothing here reads"
        differences.append(Difference(rest, "as read", "another", "as read"))
    apart = not found.clash and theirs.system == document.system
    return Comparison(theirs, stamp, "", tuple(differences), tuple(found.edits) if apart else None)


_Ids = dict[tuple[str, int], Row]


def _by_origin(document: Document) -> _Ids:
    """Return the rows here by their place in the text that was read."""
    return {
        (table, row.origin.index): row
        for table in ARRAYS
        for row in document.rows(table)
        if row.origin and row.origin.source is document.source and row.origin.index is not None
    }


def _by_name(theirs: Document, base: Document) -> _Ids:
    """Return for the place of each row of theirs the row of the base that it is."""
    same: _Ids = {}
    for table in ARRAYS:
        names, others = (_names(one.rows(table), table) for one in (theirs, base))
        known = {name: row for name, row in zip(others, base.rows(table), strict=True) if name}
        for place, name in enumerate(names):
            if name in known:
                same[table, place] = known.pop(name)
        left = {row.row_id for row in known.values()}
        left |= {row.row_id for n, row in zip(others, base.rows(table), strict=True) if not n}
        if len(names) == len(others):  # renamed, or without a name: the same place has to do
            for place, row in enumerate(base.rows(table)):
                if (table, place) not in same and row.row_id in left:
                    same[table, place] = row
    return same


def _names(rows: Sequence[Row], table: str) -> list[tuple[str, int] | None]:
    """Return each row's name, with a number where it is used again; None for one without."""
    used: Counter[str] = Counter()
    names: list[tuple[str, int] | None] = []
    for row in rows:
        name = row.text(NAMES[table])
        used[name] += 1
        names.append((name, used[name]) if name else None)
    return names


def _like(document: Document, model: Document, same: _Ids, next_id: int = 0) -> Document:
    """Return a document with the row ids of another where the rows are the same."""
    fresh = max(document.next_id, model.next_id, next_id)
    single = {
        name: replace(row, row_id=model.single[name].row_id if name in model.single else fresh + i)
        for i, (name, row) in enumerate(document.single.items())
    }
    fresh += len(single)
    arrays: dict[str, tuple[Row, ...]] = {}
    for table in ARRAYS:
        rows = []
        for place, row in enumerate(document.rows(table)):
            other = same.get((table, place))
            row_id, fresh = (other.row_id, fresh) if other else (fresh, fresh + 1)
            kept = (
                {one.origin.index: one.row_id for one in other.accepted if one.origin}
                if other
                else {}
            )
            accepted = []
            for index, one in enumerate(row.accepted):
                accepted.append(replace(one, row_id=kept.get(index, fresh)))
                fresh += index not in kept
            rows.append(replace(row, row_id=row_id, accepted=tuple(accepted)))
        arrays[table] = tuple(rows)
    return replace(document, single=single, arrays=arrays, next_id=fresh)


class _Differences:
    """One comparison: gathers what differs, and what was done here as edits of theirs."""

    def __init__(self, base: Document, theirs: Document, here: Document) -> None:
        self.base, self.theirs, self.here = base, theirs, here
        self.differences: list[Difference] = []
        self.edits: list[Edit] = []
        self.clash = False

    def look(self) -> None:
        """Go through every table."""
        for table in SINGLE:
            rows = [_only(one, table) for one in (self.base, self.theirs, self.here)]
            if any(rows):
                self._row(table, *(row or Row(self.here.next_id, {}) for row in rows))
        for table in ARRAYS:
            self._array(table)

    def _array(self, table: str) -> None:
        base, theirs, here = (
            {row.row_id: row for row in one.rows(table)}
            for one in (self.base, self.theirs, self.here)
        )
        for row_id in dict.fromkeys((*base, *theirs, *here)):
            three = base.get(row_id), theirs.get(row_id), here.get(row_id)
            if all(three):
                self._row(table, *three)  # type: ignore[arg-type]  # all of them are there
            else:
                self._whole(table, *three)
        self._order(table, *(tuple(rows) for rows in (base, theirs, here)))

    def _whole(self, table: str, base: Row | None, theirs: Row | None, here: Row | None) -> None:
        """Compare a row that one of the three has not."""
        name = _subject(table, theirs or here or base)
        before, disk, now = (_there(row) for row in (base, theirs, here))
        both = base is not None and (
            (theirs is None and here is not None and not _equal(base, here))
            or (here is None and theirs is not None and not _equal(base, theirs))
        )
        if disk != now:
            self._note(name, (before, disk, now), both=both)
        if base is None and here is not None:
            place = self.here.position(table, here.row_id)
            self.edits.append(InsertRow(table, here, place))
        elif here is None and theirs is not None and base is not None:
            self.edits.append(DeleteRow(table, theirs.row_id))

    def _row(self, table: str, base: Row, theirs: Row, here: Row) -> None:
        """Compare a row that all three have, cell by cell."""
        name = _subject(table, here)
        for key in dict.fromkeys((*here.cells, *theirs.cells, *base.cells)):
            before, disk, now = (row.cells.get(key) for row in (base, theirs, here))
            if disk == now:
                continue
            both = before not in (disk, now)
            texts = [cell.text if cell else _BLANK for cell in (before, disk, now)]
            self._note(f"{name} {_label(table, key)}", texts, both=both)
            if before == disk:
                self.edits.append(SetCell(table, theirs.row_id, key, now))
        before_, disk_, now_ = (_accepted(row) for row in (base, theirs, here))
        if disk_ != now_:
            both = before_ not in (disk_, now_)
            counts = [str(len(one)) for one in (before_, disk_, now_)]
            self._note(f"{name} {_ACCEPTED}", counts, both=both)
            if before_ == disk_:
                self.edits.append(SetAccepted(theirs.row_id, here.accepted))

    def _order(
        self, table: str, base: tuple[int, ...], theirs: tuple[int, ...], here: tuple[int, ...]
    ) -> None:
        common = set(base) & set(theirs) & set(here)
        before, disk, now = (
            tuple(one for one in ids if one in common) for ids in (base, theirs, here)
        )
        if disk == now:
            return
        both = before not in (disk, now)
        texts = ["as read" if one == before else "another" for one in (before, disk, now)]
        self._note(f"{table}: {_ORDER}", texts, both=both)
        if both or set(theirs) != set(here):
            # Where a row has gone or come besides, no place can be said to be the one meant.
            self.clash |= before == disk
            return
        if before == disk:
            self.edits += [MoveRow(table, row_id, place) for place, row_id in enumerate(here)]

    def _note(self, where: str, texts: Sequence[str], *, both: bool) -> None:
        before, disk, here = texts
        self.differences.append(Difference(where, before, disk, here, both))
        self.clash |= both


def _only(document: Document, table: str) -> Row | None:
    return document.single.get(table)


def _label(table: str, key: str) -> str:
    known = CATALOGUES[table].catalogue.get(key)
    return naming.in_sentence(known.label) if known is not None else key


def _there(row: Row | None) -> str:
    return "not there" if row is None else "there"


def _accepted(row: Row) -> list[Mapping[str, Typed]]:
    return [one.cells for one in row.accepted]


def _equal(one: Row, other: Row) -> bool:
    return one.cells == other.cells and _accepted(one) == _accepted(other)


def _subject(table: str, row: Row | None) -> str:
    if row is None or table in SINGLE:
        return table
    name = row.text(NAMES[table]) or f"without a {NAMES[table]}"
    return name if table == "unit" else f"{table} {name}"
