"""The help: keys, signs, and the checks with their sources, from the places that define them."""

from __future__ import annotations

from schedtui.report.page import CAUTION, Block, Heading, Page, Paragraph, Table
from schedtui.review.registry import registered
from schedtui.screen.actions import ACTIONS, EDIT_KEYS, PANE_KEYS, TABLE_KEYS
from schedtui.screen.looks import Look, mark_of, sign_of

_MARKS = (
    (Look.MARK_UNREADABLE, "unreadable: a cell of the row cannot be read"),
    (Look.MARK_SHORT, "short: the equipment is too small"),
    (Look.MARK_CONFLICT, "conflict: the row contradicts itself, another row, or physics"),
    (Look.MARK_CAUTION, "caution: outside customary practice"),
    (Look.MARK_MISSING, "missing: something could not be judged"),
    (Look.MARK_CLEAR, "clear: nothing found"),
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


def help_page(here: str = "", about: tuple[str, ...] = ()) -> Page:
    """Return what the keys do, what the signs mean, and which checks there are.

    Args:
        here: where the person is.
        about: what there is to say about that.
    """
    blocks: list[Block] = [Heading(here), *map(Paragraph, about)] if here else []
    blocks += [
        Heading("Marks before a row, the worst first"),
        Table(("Mark", "Means"), tuple((mark_of(look), meaning) for look, meaning in _MARKS)),
        Heading("Signs behind a cell"),
        Table(("Sign", "Means"), tuple((sign_of(look), meaning) for look, meaning in _SIGNS)),
        Heading("Keys everywhere"),
        Table(("Key", "Does"), tuple((action.shown, action.label) for action in ACTIONS)),
        Heading("Keys in the table"),
        Table(("Key", "Does"), TABLE_KEYS),
        Heading("Keys in an edit"),
        Table(("Key", "Does"), EDIT_KEYS),
        Heading("Keys in the pane"),
        Table(("Key", "Does"), PANE_KEYS),
        Heading("Checks"),
        Table(
            ("Check", "At worst", "Holds"),
            tuple(
                (name, check.severity.word, f"{check.sentence} Source: {check.source}.")
                for name, check in registered().items()
            ),
        ),
        Paragraph(CAUTION),
    ]
    return Page(tuple(blocks))
