"""Settles what a heading alone leaves open: by the values in the cells, then by the neighbours.

Air that a coil cools leaves colder than it enters, and its water leaves warmer; heating is the
other way round. What even that leaves open stays open.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from schedtui.sheets.figures import halves, plain_number
from schedtui.sheets.heading import read_parts
from schedtui.sheets.placement import ASKED, LIKELY, NONE, Placement

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping, Sequence

    from schedtui.sheets.grid import Cell
    from schedtui.sheets.known import Known
    from schedtui.sheets.table import SheetTable

_FAMILIES = ("precool", "preheat", "reheat", "cool", "heat")
_COOL_ALONE = {"cool_rows", "cool_fins", "cool_face_velocity", "cool_fluid_drop"}
_COOLS = {"cooling", "chw", "dx"}
_CLEAR = 0.8  # share of rows that must agree
_SUM = 0.03

Open = dict[int, list[tuple["Known", ...]]]


@dataclass(frozen=True, slots=True)
class _Side:
    """One family's keys for a run of columns."""

    family: str
    keys: Mapping[int, tuple[str, ...]]


def family_of(key: str) -> str:
    """Return the coil that a key belongs to, empty for none.

    >>> family_of("cool_ewt"), family_of("preheat_total"), family_of("supply_airflow")
    ('cool', 'preheat', '')
    """
    prefix, underscore, _ = key.partition("_")
    return prefix if underscore and prefix in _FAMILIES and key != "heat_airflow" else ""


def settle(table: SheetTable, found: list[Placement], fits: Open) -> list[Placement]:
    """Return the placements with what was open settled as far as can be.

    Args:
        table: the table.
        found: what each column's own heading says, in the order of the columns.
        fits: the fields that each column may be, one set for each value in its cells.
    """
    found = [_lat(table, found, place) for place in range(len(found))]
    while settled := next(_settled(table, found, fits), None):
        run, side, why = settled
        for place in run:
            found[place] = replace(found[place], keys=side.keys[place], sure=LIKELY, why=why)
    found = [_stray(found, place) for place in range(len(found))]
    return [replace(one, why=_open(one)) for one in found]


def _stray(found: Sequence[Placement], place: int) -> Placement:
    """Return a placement that is of the cooling coil alone, unless another coil's stand before.

    ROWS after the columns of a heating coil are that coil's, for which there is no key.
    """
    one = found[place]
    words = read_parts(one.column.texts).words
    if one.sure == ASKED or not one.keys or not set(one.keys) <= _COOL_ALONE or words & _COOLS:
        return one
    for before in reversed(found[:place]):
        families = {family_of(key) for key in before.keys if key not in _COOL_ALONE} - {""}
        if families and "cool" not in families:
            coil = f"{families.pop()}ing coil"
            why = f"stands after the {coil}: not {' or '.join(one.keys)}"
            return replace(one, keys=(), sure=NONE, rivals=(), why=why)
        if families:
            return one
    return one


def _settled(
    table: SheetTable, found: Sequence[Placement], fits: Open
) -> Iterator[tuple[list[int], _Side, str]]:
    """Yield the runs that can be settled as things are: each settled one bears on the others."""
    for run in _runs(found, fits):
        side = _side(table, found, fits, run)
        if side is not None:
            yield run, side, f"taken for {side.family}ing by {_reason(table, found, fits, run)}"


def _open(one: Placement) -> str:
    if one.keys or not one.rivals:
        return one.why
    return f"may be {' or '.join(dict.fromkeys(one.rivals))}"


def _runs(found: Sequence[Placement], fits: Open) -> list[list[int]]:
    """Return the neighbouring columns that are open and go together.

    A run ends where a heading comes again or where other coils come into question.
    """
    runs: list[list[int]] = []
    bases: set[str] = set()
    before: set[str] = set()
    for place, one in enumerate(found):
        if one.keys or not one.rivals or place not in fits:
            bases = set()
            continue
        own = {_base(key) for key in one.rivals}
        may_be = {side.family for side in _sides(found, fits, [place])}
        if runs and runs[-1][-1] == place - 1 and not own & bases and may_be == before:
            runs[-1].append(place)
            bases |= own
        else:
            runs.append([place])
            bases, before = own, may_be
    return runs


def _base(key: str) -> str:
    family = family_of(key)
    return key.removeprefix(f"{family}_") if family else key


def _sides(found: Sequence[Placement], fits: Open, run: Sequence[int]) -> list[_Side]:
    """Return the families that every column of a run may belong to and no other column has."""
    taken = {key for one in found for key in one.keys}
    sides = []
    for family in _FAMILIES:
        keys: dict[int, tuple[str, ...]] = {}
        for place in run:
            each = [
                [k.field.key for k in knowns if family_of(k.field.key) == family]
                for knowns in fits[place]
            ]
            if all(len(one) == 1 for one in each):
                keys[place] = tuple(one[0] for one in each)
        own = {key for some in keys.values() for key in some}
        if len(keys) == len(run) and not own & taken:
            sides.append(_Side(family, keys))
    return sides


def _side(
    table: SheetTable, found: Sequence[Placement], fits: Open, run: Sequence[int]
) -> _Side | None:
    """Return the family of a run: the one left over, else by its values, else by its neighbours."""
    sides = _sides(found, fits, run)
    sides = [side for side in sides if not _against(table, found, side)]
    if len(sides) == 1 and _is_all(fits, run):
        return sides[0]
    by_name = {side.family: side for side in sides}
    for side in sides:
        if _speaks_for(table, found, side):
            return side
    for neighbour in _neighbours(found, run):
        if neighbour in by_name:
            return by_name[neighbour]
    return None


def _is_all(fits: Open, run: Sequence[int]) -> bool:
    """Tell whether every field that a run may be is of some coil, so that one left over is it."""
    return all(family_of(known.field.key) for place in run for one in fits[place] for known in one)


def _reason(table: SheetTable, found: Sequence[Placement], fits: Open, run: Sequence[int]) -> str:
    sides = _sides(found, fits, run)
    if len(sides) == 1:
        return "what else the sheet has"
    if any(_speaks_for(table, found, side) or _against(table, found, side) for side in sides):
        return "its values"
    return "the columns beside it"


def _neighbours(found: Sequence[Placement], run: Sequence[int]) -> Iterator[str]:
    """Yield the families of the nearest columns that are settled: before the run, then after."""
    for places in (range(run[0] - 1, -1, -1), range(run[-1] + 1, len(found))):
        for place in places:
            families = [family_of(key) for key in found[place].keys]
            if families and not families[0] and place != run[0] - 1:
                break
            if families and families[0]:
                yield families[0]
                break


def _pairs(
    table: SheetTable, found: Sequence[Placement], side: _Side
) -> Iterator[tuple[str, float]]:
    """Yield what is entering and leaving, with how much it gains, for each row that states both."""
    where = {
        _base(key): (place, index)
        for place, keys in side.keys.items()
        for index, key in enumerate(keys)
    }
    for kind, (entering, leaving) in {"air": ("eat_db", "lat_db"), "water": ("ewt", "lwt")}.items():
        if entering in where and leaving in where:
            for row in table.rows:
                values = [
                    _value(table, found, row, *where[base], side) for base in (entering, leaving)
                ]
                if values[0] is not None and values[1] is not None:
                    yield kind, values[1] - values[0]


def _value(
    table: SheetTable,
    found: Sequence[Placement],
    row: Mapping[int, Cell],
    place: int,
    index: int,
    side: _Side,
) -> float | None:
    cell = row.get(found[place].column.place)
    text = (cell.number or cell.text) if cell else ""
    count = len(side.keys[place])
    if count > 1:
        parts = halves(text, count)
        text = parts[index] if parts else ""
    return plain_number(text, comma=table.decimal_comma) if text else None


def _speaks_for(table: SheetTable, found: Sequence[Placement], side: _Side) -> bool:
    """Tell whether a run's values are those of a family."""
    return _agreeing(table, found, side) >= _CLEAR


def _against(table: SheetTable, found: Sequence[Placement], side: _Side) -> bool:
    """Tell whether a run's values cannot be those of a family."""
    agreeing = _agreeing(table, found, side)
    return 0 <= agreeing <= 1 - _CLEAR


def _agreeing(table: SheetTable, found: Sequence[Placement], side: _Side) -> float:
    """Return the share of rows that agree with a family, −1 where none tells."""
    cools = side.family in ("cool", "precool")
    gains = [
        gain if kind == "water" else -gain for kind, gain in _pairs(table, found, side) if gain
    ]
    if not gains:
        return -1
    return sum((gain > 0) == cools for gain in gains) / len(gains)


def _lat(table: SheetTable, found: Sequence[Placement], place: int) -> Placement:
    """Return what LAT without a unit is taken for: leaving air, latent, or neither."""
    one = found[place]
    reading = read_parts(one.column.texts)
    bulbs = {"db", "wb"} & reading.words
    if one.sure == ASKED:
        return one
    if (
        not reading.lat
        or bulbs
        or reading.unit
        or len(one.keys) > 1
        or not (one.keys or one.rivals)
    ):
        return one
    before = found[place - 1].keys[-1] if place and found[place - 1].keys else ""
    if not before.endswith(("sensible", "total")):
        return one
    if _adds_up(table, found, place):
        return replace(one, keys=(), sure=NONE, why="latent: it is what total less sensible is")
    rivals = (*one.keys, *one.rivals)
    return replace(
        one,
        keys=(),
        sure=NONE,
        rivals=(),
        why=f"may be latent or {' or '.join(dict.fromkeys(rivals))}",
    )


def _adds_up(table: SheetTable, found: Sequence[Placement], place: int) -> bool:
    """Tell whether a column is total less sensible in the rows that state all three."""
    nearby = found[max(0, place - 3) : place]
    where = {key.rpartition("_")[2]: one.column.place for one in nearby for key in one.keys}
    if not {"total", "sensible"} <= set(where):
        return False
    fits = []
    for row in table.rows:
        texts = [
            row[p].text if p in row else ""
            for p in (where["total"], where["sensible"], found[place].column.place)
        ]
        total, sensible, latent = (
            plain_number(text, comma=table.decimal_comma) if text else None for text in texts
        )
        if total and sensible is not None and latent is not None:
            fits.append(abs(total - sensible - latent) <= _SUM * total)
    return bool(fits) and sum(fits) >= _CLEAR * len(fits)
