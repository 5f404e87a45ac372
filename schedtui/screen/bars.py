"""The two single lines: the title above the table and the hint below it.

What they say is given up piece by piece where there is no room, the least needed first, and
nothing is cut without a sign.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from rich.segment import Segment
from textual.geometry import Region
from textual.strip import Strip
from textual.widget import Widget

from schedtui.screen import looks
from schedtui.text_width import cut, fill, head, visible, width_of

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    from rich.style import Style

_GAP = "  "
_KEYS_SHARE = 0.45  # of the hint line, where what is said besides is longer than the rest
_LEAST_NAME = 12


class Bar(Widget):
    """One line, made to the width there is.

    Args:
        style: how it looks.
        id: the widget's name in the screen.
    """

    ALLOW_SELECT = False
    DEFAULT_CSS: ClassVar[str] = "Bar { height: 1; }"

    def __init__(self, style: Style, *, id: str | None = None) -> None:  # noqa: A002  the library's
        super().__init__(id=id)
        self._style = style
        self._made: Callable[[int], str] = lambda _: ""
        self._line = ""

    def show(self, made: Callable[[int], str]) -> None:
        """Show another text.

        Args:
            made: returns the text for so many cells.
        """
        self._made = made
        before, self._line = self._line, fill(made(self.size.width), self.size.width)
        if self._line != before:
            self.refresh(_difference(before, self._line, self.size.width))

    def on_resize(self) -> None:
        """Make the text anew."""
        self.show(self._made)

    def render_line(self, y: int) -> Strip:  # noqa: ARG002  there is one line
        """Draw the line."""
        return Strip([Segment(fill(self._line, self.size.width), self._style)])


def _difference(before: str, now: str, width: int) -> Region:
    """Return the cells in which two lines differ."""
    same = next((i for i, (a, b) in enumerate(zip(before, now, strict=False)) if a != b), 0)
    end = width
    if before.isascii() and now.isascii() and len(before) == len(now):
        tails = zip(reversed(before), reversed(now), strict=True)
        end -= next((i for i, (a, b) in enumerate(tails) if a != b), 0)
    start = width_of(now[:same])
    return Region(start, 0, max(end - start, 1), 1)


def title_line(width: int, file: str, project: str, site: str, counts: Sequence[str]) -> str:
    """Return the title line; the project's name gives way first, then the file's.

    Args:
        width: cells there are.
        file: name of the file, with its mark where it is unsaved.
        project: the project's name.
        site: unit system, altitude or pressure, airflow basis.
        counts: the counts by severity in ways of saying them, the longest first.
    """
    file, project, site = visible(file), visible(project), visible(site)
    needed = width_of(file) + width_of(site) + 2 * len(_GAP)
    count = next((one for one in counts if needed + width_of(one) + _LEAST_NAME <= width),
                 counts[-1])  # fmt: skip
    room = width - needed - width_of(count) - len(_GAP)
    if room < 1:
        file = cut(file, max(_LEAST_NAME, width_of(file) + room - 1))
    parts = [file, site, cut(project, room)] if room > 1 else [file, site]
    left = cut(_GAP.join(parts), max(0, width - width_of(count) - len(_GAP)))
    return fill(left, width - width_of(count)) + count


def hint_line(width: int, about: str, keys: Sequence[str], *, whole: bool = False) -> str:
    """Return the hint line: what is said on the left, as many keys as fit on the right.

    Args:
        width: cells there are.
        about: what is said; it is cut where it leaves less than their share for the keys.
        keys: the keys and what they do, the most needed first.
        whole: whether what is said has to be read to its end, so that the keys take what is left.
    """
    about = visible(about)
    share = 0 if whole else _KEYS_SHARE
    room = max(width - width_of(about) - len(_GAP), int(width * share) if keys else 0)
    shown: list[str] = []
    for key in keys:
        if width_of(_GAP.join([*shown, key])) > room:
            break
        shown.append(key)
    right = _GAP.join(shown)
    left_room = width - width_of(right) - (len(_GAP) if right else 0)
    return fill(_short(about, left_room), width - width_of(right)) + right


def _short(text: str, width: int) -> str:
    """Return a text cut at a word where one ends near enough, with a sign."""
    if width_of(text) <= width:
        return text
    kept = head(text, max(width - 1, 0))
    word = kept.rpartition(" ")[0]
    return (word if len(word) > len(kept) * 0.7 else kept) + "…"


TITLE_STYLE = looks.HEADING
HINT_STYLE = looks.UNIT
