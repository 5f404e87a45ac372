"""What is sent is read back by pyte and held against what the library's own writing shows."""

from __future__ import annotations

import asyncio
from typing import Any

import pyte
import pytest
from rich.console import Console
from rich.segment import Segment
from rich.style import Style
from textual.app import App, ComposeResult
from textual.geometry import Region
from textual.strip import Strip
from textual.widget import Widget

from schedtui.screen.terse_update import terse

WIDTH, HEIGHT = 40, 4
STYLES = [
    Style.parse("#d7d7d7 on #121212"),
    Style.parse("bold #ff8787 on #121212"),
    Style.parse("dim bold #ff8787 on #121212"),
    Style.parse("dim #87afd7 on #303030"),
    Style.parse("underline reverse #010203 on #303030"),
    Style.parse("italic strike red on default"),
]
PARTS = ["AHU-1", " 9440 ", "冷水", "x", " ", "·[b]"]


class Lines(Widget):
    """A widget of four coloured lines."""

    def render_line(self, y: int) -> Strip:
        pieces = [Segment(PARTS[(i + y) % 6], STYLES[(i * (y + 1)) % 6]) for i in range(12)]
        return Strip(pieces).adjust_cell_length(WIDTH, STYLES[0])


class Program(App[None]):
    """Keeps the updates it is asked to display."""

    def __init__(self) -> None:
        super().__init__()
        self.updates: list[Any] = []

    def compose(self) -> ComposeResult:
        yield Lines()

    def _display(self, *shown: Any) -> None:
        self.updates.append(shown[-1])


async def _updates(*regions: Region) -> list[Any]:
    program = Program()
    async with program.run_test(size=(WIDTH, HEIGHT)) as pilot:
        await pilot.pause()
        if not regions:
            return program.updates
        program.updates.clear()
        program.query_one(Lines).refresh(*regions)
        await pilot.pause()
        return program.updates


def _shown(sent: str) -> list[list[Any]]:
    screen = pyte.Screen(WIDTH, HEIGHT)
    pyte.Stream(screen).feed(sent)
    return [[screen.buffer[y][x] for x in range(WIDTH)] for y in range(HEIGHT)]


def _console(colours: Any) -> Console:
    return Console(force_terminal=True, color_system=colours, legacy_windows=False)


@pytest.mark.parametrize("colours", ["truecolor", "256", "standard"])
def test_the_picture_is_the_same(colours: str) -> None:
    console = _console(colours)
    updates = [update for update in asyncio.run(_updates()) if update is not None]
    assert updates
    for update in updates:
        before = update.render_segments(console).replace("\n", "")
        after = terse(update).render_segments(console)
        assert len(after) < len(before)
        if colours == "truecolor":  # elsewhere the library rounds greys to their neighbours
            # pyte tells #d7d7d7 and its number apart by nothing: both are read as that colour.
            assert _shown(after) == _shown(before)
        assert [[c.data for c in row] for row in _shown(after)] == [
            [c.data for c in row] for row in _shown(before)
        ]


def test_only_what_changed_is_sent() -> None:
    updates = asyncio.run(_updates(Region(30, 1, 4, 1), Region(3, 2, 2, 1)))
    assert len(updates) == 1
    sent = terse(updates[0]).render_segments(_console("truecolor"))
    shown = _shown(sent)
    touched = [(x, y) for y in range(HEIGHT) for x in range(WIDTH) if shown[y][x].bg != "default"]
    assert set(touched) <= {(x, 1) for x in range(30, 34)} | {(x, 2) for x in (3, 4)}
    assert {y for _, y in touched} == {1, 2}


def test_an_unknown_update_is_left_alone() -> None:
    class Other:
        chops = None
        spans = 3

    for update in (None, Other(), "text"):
        assert terse(update) is update
        assert not hasattr(update, "render_segments")
