"""The pane beside or below the table: pages about the unit under the cursor, scrolled.

Its first line names the pages there are, which one is shown, and how much of it is in sight.
On a page of entries one can be meant: it has a sign before it, and the arrows go from one to the
next instead of line by line.
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
from schedtui.screen.pane_lines import laid_out
from schedtui.text_width import cut, width_of

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from textual import events

_MARGIN = 1
_LEAST_WIDTH = 20
_SIDEWAYS = 8
_WHEEL_LINES = 3
_HEADER = 1
_MEANT = ">"
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
        self._entries: list[range] = []
        self._meant: int | None = None
        self.chose: Callable[[int], None] = lambda _: None  # told which entry is meant now
        self.acts: Mapping[str, Callable[[], None]] = {}  # what further keys do to that entry
        self._widest = 0
        self._top = 0
        self._left = 0
        self._shown: list[Strip] = []
        self._keys: dict[str, Callable[[], None]] = {
            "up": lambda: self._step(-1),
            "down": lambda: self._step(1),
            "pageup": lambda: self._turn(-self._room),
            "pagedown": lambda: self._turn(self._room),
            "home": lambda: self._turn(-len(self._lines)),
            "end": lambda: self._turn(len(self._lines)),
            "left": lambda: self._scroll(0, -_SIDEWAYS),
            "right": lambda: self._scroll(0, _SIDEWAYS),
        }

    def show(
        self, name: str, page: Page, *, about: object = None, meant: int | None = None
    ) -> None:
        """Show a page, from its top unless it is the same thing said anew.

        Args:
            name: what the page is called; one of no name of the pane's own stands alone.
            page: the page.
            about: what it is about; the pane stays where it is scrolled while that is the same.
            meant: place of the entry that is meant, if one of them is.
        """
        self._name, self._page = name, page
        before, self._meant = self._meant_lines, meant
        if about is None or (name, about) != self._about:
            self._top = self._left = 0
            before = -1, 0
        self._about = (name, about)
        self._lay_out()
        if self._meant_lines != before:
            self._bring_in_sight()
        self._paint()

    # -- keys and mouse --------------------------------------------------------------------

    def on_key(self, event: events.Key) -> None:
        """Scroll, do what the key does to the entry meant, or leave the key to others."""
        acts = {} if self._meant is None else self.acts
        act = self._keys.get(event.key) or acts.get(event.key)
        if act is not None:
            event.stop()
            event.prevent_default()
            act()

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

    # -- the entry that is meant -------------------------------------------------------------

    @property
    def _meant_lines(self) -> tuple[int, int]:
        """The place of the entry that is meant, and how many lines it takes."""
        if self._meant is None or self._meant >= len(self._entries):
            return -1, 0
        return self._meant, len(self._entries[self._meant])

    def _step(self, way: int) -> None:
        """Go to the next entry, or a line on where there is none or this one goes on."""
        here = self._meant
        if here is None or not 0 <= here + way < len(self._entries) or self._goes_on(way):
            self._scroll(way)
            return
        self._meant = here + way
        self._bring_in_sight()
        self._paint()
        self.chose(self._meant)

    def _goes_on(self, way: int) -> bool:
        """Tell whether the entry that is meant has lines out of sight on one side."""
        lines = self._entries[self._meant or 0]
        if way < 0:
            return lines.start < self._top < lines.stop
        return lines.start < self._top + self._room < lines.stop

    def _bring_in_sight(self) -> None:
        """Scroll as little as shows the entry that is meant, its beginning in any case."""
        if self._meant is None or self._meant >= len(self._entries):
            return
        lines = self._entries[self._meant]
        if self._meant == 0 and lines.start < self._room:
            self._top = 0  # with what stands above the first
            return
        self._top = min(max(self._top, lines.stop - self._room), lines.start)

    def _turn(self, lines: int) -> None:
        """Scroll far; what is meant is then an entry that is in sight."""
        self._scroll(lines)
        if self._meant is None or not self._entries:
            return
        sight = range(self._top, self._top + self._room)
        inside = [place for place, one in enumerate(self._entries) if one.start in sight]
        if abs(lines) >= len(self._lines):
            place = 0 if lines < 0 else len(self._entries) - 1
        elif inside:
            place = min(max(self._meant, inside[0]), inside[-1])
        else:
            place = sum(one.start < self._top for one in self._entries) - 1
        if place != self._meant and place >= 0:
            self._meant = place
            self._paint()
            self.chose(place)

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
        self._lines, self._entries = laid_out(self._page, self._width)
        self._widest = max((line.cell_length for line in self._lines), default=0)

    def _paint(self) -> None:
        """Draw what is in sight, and have the lines sent that are others than before."""
        self._top = max(0, min(self._top, len(self._lines) - self._room))
        self._left = max(0, min(self._left, self._widest - self._width))
        body = self._lines[self._top : self._top + self._room]
        shown = [self._header()]
        shown += [self._body_line(one, at) for at, one in enumerate(body, self._top)]
        shown += [self._body_line(Strip([]))] * (self.size.height - len(shown))
        before = self._shown + [Strip([])] * (len(shown) - len(self._shown))
        for y, (old, new) in enumerate(zip(before, shown, strict=False)):
            start, end = changed_cells(old, new)
            if end > start:
                self.refresh(Region(start, y, end - start, 1))
        self._shown = shown

    def _body_line(self, line: Strip, at: int = -1) -> Strip:
        """Return a line with a sign before it where its entry is meant, or there is more of it."""
        width = self.size.width
        before = "‹" if self._left and line.cell_length else " "
        if self._meant is not None and self._meant < len(self._entries):
            before = _MEANT if at == self._entries[self._meant].start else before
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
