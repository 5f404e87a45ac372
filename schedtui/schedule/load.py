"""From a file's text to a document: lenient, and complete in what it reports.

A value that cannot be read becomes a bad cell and a problem with its line; all problems are
gathered. Only what makes the rest meaningless stops the reading: broken TOML, a table of the wrong
shape, a foreign format, an unreadable unit system.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from difflib import get_close_matches
from typing import TYPE_CHECKING, Any, cast

from schedtui.errors import Problem, ScheduleError
from schedtui.schedule.catalogue.accepted import Accepted
from schedtui.schedule.catalogue.column import Column
from schedtui.schedule.catalogue.condition import HUMIDITIES, Condition
from schedtui.schedule.catalogue.kinds import FreeKind
from schedtui.schedule.catalogue.limits import Limits
from schedtui.schedule.catalogue.plant import Plant
from schedtui.schedule.catalogue.project import Project
from schedtui.schedule.catalogue.record import Record
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.document import ARRAYS, SINGLE, Document, Origin, Row
from schedtui.schedule.toml_source import BadValue, Path, Source, read_source
from schedtui.schedule.typed import Typed

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.catalogue.table import Table
    from schedtui.units import System

FORMAT = 1

CATALOGUES: Mapping[str, type[Table]] = {
    "project": Project,
    "limits": Limits,
    "defaults": Unit,
    "record": Record,
    "column": Column,
    "condition": Condition,
    "plant": Plant,
    "unit": Unit,
    "accepted": Accepted,
}

# The key that names a row in messages, and whether another row may refer to it by that.
NAMES = {"unit": "tag", "condition": "name", "plant": "name", "column": "key", "accepted": "of"}
_REFERRED = ("condition", "plant", "column")


def load(text: str, file: str = "") -> Document:
    """Read a schedule file's text.

    Args:
        text: the text.
        file: the file's name, for the exception.

    Raises:
        ScheduleError: it cannot be read as a schedule at all. Bad values do not raise: they are
            bad cells, and `problems` of the document names each.
    """
    try:
        source = read_source(text)
        _refuse_misshapen(source)
        return _Reading(source, _system(source)).document()
    except ScheduleError as error:
        raise ScheduleError(error.problems, file) from None


def _refuse_misshapen(source: Source) -> None:
    """Raise for a foreign format and for tables that are not of the shape they must have."""
    values = source.values
    problems = []
    found = values.get("format", FORMAT)
    if isinstance(found, bool) or found != FORMAT:
        raw = source.raw(("format",)) if ("format",) in source.paths() else ""
        accepted = f"is not a format that this program reads; accepted: {FORMAT}"
        problems.append(Problem(source.line(("format",)), "", "format", raw, accepted))
    for name in SINGLE:
        if name in values and not isinstance(values[name], dict):
            accepted = f"is no table; accepted: [{name}]"
            problems.append(Problem(source.line((name,)), "", name, "", accepted))
    for name in ARRAYS:
        rows = values.get(name, [])
        if not isinstance(rows, list) or not all(isinstance(row, dict) for row in rows):
            accepted = f"is no array of tables; accepted: [[{name}]]"
            problems.append(Problem(source.line((name,)), "", name, "", accepted))
    if problems:
        raise ScheduleError(problems)


def _system(source: Source) -> System:
    """Return the project's unit system, which every number's meaning hangs on.

    Raises:
        ScheduleError: it is not there or none of the two.
    """
    project = source.values.get("project")
    if project is None:
        raise ScheduleError(
            [Problem(1, "project", "", "", "is missing; accepted: [project] with title and units")]
        )
    found = project.get("units")
    if found not in ("IP", "SI") or not isinstance(found, str):
        path = ("project", "units") if "units" in project else ("project",)
        raw = source.raw(path) if "units" in project else ""
        wrong = "is none of the choices" if "units" in project else "is missing"
        accepted = f'{wrong}; accepted: "IP", "SI"'
        raise ScheduleError([Problem(source.line(path), "project", "units", raw, accepted)])
    return cast("System", found)


@dataclass(slots=True)
class _Reading:
    """One reading of a source: gathers rows, and problems on the way."""

    source: Source
    system: System
    problems: list[Problem] = field(default_factory=list)
    next_id: int = 1

    def document(self) -> Document:
        """Read every table."""
        values = self.source.values
        single = {
            name: self._row(name, (name,), values[name], name, None)
            for name in SINGLE
            if name in values
        }
        arrays: dict[str, tuple[Row, ...]] = {}
        for name in ARRAYS:  # own columns come first: units are read with them
            own = [row.text("key") for row in arrays.get("column", ())]
            arrays[name] = tuple(self._array(name, values.get(name, []), own))
        self._check_names(arrays)
        unknown = tuple(key for key in values if key not in (*SINGLE, *ARRAYS, "format"))
        problems = tuple(sorted(self.problems, key=lambda problem: problem.line))
        return Document(self.source, self.system, single, arrays, self.next_id, problems, unknown)

    def _array(self, name: str, rows: list[dict[str, Any]], own_keys: list[str]) -> Iterator[Row]:
        for index, values in enumerate(rows):
            label = values.get(NAMES[name])
            plain = isinstance(label, str) and label.strip()
            subject = f"{name} {index + 1}" if not plain else str(label)
            if plain and name != "unit":
                subject = f"{name} {label}"
            row = self._row(name, (name, index), values, subject, index, own_keys)
            if name == "condition":
                self._check_humidity(row, (name, index), subject)
            yield row

    def _row(
        self,
        table: str,
        path: Path,
        values: dict[str, Any],
        subject: str,
        index: int | None,
        own_keys: list[str] | None = None,
    ) -> Row:
        catalogue = CATALOGUES[table].catalogue
        accepted: tuple[Row, ...] = ()
        row_id, self.next_id = self.next_id, self.next_id + 1
        cells: dict[str, Typed] = {}
        for key, value in values.items():
            if table == "unit" and key == "accepted" and _are_tables(value):
                accepted = tuple(
                    self._row("accepted", (*path, key, place), one, f"{subject} accepted", place)
                    for place, one in enumerate(value)
                )
                continue
            cells[key] = self._cell(
                catalogue.get(key), (*path, key), value, key in (own_keys or ())
            )
            self._note_bad(cells[key], (*path, key), subject)
        if table != "defaults":
            self._note_missing(catalogue, cells, path, subject)
        return Row(row_id, cells, Origin(self.source, index, dict(cells)), accepted)

    def _cell(self, known: Field[object] | None, path: Path, value: Any, own: bool) -> Typed:
        """Read one value; what no catalogue knows is kept as the characters it stands in."""
        raw = self.source.raw(path) if path in self.source.paths() else ""
        if known is not None:
            return known.kind.read(value, raw, self.system)
        if own:
            return FreeKind().read(value, raw, self.system)
        if isinstance(value, BadValue):
            return Typed(raw, None, raw, "is no TOML value")
        return Typed(value if isinstance(value, str) else raw, None, raw)

    def _note_bad(self, cell: Typed, path: Path, subject: str) -> None:
        if cell.problem is not None:
            line = self.source.line(path)
            shown = cell.toml or "nothing"
            self.problems.append(Problem(line, subject, str(path[-1]), shown, cell.problem))

    def _note_missing(
        self,
        catalogue: Mapping[str, Field[object]],
        cells: Mapping[str, Typed],
        path: Path,
        subject: str,
    ) -> None:
        for key, known in catalogue.items():
            if known.required and key not in cells:
                accepted = f"is missing; accepted: {known.kind.accepted(self.system)}"
                self.problems.append(Problem(self.source.line(path), subject, key, "", accepted))

    def _check_humidity(self, row: Row, path: Path, subject: str) -> None:
        stated = [key for key in HUMIDITIES if key in row.cells]
        if len(stated) != 1:
            wrong = "states none" if not stated else f"states {' and '.join(stated)}"
            accepted = f"{wrong}; accepted: exactly one of {', '.join(HUMIDITIES)}"
            line = self.source.line((*path, stated[1]) if stated else path)
            self.problems.append(Problem(line, subject, "", "", accepted))

    def _check_names(self, arrays: Mapping[str, tuple[Row, ...]]) -> None:
        """Note names that occur twice where others refer to them, and keys that are taken."""
        for table in _REFERRED:
            key, seen = NAMES[table], set[str]()
            for index, row in enumerate(arrays[table]):
                name = row.text(key)
                line = self.source.line((table, index, key)) if key in row.cells else 0
                if name and name in seen:
                    again = f"occurs twice; accepted: a {table} {key} of its own"
                    self.problems.append(Problem(line, f"{table} {name}", key, f'"{name}"', again))
                if table == "column" and (name in Unit.catalogue or name == "accepted"):
                    taken = "is a key of every unit; accepted: a key that is none"
                    self.problems.append(Problem(line, f"{table} {name}", key, f'"{name}"', taken))
                seen.add(name)


def _are_tables(value: Any) -> bool:
    return isinstance(value, list) and all(isinstance(one, dict) for one in value)


def nearest_key(table: str, key: str) -> str | None:
    """Return the known key of a table that `key` was most likely meant to be, or None."""
    close = get_close_matches(key, CATALOGUES[table].catalogue, n=1, cutoff=0.75)
    return close[0] if close else None
