"""A column's heading: its printed parts, read into words and a unit.

Takes "EAT DB/WB (°F)" apart into two headings, and notes what may be read in two ways. Knows no
key.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import lru_cache
from itertools import product

from schedtui.sheets.words import LONGEST, plain, split_units, unit_alone, words_of

_BRACKETS = re.compile(r"\(([^()]*)\)|\[([^\[\]]*)\]")
_ANNOTATION = re.compile(
    r"(?:see\s+)?(?:notes?|rem(?:arks?)?)?\s*#?\s*[0-9](?:[0-9,&\s]*)|each|ea|typ(?:ical)?\.?"
)
_SLASH = re.compile(r"\s*(?:/|&|\+)\s*")
_MOST_IN_ONE = 4


@dataclass(frozen=True, slots=True)
class Reading:
    """What one heading says.

    Args:
        words: its words spelled out.
        units: the units in it, the innermost last.
        lat: whether LAT is in it, which is leaving air or latent.
    """

    words: frozenset[str]
    units: tuple[str, ...]
    lat: bool = False

    @property
    def unit(self) -> str | None:
        """The unit that holds: the innermost, one that names a quantity before a bare degree."""
        return self.units[-1] if self.units else None

    def latent(self) -> Reading:
        """Return the reading with LAT for latent."""
        words = (self.words - {"leaving"}) | {"latent"}
        return Reading(words, self.units, lat=False)


@lru_cache(maxsize=4096)
def part_reading(text: str) -> Reading:
    """Read one part of a heading.

    >>> sorted(part_reading("EAT DB, °F").words), part_reading("EAT DB, °F").unit
    (['air', 'db', 'entering'], '°F')
    """
    text = plain(text)
    alone = unit_alone(text)
    if alone:
        return Reading(frozenset(), (alone,))
    units: list[str] = []

    def bracket(found: re.Match[str]) -> str:
        inside = (found[1] or found[2] or "").strip()
        unit = unit_alone(inside)
        if unit:
            units.append(unit)
            return " "
        return " " if _ANNOTATION.fullmatch(inside) or not inside else f" {inside} "

    text = _BRACKETS.sub(bracket, text)
    head, comma, tail = text.rpartition(",")
    if comma and (unit := unit_alone(tail)):
        text, units = head, [unit, *units]
    head, dash, tail = text.rpartition(" - ")
    if dash and (unit := unit_alone(tail)):
        text, units = head, [unit, *units]
    text, within = split_units(text)
    words = words_of(text)
    lat = bool(re.search(r"\blat\b", text))
    return Reading(frozenset(words), (*within, *units), lat)


def read_parts(parts: tuple[str, ...]) -> Reading:
    """Read a heading of several parts, the outermost first."""
    readings = [part_reading(part) for part in parts]
    return Reading(
        frozenset().union(*(one.words for one in readings)),
        tuple(unit for one in readings for unit in one.units),
        any(one.lat for one in readings),
    )


def variants(parts: tuple[str, ...]) -> list[list[tuple[str, ...]]]:
    """Return the ways in which a heading may be several headings in one, the likeliest first.

    Each way is a list of headings; none where the heading is but one.

    >>> variants(("EAT", "DB/WB"))
    [[('EAT', 'db'), ('EAT', 'wb')]]
    """
    found: list[list[tuple[str, ...]]] = []
    for place, part in enumerate(parts):
        found += [
            [(*parts[:place], text, *parts[place + 1 :]) for text in texts]
            for texts in _taken_apart(part)
        ]
    pairs = [place for place, part in enumerate(parts) if len(_pieces(part)[0]) > 1]
    if len(pairs) > 1:  # "EAT/LAT" over "DB/WB": every one with every other
        choices = [
            _taken_apart(part)[0] if place in pairs else [part] for place, part in enumerate(parts)
        ]
        found.insert(0, [tuple(one) for one in product(*choices)])
    return [one for one in found if 1 < len(one) <= _MOST_IN_ONE]


@lru_cache(maxsize=4096)
def _pieces(part: str) -> tuple[tuple[str, ...], str]:
    """Return what stands between the slashes of a heading that are no unit's, and its unit."""
    text = plain(part)
    for phrase in (r"\b[osre]\s*/\s*a\b", r"\bd\s*/\s*b\b", r"\bw\s*/\s*b\b", r"\bn\s*/\s*a\b"):
        text = re.sub(phrase, lambda found: re.sub(r"[\s/]", "", found[0]), text)
    text = re.sub(r"[()\[\]]", " ", text)
    bare, units = split_units(text)
    texts = tuple(piece.strip(" ,-") for piece in _SLASH.split(bare))
    unit = f" ({units[-1]})" if len(set(units)) == 1 else ""
    if len(units) == len(texts) > 1 or not all(texts):
        texts, unit = _with_own_units(text), ""
    return (texts, unit) if all(texts) and 1 < len(texts) <= _MOST_IN_ONE else ((part,), "")


def _with_own_units(text: str) -> tuple[str, ...]:
    """Part a heading at its slashes outside units, each piece with the unit it has."""
    masked = re.sub(r"(?<=[a-z0-9])/(?=(?:s|h|hr|min|sec|lb|in|inch|hour)\b)", "\0", text)
    return tuple(piece.replace("\0", "/").strip(" ,-") for piece in _SLASH.split(masked[:LONGEST]))


def _taken_apart(part: str) -> list[list[str]]:
    """Return the headings in one part: first with the words around shared, then without."""
    texts, unit = _pieces(part)
    if len(texts) == 1:
        return []
    before = texts[0].split()[:-1]
    after = texts[-1].split()[1:]
    first, last = texts[0].split()[-1:], texts[-1].split()[:1]
    middles = [first, *(text.split() for text in texts[1:-1]), last]
    shared = [" ".join([*before, *middle, *after]) + unit for middle in middles]
    alone = [text + unit for text in texts]
    tails = [" ".join([*before, *text.split()]) + unit for text in (texts[0], *texts[1:])]
    tails[0] = texts[0] + unit
    ways: list[list[str]] = []
    for way in (shared, tails, alone):
        if way not in ways:
            ways.append(way)
    return ways
