"""How messages name a unit: by its tag, by its place where it has none.

Knows nothing of rows or of what is said about them.
"""

from __future__ import annotations

from collections import Counter
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

_TEENS = range(11, 14)


def unit_labels(tags: Iterable[str | None]) -> Iterator[str]:
    """Name each unit by its tag: with a number when it is used again, by its place without one.

    Args:
        tags: the tags in file order; None, or a blank one, for a unit that has none.

    >>> list(unit_labels(["AHU-1", "AHU-2", None, "AHU-1"]))
    ['AHU-1', 'AHU-2', 'unit 3', 'AHU-1 (2nd)']
    """
    used: Counter[str] = Counter()
    for place, tag in enumerate(tags, start=1):
        if tag is None or not tag.strip():
            yield f"unit {place}"
            continue
        used[tag] += 1
        yield tag if used[tag] == 1 else f"{tag} ({_ordinal(used[tag])})"


def _ordinal(number: int) -> str:
    """Return 2nd, 3rd, 4th, …, 11th, …, 22nd."""
    ending = {1: "st", 2: "nd", 3: "rd"}.get(number % 10, "th")
    return f"{number}{'th' if number % 100 in _TEENS else ending}"
