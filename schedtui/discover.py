"""Finds the entries of a folder: one module an entry, so that a new one is one new file.

Knows nothing of what the modules hold; whoever asks takes from them what it registers. A
folder without a module is an error, since a registry that finds nothing would pass everything.
"""

from __future__ import annotations

import importlib
import pkgutil
from typing import TYPE_CHECKING

from schedtui.errors import SchedtuiError

if TYPE_CHECKING:
    from types import ModuleType


def modules(package: ModuleType) -> tuple[ModuleType, ...]:
    """Import every module of a package and return them in the order of their names.

    Args:
        package: the package whose direct modules are wanted; it is imported already.

    Raises:
        SchedtuiError: the package holds no module at all.
    """
    path = getattr(package, "__path__", ())
    names = sorted(entry.name for entry in pkgutil.iter_modules(path))
    if not names:
        raise SchedtuiError(f"no module in {package.__name__}: the installation is incomplete")
    return tuple(importlib.import_module(f"{package.__name__}.{name}") for name in names)
