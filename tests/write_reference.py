"""Writes the reference tables of README.md: python tests/write_reference.py.

Each stands between markers there, and is made from the place in the code that defines it.
"""

from __future__ import annotations

import re
from pathlib import Path

from schedtui.cli.main import all_commands
from schedtui.report.formats.markdown import render
from schedtui.report.page import Page, Table
from schedtui.report.reference import checks_table, columns_table, keys_table, limits_table
from schedtui.schedule.load import CATALOGUES

README = Path(__file__).parent.parent / "README.md"
_MARKED = re.compile(r"(<!-- (\w+) begins -->\n).*?(<!-- \2 ends -->)", re.DOTALL)


def commands_table() -> Table:
    """Return the commands with an example each."""
    rows = tuple(
        (f"schedtui {name}", command.summary, command.example)
        for name, command in all_commands().items()
    )
    return Table(("Command", "Does", "Example"), rows)


def tables() -> dict[str, Table]:
    """Return every reference table by the name in its markers."""
    keys = {name: keys_table(catalogue) for name, catalogue in CATALOGUES.items()}
    for elsewhere in (
        "limits",
        "defaults",
    ):  # limits have a table of their own; defaults are a unit's
        del keys[elsewhere]
    return {
        **keys,
        "limits": limits_table(),
        "checks": checks_table(),
        "columns": columns_table(),
        "commands": commands_table(),
    }


def written(text: str) -> str:
    """Return the README's text with every marked table as it has to be.

    Raises:
        ValueError: a table has no place in the text, or a marker no table.
    """
    made = tables()
    marked = {match[2] for match in _MARKED.finditer(text)}
    if marked != set(made):
        raise ValueError(f"markers and tables differ: {sorted(marked ^ set(made))}")
    return _MARKED.sub(lambda match: match[1] + render(Page((made[match[2]],))) + match[3], text)


if __name__ == "__main__":
    README.write_text(written(README.read_text(encoding="utf-8")), encoding="utf-8")
