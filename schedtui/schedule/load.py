"""From a file's text to a document: lenient, and complete in what it reports.

A value that cannot be read becomes a bad cell and a problem with its line; all problems are
gathered. Only what makes the rest meaningless stops the reading: broken TOML, a table of the wrong
shape, a foreign format, an unreadable unit system.
"""

from __future__ import annotations

from dataclasses import dataclass, field, replace
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
from schedtui.schedule.label import unit_labels
from schedtui.schedule.toml_source import BadValue, Path, Source, read_source
from schedtui.schedule.typed import Typed

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Mapping, Sequence

    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.catalogue.table import Table
    from schedtui.units import System

FORMAT = 1
SYSTEMS: tuple[System, System] = ("IP", "SI")

_NO_TOML = "is no TOML value"

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
        return _document(read_source(text))
    except ScheduleError as error:
        raise ScheduleError(error.problems, file) from None


def _document(source: Source) -> Document:
    """Read a source, or raise every problem of one that cannot be read."""
    _refuse_foreign(source)
    misshapen = dict(_misshapen(source))
    project = source.values.get("project")
    if project is None:
        missing = "is missing; accepted: [project] with title and units"
        misshapen["project"] = Problem(1, "project", "", "", missing)
    units = project.get("units") if isinstance(project, dict) else None
    if units in ("IP", "SI") and not misshapen:
        return _Reading(source, cast("System", units)).document()
    ip, si = (_Reading(source, system, frozenset(misshapen)).document() for system in SYSTEMS)
    found = list(ip.problems) if units == "IP" else list(si.problems)
    if units not in ("IP", "SI"):
        found = list(_in_both(ip.problems, si.problems))
    raise ScheduleError(_by_line([*misshapen.values(), *found]))


def _refuse_foreign(source: Source) -> None:
    """Raise for a format whose keys may mean something else."""
    found = source.values.get("format", FORMAT)
    if isinstance(found, bool) or found != FORMAT:
        raw = _raw(source, ("format",))
        accepted = f"is not a format that this program reads; accepted: {FORMAT}"
        raise ScheduleError([Problem(source.line(("format",)), "", "format", raw, accepted)])


def _misshapen(source: Source) -> Iterator[tuple[str, Problem]]:
    """Yield the tables that are not of the shape they must have, each with its problem."""
    for name in (*SINGLE, *ARRAYS):
        value = source.values.get(name, {} if name in SINGLE else [])
        if name in SINGLE and not isinstance(value, dict):
            accepted = f"is no table; accepted: [{name}]"
            yield name, Problem(source.line((name,)), "", name, "", accepted)
        if name in ARRAYS and not _are_tables(value):
            accepted = f"is no array of tables; accepted: [[{name}]]"
            yield name, Problem(source.line((name,)), "", name, "", accepted)


def _in_both(ip: Sequence[Problem], si: Sequence[Problem]) -> Iterator[Problem]:
    """Yield what is wrong whatever the unit system, for a file that does not tell its own."""
    others = {(one.line, one.subject, one.key): one for one in si}
    for one in ip:
        other = others.get((one.line, one.subject, one.key))
        if other is not None:
            same = one.accepted == other.accepted
            metric = "" if same else f" in IP, {other.accepted.partition('accepted: ')[2]} in SI"
            yield replace(one, accepted=one.accepted + metric)


def _by_line(problems: Iterable[Problem]) -> list[Problem]:
    return sorted(problems, key=lambda problem: problem.line)


def _raw(source: Source, path: Path) -> str:
    """Return a value's characters; none for a table, whose text is not in one place."""
    try:
        return source.raw(path)
    except KeyError:
        return ""


@dataclass(slots=True)
class _Reading:
    """One reading of a source: gathers rows, and problems on the way."""

    source: Source
    system: System
    skipped: frozenset[str] = frozenset()
    problems: list[Problem] = field(default_factory=list)
    noted: set[Path] = field(default_factory=set)
    next_id: int = 1

    def document(self) -> Document:
        """Read every table."""
        values = {k: v for k, v in self.source.values.items() if k not in self.skipped}
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
        self._note_bad_elsewhere()
        unknown = tuple(key for key in values if key not in (*SINGLE, *ARRAYS, "format"))
        problems = tuple(_by_line(self.problems))
        return Document(self.source, self.system, single, arrays, self.next_id, problems, unknown)

    def _array(self, name: str, rows: list[dict[str, Any]], own_keys: list[str]) -> Iterator[Row]:
        for index, (values, subject) in enumerate(zip(rows, _subjects(name, rows), strict=True)):
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
            known = catalogue.get(key)
            cell = self._cell(known, (*path, key), value, key in (own_keys or ()))
            cells[key] = cell
            if cell.problem is not None:
                number = known is not None and known.quantity is not None
                shown = _shown(value, cell.toml, number=number)
                self._note_bad((*path, key), subject, shown, cell.problem)
        if table != "defaults":
            self._note_missing(catalogue, cells, path, subject)
        origin = Origin(self.source, index, dict(cells), len(accepted))
        return Row(row_id, cells, origin, accepted)

    def _cell(self, known: Field[object] | None, path: Path, value: Any, own: bool) -> Typed:
        """Read one value; what no catalogue knows is kept as the characters it stands in."""
        raw = _raw(self.source, path)
        if known is not None:
            return known.kind.read(value, raw, self.system)
        if own:
            return FreeKind().read(value, raw, self.system)
        if isinstance(value, BadValue):
            return Typed(raw, None, raw, _NO_TOML)
        if path[0] == "unit" and path[-1] == "accepted":
            return Typed(raw, None, raw, "is no array of tables; accepted: [[unit.accepted]]")
        return Typed(value if isinstance(value, str) else raw, None, raw)

    def _note_bad(self, path: Path, subject: str, shown: str, problem: str) -> None:
        self.noted.add(path)
        line = self.source.line(path)
        self.problems.append(Problem(line, subject, str(path[-1]), shown, problem))

    def _note_bad_elsewhere(self) -> None:
        """Note what is no TOML in tables that nothing here reads."""
        for path, place in self.source.paths().items():
            if place.value is None or not place.value.bad:
                continue
            if not any(path[:size] in self.noted for size in range(1, len(path) + 1)):
                self.noted.add(path)
                key = ".".join(str(part) for part in path if isinstance(part, str))
                shown = _raw(self.source, path) or "nothing"
                self.problems.append(Problem(self.source.line(path), "", key, shown, _NO_TOML))

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


def _subjects(name: str, rows: list[dict[str, Any]]) -> Iterator[str]:
    """Say what messages call each row of an array: "AHU-1", "condition summer peak", "plant 2"."""
    labels = [row.get(NAMES[name]) for row in rows]
    plain = [one if isinstance(one, str) and one.strip() else None for one in labels]
    if name == "unit":
        return unit_labels(plain)
    return (f"{name} {one or place}" for place, one in enumerate(plain, start=1))


def _shown(value: Any, toml: str, *, number: bool) -> str:
    """Return a value as messages show it; where a number should be, other text is in quotes."""
    if isinstance(value, BadValue) and number and toml:
        return f'"{toml}"'
    return toml or ("nothing" if isinstance(value, BadValue) else "a table")


def _are_tables(value: Any) -> bool:
    return isinstance(value, list) and all(isinstance(one, dict) for one in value)


def nearest_key(table: str, key: str) -> str | None:
    """Return the known key of a table that `key` was most likely meant to be, or None."""
    close = get_close_matches(key, CATALOGUES[table].catalogue, n=1, cutoff=0.75)
    return close[0] if close else None
