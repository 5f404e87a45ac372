"""A number, or a number with a unit, that a person typed into a cell.

Splits what was typed into the two, and hands back the text to store. Nothing typed is ever
evaluated as an expression, and no typed text reaches pint.
"""

from __future__ import annotations

import math
import re
import unicodedata
from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.errors import AmountError
from schedtui.units.number import (
    NUMBER_START,
    format_number,
    number_text,
    number_value,
    resolution,
)
from schedtui.units.word import Unit, accepted_units, convert, find_unit, own_unit

if TYPE_CHECKING:
    from schedtui.units.quantity import Quantity, System

_LONGEST = 100  # characters; no schedule states a longer number
_NOISE = 12  # significant figures; what a converted float shows beyond them says nothing
_SMALLEST, _LARGEST = 1e-9, 1e15  # of converted numbers, which are written out in full
_NUMBER_AND_WORD = re.compile(rf"({NUMBER_START})\s*(.*)")
_FRACTION = re.compile(
    r"([+-]?)(?:([0-9]{1,6})(?:\s*-\s*|\s+))?([0-9]{1,6})\s*/\s*([0-9]{1,6})(?![0-9/])\s*(.*)"
)

# One sign for each of the look-alikes that keyboards, spreadsheets and drawings put in.
_TYPOGRAPHY = str.maketrans(
    {"−": "-", "º": "°", "˚": "°", "″": '"', "”": '"', "“": '"', "′": "'", "’": "'"}
    | dict.fromkeys("\N{NO-BREAK SPACE}\N{NARROW NO-BREAK SPACE}\N{THIN SPACE}", " ")
    | {sign: f" {unicodedata.normalize('NFKC', sign).replace('⁄', '/')}" for sign in "½⅓⅔¼¾⅛⅜⅝⅞"}
)


@dataclass(frozen=True, slots=True)
class Amount:
    """A number as a person typed it, made ready to be stored.

    Args:
        text: the TOML number to store, with the digits typed or converted.
        value: the same as a number, in the project's unit.
        note: what was done to it, "3.2 kW = 10.9 MBH"; empty when it stands as typed.
    """

    text: str
    value: float
    note: str = ""


def read_amount(text: str, quantity: Quantity, system: System, digits: int | None = None) -> Amount:
    """Read a number, or a number with a unit, that a person typed into a cell.

    Without a unit the number is kept as typed; with one it becomes the project's unit, to the
    decimals of the field, or more where the last digit typed would otherwise be lost.

    Args:
        text: what was typed.
        quantity: what the field measures.
        system: the project's unit system.
        digits: decimals of the field, where they differ from those of the quantity.

    Raises:
        AmountError: it is no finite number, or its unit is none of the quantity's.

    >>> from schedtui.units import AIRFLOW, LOAD
    >>> read_amount("3.2 kW", LOAD, "IP")
    Amount(text='10.9', value=10.9, note='3.2 kW = 10.9 MBH')
    >>> read_amount("9,440", AIRFLOW, "IP").text
    '9440'
    """
    figures, word = _split(text.translate(_TYPOGRAPHY).strip(), quantity, system)
    number = number_text(figures)
    value = number_value(number)
    own = own_unit(quantity, system)
    unit = _typed_unit(word, quantity, system) if word else own
    if unit is None or own is None or unit.definition == own.definition:
        return Amount(number, value, f"{figures} = {number}" if "," in figures else "")
    least = quantity.digits(system) if digits is None else digits
    converted = _converted(number, unit, own, least)
    note = f"{number} {unit.label} = {converted} {quantity.unit(system)}"
    return Amount(converted, float(converted), note)


def _split(typed: str, quantity: Quantity, system: System) -> tuple[str, str]:
    """Return the figures and the unit word of what was typed; the word may be empty."""
    if len(typed) > _LONGEST:
        raise AmountError(f"is too long for a number; {_accepted(quantity, system)}")
    _refuse_fraction(typed)
    found = _NUMBER_AND_WORD.fullmatch(typed)
    if found is None:
        what = "is not a number" if typed else "nothing is typed"
        raise AmountError(f"{what}; {_accepted(quantity, system)}")
    figures, word = found.groups()
    if word and word[0] in "0123456789.,+-*/_":
        raise AmountError(f"is more than one number; {_accepted(quantity, system)}")
    return figures, word


def _converted(number: str, source: Unit, target: Unit, least: int) -> str:
    """Return a number typed in `source` as one in `target`, to `least` decimals or more."""
    result = convert(number_value(number), source, target)
    if result and not _SMALLEST <= abs(result) < _LARGEST:
        raise AmountError(f"is too {'small' if abs(result) < 1 else 'large'} a number")
    # The difference of two conversions is the scale alone, without a temperature's offset.
    scale = abs(convert(1, source, target) - convert(0, source, target))
    needed = math.ceil(-math.log10(resolution(number) * scale) - 1e-9)
    size = math.floor(math.log10(abs(result))) if result else 0
    return format_number(result, max(least, min(needed, _NOISE - 1 - size)))


def _typed_unit(word: str, quantity: Quantity, system: System) -> Unit:
    """Return the unit that a typed word means for this quantity."""
    unit = find_unit(word, quantity)
    if unit is None:
        what = f'"{_shown(word)}" is no unit of {quantity.name}'
        raise AmountError(f"{what}; {_accepted(quantity, system)}")
    return unit


def _refuse_fraction(typed: str) -> None:
    """Raise for 1/2 and 7-1/2, naming the decimal to type."""
    fraction = _FRACTION.fullmatch(typed)
    if fraction is None:
        return
    sign, whole, over, under, word = fraction.groups()
    if int(under) == 0:
        raise AmountError("is not a number; type a decimal number")
    decimal = f"{int(whole or 0) + int(over) / int(under):.4f}".rstrip("0").rstrip(".")
    raise AmountError(f"is a fraction; type {f'{sign}{decimal} {_shown(word)}'.rstrip()}")


def _accepted(quantity: Quantity, system: System) -> str:
    """Return what may be typed for a quantity, as one phrase."""
    own = quantity.unit(system)
    others = [label for label in accepted_units(quantity) if label != own]
    number = f"a number in {own}" if own else "a number without a unit"
    return f"accepted: {number}" + (f", or one with {', '.join(others)}" if others else "")


def _shown(word: str) -> str:
    """Return typed text fit for a message: short, and nothing in it that acts on a terminal."""
    return "".join(sign if sign.isprintable() else "·" for sign in word[:20])
