"""The pane beside or below the table: pages about the unit under the cursor, scrolled.

Its first line names the pages there are, which one is shown, and how much of it is in sight.
Draws any page of a report. Must not know what a page is about.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from rich.segment import Segment
from textual.geometry import Region
from textual.strip import Strip
from textual.widget import Widget

from schedtui.report.page import Page
from schedtui.screen import looks
from schedtui.screen.looks import Look
from schedtui.screen.painter import changed_cells
from schedtui.screen.pane_lines import page_lines
from schedtui.text_width import cut, width_of

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    from textual import events

_MARGIN = 1
_LEAST_WIDTH = 20
_SIDEWAYS = 8
_WHEEL_LINES = 3
_HEADER = 1
_AWAY = looks.style_of(Look.SUBDUED)


class DetailPane(Widget, can_focus=True):
    """A page, laid out to the pane's width, below a line of the pages' names.

    Args:
        names: what the pages are called, in their order.
        id: the widget's name in the screen.
    """

    ALLOW_SELECT = False
    DEFAULT_CSS: ClassVar[str] = f"DetailPane {{ background: {looks.SLATE}; }}"

    def __init__(
        self,
        names: Sequence[str],
        *,
        id: str | None = None,  # noqa: A002  the library's name for it
    ) -> None:
        super().__init__(id=id)
        self._names = tuple(names)
        self._name = self._names[0]
        self._page = Page(())
        self._about: tuple[str, object] = ("", None)
        self._lines: list[Strip] = []
        self._widest = 0
        self._top = 0
        self._left = 0
        self._shown: list[Strip] = []
        self._keys: dict[str, Callable[[], None]] = {
            "up": lambda: self._scroll(-1),
            "down": lambda: self._scroll(1),
            "pageup": lambda: self._scroll(-self._room),
            "pagedown": lambda: self._scroll(self._room),
            "home": lambda: self._scroll(-len(self._lines)),
            "end": lambda: self._scroll(len(self._lines)),
            "left": lambda: self._scroll(0, -_SIDEWAYS),
            "right": lambda: self._scroll(0, _SIDEWAYS),
        }

    def show(self, name: str, page: Page, *, about: object = None) -> None:
        """Show a page, from its top unless it is the same thing said anew.

        Args:
            name: what the page is called; one of no name of the pane's own stands alone.
            page: the page.
            about: what it is about; the pane stays where it is scrolled while that is the same.
        """
        self._name, self._page = name, page
        if about is None or (name, about) != self._about:
            self._top = self._left = 0
        self._about = (name, about)
        self._lay_out()
        self._paint()

    # -- keys and mouse --------------------------------------------------------------------

    def on_key(self, event: events.Key) -> None:
        """Scroll, or leave the key to others."""
        if event.key in self._keys:
            event.stop()
            event.prevent_default()
            self._keys[event.key]()

    def on_mouse_scroll_down(self, event: events.MouseScrollDown) -> None:
        """Scroll down."""
        event.stop()
        self._scroll(_WHEEL_LINES)

    def on_mouse_scroll_up(self, event: events.MouseScrollUp) -> None:
        """Scroll up."""
        event.stop()
        self._scroll(-_WHEEL_LINES)

    def _scroll(self, lines: int, cells: int = 0) -> None:
        self._top += lines
        self._left += cells
        self._paint()

    # -- painting --------------------------------------------------------------------------

    def on_resize(self) -> None:
        """Lay the page out to the new width."""
        self._lay_out()
        self._paint()

    def on_focus(self) -> None:
        """Show that keys go here."""
        self._paint()

    def on_blur(self) -> None:
        """Show that keys go elsewhere."""
        self._paint()

    def render_line(self, y: int) -> Strip:
        """Draw one line."""
        if y < len(self._shown):
            return self._shown[y]
        return Strip([Segment(" " * self.size.width, looks.GROUND)])

    @property
    def _room(self) -> int:
        return max(1, self.size.height - _HEADER)

    @property
    def _width(self) -> int:
        return max(self.size.width - 2 * _MARGIN, _LEAST_WIDTH)

    def _lay_out(self) -> None:
        self._lines = page_lines(self._page, self._width)
        self._widest = max((line.cell_length for line in self._lines), default=0)

    def _paint(self) -> None:
        """Draw what is in sight, and have the lines sent that are others than before."""
        self._top = max(0, min(self._top, len(self._lines) - self._room))
        self._left = max(0, min(self._left, self._widest - self._width))
        body = self._lines[self._top : self._top + self._room]
        shown = [self._header(), *map(self._body_line, body)]
        shown += [self._body_line(Strip([]))] * (self.size.height - len(shown))
        before = self._shown + [Strip([])] * (len(shown) - len(self._shown))
        for y, (old, new) in enumerate(zip(before, shown, strict=False)):
            start, end = changed_cells(old, new)
            if end > start:
                self.refresh(Region(start, y, end - start, 1))
        self._shown = shown

    def _body_line(self, line: Strip) -> Strip:
        """Return a line with a sign at either side where there is more of it."""
        width = self.size.width
        before = "‹" if self._left and line.cell_length else " "
        behind = "›" if line.cell_length - self._left > self._width else " "
        text = line.crop(self._left, self._left + self._width)
        text = text.extend_cell_length(self._width, looks.GROUND)
        first, last = (
            Strip([Segment(sign, looks.GROUND if sign == " " else looks.POINTER)])
            for sign in (before, behind)
        )
        return Strip.join([first, text, last]).crop(0, width)

    def _header(self) -> Strip:
        width, focused = self.size.width, self.has_focus
        names = [f"[{name}]" if name == self._name else f" {name} " for name in self._names]
        if self._name not in self._names:
            names = [f"[{self._name}]"]
        left = ("─>" if focused else "──") + "".join(names)
        last = min(self._top + self._room, len(self._lines))
        place = f" {self._top + 1} to {last} of {len(self._lines)} ─"
        if len(self._lines) <= self._room:
            place = ""
        left = cut(left, max(0, width - width_of(place)))
        rest = "─" * (width - width_of(left) - width_of(place))
        style = looks.GROUP if focused else _AWAY
        return Strip([Segment(left + rest + place, style)])
