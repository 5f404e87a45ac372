"""What edits would do to the verdicts, tried on a copy before anything is taken."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.review.reviewed import Review, UnitReview, review
from schedtui.schedule.edit import Edit, Together
from schedtui.schedule.view import view

if TYPE_CHECKING:
    from collections.abc import Iterable


@dataclass(frozen=True, slots=True)
class Turned:
    """A unit whose verdict would be another.

    Args:
        label: how messages name it.
        before: its state as it is, nothing for a unit that is not there yet.
        after: its state as it would be, nothing for one that goes.
        came: names of the checks that would come to find something.
        went: names of the checks that would no longer.
    """

    label: str
    before: str
    after: str
    came: tuple[str, ...]
    went: tuple[str, ...]


def what_if(now: Review, edits: Iterable[Edit]) -> tuple[Turned, ...]:
    """Return the units whose verdict some edits would change; nothing is changed by asking.

    Args:
        now: the review as it is.
        edits: the edits, tried in their order.
    """
    document, _ = Together(tuple(edits)).apply(now.schedule.document)
    then = review(view(document, now.schedule), now)
    row_ids = [*now.units, *(row_id for row_id in then.units if row_id not in now.units)]
    turned = (_turned(now.units.get(row_id), then.units.get(row_id)) for row_id in row_ids)
    return tuple(one for one in turned if one is not None)


def _turned(before: UnitReview | None, after: UnitReview | None) -> Turned | None:
    """Return what has changed about a unit, None where nothing has."""
    first, second = _checks(before), _checks(after)
    if before is after or (first == second and before and after and before.status == after.status):
        return None
    named = after or before
    return Turned(
        named.label if named else "",
        before.status if before else "",
        after.status if after else "",
        tuple(sorted(second - first)),
        tuple(sorted(first - second)),
    )


def _checks(reviewed: UnitReview | None) -> set[str]:
    """Return the checks that find something nobody has accepted."""
    return {one.check for one in reviewed.findings if not one.accepted} if reviewed else set()
