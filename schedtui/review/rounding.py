"""Whether the digits that a schedule prints can explain a fault.

A number printed with d decimals stands for half a step either side. A fault stands only if it is
still one at the most favourable corner of those intervals. Which numbers a check reads is found by
watching it, so that no check knows of this.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Collection, Iterable, Mapping, Sequence
from dataclasses import dataclass

from schedtui.errors import Absent, StateError
from schedtui.review.finding import Fault
from schedtui.schedule.catalogue.kinds import NumberKind
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD, TEMPERATURE, System, step

FindIn = Callable[[Unit], Iterable[Fault]]

# The wet-bulb formula changes from water to ice on the wick at freezing, where the humidity ratio
# drops by a tenth: an interval across it has its best place on either side.
_FREEZING: dict[System, float] = {"IP": 32.0, "SI": 0.0}
_BESIDE = 1e-6
_COIL_TEMPERATURES = ("cool_eat_db", "cool_eat_wb", "cool_lat_db", "cool_lat_wb")
_ENOUGH = 3  # coil temperatures that must be there to tell half degrees by
_TENTH, _HALF = 0.1, 0.5
_HALVINGS = 30  # at most, and only as many as it takes to be
_NEAR = 0.002  # as near as this share: what is told of it has three digits at most
_ENDS = 2


@dataclass(frozen=True, slots=True)
class Explained:
    """How the printed digits explain a fault.

    Args:
        key: the field whose next digit would do most to settle it.
        band: how far the digits let the comparison move, in the fault's unit.
    """

    key: str
    band: float


def explained_by_digits(
    unit: Unit, fault: Fault, find: FindIn, cap: float, derived: Collection[str] = ()
) -> Explained | None:
    """Return how rounding alone can explain a fault, None where the fault stands.

    Args:
        unit: the unit as scheduled.
        fault: the fault, found in it.
        find: the check that found it, over any reading of the unit.
        cap: the widest band of a scheduled capacity [% of what is required].
        derived: givens whose digits count besides those of what is always derived and printed.
    """
    if fault.scheduled is None or fault.required is None:
        return None
    reads: set[str] = set()
    start = _distance(unit.traced(reads), fault, find)
    if start == 0:
        return None  # found in something else than the unit's own numbers
    printed = [key for key in reads if Unit.catalogue[key].printed or key in derived]
    corner, best = _favourable_corner(unit, fault, find, printed, start)
    if not corner or _distance(unit.replaced(corner), fault, find) > 0:
        return None
    share, moved = _share_needed(unit, fault, find, corner, start)
    if _is_capacity(unit, fault) and moved > cap / 100 * abs(fault.required):
        return None
    return Explained(best, moved / share)


def _is_capacity(unit: Unit, fault: Fault) -> bool:
    """Tell whether a fault is about a capacity as scheduled that air or room require."""
    cell = unit.typed(fault.fields[0])
    stated = cell is not None and cell.value == fault.scheduled
    return stated and fault.quantity is LOAD and len(fault.fields) == 1


def _favourable_corner(
    unit: Unit, fault: Fault, find: FindIn, printed: Iterable[str], start: float
) -> tuple[Mapping[str, float], str]:
    """Return for each printed number that matters its most favourable value; name the first.

    Each number is tried by itself: every check here moves one way with each of its numbers, so
    that what gains at one end of an interval cannot at the other, unless freezing lies between.
    What is gained is counted from `start`, the distance in the unit as scheduled.
    """
    corner: dict[str, float] = {}
    gains: dict[str, float] = {}
    for key in sorted(printed):
        tried = _interval(unit, key)
        for value in tried:
            gain = start - _distance(unit.replaced({key: value}), fault, find)
            if gain > gains.get(key, 0.0):
                corner[key], gains[key] = value, gain
                if len(tried) <= _ENDS:
                    break
    return corner, max(gains, key=lambda key: gains[key], default="")


def _interval(unit: Unit, key: str) -> Sequence[float]:
    """Return the ends of what a printed number may stand for, and both sides of freezing."""
    field, cell = Unit.catalogue[key], unit.typed(key)
    if cell is None or not isinstance(cell.value, float):
        return ()
    size = _step(unit, key, cell.text)
    if size is None:
        return ()
    low, high = cell.value - size / 2, cell.value + size / 2
    ends = [high, low]  # too little is scheduled more often than too much
    freezing = _FREEZING[unit.system]
    if field.quantity is TEMPERATURE and low < freezing < high:
        ends += [freezing - _BESIDE, freezing + _BESIDE]
    kind = field.kind
    assert isinstance(kind, NumberKind)  # noqa: S101  what is printed is a number
    accepted = kind.ip if unit.system == "IP" else kind.si
    return [end for end in ends if accepted.holds(end)]


def _step(unit: Unit, key: str, text: str) -> float | None:
    """Return the step that a number is printed with.

    Some sheets print half degrees. A row all of whose coil temperatures end in .0 or .5, and one
    at least in .5, is read as such: by chance that is one row in several hundred.
    """
    size = step(text)
    if key not in _COIL_TEMPERATURES or size != _TENTH:
        return size
    texts = [cell.text for one in _COIL_TEMPERATURES if (cell := unit.typed(one)) is not None]
    endings = {text[-2:] for text in texts}
    halves = len(texts) >= _ENOUGH and ".5" in endings and endings <= {".0", ".5"}
    return _HALF if halves else size


def _distance(unit: Unit, fault: Fault, find: FindIn) -> float:
    """Return how far apart the fault's two numbers stand in a reading of the unit; 0 where fine."""
    again = _same_fault(unit, fault, find)
    if again is None:
        return 0.0
    if again.scheduled is None or again.required is None:
        return math.inf
    return abs(again.scheduled - again.required) or math.ulp(1.0)


def _same_fault(unit: Unit, fault: Fault, find: FindIn) -> Fault | None:
    try:
        for again in find(unit):
            if again.fields == fault.fields:
                return again
    except (Absent, StateError):  # not to be judged there, so nothing is explained there
        return Fault("", fault.fields)
    return None


def _share_needed(
    unit: Unit, fault: Fault, find: FindIn, corner: Mapping[str, float], start: float
) -> tuple[float, float]:
    """Return the share of the way to a corner that the fault still stands at, and what moved there.

    Returns:
        The share, above 0 and at most 1, and the movement from `start` in the fault's unit.
    """
    base = {key: _number(unit, key) for key in corner}
    last = start
    low, high = 0.0, 1.0
    for _ in range(_HALVINGS):
        middle = (low + high) / 2
        values = {key: base[key] + middle * (corner[key] - base[key]) for key in corner}
        distance = _distance(unit.replaced(values), fault, find)
        if distance > 0:
            low, last = middle, distance
        else:
            high = middle
        if high - low <= _NEAR * high:
            break
    return low or high, start - last


def _number(unit: Unit, key: str) -> float:
    cell = unit.typed(key)
    assert cell is not None  # noqa: S101  it has an interval, so it has a number
    assert isinstance(cell.value, float)  # noqa: S101
    return cell.value
