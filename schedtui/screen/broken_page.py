"""The one page for a file that cannot be opened: what is wrong, on which line, as it stands there.

It looks at the file while it is being mended elsewhere, and hands on the schedule as soon as it
can be read.
"""

from __future__ import annotations

import asyncio
import os
from typing import TYPE_CHECKING, ClassVar

from rich.text import Text
from textual.app import App, ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import VerticalScroll
from textual.widgets import Static

from schedtui.errors import FileError, ScheduleError
from schedtui.files import read_text
from schedtui.screen import looks
from schedtui.screen.bars import HINT_STYLE, TITLE_STYLE, Bar, hint_line
from schedtui.text_width import visible

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator
    from pathlib import Path

    from schedtui.errors import SchedtuiError
    from schedtui.screen.ending import Ending
    from schedtui.session.session import Session

_LOOKS_EVERY = 0.3  # s
_KEYS = ("ctrl+q quit", "Enter look again")
_WATCHED = "Mend it in an editor and save it there: it opens by itself."


class BrokenPage(App["Session | None"]):
    """Says what keeps a file from being opened, until it can be or the person leaves.

    Args:
        path: the file.
        error: why it cannot be opened.
        open_again: opens it, or raises why that cannot be done.
        ending: what tells it to end; nothing does if not given.
    """

    ENABLE_COMMAND_PALETTE = False
    CSS = f"""
    Screen {{ background: {looks.SLATE}; layout: vertical; }}
    #page {{ height: 1fr; padding: 1 2; scrollbar-size: 1 1; }}
    """
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("ctrl+q", "leave", "quit", show=False, priority=True),
        Binding("ctrl+c", "stay", "nothing", show=False, priority=True),
        Binding("enter", "again", "look again", show=False, priority=True),
    ]

    def __init__(
        self,
        path: Path,
        error: SchedtuiError,
        open_again: Callable[[], Session],
        ending: Ending | None = None,
    ) -> None:
        super().__init__()
        self._ending = ending
        self._path = path
        self._error = error
        self._open_again = open_again
        self._seen = _seen(path)
        self._title = Bar(TITLE_STYLE)
        self._page = Static()
        self._hint = Bar(HINT_STYLE)

    @property
    def error(self) -> SchedtuiError:
        """What was wrong when it was last looked at."""
        return self._error

    def compose(self) -> ComposeResult:
        """Lay out the file's name, what is wrong with it, and the keys."""
        yield self._title
        with VerticalScroll(id="page"):
            yield self._page
        yield self._hint

    def on_mount(self) -> None:
        """Show what is wrong and begin to watch."""
        self._show()
        self.set_interval(_LOOKS_EVERY, self._watch)
        if self._ending is not None:
            loop = asyncio.get_running_loop()
            self._ending.by(lambda _: loop.call_soon_threadsafe(self.exit))

    def on_unmount(self) -> None:
        """Leave it to the next to end when told."""
        if self._ending is not None:
            self._ending.by(None)

    def _show(self) -> None:
        name = visible(self._path.name)
        self._title.show(lambda _: f"{name} cannot be opened")
        self._page.update(Text("\n".join(self._lines()), style=looks.GROUND))
        self._hint.show(lambda width: hint_line(width, _WATCHED, _KEYS, whole=True))

    def _lines(self) -> Iterator[str]:
        if not isinstance(self._error, ScheduleError):
            yield visible(str(self._error))
            return
        text = _text(self._path)
        for problem in self._error.problems:
            yield f"line {problem.line}: {visible(str(problem))}"
            if 0 < problem.line <= len(text):
                yield f"    {visible(text[problem.line - 1])}"
            yield ""

    def _watch(self) -> None:
        """Open the file once it is another and can be read."""
        seen = _seen(self._path)
        if seen != self._seen:
            self._seen = seen
            self.action_again()

    def action_again(self) -> None:
        """Open the file, or say what is wrong now."""
        try:
            session = self._open_again()
        except (ScheduleError, FileError) as error:
            self._error = error
            self._show()
        else:
            self.exit(session)

    def action_leave(self) -> None:
        """Leave without having opened it."""
        self.exit(None)

    def action_stay(self) -> None:
        """Stay: ctrl+c does not quit."""


def _seen(path: Path) -> tuple[int, int, int] | None:
    try:
        found = os.stat(path)  # noqa: PTH116  asked often
    except OSError:
        return None
    return found.st_mtime_ns, found.st_size, found.st_ino


def _text(path: Path) -> list[str]:
    try:
        return read_text(path).text.split("\n")
    except FileError:
        return []
