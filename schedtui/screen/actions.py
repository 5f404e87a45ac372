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
        label: what it does, for the help.
        overriding: whether it works in the middle of an edit too.
    """

    name: str
    key: str
    shown: str
    label: str
    overriding: bool = False


ACTIONS: tuple[Action, ...] = (
    Action("help", "f1", "F1", "this help, and back", overriding=True),
    Action("next_finding", "ctrl+g", "ctrl+g", "go to the next finding, on the cell it blames"),
    Action("next_row", "ctrl+down", "ctrl+Down", "go to the next unit to look at"),
    Action("previous_row", "ctrl+up", "ctrl+Up", "go to the previous unit to look at"),
    Action("undo", "ctrl+z", "ctrl+z", "take the last step back"),
    Action("redo", "ctrl+y", "ctrl+y", "do again what was taken back"),
    Action("turn_pane", "ctrl+p", "ctrl+p", "show the next page in the pane"),
    Action("other_part", "ctrl+w", "ctrl+w", "go from table to pane, and back"),
    Action("enlarge_pane", "ctrl+l", "ctrl+l", "the pane as large as the screen, and back"),
    Action("save", "ctrl+s", "ctrl+s", "save the schedule", overriding=True),
    Action("save_as", "f11", "F11", "save under another name"),
    Action("leave", "ctrl+q", "ctrl+q", "quit; asks where something is unsaved", overriding=True),
    Action("stay", "ctrl+c", "ctrl+c", "nothing: it does not quit", overriding=True),
    Action("to_table", "escape", "Esc", "from help or pane back to the table"),
)

# What the table does by itself.
TABLE_KEYS: tuple[tuple[str, str], ...] = (
    ("arrows", "move from cell to cell"),
    ("ctrl+Right, ctrl+Left", "first column of the next and previous group"),
    ("Home, End", "first and last column"),
    ("PgUp, PgDn", "a page up and down"),
    ("ctrl+Home, ctrl+End", "first and last unit"),
    ("Tab, shift+Tab", "next and previous cell that can be typed into"),
    ("any character", "type over the cell"),
    ("Enter, F2", "edit what stands in the cell"),
    ("Del", "clear the cell; do without a default"),
)
EDIT_KEYS: tuple[tuple[str, str], ...] = (
    ("Enter", "take the text and go down"),
    ("Tab, shift+Tab", "take the text and go right, left"),
    ("Esc", "leave the cell as it was"),
)
PANE_KEYS: tuple[tuple[str, str], ...] = (
    ("Up, Down", "among findings the previous and the next; else scroll"),
    ("Enter", "clear a short finding with a remedy; asks which where there are several"),
    ("a", "accept the finding in the numbers as they stand, with a reason"),
    ("t", "take back that it is accepted; take out an acceptance that has lapsed"),
    ("PgUp, PgDn", "scroll"),
    ("Left, Right", "scroll sideways where there is more"),
    ("Home, End", "the page's beginning and end"),
)

# What the hint line offers in each place, the most needed first.
TABLE_HINT = (
    *("F1 help", "Enter edit", "ctrl+g finding", "ctrl+q quit", "ctrl+s save"),
    *("ctrl+p pane", "ctrl+z undo", "ctrl+Down next unit", "ctrl+w to pane"),
)
COMPUTED_HINT = ("F1 help", "Tab next cell", *TABLE_HINT[2:])
EDIT_HINT = ("Enter takes", "Esc leaves", "Tab takes, goes right", "F1 help")
PANE_HINT = ("F1 help", "ctrl+w table", "ctrl+p next page", "ctrl+l larger", "PgDn scroll")
LARGE_HINT = ("F1 help", "ctrl+l smaller", "ctrl+p next page", "PgDn scroll")
CLEARS, ACCEPTS, TAKES_BACK = "Enter clears it", "a accepts it", "t takes it back"
FINDINGS_HINT = ("ctrl+w table", "Down next", "F1 help", "ctrl+p next page", "ctrl+l larger")
LARGE_FINDINGS_HINT = ("ctrl+l smaller", "Down next", "F1 help", "ctrl+p next page")
HELP_HINT = ("F1 back", "PgDn scroll")
