"""The checks there are: one module each in `review.checks`, found by looking.

A check is named after the fault it finds: its module's name with hyphens.
"""

from __future__ import annotations

from functools import cache
from typing import TYPE_CHECKING

from schedtui import discover
from schedtui.review import checks

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.review.check import Check


@cache
def registered() -> Mapping[str, Check]:
    """Return every check by its name, in the order of the names."""
    return {
        module.__name__.rpartition(".")[2].replace("_", "-"): module.CHECK
        for module in discover.modules(checks)
    }
