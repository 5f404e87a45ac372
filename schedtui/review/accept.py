"""Acceptances: which findings a reviewer has accepted, and whether what they accepted still stands.

An acceptance holds for the inputs that its finding was found in. They are noted by watching which
cells the check reads, and kept as a digest: when one of them changes, the acceptance lapses.
"""

from __future__ import annotations

import hashlib
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field, replace
from typing import TYPE_CHECKING, TypeVar

from schedtui.errors import Absent, StateError
from schedtui.review.case import ConditionCase, ScheduleCase, UnitCase
from schedtui.review.finding import Finding, Severity, Subject
from schedtui.review.heating import Heating
from schedtui.review.part_load import cooling_at
from schedtui.review.plants import PlantCase
from schedtui.review.registry import registered
from schedtui.review.site import Site, site_of
from schedtui.schedule.catalogue.accepted import Accepted
from schedtui.schedule.view import Schedule

if TYPE_CHECKING:
    from collections.abc import Callable, Collection, Iterable, Sequence

    from schedtui.air.state import Air
    from schedtui.review.check import Check, Faults
    from schedtui.schedule.catalogue.table import Table
    from schedtui.schedule.document import Row
    from schedtui.schedule.typed import Typed

LAPSED = "acceptance-lapsed"

R = TypeVar("R", bound="Table")

Key = tuple[str, str | None, tuple[str, ...]]
"""What an acceptance is of: check, condition, fields."""


class _Watched(Mapping[str, "Typed"]):
    """Cells that note which of them are looked at.

    Args:
        cells: the cells.
        path: where they stand: "unit", "condition[summer peak]".
        notes: gathers "path.key" with the text that stands there, nothing for an absent cell.
    """

    def __init__(self, cells: Mapping[str, Typed], path: str, notes: dict[str, str]) -> None:
        self._cells = cells
        self._path = path
        self._notes = notes

    def _note(self, key: str) -> None:
        cell = self._cells.get(key)
        self._notes[f"{self._path}.{key}"] = cell.text if cell else ""

    def __getitem__(self, key: str) -> Typed:
        self._note(key)
        return self._cells[key]

    def get(self, key: str, default: Typed | None = None) -> Typed | None:  # type: ignore[override]
        """Return a cell, noting it."""
        self._note(key)
        return self._cells.get(key, default)

    def __iter__(self) -> Iterator[str]:
        for key in self._cells:
            self._note(key)
            yield key

    def __len__(self) -> int:
        return len(self._cells)


@dataclass(slots=True)
class _Watch:
    """A schedule whose cells note that they are looked at, and what was noted."""

    schedule: Schedule
    notes: dict[str, str] = field(default_factory=dict)

    def row(self, row: R, path: str) -> R:
        """Return a row that is watched."""
        own = _Watched(row.own, path, self.notes)
        inherited = _Watched(row.inherited, "defaults", self.notes)
        return type(row)(row.row_id, row.system, own, inherited)

    def watched(self, unit_id: int | None) -> Schedule:
        """Return the schedule watched; the unit a finding is about goes without its name.

        Args:
            unit_id: row id of that unit, if it is one.
        """
        plain, labels = self.schedule, self.schedule.labels()
        return Schedule(
            document=plain.document,
            project=self.row(plain.project, "project"),
            limits=self.row(plain.limits, "limits"),
            columns=plain.columns,
            conditions=tuple(self.row(one, f"condition[{one.name}]") for one in plain.conditions),
            plants=tuple(self.row(one, f"plant[{one.name}]") for one in plain.plants),
            units=tuple(
                self.row(one, "unit" if one.row_id == unit_id else f"unit[{labels[one.row_id]}]")
                for one in plain.units
            ),
        )

    def digest(self) -> str:
        """Return the digest of what was noted."""
        lines = sorted(f"{path}={text}" for path, text in self.notes.items())
        return hashlib.sha256("\n".join(lines).encode()).hexdigest()


class _WatchedSite(Site):
    """A site that looks at its project only when it is asked for what stands there.

    Args:
        schedule: the schedule, watched.
    """

    __slots__ = ("_schedule",)
    _schedule: Schedule

    def __init__(self, schedule: Schedule) -> None:
        object.__setattr__(self, "_schedule", schedule)
        object.__setattr__(self, "system", schedule.system)
        object.__setattr__(self, "limits", schedule.limits)

    @property
    def air(self) -> Air:
        """The air at the site."""
        return site_of(self._schedule).air

    @property
    def airflow_basis(self) -> str:
        """What airflows mean unless a unit says otherwise."""
        return self._schedule.project.airflow_basis


def basis(finding: Finding, schedule: Schedule) -> str:
    """Return the digest of every input that a finding is found in.

    Args:
        finding: the finding.
        schedule: the schedule that it was found in.
    """
    watch = _Watch(schedule)
    subject = finding.subject
    watched = watch.watched(subject.row_id if subject.table == "unit" else None)
    check = registered()[finding.check]
    if check.reads_digits:  # what the judge reads besides
        _ = watched.limits.rounding, watched.limits.rounding_cap
    at = next((one.row_id for one in schedule.conditions if one.name == finding.condition), None)
    for ask in _asks(check, finding, watched, at):
        try:
            for _ in ask():
                pass
        except (Absent, StateError):
            continue  # what could not be had was looked for, and is noted
    return watch.digest()


def _asks(
    check: Check, finding: Finding, schedule: Schedule, at: int | None
) -> Iterator[Callable[[], Faults]]:
    """Return the ways a check comes to a finding, over a watched schedule."""
    site, subject = _WatchedSite(schedule), finding.subject
    if subject.table == "unit":
        yield from _asks_of_unit(check, finding, schedule, site, at)
    elif subject.table == "plant" and (in_plant := check.plant) is not None:
        labels = schedule.labels()
        units = [(labels[one.row_id], UnitCase(one, schedule, site)) for one in schedule.units]
        plant = next(one for one in schedule.plants if one.row_id == subject.row_id)
        yield lambda: in_plant(PlantCase(plant, schedule, site, units))
    elif subject.table == "condition" and (in_condition := check.condition) is not None:
        condition = next(one for one in schedule.conditions if one.row_id == subject.row_id)
        yield lambda: in_condition(ConditionCase(condition, site))
    if (in_schedule := check.schedule) is not None:
        yield lambda: in_schedule(ScheduleCase(schedule, site))


def _asks_of_unit(
    check: Check, finding: Finding, schedule: Schedule, site: Site, at: int | None
) -> Iterator[Callable[[], Faults]]:
    unit = next(one for one in schedule.units if one.row_id == finding.subject.row_id)
    case = UnitCase(unit, schedule, site)
    plain = next((one for one in schedule.conditions if one.row_id == at), None)
    if plain is None and finding.condition:  # a unit of room air, in a file without conditions
        plain = next(iter(case.conditions), None)
    if (in_unit := check.unit) is not None:
        yield lambda: in_unit(case)
    if (at_cooling := check.cooling) is not None and plain is not None:
        yield lambda: at_cooling(cooling_at(unit, plain, site))
    if (at_heating := check.heating) is not None and plain is not None:
        yield lambda: at_heating(Heating(unit, plain, site))
    if (at_rated := check.rated) is not None:
        yield lambda: at_rated(case.rated)
    if (at_governing := check.governing) is not None:
        yield lambda: at_governing(case.governing)


def key_of(finding: Finding) -> Key:
    """Return what an acceptance of a finding would be of."""
    return finding.check, finding.condition, finding.fields


def of_whom(finding: Finding) -> str:
    """Return what an acceptance of a finding that is of no unit says it is of."""
    named = finding.subject.table in ("condition", "plant", "column")
    return finding.subject.label if named else "project"


def marked(findings: Sequence[Finding], accepted: Collection[Key]) -> tuple[Finding, ...]:
    """Return findings with the accepted ones marked."""
    if not accepted:
        return tuple(findings)
    return tuple(
        replace(one, accepted=True) if key_of(one) in accepted else one for one in findings
    )


def marked_of(
    findings: Iterable[Finding], accepted: Collection[tuple[str, Key]]
) -> tuple[Finding, ...]:
    """Return findings of no unit with those marked that are accepted of what they are about."""
    return tuple(
        replace(one, accepted=True) if (of_whom(one), key_of(one)) in accepted else one
        for one in findings
    )


def held(
    acceptances: Sequence[Row], findings: Iterable[Finding], schedule: Schedule, subject: Subject
) -> tuple[frozenset[Key], tuple[Finding, ...]]:
    """Hold acceptances against the findings that there are.

    Args:
        acceptances: rows of `[[unit.accepted]]` or `[[accepted]]`.
        findings: those of the same subject.
        schedule: the schedule that they were found in.
        subject: what they are about.

    Returns:
        What is accepted, and a finding for each acceptance that has lapsed.
    """
    found = list(findings)
    accepted: set[Key] = set()
    lapsed: list[Finding] = []
    for row in acceptances:
        acceptance = Accepted(row.row_id, schedule.system, row.cells)
        matching = [one for one in found if is_of(acceptance, one)]
        standing = [one for one in matching if basis(one, schedule) == acceptance.basis]
        accepted |= {key_of(one) for one in standing}
        if not standing:
            lapsed.append(_lapsed(acceptance, subject, still_there=bool(matching)))
    return frozenset(accepted), tuple(lapsed)


def is_of(acceptance: Accepted, finding: Finding) -> bool:
    """Tell whether an acceptance is of a finding: check and condition, and fields where given."""
    if acceptance.check != finding.check or acceptance.condition != finding.condition:
        return False
    return acceptance.fields is None or acceptance.fields in (finding.fields, finding.paths)


def _lapsed(acceptance: Accepted, subject: Subject, *, still_there: bool) -> Finding:
    what = acceptance.check or "no check"
    if acceptance.condition:
        what += f" at {acceptance.condition}"
    why = "what it was found in has changed" if still_there else "there is no such finding any more"
    return Finding(
        check=LAPSED,
        severity=Severity.CAUTION,
        subject=subject,
        fields=("accepted",),
        message=f"the acceptance of {what} has lapsed: {why}",
        condition=acceptance.condition,
    )
