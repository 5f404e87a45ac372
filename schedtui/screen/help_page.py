"""The help: keys, signs, and the checks with their sources, from the places that define them."""

from __future__ import annotations

from schedtui.report.page import CAUTION, Heading, Page, Paragraph, Table
from schedtui.review.registry import registered
from schedtui.screen.actions import ACTIONS, TABLE_KEYS
from schedtui.screen.looks import Look, mark_of, sign_of

_MARKS = (
    (Look.MARK_UNREADABLE, "a cell of the row cannot be read"),
    (Look.MARK_SHORT, "short: the equipment is too small"),
    (Look.MARK_CONFLICT, "conflict: the row contradicts itself, another row, or physics"),
    (Look.MARK_CAUTION, "caution: outside customary practice"),
    (Look.MARK_MISSING, "missing: something could not be judged"),
)
_SIGNS = (
    (Look.COMPUTED, "computed; cannot be typed into"),
    (Look.INHERITED, "from the defaults; typing states it for this unit"),
    (Look.BAD, "cannot be read; shown as typed"),
    (Look.BLAMED, "the cell to blame for a short or a conflict"),
    (Look.FALLS_SHORT, "a computed margin that does not suffice"),
    (Look.CAUTION, "the cell that a caution is about"),
    (Look.WANTED, "wanted for something that could not be judged"),
)


def help_page() -> Page:
    """Return what the keys do, what the signs mean, and which checks there are."""
    keys = tuple((action.shown, action.label) for action in ACTIONS)
    marks = tuple((mark_of(look), meaning) for look, meaning in _MARKS)
    signs = tuple((sign_of(look), meaning) for look, meaning in _SIGNS)
    checks = tuple(
        (name, check.severity.word, check.source) for name, check in registered().items()
    )
    return Page(
        (
            Heading("Keys"),
            Table(("Key", "Does"), (*keys, *TABLE_KEYS)),
            Heading("Marks before a row"),
            Table(("Mark", "Means"), marks),
            Heading("Signs behind a cell"),
            Table(("Sign", "Means"), signs),
            Heading("Checks"),
            Table(("Check", "At worst", "Source"), checks),
            Paragraph(CAUTION),
        )
    )
