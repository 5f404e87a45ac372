"""Invented units in winter, with water, steam, power, fuel and fans, for the workings.

Plain values from a fixed seed, as they stand in a file; imports nothing of the program.
"""

from __future__ import annotations

from tests.review.invented import UNITS_EACH, Draw, Values

GLYCOLS = ("water", "propylene glycol", "ethylene glycol")


def documents(count: int) -> tuple[Values, ...]:
    """Return so many files, half of them in each unit system, the same ones every time."""
    return tuple(_Winter("winter", place).document() for place in range(count))


class _Winter(Draw):
    """Draws a file of units in winter."""

    def document(self) -> Values:
        """Return the file's tables."""
        project = self._project()
        cold = self._degrees(-15, 25)
        night: Values = {"name": "night", "season": "heating", "outdoor_db": cold}
        match self.place % 4:
            case 0:
                night["outdoor_wb"] = round(cold - self._rise(0.5, 2), 1)
            case 1:
                night["outdoor_rh"] = self.random.randint(40, 95)
            case 2:
                night["outdoor_dp"] = round(cold - self._rise(2, 9), 1)
            case 3:
                night["outdoor_w"] = 0.0005
        mild = {"name": "thaw", "season": "heating", "outdoor_db": self._degrees(34, 58),
                "outdoor_rh": 80, "sensible_load": 55}  # fmt: skip
        peak = {"name": "peak", "season": "cooling", "outdoor_db": self._degrees(88, 100),
                "outdoor_wb": self._degrees(68, 76)}  # fmt: skip
        return {
            "project": project,
            "condition": [night, peak, mild],
            "unit": [self._unit(place) for place in range(UNITS_EACH)],
        }

    def _unit(self, place: int) -> Values:
        cfm = self.random.uniform(1_500, 60_000)
        unit: Values = {
            "tag": f"AHU-{place + 1}",
            "supply_airflow": self._flow(cfm),
            "outdoor_airflow": self._flow(cfm * self.random.choice([0, 0.15, 0.4, 1])),
            "room_heat_db": self._degrees(66, 74),
            "room_db": self._degrees(73, 77),
            "room_rh": 50,
            "cool_lat_db": self._degrees(53, 56),
        }
        unit["cool_lat_wb"] = round(unit["cool_lat_db"] - self._rise(0.5, 1.5), 1)
        unit |= self._now_and_then(0.6, room_heat_rh=self.random.randint(20, 45), humidifier=80)
        unit |= self._now_and_then(0.3, heat_airflow=self._flow(cfm * 0.7))
        unit |= self._now_and_then(0.4, fan_position="blow-through")
        unit |= self._recovery(cfm) | self._coils(cfm) | self._fans(cfm)
        unit |= self._water("cool", 44, 56, cfm) if self.random.random() < 0.6 else {}
        unit |= self._now_and_then(0.3, cool_basis="net", cool_total=self._load(cfm * 0.036))
        unit |= self._now_and_then(0.2, cool_kind="dx")
        area = cfm / 450 * (1 if self.ip else 0.0929)
        unit |= self._now_and_then(0.5, cool_face_area=round(area, 1), cool_face_velocity=2)
        unit |= self._now_and_then(0.5, heat_face_area=round(area * 0.7, 1))
        return unit

    def _recovery(self, cfm: float) -> Values:
        if self.random.random() < 0.4:
            return {}
        made: Values = {"recovery_sensible": 76, "recovery_latent": self.random.choice([0, 66])}
        made |= self._now_and_then(0.3, recovery_heat_sensible=81, recovery_heat_latent=55)
        made |= self._now_and_then(0.4, exhaust_airflow=self._flow(cfm * 0.2))
        made |= self._now_and_then(0.3, recovery_basis="supply")
        return made | self._now_and_then(0.3, recovery_exhaust_min=self._degrees(30, 40))

    def _coils(self, cfm: float) -> Values:
        made = self._now_and_then(
            0.5, preheat_lat_db=self._degrees(40, 52), preheat_total=self._load(cfm * 0.03)
        )
        if made:
            made |= self._now_and_then(0.5, preheat_at="outdoor") | self._water(
                "preheat", 180, 150, cfm
            )
        leaves = self._now_and_then(0.7, heat_lat_db=self._degrees(76, 105))
        made |= leaves or {"room_heat": self._load(cfm * 0.02)}
        made |= self._now_and_then(0.5, room_heat=self._load(cfm * 0.02))
        made["heat_total"] = self._load(cfm * 0.05)
        match self.random.choice(["water", "steam", "electric", "gas"]):
            case "water":
                made |= self._water("heat", 160, 130, cfm)
            case "steam":
                pressure = self.random.choice([5, 15, 50]) if self.ip else 103.5
                flow = round(cfm * 0.05 * (1 if self.ip else 0.45), 1)
                made |= {"heat_kind": "steam", "heat_steam": flow, "heat_steam_pressure": pressure}
            case "electric":
                made |= {"heat_kind": "electric", "heat_electric": round(cfm * 0.0147, 1)}
            case "gas":
                burnt = self._load(cfm * 0.0625)
                made |= {"heat_kind": "gas", "heat_input": burnt, "heat_efficiency": 80}
        return made

    def _water(self, coil: str, entering: float, leaving: float, cfm: float) -> Values:
        fluid = self.random.choice(GLYCOLS)
        made: Values = {
            f"{coil}_ewt": self._degrees(entering, entering + 2),
            f"{coil}_lwt": self._degrees(leaving, leaving + 2),
            f"{coil}_flow": round(cfm * 0.004 * (1 if self.ip else 0.063), 2),
        }
        if fluid != "water":
            made[f"{coil}_fluid"] = fluid
            made[f"{coil}_glycol"] = self.random.choice([25, 30, 40])
            made |= self._now_and_then(0.4, glycol_by="volume")
        return made

    def _fans(self, cfm: float) -> Values:
        power = round(cfm * (0.0009 if self.ip else 0.0007), 2)
        pressure = {"fan_total_pressure": 4.2 if self.ip else 1045, "fan_efficiency": 64}
        made: Values = self.random.choice(
            [
                {"fan_rise": self._rise(1, 4)},
                {"fan_power": power, **pressure},
                {
                    "fan_power": round(power / 2, 2),
                    "fan_count": 2,
                    "motor_efficiency": 93.5,
                    **pressure,
                },
                pressure,
            ]
        )
        return made | self._now_and_then(
            0.3, return_airflow=self._flow(cfm * 0.8), return_fan_power=round(power / 2, 2),
            return_fan_total_pressure=1.5 if self.ip else 370, return_fan_efficiency=60,
        )  # fmt: skip
