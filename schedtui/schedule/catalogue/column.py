"""The keys of `[[column]]`: what the sheet carries and nothing here checks."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Field, Group, In
from schedtui.schedule.catalogue.table import Table

_column = In(Group.UNIT)
_own = In(Group.OWN)


class Column(Table):
    """A column of the project's own."""

    __slots__ = ()
    key = _column.text("Key", "KEY", "The key of each unit that has it.", required=True)
    heading = _column.text("Heading", "HEADING", "Heading as printed.", required=True)
    group = _column.text("Group", "GROUP", "Heading that it stands under.", blank=True)


def own_field(column: Column) -> Field[str | None]:
    """Return the unit field that an own column stands for."""
    heading = column.heading or column.key or ""
    made = _own.free(heading, heading.upper(), "A column of the project's own; nothing checks it.")
    made.__set_name__(Column, column.key or "")
    return made
