"""What a grid says: one message for each thing that a person did in it.

Must not know what a cell means, or who listens.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Literal, Protocol

from textual.message import Message

if TYPE_CHECKING:
    from collections.abc import Collection

    from textual.widget import Widget

Then = Literal["down", "right", "left", "stay"]


class Table(Protocol):
    """What whoever is told can do with the grid that said it."""

    def source_changed(self, *, rows: Collection[int] | None = None, columns: bool = False) -> None:
        """Paint anew what changed."""

    def end_edit(self, then: Then = "stay") -> None:
        """Close the edit and move on."""

    def refuse(self, why: str) -> None:
        """Say why the text cannot be accepted."""


class Said(Message, namespace="grid"):
    """What the grid says; each message has the grid as its `control`."""

    def __init__(self, grid: Table) -> None:
        super().__init__()
        self.grid = grid

    @property
    def control(self) -> Widget | None:
        """The grid that says it."""
        return self.grid  # type: ignore[return-value]  # the one table there is


class AtCell(Said, namespace="grid"):
    """What is about one cell."""

    def __init__(self, grid: Table, row_key: int, column_key: str) -> None:
        super().__init__(grid)
        self.row_key = row_key
        self.column_key = column_key


class CursorMoved(AtCell, namespace="grid"):
    """The cursor is on another cell."""


class EditBegun(AtCell, namespace="grid"):
    """An edit of this cell was opened."""


class EditLeft(AtCell, namespace="grid"):
    """The edit was given up; the cell is as it was."""


class ClearAsked(AtCell, namespace="grid"):
    """The cell shall be empty."""


class ReadOnly(AtCell, namespace="grid"):
    """An edit was asked for where nothing can be typed."""


class EditTaken(AtCell, namespace="grid"):
    """The text is offered; the edit stays open until `end_edit` is called.

    Args:
        grid: the grid.
        row_key: the row.
        column_key: the column.
        text: what is offered.
        then: where to go once it is taken.
        touched: whether anything was typed; False where an edit was only opened and closed.
    """

    def __init__(
        self, grid: Table, row_key: int, column_key: str, text: str, then: Then, *, touched: bool
    ) -> None:
        super().__init__(grid, row_key, column_key)
        self.text = text
        self.then: Then = then
        self.touched = touched


class EditChanged(Said, namespace="grid"):
    """The text of the edit is another."""

    def __init__(self, grid: Table, text: str) -> None:
        super().__init__(grid)
        self.text = text
