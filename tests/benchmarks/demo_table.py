"""A table of 500 rows and 40 columns in a program of its own, for measuring the grid.

Run as `python tests/benchmarks/demo_table.py [rows]`; ctrl+q ends it.
"""

from __future__ import annotations

import sys
from typing import TYPE_CHECKING, Any

from textual.app import App, ComposeResult

from schedtui.screen.grid import Grid
from schedtui.screen.painter import Cell, Column, Look, column_width
from schedtui.screen.terse_update import terse

if TYPE_CHECKING:
    from collections.abc import Sequence

    from textual.screen import Screen

GROUPS = {
    "supply air": ["airflow cfm", "outdoor cfm", "external inwg", "db °F", "wb °F"],
    "cooling coil": [
        *("entering db °F", "entering wb °F", "leaving db °F", "leaving wb °F"),
        *("total MBH", "=required MBH", "=margin %", "sensible MBH", "=required MBH", "=margin %"),
        "=SHR",
    ],
    "chilled water": ["entering °F", "leaving °F", "flow gpm", "=required gpm", "drop ft"],
    "fan": ["brake bhp", "motor hp", "=required bhp", "=margin %", "speed rpm"],
    "heating": ["capacity MBH", "=required MBH", "=margin %", "entering °F", "leaving °F"],
    "ours": ["served by", "phase", "weight lb"],
}
MARKS = [Look.MARK_CLEAR] * 5 + [
    Look.MARK_SHORT,
    Look.MARK_CONFLICT,
    Look.MARK_CAUTION,
    Look.MARK_MISSING,
    Look.MARK_UNREADABLE,
    Look.MARK_ACCEPTED,
]


def columns() -> tuple[Column, ...]:
    """Return the columns of an invented schedule."""
    made = [
        Column("mark", "", "", "", 2, "left", computed=True, frozen=True),
        Column("tag", "unit", "tag", "", 9, "left", frozen=True),
    ]
    for group, fields in GROUPS.items():
        for number, field in enumerate(fields):
            heading, _, unit = field.lstrip("=").rpartition(" ")
            heading, unit = (heading, unit) if heading else (unit, "")
            width = column_width(heading, unit, 6)
            computed = field.startswith("=")
            made.append(
                Column(f"{group}{number}", group, heading, unit, width, "right", computed=computed)
            )
    made.append(Column("remarks", "", "remarks", "", 40, "left"))
    return tuple(made)


class DemoTable:
    """Rows whose figures follow from the row and the column."""

    def __init__(self, rows: int) -> None:
        self.columns: Sequence[Column] = columns()
        self.row_keys: Sequence[int] = range(1, rows + 1)
        self._typed: dict[tuple[int, str], str] = {}
        self._versions: dict[int, int] = {}
        self._place = {column.key: place for place, column in enumerate(self.columns)}

    def version(self, row_key: int) -> int:
        """Return how often the row was changed."""
        return self._versions.get(row_key, 0)

    def put(self, row_key: int, column_key: str, text: str) -> None:
        """Take a typed text; every computed figure of the row follows it."""
        self._typed[row_key, column_key] = text
        self._versions[row_key] = self.version(row_key) + 1

    def cell(self, row_key: int, column_key: str) -> Cell:
        """Return an invented cell."""
        if column_key == "mark":
            return Cell("", MARKS[row_key % len(MARKS)])
        if column_key == "tag":
            return Cell(f"AHU-{row_key}", Look.TYPED)
        if column_key == "remarks":
            return Cell("serves the [b]east[/b] wing, floors 冷 2 to 5" * (row_key % 2), Look.TYPED)
        if (row_key, column_key) in self._typed:
            return Cell(self._typed[row_key, column_key], Look.TYPED)
        place = self._place[column_key]
        computed = self.columns[place].computed
        changes = self.version(row_key) if computed else 0
        figure = (row_key * 7919 + place * 104729) % 9000 / 10 + changes
        return Cell(f"{figure:.1f}", self._look(row_key, place, computed=computed))

    @staticmethod
    def _look(row_key: int, place: int, *, computed: bool) -> Look:
        if computed:
            return Look.FALLS_SHORT if (row_key + place) % 37 == 0 else Look.COMPUTED
        if (row_key + place) % 31 == 0:
            return Look.BLAMED
        return Look.INHERITED if place % 9 == 0 else Look.TYPED


class DemoProgram(App[None]):
    """The grid and nothing else."""

    ENABLE_COMMAND_PALETTE = False

    def __init__(self, rows: int) -> None:
        super().__init__()
        self._table = DemoTable(rows)

    def _display(self, screen: Screen[Any], renderable: Any) -> None:
        super()._display(screen, terse(renderable))

    def compose(self) -> ComposeResult:
        """Return the grid."""
        yield Grid(self._table)

    def on_grid_edit_taken(self, message: Grid.EditTaken) -> None:
        """Take any text but one that ends in x."""
        if message.text.endswith("x"):
            message.grid.refuse(f"{message.text} is no number")
            return
        self._table.put(message.row_key, message.column_key, message.text)
        message.grid.source_changed(rows=[message.row_key])
        message.grid.end_edit(message.then)


if __name__ == "__main__":
    DemoProgram(int(sys.argv[1]) if len(sys.argv) > 1 else 500).run()
