"""What a column of a sheet is taken for, and how sure that is."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from schedtui.sheets.table import SheetColumn

# How sure: its own heading says so; something else had to; a person said so; it is no key's.
CERTAIN, LIKELY, ASKED, NONE = "certain", "likely", "as told", "no key"


@dataclass(frozen=True, slots=True)
class Placement:
    """What a column is taken for.

    Args:
        column: the column.
        keys: its keys in the order of the values in its cells; none where it is no key's.
        units: the unit that each key's values are in, None for the project's own.
        sure: how sure that is.
        why: what settled it, or why it is no key's.
        rivals: keys that it may be as well.
    """

    column: SheetColumn
    keys: tuple[str, ...] = ()
    units: tuple[str | None, ...] = ()
    sure: str = NONE
    why: str = ""
    rivals: tuple[str, ...] = ()
