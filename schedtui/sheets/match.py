"""Which key each column of a schedule is: by its headings, its unit, its values, its neighbours.

Nothing is guessed: where two keys remain, or none, the column is no key's and that is said. How
sure each answer is goes with it.
"""

from __future__ import annotations

from collections import defaultdict
from dataclasses import dataclass, replace
from functools import cache, lru_cache
from typing import TYPE_CHECKING

from rapidfuzz import fuzz, process

from schedtui.errors import AmountError
from schedtui.schedule.catalogue.unit import Unit
from schedtui.sheets.figures import halves, is_nothing, stated
from schedtui.sheets.heading import Reading, part_reading, read_parts, variants
from schedtui.sheets.known import Known, known_fields, vocabulary
from schedtui.sheets.placement import ASKED, CERTAIN, LIKELY, NONE, Placement
from schedtui.sheets.settle import settle
from schedtui.units import LOAD, TEMPERATURE
from schedtui.units.word import find_unit

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from schedtui.sheets.table import SheetColumn, SheetTable
    from schedtui.units import System

_CLOSE = 84  # of 100: one letter wrong in six
_SHORTEST = 5  # letters; shorter words are one letter from too many others
_READABLE = 0.5
_TRIED = 60  # cells of a column by which it is told whether they are its key's values
_PAIR = 0.6


@dataclass(frozen=True, slots=True)
class _Fit:
    """The keys that one heading may be."""

    knowns: tuple[Known, ...]
    reading: Reading
    why: str = ""


def match(
    table: SheetTable,
    system: System,
    told: dict[str, tuple[str, ...]] | None = None,
    stated_in: System | None = None,
) -> list[Placement]:
    """Return what every column of a table is taken for.

    Args:
        table: the table.
        system: the project's unit system, in which values are tried.
        told: keys by heading, as a person said; none for a column to be kept as it is.
        stated_in: the sheet's unit system where it is another.
    """
    found: list[Placement] = []
    fits: dict[int, list[_Fit]] = {}
    for column in table.columns:
        if column.place == table.tag:
            found.append(Placement(column, ("tag",), sure=CERTAIN))
        elif (keys := told_keys(column, told or {})) is not None:
            found.append(_as_told(column, keys))
        elif keys := _by_key(column):
            found.append(Placement(column, keys, (_unit_of(column),), CERTAIN))
        else:
            fits[len(found)] = _fits(table, column, stated_in or system)
            found.append(_first(column, fits[len(found)]))
    found = settle(table, found, {k: [one.knowns for one in v] for k, v in fits.items()})
    found = [_with_values(table, one, system) for one in found]
    return _without_rivals(table, found)


def told_keys(column: SheetColumn, told: dict[str, tuple[str, ...]]) -> tuple[str, ...] | None:
    """Return the keys that a person gave a column by its heading, None where none."""
    names = (column.printed, " ".join(column.texts), column.heading, (column.parts or ("",))[-1])
    for name in names:
        keys = told.get(squashed(name))
        if keys is not None:
            return keys
    return None


def squashed(text: str) -> str:
    """Return a heading without what two spellings of it may differ in."""
    return "".join(sign for sign in text.casefold() if sign.isalnum() or sign in "%°")


def _as_told(column: SheetColumn, keys: tuple[str, ...]) -> Placement:
    return Placement(
        column, keys, (_unit_of(column),) * len(keys), ASKED, "" if keys else "kept as told"
    )


def _by_key(column: SheetColumn) -> tuple[str, ...]:
    """Return the key that a heading is, as in our own exports."""
    return next(((part,) for part in reversed(column.parts) if part in Unit.catalogue), ())


def _unit_of(column: SheetColumn) -> str | None:
    return read_parts(column.texts).unit


def _first(column: SheetColumn, fits: Sequence[_Fit]) -> Placement:
    """Return what a column's own heading says, left open where it says two things."""
    if not fits:
        return Placement(column, why="no key is known by this heading")
    units = tuple(one.reading.unit for one in fits)
    why = next((one.why for one in fits if one.why), "")
    if all(len(one.knowns) == 1 for one in fits):
        keys = tuple(one.knowns[0].field.key for one in fits)
        return Placement(column, keys, units, LIKELY if why else CERTAIN, why)
    rivals = tuple(known.field.key for one in fits for known in one.knowns)
    return Placement(column, (), units, NONE, why, rivals)


def _fits(table: SheetTable, column: SheetColumn, system: System) -> list[_Fit]:
    """Return the keys that a column may be, one fit for each value in its cells."""
    for headings in variants(column.texts):
        each = [_candidates(column, heading, system) for heading in headings]
        if all(one.knowns for one in each) and len({one.knowns for one in each}) == len(each):
            return each
    pair = _dry_and_wet(table, column, system)
    if pair:
        return pair
    fit = _candidates(column, column.texts, system)
    return [fit] if fit.knowns else []


def _dry_and_wet(table: SheetTable, column: SheetColumn, system: System) -> list[_Fit]:
    """Return dry and wet bulb for a heading of air alone over values in pairs."""
    reading = read_parts(column.texts)
    if {"db", "wb"} & reading.words or not {"entering", "leaving"} & reading.words:
        return []
    cells = [cell.text for cell in table.cells(column.place) if not is_nothing(cell.text)]
    pairs = sum(halves(text, 2) is not None for text in cells)
    if not cells or pairs < _PAIR * len(cells):
        return []
    why = "two values a cell: dry and wet bulb"
    each = [_candidates(column, (*column.texts, bulb), system) for bulb in ("DB", "WB")]
    return [replace(one, why=why) for one in each] if all(one.knowns for one in each) else []


def _candidates(column: SheetColumn, texts: tuple[str, ...], system: System) -> _Fit:
    """Return the keys that a heading may be: read as printed, then more leniently, said so."""
    reading = read_parts(texts)
    if knowns := _best(_both_lats(reading), system):
        return _Fit(knowns, reading)
    mended, why = _mended(reading)
    if mended != reading and (knowns := _best(_both_lats(mended), system)):
        return _Fit(knowns, mended, why)
    return _without_groups(column, texts, system)


def _without_groups(column: SheetColumn, texts: tuple[str, ...], system: System) -> _Fit:
    """Try a heading without the groups that mean nothing here, or that were only carried over."""
    foreign = [
        place
        for place, text in enumerate(texts[:-1])
        if not part_reading(text).words & vocabulary() and not part_reading(text).units
    ]
    own = tuple(text for place, text in enumerate(texts) if place not in foreign)
    if foreign and (knowns := _best(_both_lats(_mended(read_parts(own))[0]), system)):
        return _Fit(knowns, read_parts(own), "its group is none known here")
    own = tuple(text for place, text in enumerate(texts) if place not in column.carried)
    if column.carried and own:
        reading = _mended(read_parts(own))[0]
        knowns = tuple(
            one
            for one in _best(_both_lats(reading), system)
            if one.of_itself or one.must or reading.words & (one.around - {"coil", "section"})
        )
        if knowns:
            return _Fit(knowns, reading, "the group before it ends here")
    return _Fit((), read_parts(texts))


def _both_lats(reading: Reading) -> list[Reading]:
    """Return LAT read as leaving air, as latent, or as either: its unit says."""
    if not reading.lat:
        return [reading]
    unit = reading.unit
    if unit and (unit == "°" or find_unit(unit, TEMPERATURE)):
        return [reading]
    if unit and find_unit(unit, LOAD):
        return [reading.latent()]
    return [reading, reading.latent()]


def _best(readings: Iterable[Reading], system: System) -> tuple[Known, ...]:
    """Return the fields whose own words are most of a heading."""
    found: list[Known] = []
    for reading in readings:
        fits = {known: known.fits(reading, system) for known in known_fields()}
        most = max(fits.values(), default=0)
        found += [known for known, size in fits.items() if size == most and most]
    return tuple(found)


def _mended(reading: Reading) -> tuple[Reading, str]:
    """Return a heading with its misspelled words mended, and what was mended."""
    changes = {word: close for word in reading.words if (close := _close(word))}
    words = frozenset(changes.get(word, word) for word in reading.words)
    expanded = frozenset(
        part for word in words for part in (part_reading(word).words or frozenset((word,)))
    )
    why = ", ".join(f'"{word}" read as {close}' for word, close in sorted(changes.items()))
    return replace(reading, words=expanded), why


@cache
def _words() -> tuple[str, ...]:
    """Return the known words in an order that does not change from run to run."""
    return tuple(sorted(word for word in vocabulary() if len(word) >= _SHORTEST - 1))


@lru_cache(maxsize=4096)
def _close(word: str) -> str | None:
    """Return the known word that a word is a slip of, None where it is known or far from all."""
    if word in vocabulary() or len(word) < _SHORTEST:
        return None
    found = process.extractOne(word, _words(), scorer=fuzz.ratio, score_cutoff=_CLOSE)
    return found[0] if found else None


def _with_values(table: SheetTable, one: Placement, system: System) -> Placement:
    """Return a placement as it is when its cells can be read so, else as no key's."""
    if one.sure == ASKED or not one.keys or one.keys == ("tag",):
        return one
    cells = [cell for cell in table.cells(one.column.place) if not is_nothing(cell.text)]
    cells = cells[:_TRIED]
    good = 0
    for cell in cells:
        texts = [cell.text] if len(one.keys) == 1 else halves(cell.text, len(one.keys)) or []
        try:
            for key, unit, text in zip(one.keys, one.units, texts, strict=True):
                part = cell if len(one.keys) == 1 else replace(cell, text=text, number=None)
                field = Unit.catalogue[key]
                stated(part, field, system, unit, comma=table.decimal_comma)
            good += 1
        except (AmountError, ValueError):
            continue
    if cells and good < _READABLE * len(cells):
        why = f"its cells are no values of {', '.join(one.keys)}"
        return replace(one, keys=(), sure=NONE, why=why)
    return one


def _without_rivals(table: SheetTable, found: list[Placement]) -> list[Placement]:
    """Leave out what two columns are taken for: the surer stays, of two alike neither."""
    claims: defaultdict[str, list[int]] = defaultdict(list)
    for place, one in enumerate(found):
        for key in one.keys:
            claims[key].append(place)
    order = (ASKED, CERTAIN, LIKELY)
    for key, places in claims.items():
        if key == "tag":
            _only_tag(table, found, places)
            continue
        if len(places) < 2:  # noqa: PLR2004  no rival
            continue
        best = min(order.index(found[place].sure) for place in places if found[place].keys)
        first = [
            place
            for place in places
            if found[place].keys and order.index(found[place].sure) == best
        ]
        keep = first[0] if len(first) == 1 or _alike(table, found, first) else None
        for place in places:
            if place != keep:
                other = found[keep].column.printed if keep is not None else "another column"
                why = f'"{other}" is {key} too'
                found[place] = replace(found[place], keys=(), sure=NONE, why=why, rivals=(key,))
    return found


def _only_tag(table: SheetTable, found: list[Placement], places: list[int]) -> None:
    """Leave the tags to their column; others that are headed like one are kept."""
    for place in places:
        if found[place].column.place != table.tag:
            found[place] = replace(found[place], keys=(), sure=NONE, why="the tags are elsewhere")


def _alike(table: SheetTable, found: list[Placement], places: list[int]) -> bool:
    """Tell whether columns of one key hold the same values in every row."""
    texts = [[cell.text for cell in table.cells(found[place].column.place)] for place in places]
    return all(one == texts[0] for one in texts)
