"""Invented units with every path that air can take, drawn from a fixed seed, for the workings.

Plain values, as they stand in a file; imports nothing of the program.
"""

from __future__ import annotations

import random
from typing import Any

Values = dict[str, Any]

BASES = ("standard", "site", "actual")
UNITS_EACH = 12


def documents(count: int) -> tuple[Values, ...]:
    """Return so many files, half of them in each unit system, the same ones every time."""
    return tuple(_Working("working", place).document() for place in range(count))


class Draw:
    """Draws a file; ranges are in °F, cfm and MBH.

    Args:
        name: of what is drawn: it sows the draw, and the file's title begins with it.
        place: of the file among the others.
    """

    def __init__(self, name: str, place: int) -> None:
        self.name, self.place = name, place
        self.random = random.Random(f"{name} {place}")  # noqa: S311  a draw, not a secret
        self.ip = place % 2 == 0

    def _project(self) -> Values:
        feet = self.random.choice([0, 1_200, 2_460, 5_280, 7_000])
        return {
            "title": f"{self.name.capitalize()} {self.place}",
            "units": "IP" if self.ip else "SI",
            "airflow_basis": BASES[self.place % 3],
            "altitude": feet if self.ip else round(feet * 0.3048),
        }

    def _degrees(self, low: float, high: float) -> float:
        drawn = self.random.uniform(low, high)
        return round(drawn if self.ip else (drawn - 32) / 1.8, 1)

    def _rise(self, low: float, high: float) -> float:
        return round(self.random.uniform(low, high) / (1 if self.ip else 1.8), 1)

    def _flow(self, cfm: float) -> int:
        return round(cfm * (1 if self.ip else 0.472) / 5) * 5

    def _load(self, mbh: float) -> float:
        return round(mbh * (1 if self.ip else 0.293), 1)

    def _now_and_then(self, share: float, **values: Any) -> Values:
        return values if self.random.random() < share else {}


class _Working(Draw):
    """Draws a file with every path of the air."""

    def document(self) -> Values:
        """Return the file's tables."""
        project = self._project()
        if self.place % 5 == 4:
            project["pressure"] = 12.9 if self.ip else 96.4
        outdoor = {"name": "peak", "season": "cooling", "outdoor_db": self._degrees(84, 104)}
        match self.place % 4:
            case 0:
                outdoor["outdoor_wb"] = self._degrees(66, 80)
            case 1:
                outdoor["outdoor_rh"] = self.random.randint(25, 45)
            case 2:
                outdoor["outdoor_dp"] = self._degrees(50, 72)
            case 3:
                outdoor["outdoor_w"] = round(self.random.uniform(0.006, 0.015), 4)
        mild = {
            "name": "mild", "season": "cooling", "outdoor_db": self._degrees(42, 66),
            "outdoor_rh": 70, "sensible_load": 60, "latent_load": 90,
        }  # fmt: skip
        return {
            "project": project,
            "condition": [outdoor, mild],
            "unit": [self._unit(place) for place in range(UNITS_EACH)],
        }

    def _unit(self, place: int) -> Values:
        cfm = self.random.uniform(1_500, 60_000)
        leaving = self._degrees(48, 57)
        room = self._degrees(72, 78)
        unit: Values = {
            "tag": f"AHU-{place + 1}",
            "supply_airflow": self._flow(cfm),
            "outdoor_airflow": self._flow(cfm * self.random.choice([0, 0.1, 0.3, 0.6, 1])),
            "room_db": room,
            "cool_lat_db": leaving,
            "cool_lat_wb": round(leaving - self._rise(0.4, 1.5), 1),
            "cool_total": self._load(cfm * 0.036),
            "cool_sensible": self._load(cfm * 0.027),
            "cool_tons": round(cfm * 0.003, 1),
            "room_sensible": self._load(cfm * 0.019),
            "room_latent": self._load(cfm * 0.004),
        }
        unit |= self.random.choice(
            [{"room_rh": 50}, {"room_wb": round(room - self._rise(11, 14), 1)}]
        )
        unit |= self._now_and_then(0.5, return_rise=self._rise(0.5, 4))
        unit |= self._now_and_then(0.15, return_db=self._degrees(76, 82), return_rh=46)
        unit |= self._now_and_then(0.5, duct_rise=self._rise(0.4, 2))
        unit |= self._now_and_then(0.4, recovery_sensible=72, recovery_latent=66)
        unit |= self._now_and_then(0.3, exhaust_airflow=self._flow(cfm * 0.2))
        unit |= self._now_and_then(0.2, recovery_basis="supply")
        unit |= self._now_and_then(0.4, bypass=self.random.choice([8, 12.5, 30, 60]))
        unit |= self._now_and_then(0.15, cool_airflow=self._flow(cfm * 0.8))
        unit |= self._now_and_then(0.4, bypass_source="return")
        unit |= self._now_and_then(0.3, cool_lat_at="unit")
        unit |= self._now_and_then(0.2, wrap_drop=self._rise(2, 5))
        unit |= self._now_and_then(0.25, reheat_lat_db=self._degrees(62, 70), reheat_total=99)
        unit |= self._now_and_then(0.25, cool_basis="net")
        unit |= self._now_and_then(0.4, fan_position="blow-through")
        if self.random.random() < 0.2:
            first = self._degrees(60, 66)
            unit |= {"precool_lat_db": first, "precool_lat_wb": round(first - 0.6, 1)}
        unit |= self._fan(cfm)
        if self.random.random() < 0.15:
            del unit["cool_lat_wb"]  # from the loads
            unit |= self._now_and_then(
                0.5, cool_eat_db=self._degrees(79, 81), cool_eat_wb=self._degrees(65, 67)
            )
        elif self.random.random() < 0.15:
            del unit["cool_lat_wb"], unit["cool_lat_db"]  # from the room's loads
        return unit

    def _fan(self, cfm: float) -> Values:
        kind = self.random.choice(["rise", "power", "powers", "pressure", "pressure", "none"])
        power = round(cfm * (0.0009 if self.ip else 0.0007), 2)
        return {
            "rise": {"fan_rise": self._rise(1, 4)},
            "power": {"fan_power": power, "motor_in_airstream": False},
            "powers": {"fan_power": round(power / 2, 2), "fan_count": 2, "motor_efficiency": 93.5},
            "pressure": {"fan_total_pressure": 4.2 if self.ip else 1045, "fan_efficiency": 64},
            "none": {},
        }[kind]
