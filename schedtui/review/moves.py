"""Which scheduled numbers a designer would move for each short finding, and what must not give way.

Knows no unit and computes nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Final

if TYPE_CHECKING:
    from collections.abc import Mapping

UP: Final = 1
DOWN: Final = -1

# The numbers that may clear a check's finding alone, and which way they go.
MOVES: Mapping[str, tuple[tuple[str, int], ...]] = {
    "cool-total-short": (
        ("cool_total", UP),
        ("cool_tons", UP),
        ("precool_total", UP),
        ("outdoor_airflow", DOWN),
        ("cool_lat_wb", UP),
        ("supply_airflow", DOWN),
        ("recovery_sensible", UP),
        ("recovery_latent", UP),
    ),
    "cool-sensible-short": (
        ("cool_sensible", UP),
        ("outdoor_airflow", DOWN),
        ("cool_lat_db", UP),
        ("supply_airflow", DOWN),
        ("recovery_sensible", UP),
    ),
    "reheat-short": (("reheat_total", UP), ("reheat_lat_db", DOWN)),
    "room-sensible-short": (("supply_airflow", UP), ("cool_lat_db", DOWN)),
    "room-latent-short": (("cool_lat_wb", DOWN), ("supply_airflow", UP)),
    "cool-water-short": (("cool_flow", UP), ("cool_lwt", UP), ("cool_ewt", DOWN)),
    "heat-total-short": (
        ("heat_total", UP),
        ("outdoor_airflow", DOWN),
        ("heat_lat_db", DOWN),
        ("recovery_heat_sensible", UP),
        ("recovery_sensible", UP),
    ),
    "preheat-short": (
        ("preheat_total", UP),
        ("outdoor_airflow", DOWN),
        ("preheat_lat_db", DOWN),
    ),
    "humidifier-short": (("humidifier", UP), ("outdoor_airflow", DOWN)),
    "room-heat-short": (("heat_lat_db", UP), ("heat_airflow", UP), ("supply_airflow", UP)),
    "heat-water-short": (("heat_flow", UP), ("heat_lwt", DOWN), ("heat_ewt", UP),
                         ("preheat_flow", UP), ("preheat_lwt", DOWN), ("preheat_ewt", UP)),
    "outdoor-air-short": (("outdoor_airflow", UP), ("supply_airflow_min", UP)),
    "motor-short": (("motor_power", UP), ("return_fan_motor_power", UP)),
}  # fmt: skip

# The pairs looked for where no single number does: the second moves, the first makes room for it.
PAIRS: Mapping[str, tuple[tuple[str, str], ...]] = {
    "cool-total-short": (("cool_total", "cool_lat_wb"),),
    "cool-sensible-short": (("cool_total", "cool_sensible"),),
    "cool-water-short": (("cool_total", "cool_flow"),),
}

# What must not come to be found by moving a number: a room that pays for it, a row that then
# contradicts itself.
GUARDED: Mapping[str, tuple[str, ...]] = {
    "cool_sensible": ("sensible-above-total",),
    "cool_lat_wb": ("room-latent-short", "leaving-moister", "leaving-above-entering",
                    "wet-above-dry", "no-such-air"),
    "cool_lat_db": ("room-sensible-short", "leaving-above-entering", "wet-above-dry",
                    "no-such-air", "water-temperatures"),
    "supply_airflow": ("room-sensible-short", "room-latent-short", "room-heat-short",
                       "outdoor-above-supply"),
    "heat_lat_db": ("room-heat-short", "heating-leaves-colder"),
    "preheat_lat_db": ("heating-leaves-colder",),
    "reheat_lat_db": ("room-sensible-short",),
    "cool_lwt": ("water-temperatures",),
    "cool_ewt": ("water-temperatures", "fluid-range"),
    "heat_lwt": ("water-temperatures",),
    "heat_ewt": ("water-temperatures", "fluid-range"),
}  # fmt: skip

# Moves that a room pays for, which are not made where it is short as it is.
PAID_BY: Mapping[tuple[str, int], tuple[str, ...]] = {
    ("cool_lat_wb", UP): ("room-latent-short",),
    ("cool_lat_db", UP): ("room-sensible-short",),
    ("supply_airflow", DOWN): ("room-sensible-short", "room-latent-short", "room-heat-short"),
    ("heat_lat_db", DOWN): ("room-heat-short",),
}
