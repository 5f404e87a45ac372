"""A field: one key of a table, with all that the rest of the program needs to know of it.

A table's catalogue is a class whose attributes are fields. Asked on the class, such an attribute
is the field itself (its label, unit, range, …); asked on a row, it is the row's value with the
right type, so a field and its typed access are one entry.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from enum import Enum
from typing import Generic, Protocol, Self, TypeVar, overload

from schedtui.schedule.catalogue import ranges
from schedtui.schedule.catalogue.kinds import (
    ChoiceKind,
    DateKind,
    FlagKind,
    FreeKind,
    Kind,
    NumberKind,
    TextKind,
    TextsKind,
)
from schedtui.schedule.catalogue.ranges import Range
from schedtui.units import COUNT, Quantity, System

T = TypeVar("T")


class Group(Enum):
    """The groups that a table's columns stand in, in their order on the sheet."""

    UNIT = "Unit"
    AIR = "Air"
    ROOM = "Room"
    RECOVERY = "Recovery"
    COOLING = "Cooling coil"
    COIL = "Coil make"
    COOLING_FLUID = "Cooling fluid"
    FAN = "Fan"
    PREHEAT = "Preheat"
    HEATING = "Heating"
    REHEAT = "Reheat"
    OWN = "Project's own"
    REMARKS = "Remarks"


class Cells(Protocol):
    """What a row must offer for its fields to be asked on it."""

    def value_of(self, field: Field[T], /) -> T:
        """Return the row's value of `field`, its default where nothing is stated."""


@dataclass(frozen=True, slots=True)
class Field(Generic[T]):
    """One key of a table.

    Args:
        kind: how its value is read and what is accepted.
        label: full name.
        short: heading of its column, below that of its group.
        doc: one sentence that says what it is.
        group: where its column stands.
        default: the value when nothing is stated.
        required: whether a row without it cannot be read.
        printed: whether the number is one that someone derived and printed, so that it stands
            for half a step either side; False for a given (a room's state, an airflow).
        instead_of: name of the set of keys of which a row states only one.
        own_only: whether `[defaults]` may not state it for every unit.
        core: whether its column is always shown; others are while some row has a value.
        headings: what sheets call its column below the heading of its group.
    """

    kind: Kind
    label: str
    short: str
    doc: str
    group: Group
    default: T
    required: bool = False
    printed: bool = False
    instead_of: str | None = None
    own_only: bool = False
    core: bool = False
    headings: tuple[str, ...] = ()
    key: str = field(init=False, default="")

    def __set_name__(self, owner: type, name: str) -> None:
        """Take the attribute's name for the key, so that it is written once."""
        object.__setattr__(self, "key", name)

    @property
    def quantity(self) -> Quantity | None:
        """What the field measures, None for what is no number."""
        return self.kind.quantity if isinstance(self.kind, NumberKind) else None

    def usual(self, system: System) -> T:  # noqa: ARG002  a limit's default depends on it
        """Return the value where nothing is stated."""
        return self.default

    @overload
    def __get__(self, row: None, owner: type) -> Self: ...
    @overload
    def __get__(self, row: Cells, owner: type) -> T: ...
    def __get__(self, row: Cells | None, owner: type) -> Self | T:
        """Return the field on the class, the row's value on a row."""
        return self if row is None else row.value_of(self)


@dataclass(frozen=True, slots=True)
class In:
    """Makes the fields of one group, so that the group is named once.

    Args:
        group: the group of every field made.
    """

    group: Group

    def number(
        self,
        quantity: Quantity,
        label: str,
        short: str,
        doc: str,
        *,
        within: tuple[Range, Range] | Range | None = None,
        printed: bool = False,
        instead_of: str | None = None,
        required: bool = False,
        core: bool = False,
        headings: tuple[str, ...] = (),
    ) -> Field[float | None]:
        """Return a field for a number of `quantity`, within its usual range unless told."""
        ip, si = _both(within or ranges.usual(quantity))
        return Field(
            NumberKind(quantity, ip, si), label, short, doc, self.group, None,
            printed=printed, instead_of=instead_of, required=required, core=core, headings=headings,
        )  # fmt: skip

    def number_or(
        self,
        default: float,
        quantity: Quantity,
        label: str,
        short: str,
        doc: str,
        *,
        within: tuple[Range, Range] | Range | None = None,
        headings: tuple[str, ...] = (),
    ) -> Field[float]:
        """Return a field for a number that has a default."""
        ip, si = _both(within or ranges.usual(quantity))
        kind = NumberKind(quantity, ip, si)
        return Field(kind, label, short, doc, self.group, default, headings=headings)

    def count(
        self, label: str, short: str, doc: str, *, least: int = 0, headings: tuple[str, ...] = ()
    ) -> Field[float | None]:
        """Return a field for a whole number from `least` upwards."""
        kind = NumberKind(COUNT, Range(least), Range(least), whole=True)
        return Field(kind, label, short, doc, self.group, None, headings=headings)

    def count_or(
        self,
        default: int,
        label: str,
        short: str,
        doc: str,
        *,
        least: int = 0,
        headings: tuple[str, ...] = (),
    ) -> Field[float]:
        """Return a field for a whole number that has a default."""
        kind = NumberKind(COUNT, Range(least), Range(least), whole=True)
        return Field(kind, label, short, doc, self.group, float(default), headings=headings)

    def text(
        self,
        label: str,
        short: str,
        doc: str,
        *,
        required: bool = False,
        blank: bool = False,
        own_only: bool = False,
        core: bool = False,
        headings: tuple[str, ...] = (),
    ) -> Field[str | None]:
        """Return a field for a text."""
        return Field(
            TextKind(blank), label, short, doc, self.group, None,
            required=required, own_only=own_only, core=core, headings=headings,
        )  # fmt: skip

    def choice(
        self,
        choices: tuple[str, ...],
        label: str,
        short: str,
        doc: str,
        *,
        required: bool = False,
        headings: tuple[str, ...] = (),
    ) -> Field[str]:
        """Return a field for one of `choices`, the first of which is the default."""
        kind = ChoiceKind(choices)
        return Field(
            kind, label, short, doc, self.group, choices[0], required=required, headings=headings
        )

    def choice_or_none(
        self,
        choices: tuple[str, ...],
        label: str,
        short: str,
        doc: str,
        *,
        headings: tuple[str, ...] = (),
    ) -> Field[str | None]:
        """Return a field for one of `choices` that may be left open."""
        kind = ChoiceKind(choices)
        return Field(kind, label, short, doc, self.group, None, headings=headings)

    def flag(
        self, label: str, short: str, doc: str, *, default: bool, headings: tuple[str, ...] = ()
    ) -> Field[bool]:
        """Return a field for true or false."""
        return Field(FlagKind(), label, short, doc, self.group, default, headings=headings)

    def texts(
        self,
        label: str,
        short: str,
        doc: str,
        *,
        own_only: bool = False,
        headings: tuple[str, ...] = (),
    ) -> Field[tuple[str, ...] | None]:
        """Return a field for a list of texts."""
        return Field(
            TextsKind(), label, short, doc, self.group, None, own_only=own_only, headings=headings
        )

    def day(self, label: str, short: str, doc: str) -> Field[object | None]:
        """Return a field for a date."""
        return Field(DateKind(), label, short, doc, self.group, None)

    def free(self, label: str, short: str, doc: str) -> Field[str | None]:
        """Return a field for text or a number that nothing here computes with."""
        return Field(FreeKind(), label, short, doc, self.group, None)


def _both(within: tuple[Range, Range] | Range) -> tuple[Range, Range]:
    return (within, within) if isinstance(within, Range) else within
