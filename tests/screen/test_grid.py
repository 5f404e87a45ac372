"""Keys go in, and what the screen shows and which messages come is looked at."""

from __future__ import annotations

import asyncio
from dataclasses import dataclass, field
from typing import TYPE_CHECKING, Any

import pytest
from textual.app import App, ComposeResult

from schedtui.screen.grid import Grid
from schedtui.screen.painter import Cell, Column, Look

if TYPE_CHECKING:
    from collections.abc import Awaitable, Callable

    from textual.message import Message
    from textual.pilot import Pilot

COLUMNS = [
    Column("mark", "", "", "", 2, "left", computed=True, frozen=True),
    Column("tag", "unit", "tag", "", 8, "left", frozen=True),
    Column("flow", "supply air", "airflow", "cfm", 11, "right"),
    Column("db", "supply air", "db", "°F", 5, "right"),
    Column("need", "cooling coil", "required", "MBH", 12, "right", computed=True),
    Column("total", "cooling coil", "total", "MBH", 9, "right"),
    Column("served", "ours", "served by", "", 20, "left"),
    Column("remarks", "", "remarks", "", 24, "left"),
]


@dataclass
class Table:
    """Rows whose cells say which they are, unless something was put there."""

    columns: list[Column] = field(default_factory=lambda: list(COLUMNS))
    row_keys: list[int] = field(default_factory=lambda: list(range(100, 160)))
    typed: dict[tuple[int, str], Cell] = field(default_factory=dict)
    versions: dict[int, int] = field(default_factory=dict)
    asked: list[tuple[int, str]] = field(default_factory=list)

    def version(self, row_key: int) -> int:
        return self.versions.get(row_key, 0)

    def put(self, row_key: int, column_key: str, cell: Cell) -> None:
        self.typed[row_key, column_key] = cell
        self.versions[row_key] = self.version(row_key) + 1

    def cell(self, row_key: int, column_key: str) -> Cell:
        self.asked.append((row_key, column_key))
        default = Cell(f"{column_key[0]}{row_key}", Look.TYPED)
        if column_key == "mark":
            default = Cell("", Look.MARK_CLEAR)
        return self.typed.get((row_key, column_key), default)


class Program(App[None]):
    """A grid, and a log of what it says."""

    def __init__(self, table: Table) -> None:
        super().__init__()
        self.table = table
        self.said: list[Message] = []

    def compose(self) -> ComposeResult:
        yield Grid(self.table, empty="No units.")

    def on_grid_cursor_moved(self, message: Grid.CursorMoved) -> None:
        self.said.append(message)

    def on_grid_edit_begun(self, message: Grid.EditBegun) -> None:
        self.said.append(message)

    def on_grid_edit_changed(self, message: Grid.EditChanged) -> None:
        self.said.append(message)

    def on_grid_edit_taken(self, message: Grid.EditTaken) -> None:
        self.said.append(message)

    def on_grid_edit_left(self, message: Grid.EditLeft) -> None:
        self.said.append(message)

    def on_grid_read_only(self, message: Grid.ReadOnly) -> None:
        self.said.append(message)


class Seat:
    """Somebody before the program: presses keys and looks at the screen."""

    def __init__(self, program: Program, pilot: Pilot[None]) -> None:
        self.program = program
        self.pilot = pilot
        self.grid = program.query_one(Grid)

    async def press(self, *keys: str) -> None:
        await self.pilot.press(*keys)
        await self.pilot.pause()

    @property
    def lines(self) -> list[str]:
        return [strip.text for strip in self.program.screen._compositor.render_strips()]

    @property
    def pointed(self) -> str:
        """The line of the cursor."""
        return next(line for line in self.lines[2:] if line.startswith(">"))

    @property
    def reversed_cells(self) -> list[str]:
        return [
            segment.text
            for strip in self.program.screen._compositor.render_strips()
            for segment in strip
            if segment.style is not None and segment.style.reverse
        ]

    def said(self, kind: type[Message]) -> list[Any]:
        return [message for message in self.program.said if isinstance(message, kind)]


def use(
    act: Callable[[Seat], Awaitable[None]],
    table: Table | None = None,
    size: tuple[int, int] = (80, 24),
) -> None:
    async def run() -> None:
        program = Program(table or Table())
        async with program.run_test(size=size) as pilot:
            await pilot.pause()
            await act(Seat(program, pilot))

    asyncio.run(run())


def test_it_opens_on_the_first_cell_that_can_be_typed_into() -> None:
    async def act(seat: Seat) -> None:
        assert seat.grid.cursor == (100, "tag")
        assert seat.lines[0].startswith("    unit ─── │supply air")
        assert seat.lines[1].startswith("    tag      │airflow cfm db °F")
        assert seat.reversed_cells == ["t100     "]
        assert "t121" in seat.lines[23]

    use(act)


@pytest.mark.parametrize(
    ("keys", "cursor"),
    [
        ("down", (101, "tag")),
        ("up", (100, "tag")),
        ("right right", (100, "db")),
        ("right right right left", (100, "db")),
        ("left", (100, "mark")),
        ("left left", (100, "mark")),
        ("end", (100, "remarks")),
        ("end home", (100, "tag")),
        ("pagedown", (122, "tag")),
        ("pagedown pagedown pagedown", (159, "tag")),
        ("pagedown pageup", (100, "tag")),
        ("right ctrl+end", (159, "flow")),
        ("ctrl+end ctrl+home", (100, "tag")),
        ("tab tab tab", (100, "total")),  # past what is computed
        ("tab tab tab shift+tab", (100, "db")),
        ("end tab", (101, "tag")),
        ("down shift+tab", (100, "remarks")),
        ("shift+tab", (100, "tag")),
    ],
)
def test_where_keys_lead(keys: str, cursor: tuple[int, str]) -> None:
    async def act(seat: Seat) -> None:
        await seat.press(*keys.split())
        assert seat.grid.cursor == cursor
        if moved := seat.said(Grid.CursorMoved):
            assert (moved[-1].row_key, moved[-1].column_key) == cursor
        assert f"t{cursor[0]}" in seat.pointed
        assert len(seat.reversed_cells) == 1

    use(act)


def test_columns_scroll_whole_and_the_tag_stays() -> None:
    async def act(seat: Seat) -> None:
        assert seat.lines[1].rstrip().endswith("›")
        assert "served" in seat.lines[1]
        assert "remarks" not in seat.lines[1]
        await seat.press("end")
        assert seat.lines[1].startswith("    tag      ‹")
        assert "remarks" in seat.lines[1]
        assert not seat.lines[1].rstrip().endswith("›")
        assert seat.lines[2].startswith(">   t100     │")
        assert seat.reversed_cells == ["r100" + " " * 21]

    use(act)


def test_scrolling_down_leaves_the_headings() -> None:
    async def act(seat: Seat) -> None:
        before = seat.lines[:2]
        await seat.press(*["down"] * 22)
        assert seat.lines[:2] == before
        assert "t122" in seat.pointed
        assert "t100" not in "".join(seat.lines)

    use(act)


def test_typing_replaces_the_cell_and_enter_offers_it() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("right", "9", "6", "5")
        assert seat.grid.editing is not None
        assert seat.grid.editing.text == "965"
        assert "│965 " in seat.pointed
        assert seat.reversed_cells == [" "]  # the caret
        assert [message.text for message in seat.said(Grid.EditChanged)] == ["9", "96", "965"]
        assert len(seat.said(Grid.EditBegun)) == 1
        await seat.press("enter")
        (taken,) = seat.said(Grid.EditTaken)
        assert (taken.row_key, taken.column_key, taken.text, taken.then) == (
            *(100, "flow", "965"),
            "down",
        )
        assert seat.grid.editing is not None  # whether it is accepted is not the grid's to say
        assert seat.grid.cursor == (100, "flow")

    use(act)


def test_an_accepted_text_is_shown_and_the_cursor_goes_down() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("right", "7", "enter")
        seat.program.table.put(100, "flow", Cell("7.0", Look.TYPED))
        seat.program.table.put(100, "need", Cell("12.5", Look.COMPUTED))
        seat.grid.source_changed(rows=[100])
        seat.grid.end_edit("down")
        await seat.pilot.pause()
        assert seat.lines[2].startswith("    t100     │        7.0  d100         12.5·")
        assert seat.grid.cursor == (101, "flow")
        assert seat.grid.editing is None

    use(act)


@pytest.mark.parametrize(("key", "then"), [("tab", "right"), ("shift+tab", "left")])
def test_tab_offers_and_goes_sideways(key: str, then: str) -> None:
    async def act(seat: Seat) -> None:
        await seat.press("right", "right", "7", key)
        (taken,) = seat.said(Grid.EditTaken)
        assert taken.then == then
        seat.grid.end_edit(taken.then)
        await seat.pilot.pause()
        assert seat.grid.cursor == (100, "total" if then == "right" else "flow")

    use(act)


def test_a_refusal_is_said_beside_the_cell_until_something_is_typed() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("right", "x", "enter")
        seat.grid.refuse("type a number, as 9440")
        await seat.pilot.pause()
        assert "type a number, as 9440" in seat.pointed
        assert seat.grid.editing is not None
        await seat.press("backspace")
        assert "type a number" not in seat.pointed

    use(act)


def test_enter_edits_what_is_there_and_escape_leaves_it() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("right", "enter", "left", "left", "delete", "5")
        assert seat.grid.editing is not None
        assert seat.grid.editing.text == "f150"
        await seat.press("escape")
        assert seat.grid.editing is None
        assert "f100" in seat.pointed
        assert len(seat.said(Grid.EditLeft)) == 1
        await seat.press("f2")
        assert seat.grid.editing is not None
        await seat.press("down", "pagedown", "up")
        assert seat.grid.cursor == (100, "flow")

    use(act)


@pytest.mark.parametrize("key", ["5", "enter", "f2"])
def test_what_is_computed_cannot_be_typed_into(key: str) -> None:
    async def act(seat: Seat) -> None:
        await seat.press("right", "right", "right", key)
        assert [message.column_key for message in seat.said(Grid.ReadOnly)] == ["need"]
        assert seat.grid.editing is None

    use(act)


def test_rows_are_known_by_their_keys_when_they_move() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("down", "down", "right")
        seat.program.table.row_keys = [102, 150, 100]
        seat.grid.source_changed(rows=())
        await seat.pilot.pause()
        assert seat.grid.cursor == (102, "flow")
        assert seat.pointed == seat.lines[2]
        assert "t102" in seat.pointed
        seat.program.table.row_keys = [150, 100]
        seat.grid.source_changed()
        await seat.pilot.pause()
        assert seat.grid.cursor == (150, "flow")
        assert seat.lines[4].strip() == ""
        assert seat.said(Grid.CursorMoved)[-1].row_key == 150

    use(act)


def test_columns_are_known_by_their_keys_when_they_come_and_go() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("tab", "tab", "tab")
        seat.program.table.columns = [COLUMNS[0], COLUMNS[1], COLUMNS[5]]
        seat.grid.source_changed(columns=True)
        await seat.pilot.pause()
        assert seat.grid.cursor == (100, "total")
        assert "airflow" not in seat.lines[1]

    use(act)


def test_no_rows_is_said_and_no_key_harms() -> None:
    async def act(seat: Seat) -> None:
        assert seat.grid.cursor is None
        assert "No units." in seat.lines[2]
        for key in ("down", "pagedown", "5", "enter", "tab", "ctrl+end", "end"):
            await seat.press(key)
        assert seat.program.said == []

    use(act, Table(row_keys=[]))


def test_move_to_brings_the_cell_into_sight() -> None:
    async def act(seat: Seat) -> None:
        seat.grid.move_to(155, "remarks")
        await seat.pilot.pause()
        assert "t155" in seat.pointed
        assert "r155" in seat.pointed
        region = seat.grid.cursor_region
        assert seat.lines[region.y][region.x : region.right].strip() == "r155"

    use(act)


def test_five_thousand_rows_ask_only_for_those_shown() -> None:
    table = Table(row_keys=list(range(100, 5100)))

    async def act(seat: Seat) -> None:
        assert {row for row, _ in table.asked} == set(range(100, 122))
        table.asked.clear()
        await seat.press("down", "up", "right")
        assert table.asked == []
        await seat.press("ctrl+end")
        assert "t5099" in seat.pointed

    use(act, table)


def test_only_a_changed_row_is_asked_for_again() -> None:
    async def act(seat: Seat) -> None:
        table = seat.program.table
        table.asked.clear()
        table.put(103, "flow", Cell("31", Look.BLAMED))
        seat.grid.source_changed(rows=[103, 158])
        await seat.pilot.pause()
        assert {row for row, _ in table.asked} == {103}
        assert "31<" in seat.lines[5]

    use(act)


def test_a_marked_block_is_seen_without_colour() -> None:
    async def act(seat: Seat) -> None:
        def underlined() -> list[str]:
            return [
                segment.text.strip()
                for strip in seat.program.screen._compositor.render_strips()
                for segment in strip
                if segment.style is not None and segment.style.underline
            ]

        seat.grid.mark([101, 102], ["flow", "db"])
        await seat.pilot.pause()
        assert " ".join(underlined()).split() == ["f101", "d101", "f102", "d102"]
        seat.grid.mark([], [])
        await seat.pilot.pause()
        assert underlined() == []

    use(act)


def test_a_smaller_terminal_keeps_the_cursor_in_sight() -> None:
    async def act(seat: Seat) -> None:
        await seat.press("pagedown", "end")
        await seat.pilot.resize_terminal(60, 16)
        await seat.pilot.pause()
        assert "t122" in seat.pointed
        assert "r122" in seat.pointed
        assert all(len(line) == 60 for line in seat.lines)

    use(act)


def test_a_click_puts_the_cursor_there() -> None:
    async def act(seat: Seat) -> None:
        await seat.pilot.click(Grid, offset=(20, 6))
        await seat.pilot.pause()
        assert seat.grid.cursor == (104, "flow")

    use(act)


def test_text_is_never_markup_nor_a_command_to_the_terminal() -> None:
    table = Table()
    table.put(100, "served", Cell("[b]x[/b] [/y] \x1b[2J", Look.TYPED))

    async def act(seat: Seat) -> None:
        assert "[b]x[/b] [/y] ␛[2J" in seat.lines[2]

    use(act, table)


def test_it_works_without_colour(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("NO_COLOR", "1")

    async def act(seat: Seat) -> None:
        await seat.press("right", "5", "x", "escape", "down")
        assert seat.reversed_cells == ["       f101 "]

    use(act)
