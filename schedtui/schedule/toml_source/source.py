"""A TOML text with its values, and the characters and line of each.

The one way from characters to values. What the keys mean is not known here.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from types import MappingProxyType
from typing import TYPE_CHECKING, Any

from schedtui.errors import ScheduleError
from schedtui.schedule.toml_source.locate import Layout, Place, Section, locate, newlines
from schedtui.schedule.toml_source.recover import BadValue, recover
from schedtui.schedule.toml_source.scan import scan

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.schedule.toml_source.changes import Path


@dataclass(frozen=True, slots=True, eq=False)
class Source:
    """A text that was read.

    Args:
        text: the whole text, its line endings and a byte order mark included.
        values: its values as the standard library's parser gives them; one that is no TOML
            is a `BadValue`, as is an array with an element that is none.
        layout: where everything stands.
    """

    text: str
    values: dict[str, Any]
    layout: Layout = field(repr=False)

    def raw(self, path: Path) -> str:
        """Return the characters of a value as they stand in the text.

        Args:
            path: path of a key, or of an element of an array in brackets.

        Raises:
            KeyError: nothing of that path has characters of its own (a table with a head).
        """
        value = self.layout.places[path].value
        if value is None:
            raise KeyError(path)
        return self.text[value.start : value.end]

    def line(self, path: Path) -> int:
        """Return the line, from 1, of a value or of a table's head.

        Args:
            path: any path; of one that is not there, the nearest table around it counts.
        """
        while path and path not in self.layout.places:
            path = path[:-1]
        return self.layout.line(self.layout.places[path].start) if path else 1

    def paths(self) -> Mapping[Path, Place]:
        """Return the place of every key, table and array element."""
        return MappingProxyType(self.layout.places)

    def block(self, array: str, index: int) -> str:
        """Return the text of an element of a top-level array, its sub-tables included.

        Args:
            array: key of the array.
            index: place of the element in it, from 0.

        Raises:
            KeyError: there is no such element.
        """
        place = self.layout.places[array, index]
        if place.value is not None:
            return self.text[place.value.start : place.value.end]
        return "".join(self.text[s.start : s.end] for s in self.sections((array, index)))

    def sections(self, path: Path) -> list[Section]:
        """Return the sections of a table and of the tables in it, in the order of the text."""
        size = len(path)
        return [s for s in self.layout.sections if s.head and s.path[:size] == path]


def read_source(text: str) -> Source:
    r"""Return a text with its values and their places.

    Args:
        text: the whole text of a TOML file.

    Raises:
        ScheduleError: a table's head or a key is at fault or stated twice, or a string or
            array is not closed; every such problem that was found, with its line.

    >>> source = read_source('[[unit]]\ntag = "AHU-1"\nsupply_airflow = 9,440 # cfm\n')
    >>> source.values
    {'unit': [{'tag': 'AHU-1', 'supply_airflow': BadValue(raw='9,440', line=3)}]}
    >>> source.raw(("unit", 0, "tag")), source.line(("unit", 0, "tag"))
    ('"AHU-1"', 2)
    """
    scanned = scan(text)
    lines = newlines(text)
    values, problems = recover(text, scanned, lines)
    if problems:
        raise ScheduleError(problems)
    layout = locate(text, scanned.statements, lines)
    for path, place in layout.places.items():
        if place.value is not None and place.value.bad:
            raw = text[place.value.start : place.value.end]
            _put(values, path, BadValue(raw, layout.line(place.value.start)))
    return Source(text, values, layout)


def _put(values: dict[str, Any], path: Path, value: BadValue) -> None:
    holder: Any = values
    for key in path[:-1]:
        holder = holder[key]
    holder[path[-1]] = value
