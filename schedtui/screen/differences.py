"""What the file on the disk and what is here differ in, as lines to be read side by side.

Pure. Must not know of widgets.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.text_width import cut, fill, visible, width_of

if TYPE_CHECKING:
    from schedtui.session.comparison import Comparison

_GAP = "  "
_BOTH = "!= "
_LEAST = 8
_HEADS = ("", "on the disk", "here", "as read")


def difference_lines(comparison: Comparison, width: int) -> list[str]:
    """Return a line for each difference, those that both changed marked and first.

    Args:
        comparison: what was found.
        width: cells there are.
    """
    rows = [
        ((_BOTH if one.both else "") + one.where, one.disk, one.here, one.before)
        for one in comparison.differences
    ]
    shown = [tuple(visible(text) for text in row) for row in (_HEADS, *rows)]
    widths = [max(width_of(row[place]) for row in shown) for place in range(len(_HEADS))]
    room = width - len(_GAP) * (len(_HEADS) - 1)
    while sum(widths) > room and max(widths) > _LEAST:
        widths[widths.index(max(widths))] -= 1
    return [
        _GAP.join(
            fill(cut(text, size), size) for text, size in zip(row, widths, strict=True)
        ).rstrip()
        for row in shown
    ]


def merge_words(comparison: Comparison) -> str:
    """Say whether what is on the disk and what is here can be had together."""
    both = sum(one.both for one in comparison.differences)
    if both:
        cells = "cell or row" if both == 1 else "cells or rows"
        return f"{both} {cells} changed on both sides, marked {_BOTH.strip()}"
    if comparison.edits is None:
        return "The two cannot be had together"
    if not comparison.edits:
        return "Nothing here that the disk has not"
    return "They touch different cells"
