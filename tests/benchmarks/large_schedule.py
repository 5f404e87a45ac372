"""Writes an invented schedule: many units with 32 filled keys each, two conditions.

    python tests/benchmarks/large_schedule.py FILE [UNITS]

Most rows are sound; of every ten one is short, one contradicts itself and one has a gap.
"""

from __future__ import annotations

import sys
from pathlib import Path
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterator

UNITS = 500
KEYS = 32

_HEAD = """\
# An invented schedule for measuring the program with: no real project, no real unit.
format = 1

[project]
title = "Measured Works"
units = "IP"
altitude = 1250
airflow_basis = "standard"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 93.0
outdoor_wb = 74.0

[[condition]]
name = "humid shoulder"
season = "cooling"
outdoor_db = 80.0
outdoor_wb = 73.5
"""


def schedule(units: int = UNITS) -> str:
    """Return the text of a schedule with so many units."""
    return "\n".join([_HEAD, *("\n".join(_unit(number)) for number in range(1, units + 1))])


def _unit(number: int) -> Iterator[str]:
    airflow = 4000 + number * 37 % 16000
    fails = number % 10
    total = airflow * (0.0305 if fails == 3 else 0.0430)  # short
    sensible = total * (1.1 if fails == 5 else 0.72)  # more than the total
    cells: dict[str, str | float] = {
        "tag": f"AHU-{number}",
        "serves": f"Bay {number}",
        "location": f"Roof {chr(ord('A') + number % 8)}",
        "supply_airflow": airflow,
        "outdoor_airflow": airflow // 5,
        "outdoor_required": airflow // 6,
        "return_airflow": airflow - airflow // 5,
        "room_db": 75.0,
        "room_rh": 50,
        "return_rise": 2.0,
        "duct_rise": 1.0,
        "fan_position": "draw-through",
        "fan_total_pressure": 4.2,
        "fan_external_pressure": 2.0,
        "fan_efficiency": 66,
        "motor_efficiency": 93,
        "fan_power": round(airflow * 4.2 / 6356 / 0.66, 1),
        "motor_power": 30,
        "cool_eat_db": 80.0,
        "cool_eat_wb": 65.8,
        "cool_lat_db": 53.0,
        "cool_lat_wb": 52.2,
        "cool_total": round(total, 1),
        "cool_sensible": round(sensible, 1),
        "cool_ewt": 44.0,
        "cool_lwt": 58.0,
        "cool_flow": round(total / 7, 1),
        "cool_rows": 6,
        "cool_fins": 10,
        "heat_lat_db": 90.0,
        "heat_total": round(airflow * 0.045, 1),
        "heat_flow": round(airflow * 0.045 / 15, 1),
    }
    if len(cells) != KEYS:
        message = f"{len(cells)} keys are filled, not {KEYS}"
        raise ValueError(message)
    if fails == 7:  # a gap
        del cells["cool_lat_wb"]
        cells["cool_kind"] = "chilled water"
    yield "[[unit]]"
    for key, value in cells.items():
        yield f'{key} = "{value}"' if isinstance(value, str) else f"{key} = {value}"
    yield ""


if __name__ == "__main__":
    count = int(sys.argv[2]) if len(sys.argv) > 2 else UNITS
    Path(sys.argv[1]).write_text(schedule(count), encoding="utf-8")
