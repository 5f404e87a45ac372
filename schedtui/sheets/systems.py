"""The unit system of a sheet: the one that most of the units stated on it belong to."""

from __future__ import annotations

from collections import Counter
from statistics import median
from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.sheets.figures import plain_number
from schedtui.sheets.heading import read_parts
from schedtui.sheets.known import system_of
from schedtui.sheets.words import plain, split_units

if TYPE_CHECKING:
    from collections.abc import Iterable

    from schedtui.sheets.table import SheetTable
    from schedtui.units import System

_ROWS = 5
_IN_BOTH = ("kW", "W")  # electric power has them in either system, so they say less
_WARM = 45.0  # entering or leaving air: in °C no cooling coil's is above, in °F none is below


def system_of_tables(tables: Iterable[SheetTable]) -> tuple[System, str]:
    """Return the unit system of a sheet's schedules and what it was told by.

    Args:
        tables: the schedules.

    Raises:
        FileError: nothing tells.
    """
    votes: Counter[System] = Counter()
    weight: Counter[System] = Counter()
    temperatures: list[float] = []
    for table in tables:
        for column in table.columns:
            reading = read_parts(column.texts)
            texts = [row[column.place].text for row in table.rows[:_ROWS] if column.place in row]
            units = reading.units or tuple(
                unit for text in texts for unit in split_units(plain(text))[1]
            )
            for unit in set(units):
                if (belongs := system_of(unit)) is not None:
                    votes[belongs] += 1
                    weight[belongs] += 1 if unit in _IN_BOTH else 2
            if {"entering", "leaving"} & reading.words and {"db", "wb", "air"} & reading.words:
                numbers = (plain_number(text, comma=table.decimal_comma) for text in texts)
                temperatures += [number for number in numbers if number is not None]
    if weight["IP"] != weight["SI"]:
        system: System = "IP" if weight["IP"] > weight["SI"] else "SI"
        return system, f"{votes[system]} of {votes.total()} units in the headings are {system}"
    if temperatures:
        system = "IP" if median(temperatures) > _WARM else "SI"
        return system, f"no unit tells; by its air temperatures the sheet is {system}"
    raise FileError("states no units: give them with --units IP or --units SI")
