"""A schedule reviewed: every unit with its findings, those of no unit, and the sums.

After an edit only what it touches is reviewed again: a unit's row makes that unit and the sums
new, anything else makes every unit new.
"""

from __future__ import annotations

from collections import Counter
from dataclasses import dataclass, field, replace
from typing import TYPE_CHECKING

from schedtui.review.accept import Key, held, marked, marked_of, of_whom
from schedtui.review.case import ConditionCase, ScheduleCase, UnitCase
from schedtui.review.figure import known
from schedtui.review.finding import Finding, Severity, Subject, in_order
from schedtui.review.judge import judge_condition, judge_plant, judge_schedule, judge_unit
from schedtui.review.plants import PlantCase
from schedtui.review.site import Site, site_of

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.schedule.catalogue.unit import Unit
    from schedtui.schedule.document import Row
    from schedtui.schedule.view import Schedule

UNREADABLE = "unreadable"
CLEAR = "clear"


@dataclass(frozen=True, slots=True)
class UnitReview:
    """One unit, reviewed.

    Args:
        label: how messages name it.
        case: the unit with its evaluations.
        own: findings of the unit by itself, in the order they are read.
        shared: findings that only the whole schedule shows, a duplicate tag for one.
        accepted: what of them a reviewer has accepted.
        findings: both, in the order they are read, the accepted ones marked.
        worst: the worst severity among findings that nobody has accepted.
        status: the unit's state in one word.
    """

    label: str
    case: UnitCase
    own: tuple[Finding, ...]
    shared: tuple[Finding, ...] = ()
    accepted: frozenset[Key] = frozenset()
    findings: tuple[Finding, ...] = field(init=False)
    worst: Severity | None = field(init=False)
    status: str = field(init=False)

    def __post_init__(self) -> None:
        """Settle what follows, once: every key on the screen asks for it."""
        findings = in_order((*self.own, *self.shared)) if self.shared else self.own
        findings = marked(findings, self.accepted)
        worst = max((one.severity for one in findings if not one.accepted), default=None)
        status = CLEAR if worst is None else worst.word
        if any(self.unit.bad_keys()):
            status = UNREADABLE
        for name, value in (("findings", findings), ("worst", worst), ("status", status)):
            object.__setattr__(self, name, value)

    @property
    def unit(self) -> Unit:
        """The unit as scheduled."""
        return self.case.unit


@dataclass(frozen=True, slots=True)
class PlantReview:
    """One plant, reviewed.

    Args:
        case: the plant with what it feeds.
        findings: findings of the plant, worst first.
    """

    case: PlantCase
    findings: tuple[Finding, ...]


@dataclass(frozen=True, slots=True)
class Totals:
    """Sums over the units, each times its quantity less what stands by.

    Args:
        tons: required tons, each unit at its own governing condition.
        supply_airflow: [cfm | L/s] as typed.
        outdoor_airflow: [cfm | L/s] as typed.
    """

    tons: float
    supply_airflow: float
    outdoor_airflow: float


@dataclass(frozen=True, slots=True)
class Review:
    """A schedule, reviewed.

    Args:
        schedule: what was reviewed.
        site: where its units stand.
        units: the units' reviews by row id, in file order.
        plants: the plants' reviews, in file order.
        findings: those that belong to no unit and no plant, worst first.
    """

    schedule: Schedule
    site: Site
    units: Mapping[int, UnitReview]
    plants: tuple[PlantReview, ...]
    findings: tuple[Finding, ...]

    @property
    def all_findings(self) -> tuple[Finding, ...]:
        """Every finding there is."""
        return (
            *(one for unit in self.units.values() for one in unit.findings),
            *(one for plant in self.plants for one in plant.findings),
            *self.findings,
        )

    def counts(self) -> dict[str, int]:
        """Count findings by severity, clear units, accepted findings and rounding ones."""
        found = self.all_findings
        by_severity = Counter(one.severity for one in found if not one.accepted)
        return {
            "short": by_severity[Severity.SHORT],
            "conflict": by_severity[Severity.CONFLICT],
            "caution": by_severity[Severity.CAUTION],
            "missing": by_severity[Severity.MISSING],
            "clear": sum(unit.status == CLEAR for unit in self.units.values()),
            "accepted": sum(one.accepted for one in found),
            "rounding": sum(_is_rounding_caution(one) for one in found),
        }

    def totals(self) -> Totals:
        """Return the project's sums."""
        tons = supply = outdoor = 0.0
        for reviewed in self.units.values():
            unit = reviewed.unit
            number = max(unit.quantity - unit.standby, 0)
            tons += number * (known(getattr, reviewed.case, "required_tons") or 0.0)
            supply += number * (unit.supply_airflow or 0.0)
            outdoor += number * (unit.outdoor_airflow or 0.0)
        return Totals(tons, supply, outdoor)


def review(schedule: Schedule, previous: Review | None = None) -> Review:
    """Review a schedule.

    Args:
        schedule: what to review.
        previous: an earlier review of the same document, whose units serve again where nothing
            that they depend on has changed.
    """
    site = site_of(schedule)
    kept = previous.units if previous and _same_ground(previous, schedule, site) else {}
    names = schedule.labels()
    own = {
        unit.row_id: _review_unit(unit, schedule, site, names[unit.row_id], kept)
        for unit in schedule.units
    }
    whole = judge_schedule(ScheduleCase(schedule, site), names)
    for finding in whole:
        if finding.subject.table == "unit":
            row_id = finding.subject.row_id
            own[row_id] = replace(own[row_id], shared=(*own[row_id].shared, finding))
    rest = [one for one in whole if one.subject.table != "unit"]
    for condition in schedule.conditions:
        rest += judge_condition(ConditionCase(condition, site))
    for row in schedule.document.rows("unit"):
        if row.accepted:
            own[row.row_id] = _with_acceptances(own[row.row_id], row.accepted, schedule)
    return _with_loose_acceptances(
        Review(schedule, site, own, review_plants(schedule, site, own), in_order(rest))
    )


def _with_acceptances(
    reviewed: UnitReview, rows: tuple[Row, ...], schedule: Schedule
) -> UnitReview:
    """Return a unit's review with its acceptances held against its findings."""
    subject = Subject("unit", reviewed.unit.row_id, reviewed.label)
    accepted, lapsed = held(rows, reviewed.findings, schedule, subject)
    return replace(reviewed, shared=(*reviewed.shared, *lapsed), accepted=accepted)


def _with_loose_acceptances(reviewed: Review) -> Review:
    """Return a review with the acceptances that are of no unit held against its findings."""
    rows = reviewed.schedule.document.rows("accepted")
    if not rows:
        return reviewed
    plants, findings = list(reviewed.plants), list(reviewed.findings)
    loose = [*findings, *(one for plant in plants for one in plant.findings)]
    accepted: set[tuple[str, Key]] = set()
    for of in dict.fromkeys(row.text("of") for row in rows):
        of_this = [row for row in rows if row.text("of") == of]
        about = [one for one in loose if of_whom(one) == of]
        subject = about[0].subject if about else Subject("project", 0, of or "project")
        keys, lapsed = held(of_this, about, reviewed.schedule, subject)
        accepted |= {(of, key) for key in keys}
        findings += lapsed
    plants = [replace(one, findings=marked_of(one.findings, accepted)) for one in reviewed.plants]
    return replace(reviewed, plants=tuple(plants), findings=in_order(marked_of(findings, accepted)))


def review_plants(
    schedule: Schedule, site: Site, units: Mapping[int, UnitReview]
) -> tuple[PlantReview, ...]:
    """Review every plant over the units' evaluations."""
    cases = [(one.label, one.case) for one in units.values()]
    plants = [PlantCase(plant, schedule, site, cases) for plant in schedule.plants]
    return tuple(PlantReview(case, judge_plant(case)) for case in plants)


def _is_rounding_caution(finding: Finding) -> bool:
    """Tell whether a shortfall or conflict was made a caution by the printed digits."""
    return finding.rounding and not finding.accepted and finding.severity is Severity.CAUTION


def _same_ground(previous: Review, schedule: Schedule, site: Site) -> bool:
    """Tell whether everything that all units depend on is as it was."""
    before, now = previous.schedule.document, schedule.document
    return (
        previous.site.air == site.air
        and before.system == now.system
        and all(
            before.single.get(name) == now.single.get(name)
            for name in ("project", "limits", "defaults")
        )
        and all(before.rows(name) == now.rows(name) for name in ("column", "condition", "plant"))
    )


def _review_unit(
    unit: Unit, schedule: Schedule, site: Site, label: str, kept: Mapping[int, UnitReview]
) -> UnitReview:
    before = kept.get(unit.row_id)
    if before is not None and before.unit is unit and before.label == label:
        fresh = not before.shared and not before.accepted
        return before if fresh else replace(before, shared=(), accepted=frozenset())
    case = UnitCase(unit, schedule, site)
    return UnitReview(label, case, judge_unit(case, label))
