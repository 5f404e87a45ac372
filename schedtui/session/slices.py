"""Reviewing a long schedule in slices: the first units at once, the others while nobody waits.

A unit whose turn has not come stands without findings. Knows nothing of files or of who looks on.
"""

from __future__ import annotations

import time
from dataclasses import replace
from typing import TYPE_CHECKING

from schedtui.review.case import UnitCase
from schedtui.review.judge import judge_unit
from schedtui.review.reviewed import Review, UnitReview, review
from schedtui.review.site import site_of

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.schedule.view import Schedule


def begun(schedule: Schedule, at_once: float) -> tuple[Review, tuple[int, ...]]:
    """Review the first units of a schedule.

    Args:
        schedule: what to review.
        at_once: how many units are reviewed now.

    Returns:
        The review, and the row ids of the units whose turn is to come.
    """
    if len(schedule.units) <= at_once:
        return review(schedule), ()
    site = site_of(schedule)
    names = schedule.labels()
    units = {
        unit.row_id: UnitReview(names[unit.row_id], UnitCase(unit, schedule, site), ())
        for unit in schedule.units
    }
    order = tuple(units)
    first = int(at_once)
    for row_id in order[:first]:
        units[row_id] = _judged(units[row_id])
    return Review(schedule, site, units, (), ()), order[first:]


def continued(
    reviewed: Review,
    waiting: tuple[int, ...],
    seconds: float,
    clock: Callable[[], float] = time.perf_counter,
) -> tuple[Review, tuple[int, ...]]:
    """Review further units, one at least; with the last one, what only the whole shows.

    Args:
        reviewed: the review so far.
        waiting: row ids of the units whose turn is to come.
        seconds: how long it may take.
        clock: tells the time [s].

    Returns:
        The review, and the row ids of the units that are still to come.
    """
    end = clock() + seconds
    units = dict(reviewed.units)
    done = 0
    for row_id in waiting:
        units[row_id] = _judged(units[row_id])
        done += 1
        if clock() >= end:
            break
    further = replace(reviewed, units=units)
    rest = waiting[done:]
    return (further, rest) if rest else (review(reviewed.schedule, further), ())


def still_waiting(before: Review, now: Review, waiting: tuple[int, ...]) -> tuple[int, ...]:
    """Return which units have still to wait after an edit, which may have reviewed some anew."""
    return tuple(
        row_id
        for row_id in waiting
        if row_id in now.units and now.units[row_id].case is before.units[row_id].case
    )


def _judged(reviewed: UnitReview) -> UnitReview:
    return replace(reviewed, own=judge_unit(reviewed.case, reviewed.label))
