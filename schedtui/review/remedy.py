"""What would put a short finding right: each single scheduled number that alone clears it.

Found by solving the same evaluation: a number is moved by steps of its own last digit, towards the
safe side, until no fault of the check is left, one within the printed digits included. Whatever
turns worse by that is named. The two numbers that do it together are looked for only where no
single one does.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache
from typing import TYPE_CHECKING

from schedtui.errors import Absent
from schedtui.review.case import UnitCase
from schedtui.review.finding import Severity
from schedtui.review.judge import judge_unit, still_found
from schedtui.review.moves import DOWN, GUARDED, MOVES, PAID_BY, PAIRS, UP
from schedtui.review.registry import registered
from schedtui.schedule.catalogue.kinds import NumberKind
from schedtui.schedule.catalogue.plant import Plant
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.typed import Typed
from schedtui.units import decimals, format_number

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable

    from schedtui.review.finding import Finding
    from schedtui.review.reviewed import PlantReview, UnitReview
    from schedtui.schedule.catalogue.field import Field

_MOST_STEPS = 2_000_000  # further than any schedule's number could sensibly be moved


@dataclass(frozen=True, slots=True)
class Change:
    """One number to be scheduled instead.

    Args:
        field: the key.
        text: the number, with the digits that stood there.
        unit: its unit.
    """

    field: str
    text: str
    unit: str

    @property
    def value(self) -> float:
        """The number."""
        return float(self.text)


@dataclass(frozen=True, slots=True)
class Remedy:
    """What clears a finding.

    Args:
        changes: the numbers to be changed, mostly one.
        worsens: names of the checks that turn worse by it.
    """

    changes: tuple[Change, ...]
    worsens: tuple[str, ...]


@lru_cache(maxsize=256)  # asked again at each step of the cursor
def remedies_by_check(reviewed: UnitReview) -> dict[str, tuple[Remedy, ...]]:
    """Return what would clear each of a unit's short findings, once for each check.

    A remedy clears a check's finding at every condition.
    """
    short = {one.check: one for one in reversed(reviewed.own) if one.severity is Severity.SHORT}
    return {check: remedies(reviewed, finding) for check, finding in short.items()}


def plant_remedies(reviewed: PlantReview, finding: Finding) -> tuple[Remedy, ...]:
    """Return what would clear a short finding of a plant: its own number, large enough."""
    case, key = reviewed.case, finding.fields[0]
    cell, field = case.plant.typed(key), Plant.catalogue[key]
    if cell is None or not isinstance(cell.value, float) or field.quantity is None:
        return ()
    grid = _Grid(cell.value, decimals(cell.text) or 0, UP)
    check = registered()[finding.check].plant
    assert check is not None  # noqa: S101  it has found something in a plant

    def clears(value: float) -> bool:
        try:
            return not any(True for _ in check(case.of(case.plant.replaced({key: value}))))
        except Absent:  # no longer short of what is known, though not all is
            return True

    steps = _first_clear(grid, clears, lambda _: True)
    if steps is None:
        return ()
    unit = field.quantity.unit(case.site.system)
    return (Remedy((Change(key, grid.text(steps), unit),), ()),)


def remedies(reviewed: UnitReview, finding: Finding) -> tuple[Remedy, ...]:
    """Return what would clear a short finding; nothing where no one or two numbers do.

    Args:
        reviewed: the unit with the finding.
        finding: a finding of severity short.
    """
    solving = _Solving(reviewed, finding)
    single = [
        (change,)
        for key, way in MOVES.get(finding.check, ())
        if (change := solving.nearest(key, way, GUARDED.get(key, ()))) is not None
    ]
    return tuple(map(solving.remedy, single or solving.pairs()))


@dataclass(frozen=True, slots=True)
class _Grid:
    """The values that a number can be moved to, counted in steps of its last digit.

    Args:
        start: where it stands.
        digits: its decimals.
        way: 1 for up, -1 for down.
    """

    start: float
    digits: int
    way: int

    def text(self, steps: int) -> str:
        """Return the number after so many steps, as it would be typed."""
        return format_number(self.start + self.way * steps / 10**self.digits, self.digits)

    def value(self, steps: int) -> float:
        """Return the number after so many steps."""
        return float(self.text(steps))


def _first_clear(
    grid: _Grid, clears: Callable[[float], bool], allowed: Callable[[float], bool]
) -> int | None:
    """Return the least number of steps that clears: every check here turns one way only."""
    high = 1
    while not clears(grid.value(high)):
        if high > _MOST_STEPS:
            return None
        if not allowed(grid.value(high)):
            high = _last_allowed(grid, high, allowed)
            if high == 0 or not clears(grid.value(high)):
                return None
            break
        high *= 2
    low = 0  # the finding stands there
    while high - low > 1:
        middle = (low + high) // 2
        if clears(grid.value(middle)):
            high = middle
        else:
            low = middle
    return high


def _last_allowed(grid: _Grid, beyond: int, allowed: Callable[[float], bool]) -> int:
    low, high = 0, beyond
    while high - low > 1:
        middle = (low + high) // 2
        if allowed(grid.value(middle)):
            low = middle
        else:
            high = middle
    return low


def _allowed(unit: Unit, field: Field[object], value: float, way: int) -> bool:
    """Tell whether a number may be moved so far: within its range, outdoor air as required."""
    kind = field.kind
    assert isinstance(kind, NumberKind)  # noqa: S101  only numbers are moved
    if not (kind.ip if unit.system == "IP" else kind.si).holds(value):
        return False
    # A wet bulb above its dry bulb is no air: the search ends where the two are one.
    if field.key == "cool_lat_db" and way == DOWN:
        return value >= (unit.cool_lat_wb or value)
    if way == UP:
        return field.key != "cool_lat_wb" or value <= (unit.cool_lat_db or value)
    if field.key == "outdoor_airflow":
        return value >= (unit.outdoor_required or 0.0)
    return not (field.key == "supply_airflow" and value < (unit.outdoor_airflow or 0.0))


@dataclass(frozen=True, slots=True)
class _Solving:
    """The search for what clears one finding of a unit.

    Args:
        reviewed: the unit with the finding.
        finding: the finding.
    """

    reviewed: UnitReview
    finding: Finding

    def nearest(
        self, key: str, way: int, guards: Iterable[str], others: tuple[Change, ...] = ()
    ) -> Change | None:
        """Return the nearest value of a number that clears the finding, None where none does.

        Args:
            key: the number.
            way: whether it goes up or down.
            guards: checks that must not come to find anything by it.
            others: numbers that are changed besides.
        """
        unit, field = self.reviewed.unit, Unit.catalogue[key]
        cell = unit.typed(key)
        if cell is None or not isinstance(cell.value, float) or not self._is_to_blame(key):
            return None
        if self._is_paid_already(key, way):
            return None
        digits = decimals(cell.text)
        if digits is None:
            digits = field.quantity.digits(unit.system) if field.quantity else 0
        grid = _Grid(cell.value, digits, way)

        measure = field.quantity.unit(unit.system) if field.quantity else ""
        aims = (self.finding.check, *(guards if others else ()))

        def allowed(value: float) -> bool:
            return _allowed(unit, field, value, way)

        def tried(change: Change) -> UnitCase:
            return self._tried((*others, change))

        def clears(value: float) -> bool:
            change = Change(key, format_number(value, digits), measure)
            return allowed(value) and self._is_clear(tried(change), aims)

        steps = _first_clear(grid, clears, allowed)
        if steps is None:
            return None
        change = Change(key, grid.text(steps), measure)
        # What gives way does so the more the further a number is moved, so the nearest value that
        # clears is the one to ask: a search for both at once leaps over what lies between.
        return change if self._is_clear(tried(change), guards) else None

    def _is_to_blame(self, key: str) -> bool:
        """Tell whether a number is of the part that the finding is about: one of two motors."""
        part = next((part for part in _PARTS if self.finding.fields[0].startswith(part)), None)
        return not key.startswith(_PARTS) or (part is not None and key.startswith(part))

    def _tried(self, changes: tuple[Change, ...]) -> UnitCase:
        case, unit = self.reviewed.case, self.reviewed.unit
        cells = {one.field: Typed(one.text, one.value, one.text) for one in changes}
        row = Unit(unit.row_id, unit.system, {**unit.own, **cells}, unit.inherited)
        return UnitCase(row, case.schedule, case.site)

    def _is_clear(self, case: UnitCase, names: Iterable[str]) -> bool:
        """Tell whether the finding is gone, and nothing that was fine has given way."""
        return not any(
            still_found(name, case)
            for name in names
            if name == self.finding.check or not still_found(name, self.reviewed.case)
        )

    def _is_paid_already(self, key: str, way: int) -> bool:
        """Tell whether a room that would pay for a move is short as it is."""
        rooms = PAID_BY.get((key, way), ())
        return any(
            one.check in rooms and one.severity is Severity.SHORT for one in self.reviewed.own
        )

    def pairs(self) -> list[tuple[Change, ...]]:
        """Return the pairs of numbers that clear the finding together.

        The second of a pair clears it, the first is moved until nothing gives way any more.
        """
        ways = dict(MOVES.get(self.finding.check, ()))
        found: list[tuple[Change, ...]] = []
        for first, second in PAIRS.get(self.finding.check, ()):
            change = self.nearest(second, ways.get(second, UP), ())
            if change is None:
                continue
            room = self.nearest(first, UP, GUARDED.get(second, ()), (change,))
            if room is not None:
                found.append((room, change))
        return found

    def remedy(self, changes: tuple[Change, ...]) -> Remedy:
        """Return changes as a remedy, with what turns worse by them."""
        before = _worst(self.reviewed.own)
        bearable = {name: max(before.get(name, 0), Severity.MISSING) for name in registered()}
        after = judge_unit(self._tried(changes), self.reviewed.label, bearable)
        worse = (one.check for one in after if one.severity > bearable[one.check])
        return Remedy(changes, tuple(dict.fromkeys(worse)))


_PARTS = ("preheat_", "return_fan_", "precool_", "cool_tons")


def _worst(findings: tuple[Finding, ...]) -> dict[str, int]:
    worst: dict[str, int] = {}
    for one in findings:
        worst[one.check] = max(worst.get(one.check, 0), int(one.severity))
    return worst
