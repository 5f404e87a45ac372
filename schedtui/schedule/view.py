"""The schedule as the rest of the program reads it: typed rows, defaults resolved.

A view is made of a document and holds nothing of its own. Bad cells answer with nothing.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, TypeVar

from schedtui.schedule.catalogue.column import Column
from schedtui.schedule.catalogue.condition import Condition
from schedtui.schedule.catalogue.limits import Limits
from schedtui.schedule.catalogue.plant import Plant
from schedtui.schedule.catalogue.project import Project
from schedtui.schedule.catalogue.table import Table
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.label import unit_labels

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.schedule.document import Document, Row
    from schedtui.schedule.typed import Typed
    from schedtui.units import System

T = TypeVar("T", bound=Table)


@dataclass(frozen=True, slots=True)
class Schedule:
    """A document's rows, typed.

    Args:
        document: what the view was made of.
        project: the project.
        limits: the limits in force.
        columns: the project's own columns.
        conditions: the design conditions, in file order.
        plants: the plants.
        units: the units, each with the defaults that hold for it.
    """

    document: Document
    project: Project
    limits: Limits
    columns: tuple[Column, ...]
    conditions: tuple[Condition, ...]
    plants: tuple[Plant, ...]
    units: tuple[Unit, ...]

    @property
    def system(self) -> System:
        """The unit system of every number."""
        return self.document.system

    def labels(self) -> dict[int, str]:
        """Return how messages name each unit, by row id."""
        names = unit_labels(unit.tag for unit in self.units)
        return {unit.row_id: name for unit, name in zip(self.units, names, strict=True)}


def view(document: Document, previous: Schedule | None = None) -> Schedule:
    """Return the view of a document.

    Args:
        document: what to view.
        previous: an earlier view; its rows serve again where nothing of theirs has changed, so
            that whoever remembers a row by identity need not look at it again.
    """
    system = document.system
    old = previous.document if previous and previous.system == system else None

    return Schedule(
        document=document,
        project=_single(document, "project", Project),
        limits=_single(document, "limits", Limits),
        columns=tuple(Column(r.row_id, system, r.cells) for r in document.rows("column")),
        conditions=tuple(Condition(r.row_id, system, r.cells) for r in document.rows("condition")),
        plants=tuple(Plant(r.row_id, system, r.cells) for r in document.rows("plant")),
        units=_units(document, previous if old is not None else None),
    )


def _single(document: Document, name: str, kind: type[T]) -> T:
    """Return the table that stands once, an empty one where the file has none."""
    rows = document.rows(name)
    return kind(rows[0].row_id if rows else 0, document.system, rows[0].cells if rows else {})


def _units(document: Document, previous: Schedule | None) -> tuple[Unit, ...]:
    defaults = document.single["defaults"].cells if "defaults" in document.single else {}
    same = previous is not None and previous.document.single.get("defaults") is (
        document.single.get("defaults")
    )
    kept: Mapping[int, Unit] = (
        {unit.row_id: unit for unit in previous.units} if previous and same else {}
    )
    units = []
    for row in document.rows("unit"):
        unit = kept.get(row.row_id)
        if unit is None or unit.own is not row.cells:
            unit = Unit(row.row_id, document.system, row.cells, inherited(row, defaults))
        units.append(unit)
    return tuple(units)


def inherited(row: Row, defaults: Mapping[str, Typed]) -> dict[str, Typed]:
    """Return the defaults that hold for a unit's row.

    A unit's own key displaces the default of its alternatives too: a stated `room_wb` leaves no
    default `room_rh`. Keys named in `without`, which may be a default itself, have no default here.
    """
    cell = row.cells.get("without") or defaults.get("without")
    without = cell.value if cell is not None and isinstance(cell.value, tuple) else ()
    settled = {
        known.instead_of
        for key in row.cells
        if (known := Unit.catalogue.get(key)) is not None and known.instead_of
    }
    return {
        key: value
        for key, value in defaults.items()
        if (known := Unit.catalogue.get(key)) is not None
        and not known.own_only
        and key not in row.cells
        and key not in without
        and known.instead_of not in settled - {None}
    }
