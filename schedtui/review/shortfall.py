"""When a capacity is short, and by how much."""

from __future__ import annotations


def is_short(scheduled: float, required: float, least_margin: float, agreement: float) -> bool:
    """Tell whether a scheduled capacity falls short of a required one.

    Args:
        scheduled: capacity as scheduled, in any unit.
        required: what it is held against, in the same unit.
        least_margin: margin that the scheduled capacity must have [% of required].
        agreement: what published formulas may part by [% of required].

    >>> is_short(399, 400, 0, 1), is_short(395, 400, 0, 1), is_short(405, 400, 5, 1)
    (False, True, True)
    """
    return scheduled < required * (1 + (least_margin - agreement) / 100)
