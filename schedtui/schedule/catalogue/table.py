"""A row of any table, read through its catalogue.

A row answers for a field with its own cell, else with the one it inherits, else with the field's
default. A bad cell answers with nothing at all: the figures that need it are absent.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Any, ClassVar, Self, TypeVar

from schedtui.errors import Absent
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.typed import Typed, Value

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from schedtui.units import System

T = TypeVar("T")

_NOTHING: Mapping[str, Typed] = {}


class Table:
    """A row with typed access to its fields; each table of the file is one subclass.

    Args:
        row_id: the row's lasting number in the document.
        system: unit system of its numbers.
        own: the cells stated in the row itself.
        inherited: cells that hold where the row states none.
        reads: collects the keys whose values are asked for, where someone wants to know.
    """

    __slots__ = ("inherited", "own", "reads", "row_id", "system")
    catalogue: ClassVar[Mapping[str, Field[object]]] = {}

    def __init__(
        self,
        row_id: int,
        system: System,
        own: Mapping[str, Typed],
        inherited: Mapping[str, Typed] = _NOTHING,
        reads: set[str] | None = None,
    ) -> None:
        self.row_id = row_id
        self.system = system
        self.own = own
        self.inherited = inherited
        self.reads = reads

    def __init_subclass__(cls) -> None:
        """Collect the subclass's fields in the order they are written."""
        cls.catalogue = {
            name: value
            for parent in cls.__mro__
            for name, value in vars(parent).items()
            if isinstance(value, Field)
        }

    def typed(self, key: str) -> Typed | None:
        """Return the cell that holds for `key`, own or inherited, or None."""
        return self.own.get(key) or self.inherited.get(key)

    def stated(self, *keys: str) -> bool:
        """Tell whether every one of `keys` is stated, readable or not."""
        own, inherited = self.own, self.inherited
        for key in keys:  # noqa: SIM110  half the time of a generator, asked for as often as this
            if not (own.get(key) or inherited.get(key)):
                return False
        return True

    def value_of(self, field: Field[T]) -> T:
        """Return the value of `field`; its default where nothing readable is stated."""
        if self.reads is not None:
            self.reads.add(field.key)
        cell = self.own.get(field.key) or self.inherited.get(field.key)
        if cell is None or cell.problem is not None:
            return field.usual(self.system)
        value: Any = cell.value  # of the field's type: its kind has read the cell
        return value  # type: ignore[no-any-return]

    def need(self, field: Field[T | None]) -> T:
        """Return the value of `field`.

        Raises:
            Absent: nothing is stated, or the cell cannot be read.
        """
        value = self.value_of(field)
        if value is None:
            raise Absent(field.key)
        return value

    def need_both(self, one: Field[T | None], other: Field[T | None]) -> tuple[T, T]:
        """Return the values of two fields that are of use together only.

        Raises:
            Absent: one or both of them are not stated, or cannot be read; all are named.
        """
        first, second = self.value_of(one), self.value_of(other)
        if first is None or second is None:
            raise Absent(*(
                field.key for field, value in ((one, first), (other, second)) if value is None
            ))  # fmt: skip
        return first, second

    def refuse_bad(self, *fields: Field[T]) -> None:
        """Make sure that no cell of `fields` is unreadable, so that a default does not hide it.

        Raises:
            Absent: one of them is.
        """
        for field in fields:
            cell = self.own.get(field.key) or self.inherited.get(field.key)
            if cell is not None and cell.problem is not None:
                raise Absent(field.key)

    def bad_keys(self) -> Iterator[str]:
        """Name the keys of this row's own unreadable cells."""
        return (key for key, cell in self.own.items() if cell.bad)

    def replaced(self, values: Mapping[str, Value]) -> Self:
        """Return this row with other values, for trying what a change would do.

        The cells carry no text worth showing: they exist only to be computed with.
        """
        cells = {key: Typed("", value, "") for key, value in values.items()}
        return type(self)(self.row_id, self.system, {**self.own, **cells}, self.inherited)

    def traced(self, reads: set[str]) -> Self:
        """Return this row as one that notes in `reads` which keys are asked for."""
        return type(self)(self.row_id, self.system, self.own, self.inherited, reads)
