"""The reference tables: keys, checks, limits, computed columns, from the places that define them.

The README and the help on screen show these; nothing is listed a second time.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.report.page import Table
from schedtui.review.quantities import COLUMNS
from schedtui.review.registry import registered
from schedtui.schedule.catalogue.limits import Limits
from schedtui.units import format_number

if TYPE_CHECKING:
    from schedtui.schedule.catalogue.field import Field
    from schedtui.schedule.catalogue.table import Table as Catalogue
    from schedtui.units import System

_SYSTEMS: tuple[System, ...] = ("IP", "SI")


def keys_table(catalogue: type[Catalogue]) -> Table:
    """Return the keys of a table of the file: what each is, and what it accepts in each system."""
    rows = tuple(
        (key, field.doc, _accepted(field), _default(field))
        for key, field in catalogue.catalogue.items()
    )
    return Table(("Key", "What it is", "Accepted", "Default"), rows)


def limits_table() -> Table:
    """Return the limits with their defaults in both systems."""
    rows = tuple((key, field.doc, _both_defaults(field)) for key, field in Limits.catalogue.items())
    return Table(("Limit", "What it bounds", "Default"), rows)


def checks_table() -> Table:
    """Return the checks with what they hold, how bad a fault is, and the source."""
    rows = tuple(
        (name, check.severity.word, check.sentence, check.source)
        for name, check in registered().items()
    )
    return Table(("Check", "At worst", "What must hold", "Source"), rows)


def columns_table() -> Table:
    """Return the computed columns and what each is computed from."""
    rows = tuple(
        (column.key, column.label, column.of, column.quantity.ip, column.quantity.si)
        for column in COLUMNS
    )
    return Table(("Column", "What it is", "Computed from", "IP", "SI"), rows)


def _accepted(field: Field[object]) -> str:
    """Say what a field accepts, once where both systems accept the same."""
    ip, si = field.kind.accepted("IP"), field.kind.accepted("SI")
    return ip if ip == si else f"{ip}; {si}"


def _default(field: Field[object]) -> str:
    if field.default is None:
        return "required" if field.required else ""
    return _plain(field.default)


def _both_defaults(field: Field[object]) -> str:
    ip, si = (_with_unit(field, system) for system in _SYSTEMS)
    return ip if ip == si else f"{ip}; {si}"


def _with_unit(field: Field[object], system: System) -> str:
    unit = field.quantity.unit(system) if field.quantity else ""
    return f"{_plain(field.usual(system))} {unit}".rstrip()


def _plain(value: object) -> str:
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, float | int):
        return format_number(value, 0 if float(value).is_integer() else 1)
    return str(value)
