"""The pane beside or below the table: pages about the unit under the cursor, scrolled.

Draws any page of a report. Must not know what a page is about.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from rich.segment import Segment
from textual.geometry import Size
from textual.scroll_view import ScrollView
from textual.strip import Strip

from schedtui.report.formats.text import block_lines
from schedtui.report.page import Heading, Page
from schedtui.screen import looks
from schedtui.text_width import fill

if TYPE_CHECKING:
    from rich.style import Style

_MARGIN = 1
_LEAST_WIDTH = 20


class DetailPane(ScrollView, can_focus=True):
    """A page, laid out to the pane's width."""

    ALLOW_SELECT = False
    DEFAULT_CSS: ClassVar[str] = f"""
    DetailPane {{
        background: {looks.SLATE};
        overflow: hidden hidden;
    }}
    """

    def __init__(self, *, id: str | None = None) -> None:  # noqa: A002  the library's name for it
        super().__init__(id=id)
        self._page = Page(())
        self._lines: list[tuple[str, Style]] = []

    def show(self, page: Page) -> None:
        """Show a page from its top, unless it is the one that is shown."""
        if page == self._page:
            return
        self._page = page
        self._lay_out()
        self.scroll_to(y=0, animate=False)

    def on_resize(self) -> None:
        """Lay the page out to the new width."""
        self._lay_out()

    def render_line(self, y: int) -> Strip:
        """Draw one line of the page."""
        width = self.size.width
        place = y + self.scroll_offset.y
        if place >= len(self._lines):
            return Strip([Segment(" " * width, looks.GROUND)])
        text, style = self._lines[place]
        return Strip([Segment(fill(" " * _MARGIN + text, width), style)])

    def _lay_out(self) -> None:
        width = max(self.size.width - 2 * _MARGIN, _LEAST_WIDTH)
        self._lines = []
        for block in self._page.blocks:
            if self._lines:
                self._lines.append(("", looks.GROUND))
            style = looks.POINTER if isinstance(block, Heading) else looks.GROUND
            self._lines += [(line, style) for line in block_lines(block, width)]
        self.virtual_size = Size(self.size.width, len(self._lines))
        self.refresh()
