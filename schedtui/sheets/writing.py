"""A schedule file's text for units that came from a sheet.

Plain to read: a unit's keys in groups, and beside what was converted what stood on the sheet.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import ScheduleError
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.load import load
from schedtui.schedule.typed import toml_text

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    from schedtui.schedule.document import Document
    from schedtui.sheets.importing import Import
    from schedtui.sheets.place import OwnColumn, SheetUnit

_LONGEST_COMMENT = 80


def schedule_text(read: Import, title: str, source: str) -> str:
    """Return the text of a new schedule file, read back and found without a fault.

    Args:
        read: what the sheets say.
        title: the project's title.
        source: name of the sheet's file, for the comment at the head.

    Raises:
        ScheduleError: the text would hold what the program itself refuses.
    """
    text = "\n".join(_lines(read, title, source)) + "\n"
    checked(load(text))
    return text


def checked(document: Document) -> Document:
    """Return a document without problems.

    Raises:
        ScheduleError: it has some.
    """
    if document.problems:
        raise ScheduleError(document.problems)
    return document


def _lines(read: Import, title: str, source: str) -> Iterator[str]:
    yield f"# Read from {comment(source)}: numbers as they stand there. What had to be converted"
    yield "# or mended has beside it what the sheet has."
    yield "format = 1"
    yield ""
    yield "[project]"
    yield f"title = {toml_text(title)}"
    yield f'units = "{read.placed.system}"'
    if read.notes:
        yield "notes = ["
        yield from (f"    {toml_text(note)}," for note in read.notes)
        yield "]"
    yield from _column_lines(read.placed.columns)
    for unit in read.placed.units:
        yield from _unit_lines(unit)


def _column_lines(columns: Iterable[OwnColumn]) -> Iterator[str]:
    for column in columns:
        yield ""
        yield "[[column]]"
        yield f"key = {toml_text(column.key)}"
        yield f"heading = {toml_text(column.heading)}"
        if column.group:
            yield f"group = {toml_text(column.group)}"


def _unit_lines(unit: SheetUnit) -> Iterator[str]:
    yield ""
    yield "[[unit]]"
    yield f"tag = {toml_text(unit.tag)}"
    group = Unit.tag.group
    for key, stated in unit.cells.items():
        if Unit.catalogue[key].group is not group:
            group = Unit.catalogue[key].group
            yield ""
            yield f"# {group.value}"
        yield f"{key} = {value_text(stated.typed.toml, stated.was)}"
    if unit.own:
        yield ""
        yield "# Carried on the sheet"
        yield from (f"{key} = {toml_text(text)}" for key, text in unit.own.items())


def value_text(toml: str, was: str) -> str:
    """Return a value with what stood on the sheet in the comment beside it."""
    return f"{toml}  # {comment(was)}" if was else toml


def comment(text: str) -> str:
    r"""Return a text fit for a comment: on one line, with nothing in it that acts.

    >>> comment("3.2\n kW")
    '3.2 kW'
    """
    shown = "".join(sign if sign.isprintable() else " " for sign in text)
    return " ".join(shown.split())[:_LONGEST_COMMENT]
