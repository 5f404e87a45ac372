"""How a key's value is read, whether it stands in a file or was typed by a person.

A kind turns either into a `Typed` cell and says in words what it accepts. It never raises
for a bad value from a file: that is a bad cell, which is kept. Knows no keys.
"""

from __future__ import annotations

import math
import re
import tomllib
from dataclasses import dataclass
from datetime import date, datetime
from typing import TYPE_CHECKING, Any, Protocol

from schedtui.errors import AmountError
from schedtui.schedule.typed import Typed, toml_text, toml_texts
from schedtui.units import Quantity, System, read_amount

if TYPE_CHECKING:
    from schedtui.schedule.catalogue.ranges import Range


# A text in a list: within quotation marks, or up to the next comma.
_PART = re.compile(r'\s*"(?:[^"\\]|\\.)*"(?=\s*(?:,|$))|[^,]+')


class Kind(Protocol):
    """What every kind of value can do."""

    def accepted(self, system: System) -> str:
        """Say in a phrase what is accepted in `system`."""

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML value whose characters in the file are `raw`."""

    def enter(self, text: str, system: System) -> Typed:
        """Read what a person typed.

        Raises:
            AmountError: it cannot be accepted; the text says what is.
        """


def _bad(value: Any, raw: str, problem: str) -> Typed:
    """Return a bad cell that shows a text without its quotes and writes back what stood there."""
    return Typed(value if isinstance(value, str) else raw, None, raw, problem)


def _refuse(typed: Typed) -> Typed:
    """Return a cell a person typed, or refuse it if it turned out bad."""
    if typed.problem is not None:
        raise AmountError(typed.problem)
    return typed


@dataclass(frozen=True, slots=True)
class NumberKind:
    """A finite number of one quantity within a range, or a whole one.

    Args:
        quantity: what is measured.
        ip: accepted range in the quantity's IP unit.
        si: accepted range in its SI unit.
        whole: only whole numbers.
    """

    quantity: Quantity
    ip: Range
    si: Range
    whole: bool = False

    def accepted(self, system: System) -> str:
        """Say the range with its unit: "0 or more cfm"."""
        limits = self.ip if system == "IP" else self.si
        words = f"{limits.words()} {self.quantity.unit(system)}".rstrip()
        return f"a whole number, {words}" if self.whole else words

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML integer or float; anything else is a bad cell."""
        if isinstance(value, bool) or not isinstance(value, int | float):
            return _bad(value, raw, f"is not a number; accepted: {self.accepted(system)}")
        try:
            number = float(value)
        except OverflowError:
            number = math.inf
        wrong = self._wrong(number, self.ip if system == "IP" else self.si)
        if wrong:
            return _bad(None, raw, f"{wrong}; accepted: {self.accepted(system)}")
        return Typed(raw, number + 0.0, raw)  # adding 0.0 turns -0.0 into 0.0

    def _wrong(self, number: float, limits: Range) -> str:
        """Say what is wrong with a number, nothing where it can be accepted."""
        if not math.isfinite(number):
            return "is not a finite number"
        if self.whole and not number.is_integer():
            return "is not a whole number"
        return "" if limits.holds(number) else "is out of range"

    def enter(self, text: str, system: System) -> Typed:
        """Read a number as typed, with or without a unit."""
        amount = read_amount(text, self.quantity, system)
        return _refuse(self.read(amount.value, amount.text, system))


@dataclass(frozen=True, slots=True)
class TextKind:
    """A text.

    Args:
        blank: whether a text of nothing but spaces is accepted.
    """

    blank: bool = False

    def accepted(self, system: System) -> str:  # noqa: ARG002  a text is the same in both systems
        """Say that text is accepted."""
        return "text" if self.blank else "text that is not blank"

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML string."""
        if not isinstance(value, str):
            return _bad(None, raw, f"is not text; accepted: {self.accepted(system)}")
        if not self.blank and not value.strip():
            return Typed(value, None, raw, f"is blank; accepted: {self.accepted(system)}")
        return Typed(value, value, raw)

    def enter(self, text: str, system: System) -> Typed:
        """Take the text as typed."""
        return _refuse(self.read(text, toml_text(text), system))


@dataclass(frozen=True, slots=True)
class ChoiceKind:
    """One of a few fixed texts.

    Args:
        choices: the texts, the usual one first.
    """

    choices: tuple[str, ...]

    def accepted(self, system: System) -> str:  # noqa: ARG002  words have no units
        """List the choices."""
        return ", ".join(f'"{choice}"' for choice in self.choices)

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML string that is one of the choices."""
        if value in self.choices and isinstance(value, str):
            return Typed(value, value, raw)
        return _bad(value, raw, f"is none of the choices; accepted: {self.accepted(system)}")

    def enter(self, text: str, system: System) -> Typed:
        """Take a choice, or the start of one that only one choice has."""
        wanted = text.strip().casefold()
        exact = [choice for choice in self.choices if choice.casefold() == wanted]
        found = exact or [
            one for one in self.choices if wanted and one.casefold().startswith(wanted)
        ]
        value = found[0] if len(found) == 1 else text
        return _refuse(self.read(value, toml_text(value), system))


@dataclass(frozen=True, slots=True)
class FlagKind:
    """True or false."""

    def accepted(self, system: System) -> str:  # noqa: ARG002  a flag has no unit
        """Name both values."""
        return "true or false"

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML boolean."""
        if isinstance(value, bool):
            return Typed(raw, value, raw)
        return _bad(value, raw, f"is neither; accepted: {self.accepted(system)}")

    def enter(self, text: str, system: System) -> Typed:
        """Take true or false, yes or no."""
        word = {"yes": "true", "y": "true", "no": "false", "n": "false"}.get(
            text.strip().casefold(), text.strip().casefold()
        )
        value: Any = {"true": True, "false": False}.get(word, text)
        return _refuse(self.read(value, word, system))


@dataclass(frozen=True, slots=True)
class TextsKind:
    """A list of texts; one with a comma or a quotation mark in it stands in quotation marks."""

    def accepted(self, system: System) -> str:  # noqa: ARG002  texts have no units
        """Say that a list of texts is accepted."""
        return 'a list of texts such as ["one", "two"]'

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML array of strings."""
        if not isinstance(value, list) or not all(isinstance(one, str) for one in value):
            return _bad(value, raw, f"is no list of texts; accepted: {self.accepted(system)}")
        texts = tuple(value)
        return Typed(", ".join(map(_listed, texts)), texts, raw)

    def enter(self, text: str, system: System) -> Typed:
        """Take texts separated by commas, those within quotation marks as they stand."""
        parts = (part.strip() for part in _PART.findall(text))
        texts = tuple(_unlisted(part) for part in parts if part)
        return self.read(list(texts), toml_texts(texts), system)


def _listed(text: str) -> str:
    """Return a text as it stands in a list: in quotation marks where it would else be torn.

    >>> print(_listed("VFD by others"), _listed("VFD, by others"))
    VFD by others "VFD, by others"
    """
    plain = text and text == text.strip() and not any(sign in text for sign in ',"\n')
    return text if plain else toml_text(text)


def _unlisted(part: str) -> str:
    """Return a text from a list; quotation marks that enclose none are kept."""
    try:
        return str(tomllib.loads(f"a = {part}")["a"]) if part.startswith('"') else part
    except tomllib.TOMLDecodeError:
        return part


@dataclass(frozen=True, slots=True)
class DateKind:
    """A day."""

    def accepted(self, system: System) -> str:  # noqa: ARG002  a day is a day
        """Show how a day is written."""
        return "a date such as 2026-11-30"

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML local date."""
        if isinstance(value, date) and not isinstance(value, datetime):
            return Typed(raw, value, raw)
        return _bad(value, raw, f"is no date; accepted: {self.accepted(system)}")

    def enter(self, text: str, system: System) -> Typed:
        """Take a day in the form year-month-day."""
        try:
            day = date.fromisoformat(text.strip())
        except ValueError:
            return _refuse(self.read(text, text, system))
        return self.read(day, day.isoformat(), system)


@dataclass(frozen=True, slots=True)
class FreeKind:
    """A text or a number, which nothing here computes with: the project's own columns."""

    def accepted(self, system: System) -> str:  # noqa: ARG002  nothing is known of its unit
        """Say that text and numbers are accepted."""
        return "text or a number"

    def read(self, value: Any, raw: str, system: System) -> Typed:
        """Read a TOML string or number."""
        if isinstance(value, str):
            return Typed(value, value, raw)
        if isinstance(value, int | float) and not isinstance(value, bool):
            return Typed(raw, raw, raw)
        return _bad(value, raw, f"is neither; accepted: {self.accepted(system)}")

    def enter(self, text: str, system: System) -> Typed:
        """Keep what was typed as text, so that its characters stay as they are."""
        return self.read(text, toml_text(text), system)
