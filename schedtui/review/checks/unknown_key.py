"""A key or table that this program does not know.

It is kept as it stands, but nothing reads it: often a known key with a letter wrong, whose number
is then missed without a word.
"""

from __future__ import annotations

from difflib import get_close_matches
from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.document import ARRAYS, SINGLE
from schedtui.schedule.load import CATALOGUES, nearest_key

if TYPE_CHECKING:
    from collections.abc import Iterable

    from schedtui.review.case import ScheduleCase, UnitCase

# The record's tables of counts and limits are kept as they stand.
_KEPT = {"record": {"counts", "limits"}}


def find_in_unit(case: UnitCase) -> Faults:
    """Look for keys of a unit that are neither a unit's nor the project's own."""
    own_columns = {column.key for column in case.schedule.columns}
    for key in case.unit.own:
        if key not in Unit.catalogue and key not in own_columns:
            yield _fault("unit", key, None)


def find_in_schedule(case: ScheduleCase) -> Faults:
    """Look for unknown tables, and unknown keys in every table but the units."""
    document = case.schedule.document
    for name in document.unknown:
        near = get_close_matches(name, (*SINGLE, *ARRAYS), n=1)
        hint = f"; {near[0]} is one, if that was meant" if near else ""
        yield Fault(
            "{name} is no table of a schedule; it is kept as it stands{hint}",
            (name,),
            values={"name": name, "hint": hint},
        )
    for table in (*SINGLE, *ARRAYS):
        for row in document.rows(table) if table != "unit" else ():
            for key in _unknown(table, row.cells):
                yield _fault(table, key, (table, row.row_id))


def _unknown(table: str, keys: Iterable[str]) -> Iterable[str]:
    catalogue = CATALOGUES[table].catalogue
    for key in keys:
        misplaced = table == "defaults" and key in catalogue and catalogue[key].own_only
        if misplaced or (key not in catalogue and key not in _KEPT.get(table, ())):
            yield key


def _fault(table: str, key: str, about: tuple[str, int] | None) -> Fault:
    near = nearest_key(table, key)
    hint = f"; {near} is one, if that was meant" if near and near != key else ""
    return Fault(
        "{key} is no key of {table}; it is kept, and nothing reads it{hint}",
        (key,),
        values={"key": key, "table": f"[{table}]", "hint": hint},
        about=about,
    )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Every key and table is one that this program reads.",
    source="the schedule file's format",
    unit=find_in_unit,
    schedule=find_in_schedule,
)
