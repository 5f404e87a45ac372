"""How wide a text stands in a terminal, and how it is made to fill exactly so many cells.

Whatever comes from a file may hold control characters, combining marks and wide characters;
here it is made harmless and measured. Must not know of tables, colours or widgets.
"""

from __future__ import annotations

import unicodedata
from functools import lru_cache
from typing import Literal

from rich.cells import get_character_cell_size

ELLIPSIS = "…"
_UNSEEN = "¤"
_BASE_FOR_A_LONE_MARK = "◌"
_DELETE = 0x7F


@lru_cache(maxsize=4096)
def _visible(character: str) -> str:
    code = ord(character)
    if code < ord(" "):
        return chr(0x2400 + code)
    if code == _DELETE:
        return "␡"
    category = unicodedata.category(character)
    if 0xFE00 <= code <= 0xFE0F or 0xE0100 <= code <= 0xE01EF:  # noqa: PLR2004 - ranges of Unicode
        return ""  # a variation selector: terminals disagree on the width it asks for
    # Controls, surrogates, and what has no agreed width: private and unassigned characters.
    return _UNSEEN if category[0] == "C" or category in {"Zl", "Zp"} else character


def visible(text: str) -> str:
    r"""Return the text with every character that would act on a terminal shown as a sign.

    >>> visible("AHU\x1b[31m\t1")
    'AHU␛[31m␉1'
    """
    if text.isascii() and text.isprintable():
        return text
    shown = "".join(map(_visible, text))
    if shown and _cells_of(shown[0]) == 0:
        return _BASE_FOR_A_LONE_MARK + shown
    return shown


@lru_cache(maxsize=4096)
def _cells_of(character: str) -> int:
    return get_character_cell_size(character)


def width_of(text: str) -> int:
    """Return how many cells a visible text takes.

    >>> width_of("冷水 5°C"), width_of("e\u0301")
    (8, 1)
    """
    if text.isascii():
        return len(text)
    # Character by character, as terminals advance; a whole-text measure may join an emoji pair.
    return sum(map(_cells_of, text))


def head(text: str, width: int) -> str:
    """Return as much of the text's beginning as stands in so many cells."""
    if text.isascii():
        return text[:width]
    taken = 0
    for position, character in enumerate(text):
        taken += _cells_of(character)
        if taken > width:
            return text[:position]
    return text


def cut(text: str, width: int) -> str:
    """Return the text, or its head and a sign that it goes on, in at most so many cells.

    >>> cut("supply airflow", 8)
    'supply …'
    """
    if width_of(text) <= width:
        return text
    return head(text, width - 1) + ELLIPSIS if width > 0 else ""


def fill(text: str, width: int, align: Literal["left", "right"] = "left") -> str:
    """Return the visible text cut or padded to exactly so many cells.

    >>> fill("9440", 6, "right"), fill("冷水機", 4)
    ('  9440', '冷 …')
    """
    shown = visible(text)
    if width_of(shown) > width:
        # A wide character may leave one cell over; the sign stays at the column's edge.
        kept = head(shown, width - 1)
        return kept + " " * (width - 1 - width_of(kept)) + ELLIPSIS if width > 0 else ""
    blanks = " " * (width - width_of(shown))
    return blanks + shown if align == "right" else shown + blanks
