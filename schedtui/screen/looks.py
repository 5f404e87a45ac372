"""The palette, and how each kind of cell looks and is signed.

The colours are steps of the 256-colour cube or its greys, so that they are the same on a
terminal with fewer than 16 million. No italics: some terminals show them reversed, and each
change of style is sent over the line. Every look that says something has a sign too: nothing is
told by colour alone. Must not know of schedules, columns or widgets.
"""

from __future__ import annotations

from enum import Enum, auto
from functools import lru_cache

from rich.style import Style

SLATE = "#121212"  # the ground everything stands on
SHALE = "#303030"  # headings
INK = "#d7d7d7"  # what somebody typed
CHALK = "#ffffff"
SEA = "#87afd7"  # what was computed
MOSS = "#afaf87"  # what comes from the defaults
ASH = "#9e9e9e"  # what is there without asking for attention
EMBER = "#ff8787"  # short, unreadable
AMBER = "#ffaf5f"  # two figures that contradict each other
STRAW = "#ffd787"  # a caution; the place of the cursor
LAGOON = "#5fd7d7"  # something is missing
FERN = "#87d787"  # accepted
NIGHT = "#00005f"  # the ground of an edit


class Look(Enum):
    """What a cell is; each has a style and a sign of its own."""

    TYPED = auto()
    COMPUTED = auto()
    INHERITED = auto()
    BLANK = auto()
    BAD = auto()
    BLAMED = auto()
    FALLS_SHORT = auto()  # a computed figure that does not suffice
    CAUTION = auto()
    WANTED = auto()  # a blank that has to be filled
    SUBDUED = auto()
    MARK_CLEAR = auto()
    MARK_UNREADABLE = auto()
    MARK_SHORT = auto()
    MARK_CONFLICT = auto()
    MARK_CAUTION = auto()
    MARK_MISSING = auto()
    MARK_ACCEPTED = auto()


def _on(ground: str, colour: str, *, bold: bool = False) -> Style:
    return Style(color=colour, bgcolor=ground, bold=bold or None)


GROUND = _on(SLATE, INK)
POINTER = _on(SLATE, STRAW, bold=True)
HEADING = _on(SHALE, CHALK)
GROUP = _on(SHALE, STRAW)
UNIT = _on(SHALE, INK)
STRONG = _on(SLATE, INK, bold=True)
EDIT = Style(color=CHALK, bgcolor=NIGHT, underline=True)
CARET = Style(color=CHALK, bgcolor=NIGHT, reverse=True)
REFUSED = Style(color=EMBER, bgcolor=SLATE, bold=True, reverse=True)

_STYLES = {
    Look.TYPED: GROUND,
    Look.COMPUTED: _on(SLATE, SEA),
    Look.INHERITED: _on(SLATE, MOSS),
    Look.BLANK: GROUND,
    Look.BAD: _on(SLATE, EMBER, bold=True),
    Look.BLAMED: Style(color=EMBER, bgcolor=SLATE, bold=True, underline=True),
    Look.FALLS_SHORT: _on(SLATE, EMBER),
    Look.CAUTION: _on(SLATE, STRAW),
    Look.WANTED: _on(SLATE, LAGOON),
    Look.SUBDUED: _on(SLATE, ASH),
    Look.MARK_CLEAR: GROUND,
    Look.MARK_UNREADABLE: Style(color=EMBER, bgcolor=SLATE, bold=True, reverse=True),
    Look.MARK_SHORT: _on(SLATE, EMBER, bold=True),
    Look.MARK_CONFLICT: _on(SLATE, AMBER, bold=True),
    Look.MARK_CAUTION: _on(SLATE, STRAW),
    Look.MARK_MISSING: _on(SLATE, LAGOON),
    Look.MARK_ACCEPTED: _on(SLATE, FERN),
}

_SIGNS = {
    Look.COMPUTED: "·",
    Look.INHERITED: "^",  # it comes from above: from the defaults
    Look.BAD: "?",
    Look.BLAMED: "<",
    Look.FALLS_SHORT: "-",
    Look.CAUTION: "~",
    Look.WANTED: "_",
}

_MARKS = {
    Look.MARK_UNREADABLE: "??",
    Look.MARK_SHORT: "!!",
    Look.MARK_CONFLICT: "!=",
    Look.MARK_CAUTION: "~",
    Look.MARK_MISSING: "__",
    Look.MARK_ACCEPTED: "ac",
}
MARK_WIDTH = 2


def style_of(look: Look) -> Style:
    """Return the style of a look."""
    return _STYLES[look]


def sign_of(look: Look) -> str:
    """Return the one character that stands behind a cell's text, or a blank.

    >>> sign_of(Look.COMPUTED), sign_of(Look.TYPED)
    ('·', ' ')
    """
    return _SIGNS.get(look, " ")


def mark_of(look: Look) -> str:
    """Return the severity mark of a look, in plain ASCII; empty where it is none.

    >>> mark_of(Look.MARK_CONFLICT)
    '!='
    """
    return _MARKS.get(look, "")


@lru_cache(maxsize=64)
def under_cursor(style: Style) -> Style:
    """Return the style a cell has while the cursor is on it: exchanged, so seen without colour."""
    return style + Style(reverse=not style.reverse, bold=True)


@lru_cache(maxsize=64)
def marked(style: Style) -> Style:
    """Return the style a cell has as part of a marked block."""
    return style + Style(bgcolor=NIGHT, underline=True)


@lru_cache(maxsize=256)
def carries_blanks(style: Style) -> bool:
    """Return whether a blank in this style looks the same as a blank of the ground."""
    shows = style.underline or style.reverse or style.strike or style.overline
    return not shows and style.bgcolor == GROUND.bgcolor
