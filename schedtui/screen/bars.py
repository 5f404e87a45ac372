"""The two single lines: the title above the table and the hint below it."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from rich.segment import Segment
from textual.strip import Strip
from textual.widget import Widget

from schedtui.screen import looks
from schedtui.text_width import cut, fill, visible, width_of

if TYPE_CHECKING:
    from rich.style import Style

_GAP = 2


class Bar(Widget):
    """A line with a text at its left and another at its right; the right one is cut last.

    Args:
        style: how it looks.
        id: the widget's name in the screen.
    """

    ALLOW_SELECT = False
    DEFAULT_CSS: ClassVar[str] = "Bar { height: 1; }"

    def __init__(self, style: Style, *, id: str | None = None) -> None:  # noqa: A002  the library's
        super().__init__(id=id)
        self._style = style
        self._texts = ("", "")

    def show(self, left: str, right: str = "") -> None:
        """Show other texts."""
        texts = (visible(left), visible(right))
        if texts != self._texts:
            self._texts = texts
            self.refresh()

    def render_line(self, y: int) -> Strip:  # noqa: ARG002  there is one line
        """Draw the line."""
        left, right = self._texts
        width = self.size.width
        right = cut(right, width)
        room = width - width_of(right) - (_GAP if right else 0)
        line = fill(cut(left, max(room, 0)), max(room, 0)) + " " * (_GAP if right else 0) + right
        return Strip([Segment(fill(line, width), self._style)])


TITLE_STYLE = looks.HEADING
HINT_STYLE = looks.UNIT
