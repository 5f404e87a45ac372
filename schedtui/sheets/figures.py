"""What a cell states: a number with its digits, a choice, a text, or nothing.

From a cell's text to the TOML text of a key's value; a number in another unit is converted, and
what it was is handed back. Never evaluates anything, never guesses at a number.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from functools import cache
from typing import TYPE_CHECKING

from schedtui.errors import AmountError
from schedtui.schedule.catalogue.kinds import ChoiceKind, FlagKind, NumberKind, TextsKind
from schedtui.sheets.grid import Cell
from schedtui.sheets.header import NOTHING
from schedtui.sheets.words import plain, unit_alone
from schedtui.units import format_number
from schedtui.units.number import number_text, number_value
from schedtui.units.word import Unit, convert, find_unit, own_unit

if TYPE_CHECKING:
    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.typed import Typed
    from schedtui.units import Quantity, System

_FRACTION = re.compile(r"([+-]?)(?:([0-9]{1,6})\s*[-\s]\s*)?([0-9]{1,4})\s*/\s*([0-9]{1,4})")
_VULGAR = {"½": "1/2", "⅓": "1/3", "⅔": "2/3", "¼": "1/4", "¾": "3/4", "⅛": "1/8", "⅜": "3/8",
           "⅝": "5/8", "⅞": "7/8"}  # fmt: skip
_GROUPS = re.compile(r"[+-]?[0-9]{1,3}(?:([ '])[0-9]{3})(?:\1[0-9]{3})*(?:[.,][0-9]+)?")
_MARK = re.compile(
    r"(?<=[0-9])\s*(?:\*+|†|‡|\s\((?:note\s*)?[0-9]{1,2}\)|\s\[[0-9]{1,2}\])$", re.IGNORECASE
)
_LONGEST = 60
_PARTS = (2, 3, 4, 8, 16, 32)

# What sheets print for a choice, beside the choice itself.
_CHOICES: dict[str, tuple[str, ...]] = {
    "chilled water": ("chw", "chilled", "cw", "chwc", "water"),
    "dx": ("direct expansion", "d x", "refrigerant"),
    "hot water": ("hw", "hhw", "hhws", "lphw", "water"),
    "steam": ("stm", "lps"),
    "electric": ("elec", "electrical", "electric heat"),
    "gas": ("natural gas", "ng", "gas fired", "gas-fired"),
    "heat pump": ("hp",),
    "draw-through": ("draw through", "draw thru", "draw-thru", "dt", "draw"),
    "blow-through": ("blow through", "blow thru", "blow-thru", "bt", "blow"),
    "water": ("wtr", "100% water"),
    "propylene glycol": ("pg", "prop. glycol", "propylene"),
    "ethylene glycol": ("eg", "ethylene"),
    "ec": ("ecm",),
    "standard": ("std", "scfm", "standard air"),
    "actual": ("acfm", "actual air"),
}


@dataclass(frozen=True, slots=True)
class Stated:
    """What a cell states for a key.

    Args:
        typed: the cell of the schedule.
        was: what stood on the sheet where that is not what is stored, for the comment on its line.
    """

    typed: Typed
    was: str = ""


def is_nothing(text: str) -> bool:
    """Tell whether a text stands for nothing: blank, dashes, N/A."""
    return not text or bool(NOTHING.fullmatch(text))


def stated(
    cell: Cell, field: Field[object], system: System, unit: str | None, *, comma: bool
) -> Stated:
    """Read a cell for a key.

    Args:
        cell: the sheet's cell, which states something.
        field: the key.
        system: the project's unit system.
        unit: the unit of its column, None for the project's own.
        comma: whether the comma is the decimal sign in the sheet's texts.

    Raises:
        AmountError: it cannot be the key's value; the text says why.
    """
    if cell.problem:
        raise AmountError(cell.problem)
    if isinstance(field.kind, NumberKind):
        return _number(cell, field.kind, system, unit, comma=comma)
    if isinstance(field.kind, ChoiceKind | FlagKind):
        return Stated(field.kind.enter(_choice(cell.text, field.kind), system))
    if isinstance(field.kind, TextsKind):
        return Stated(field.kind.enter(_as_list(cell.text), system))
    return Stated(field.kind.enter(" ".join(cell.text.split()), system))


def _choice(text: str, kind: ChoiceKind | FlagKind) -> str:
    wanted = plain(text).strip(". ")
    if isinstance(kind, FlagKind):
        return {"x": "true", "in": "true", "✓": "true", "out": "false"}.get(wanted, wanted)
    for choice in kind.choices:
        if wanted == choice or wanted in _CHOICES.get(choice, ()):
            return choice
    return text if wanted else "-"


def _as_list(text: str) -> str:
    """Return remarks as a list: numbers apart, lines apart, a sentence whole."""
    numbers = re.fullmatch(
        r"(?:notes?|see)?\s*[:#]?\s*([A-Z0-9]{1,3}(?:\s*[,;&/\s]\s*[A-Z0-9]{1,3})*)\s*\.?",
        text,
        re.IGNORECASE,
    )
    if numbers and re.search(r"[0-9]", text):
        parts = re.split(r"[,;&/\s]+", numbers[1])
    else:
        parts = [part.strip() for part in text.split("\n")]
    return ", ".join(
        '"' + re.sub(r'(["\\])', r"\\\1", " ".join(p.split())) + '"' for p in parts if p
    )


def _number(
    cell: Cell, kind: NumberKind, system: System, unit: str | None, *, comma: bool
) -> Stated:
    quantity = kind.quantity
    text, mark = _unmarked(cell.text)
    number, word = _split(cell, text, comma=comma)
    if word:
        unit = _unit(word, quantity)
    stored = number if unit is None else _in_own_unit(number, unit, quantity, system)
    typed = kind.enter(stored, system)
    same = stored == number and not mark and not _is_fraction(text)
    return Stated(typed, "" if same else _original(cell.text, word, unit))


def _is_fraction(text: str) -> bool:
    return "/" in text or any(sign in text for sign in _VULGAR)


def _original(text: str, word: str, unit: str | None) -> str:
    return text if word or not unit else f"{text} {unit}"


def _unmarked(text: str) -> tuple[str, str]:
    """Take the mark of a footnote off a number."""
    text = " ".join(text[:_LONGEST].split())
    found = _MARK.search(text)
    return (text[: found.start()], found[0]) if found else (text, "")


def _unit(word: str, quantity: Quantity) -> str:
    label = unit_alone(word)
    if label == "°":
        label = None if quantity.ip != "°F" else "°"
    if label is None or (label != "°" and find_unit(label, quantity) is None):
        raise AmountError(f'"{word}" is no unit of {quantity.name}')
    return label


def _split(cell: Cell, text: str, *, comma: bool) -> tuple[str, str]:
    """Return the number of a cell as TOML has it, and the unit word behind it."""
    for sign, written in _VULGAR.items():
        text = text.replace(sign, f" {written}")
    text = text.strip().translate({0x2212: "-", 0xA0: " ", 0x202F: " ", 0x2009: " ", 0x2019: "'"})
    found = re.fullmatch(r"(.*?[0-9])\s*(\"|%|[^0-9\s.,'%/-][^0-9]*[0-9]?)?", text)
    if found is None or len(cell.text) > _LONGEST:
        raise AmountError("is not a number")
    figures, word = found[1], (found[2] or "").strip()
    if cell.number is not None:
        return number_text(cell.number), word
    if fraction := _FRACTION.fullmatch(figures):
        return _decimal(fraction), word
    return number_text(_pointed(figures, comma=comma)), word


def _decimal(fraction: re.Match[str]) -> str:
    sign, whole, over, under = fraction.groups()
    if not int(under) or int(over) >= int(under):
        raise AmountError("is no fraction that can be read")
    decimal = f"{int(whole or 0) + int(over) / int(under):.4f}".rstrip("0").rstrip(".")
    return sign + decimal


def _pointed(figures: str, *, comma: bool) -> str:
    """Return figures with a point for decimal sign and nothing between thousands."""
    if _GROUPS.fullmatch(figures):
        figures = figures.replace(" ", "").replace("'", "")
    if not comma:
        return figures
    if re.fullmatch(r"[+-]?[0-9]{1,3}(?:\.[0-9]{3})+(?:,[0-9]*)?", figures):
        figures = figures.replace(".", "")
    elif "." in figures:
        raise AmountError("has a point where the sheet has commas for decimal sign")
    return figures.replace(",", ".", 1)


@cache
def _units(unit: str, quantity: Quantity, system: System) -> tuple[Unit | None, Unit | None]:
    """Return the unit that a label means for a quantity, and the project's own."""
    own = own_unit(quantity, system)
    return (own if unit == "°" else find_unit(unit, quantity)), own


def _in_own_unit(number: str, unit: str, quantity: Quantity, system: System) -> str:
    """Return a number in the project's unit: as many significant figures, no needless digits."""
    source, own = _units(unit, quantity, system)
    if source is None or own is None or source.definition == own.definition:
        return number
    result = convert(number_value(number), source, own)
    digits = quantity.digits(system)
    if result:
        size = math.floor(math.log10(abs(result)))
        digits = max(digits, _figures(number) - 1 - size)
    return format_number(result, min(digits, 12))


def _figures(number: str) -> int:
    """Return how many significant figures a number states.

    >>> _figures("0.50"), _figures("9440"), _figures("7.5")
    (2, 4, 2)
    """
    mantissa = number.lower().partition("e")[0].lstrip("+-").replace("_", "")
    return max(1, len(mantissa.replace(".", "").lstrip("0")))


def plain_number(text: str, *, comma: bool) -> float | None:
    """Return the number that a text states without its unit, None where it states none."""
    try:
        number, _ = _split(Cell(text, ""), _unmarked(text)[0], comma=comma)
        return number_value(number)
    except AmountError:
        return None


def halves(text: str, count: int) -> list[str] | None:
    """Return the values in one cell: "80.1/66.9"; None where there are not `count` of them.

    >>> halves("80.1/66.9", 2), halves("5.2 / 7-1/2", 2), halves("7-1/2", 2)
    (['80.1', '66.9'], ['5.2', '7-1/2'], None)
    """
    text = text.strip()
    ways = (r"\s+/\s+|\n+", r"\s*[;|\n]\s*", r"\s*/\s*", r"\s*&\s*", r",\s+")
    for way in ways:
        parts = [part.strip() for part in re.split(way, text)]
        if len(parts) == count and all(parts) and not _torn(text, parts):
            return parts
    if count == 2 and text.count("/") == 2:  # noqa: PLR2004  one of the two is a fraction
        first, _, rest = text.partition("/")
        if _is_usual(rest):
            return [first.strip(), rest.strip()]
        head, _, tail = text.rpartition("/")
        if _is_usual(head):
            return [head.strip(), tail.strip()]
    return None


def _is_usual(text: str) -> bool:
    """Tell whether a text is a fraction such as sizes have: of halves, thirds, quarters, …."""
    found = _FRACTION.fullmatch(text.strip())
    return found is not None and int(found[4]) in _PARTS and int(found[3]) < int(found[4])


def _torn(text: str, parts: list[str]) -> bool:
    """Tell whether parting a text has torn a fraction such as 7-1/2."""
    return bool(_FRACTION.fullmatch(text)) and bool(re.search(r"[0-9][-\s]+[0-9]", parts[0]))
