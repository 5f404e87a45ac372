"""What can be done, and with which key: one line each.

The application binds these, the hint and the help list them.
"""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Action:
    """Something that can be done.

    Args:
        name: the application's method is `action_` and this.
        key: the key that does it, as the library names it.
        shown: the key as people read it.
        short: what it does, in a word for the hint line; empty to leave it out there.
        label: what it does, for the help.
        overriding: whether it works in the middle of an edit too.
    """

    name: str
    key: str
    shown: str
    short: str
    label: str
    overriding: bool = False


ACTIONS: tuple[Action, ...] = (
    Action("help", "f1", "F1", "help", "say what the keys do here", overriding=True),
    Action("save", "ctrl+s", "ctrl+s", "save", "save the schedule", overriding=True),
    Action("undo", "ctrl+z", "ctrl+z", "undo", "take the last step back"),
    Action("redo", "ctrl+y", "ctrl+y", "redo", "do again what was taken back"),
    Action("next_row", "ctrl+down", "ctrl+Down", "next", "go to the next unit to look at"),
    Action("previous_row", "ctrl+up", "ctrl+Up", "", "go to the previous unit to look at"),
    Action("turn_pane", "ctrl+p", "ctrl+p", "pane", "show the next page in the pane"),
    Action("other_part", "ctrl+w", "ctrl+w", "", "go from table to pane, and back"),
    Action("enlarge_pane", "ctrl+l", "ctrl+l", "", "the pane as large as the screen, and back"),
    Action("leave", "ctrl+q", "ctrl+q", "quit", "quit", overriding=True),
)

# What the table does by itself.
TABLE_KEYS: tuple[tuple[str, str], ...] = (
    ("arrows", "move from cell to cell"),
    ("Home, End", "first and last column"),
    ("PgUp, PgDn", "a page up and down"),
    ("ctrl+Home, ctrl+End", "first and last unit"),
    ("Tab, shift+Tab", "next and previous cell that can be typed into"),
    ("any character", "type over the cell"),
    ("Enter, F2", "edit what stands in the cell"),
    ("Enter while editing", "take the text and go down"),
    ("Tab while editing", "take the text and go right"),
    ("Esc while editing", "leave the cell as it was"),
)
