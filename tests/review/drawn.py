"""Invented projects drawn from a fixed seed: the units that the air path is tried on.

A project is plain values, as they stand in its file. Numbers carry the digits that a schedule
prints. Imports nothing of the program.
"""

from __future__ import annotations

import random
from dataclasses import dataclass
from typing import Any

Values = dict[str, Any]

PROJECTS, UNITS_EACH = 16, 13  # in each unit system: 208 units, each at two conditions
WINTERS, WINTER_UNITS = 10, 12  # in each unit system: 120 units, each at two conditions
CFM, INCH, HORSEPOWER, MBH = 0.47194745, 248.6, 0.7457, 0.29307107


@dataclass(frozen=True)
class Project:
    """A project: its own values, its conditions, its units."""

    values: Values
    conditions: tuple[Values, ...]
    units: tuple[Values, ...]

    def document(self, *units: Values) -> Values:
        """Return it as the tables of a file, with other units where some are given."""
        return {
            "format": 1,
            "project": self.values,
            "condition": list(self.conditions),
            "unit": list(units or self.units),
        }


def projects(system: str) -> tuple[Project, ...]:
    """Return the projects of a unit system, the same ones every time."""
    return tuple(_Draw(system, place).project() for place in range(PROJECTS))


def winters(system: str) -> tuple[Project, ...]:
    """Return the projects of a unit system with heating conditions, the same ones every time."""
    return tuple(_WinterDraw(system, place, "winter ").project() for place in range(WINTERS))


class _Draw:
    """Draws one project; ranges are in °F, cfm and in. wg, and converted before they are cut."""

    units_each = UNITS_EACH

    def __init__(self, system: str, place: int, seed: str = "") -> None:
        self.system, self.place = system, place
        drawn = random.Random(f"{seed}{system} {place}")  # noqa: S311  a draw, not a secret
        self.random = drawn

    def project(self) -> Project:
        feet = self.random.choice([0, 0, 1_200, 2_460, 5_280, 7_000])
        values: Values = {
            "title": f"Drawn {self.place}",
            "units": self.system,
            "airflow_basis": ("standard", "site", "actual")[self.place % 3],
        }
        if self.place % 4 == 3:
            values["pressure"] = 12.9 if self.system == "IP" else 96.4
        else:
            values["altitude"] = feet if self.system == "IP" else round(feet * 0.3048)
        units = tuple(self._unit(place) for place in range(self.units_each))
        return Project(values, (self._condition("first"), self._condition("second")), units)

    # Numbers with a schedule's digits

    def _between(self, low: float, high: float) -> float:
        return self.random.uniform(low, high)

    def _degrees(self, low: float, high: float) -> float:
        drawn = self._between(low, high)
        return round(drawn if self.system == "IP" else (drawn - 32) / 1.8, 1)

    def _difference(self, low: float, high: float) -> float:
        drawn = self._between(low, high)
        return round(drawn if self.system == "IP" else drawn / 1.8, 1)

    def _flow(self, cfm: float) -> int:
        return round((cfm if self.system == "IP" else cfm * CFM) / 10) * 10

    # Rows

    def _condition(self, name: str) -> Values:
        """Draw the weather: no more humid than a wet bulb of 82 °F makes it."""
        dry = self._degrees(72, 106)
        made: Values = {"name": name, "season": "cooling", "outdoor_db": dry}
        match self.random.choice(["wb", "wb", "wb", "dp", "rh", "w"]):
            case "wb":
                made["outdoor_wb"] = min(self._degrees(60, 82), round(dry - 1.5, 1))
            case "dp":
                made["outdoor_dp"] = min(self._degrees(45, 76), round(dry - 3, 1))
            case "rh":
                made["outdoor_rh"] = round(self._between(20, 42))
            case "w":
                made["outdoor_w"] = round(self._between(0.006, 0.0135), 4)
        return made

    def _unit(self, place: int) -> Values:
        cfm = round(self._between(1_500, 40_000))
        supply = self._flow(cfm)
        made: Values = {"tag": f"AHU-{place + 1}", "supply_airflow": supply}
        match place % 6:
            case 0:
                made["outdoor_airflow"] = supply
            case 1:
                made |= self.random.choice([{}, {"outdoor_airflow": 0}])
            case _:
                made["outdoor_airflow"] = self._flow(cfm * self._between(0.05, 0.85))
        if place == UNITS_EACH - 1:
            made["outdoor_airflow"] = supply + 100  # a finding; its share is held at 1
        if self.random.random() < 0.4:
            made["airflow_basis"] = self.random.choice(["standard", "site", "actual"])
        made |= self._room() | self._fan(cfm) | self._coil(cfm)
        made |= self._recovery(made, cfm)
        made |= self._around_and_about(made, cfm)
        return made

    def _room(self) -> Values:
        dry = self._degrees(70, 79)
        made: Values = {"room_db": dry}
        if self.random.random() < 0.6:
            made["room_rh"] = round(self._between(35, 58))
        else:
            made["room_wb"] = round(dry - self._difference(9, 15), 1)
        match self.random.choice(["room", "rise", "rise", "db", "wb", "rh"]):
            case "rise":
                made["return_rise"] = self._difference(0.5, 4)
            case "db":
                made["return_db"] = self._degrees(76, 82)
            case "wb":
                made["return_db"] = back = self._degrees(76, 82)
                made["return_wb"] = round(back - self._difference(9, 16), 1)
            case "rh":
                made["return_db"] = self._degrees(76, 82)
                made["return_rh"] = round(self._between(35, 55))
        if self.random.random() < 0.6:
            made["duct_rise"] = self._difference(0.3, 2)
        return made

    def _fan(self, cfm: float) -> Values:
        made: Values = {}
        if self.random.random() < 0.4:
            made["fan_position"] = "blow-through"
        pressure = self._between(1.5, 6.5)
        power = cfm * pressure / 6356 / 0.65
        match self.random.choice(["rise", "power", "power", "pressure", "pressure", "none"]):
            case "rise":
                made["fan_rise"] = self._difference(0.8, 4)
            case "power":
                count = self.random.choice([1, 1, 1, 2])
                if count > 1:
                    made["fan_count"] = count
                each = power / count * (1 if self.system == "IP" else HORSEPOWER)
                made["fan_power"] = round(each, 1) or 0.5
            case "pressure":
                in_system = pressure if self.system == "IP" else pressure * INCH
                made["fan_total_pressure"] = round(in_system, 1 if self.system == "IP" else 0)
                made["fan_efficiency"] = round(self._between(55, 75))
        if self.random.random() < 0.5:
            made["motor_efficiency"] = round(self._between(85, 96), 1)
        if self.random.random() < 0.3:
            made["motor_in_airstream"] = False
        return made

    def _coil(self, cfm: float) -> Values:
        leaving = self._degrees(46, 60)
        made: Values = {"cool_lat_db": leaving}
        draw = self.random.random()
        if draw < 0.06:  # hardly colder than some of the air that enters, or warmer
            made["cool_lat_db"] = leaving = self._degrees(70, 84)
        if draw > 0.94:  # stated by its loads; half of them from an entering state of their own
            mbh = cfm * 0.0335
            made["cool_total"] = round(mbh if self.system == "IP" else mbh * MBH, 1)
            made["cool_sensible"] = round(made["cool_total"] * self._between(0.7, 0.82), 1)
            if self.random.random() < 0.5:
                made["cool_eat_db"] = entering = self._degrees(79, 81)
                made["cool_eat_wb"] = round(entering - self._difference(12, 14), 1)
            return made
        made["cool_lat_wb"] = round(leaving - self._difference(0.3, 2.2), 1)
        return made

    # What joins the plain path: recovery, air around the coil, a second coil, reheat

    def _chance(self, share: float) -> bool:
        return self.random.random() < share

    def _recovery(self, unit: Values, cfm: float) -> Values:
        if not self._chance(0.4):
            return {}
        made: Values = {"recovery_sensible": round(self._between(40, 80))}
        if self._chance(0.5):
            made["recovery_latent"] = round(self._between(30, 75))
        if self._chance(0.5) and unit.get("outdoor_airflow"):
            share = unit["outdoor_airflow"] / unit["supply_airflow"]
            made["exhaust_airflow"] = self._flow(cfm * share * self._between(0.5, 1.2))
        if self._chance(0.3):
            made["recovery_basis"] = "supply"
        return made

    def _around_and_about(self, unit: Values, cfm: float) -> Values:
        """Draw the rest; states at the unit stay so dry that the coil's are no fog."""
        made: Values = {}
        if self._chance(0.25):
            self._by_the_room(unit, cfm)
        if "cool_total" in unit:
            if self._chance(0.5):
                made["cool_basis"] = "net"
        elif self._chance(0.25) and "cool_lat_db" in unit and unit["cool_lat_db"] < self._at(62):
            leaving = self._degrees(56, 60)
            made |= {"cool_lat_at": "unit", "cool_lat_db": leaving}
            made["cool_lat_wb"] = round(leaving - self._difference(3.5, 6), 1)
        elif self._chance(0.2):
            made["cool_basis"] = "net"
        back = "cool_lat_at" in made or "room_sensible" in unit
        if self._chance(0.3):
            self._bypass(made, unit, most=7 if back else 35)
        if not back and self._chance(0.15) and "cool_lat_db" in unit:
            made["wrap_drop"] = self._difference(2, 8)
        elif self._chance(0.2):
            first = self._degrees(62, 68)
            made["precool_lat_db"] = first
            made["precool_lat_wb"] = round(first - self._difference(0.5, 3), 1)
        if self._chance(0.2) or unit.get("outdoor_airflow") == unit["supply_airflow"]:
            made["reheat_lat_db"] = self._degrees(58, 74)
        return made

    def _at(self, fahrenheit: float) -> float:
        return fahrenheit if self.system == "IP" else (fahrenheit - 32) / 1.8

    def _bypass(self, made: Values, unit: Values, most: float) -> None:
        share = self._between(3, most)
        if self._chance(0.5):
            made["bypass"] = round(share)
        else:
            made["cool_airflow"] = round(unit["supply_airflow"] * (1 - share / 100) / 10) * 10
        if self._chance(0.5):
            made["bypass_source"] = "return"

    def _by_the_room(self, unit: Values, cfm: float) -> None:
        """Take the leaving state away, and state the room's loads in its place."""
        if "cool_total" in unit:
            return
        for key in ("cool_lat_db", "cool_lat_wb", "room_wb", "return_db", "return_wb", "return_rh"):
            unit.pop(key, None)
        unit["room_rh"] = round(self._between(40, 47))
        load = 1.0 if self.system == "IP" else MBH
        unit["room_sensible"] = round(cfm * self._between(0.0125, 0.016) * load, 1)
        unit["room_latent"] = round(cfm * self._between(0.0015, 0.0035) * load, 1)


class _WinterDraw(_Draw):
    """Draws one project with heating conditions."""

    units_each = WINTER_UNITS

    def _condition(self, name: str) -> Values:
        dry = self._degrees(-20, 45)
        made: Values = {"name": name, "season": "heating", "outdoor_db": dry}
        if self._chance(0.5):
            made["outdoor_rh"] = round(self._between(40, 95))
        else:
            made["outdoor_dp"] = round(dry - self._difference(1, 10), 1)
        if name == "second" and self._chance(0.5):
            made["sensible_load"] = 60
        return made

    def _unit(self, place: int) -> Values:
        cfm = round(self._between(1_500, 40_000))
        supply = self._flow(cfm)
        made: Values = {"tag": f"AHU-{place + 1}", "supply_airflow": supply}
        if self._chance(0.3):
            made["heat_airflow"] = self._flow(cfm * self._between(0.5, 0.95))
        air = float(made.get("heat_airflow", supply))
        match place % 6:
            case 0:
                made["outdoor_airflow"] = round(air)
            case 1:
                made["outdoor_airflow"] = 0
            case _:
                made["outdoor_airflow"] = round(air * self._between(0.1, 0.8) / 10) * 10
        if self._chance(0.4):
            made["airflow_basis"] = self.random.choice(["standard", "site", "actual"])
        made["room_heat_db"] = self._degrees(66, 74)
        if self._chance(0.6):
            made["room_heat_rh"] = round(self._between(20, 45))
        return made | self._fan(cfm) | self._recovery(made, cfm) | self._winter(made)

    def _recovery(self, unit: Values, cfm: float) -> Values:
        made = super()._recovery(unit, cfm)
        if made and self._chance(0.4):
            made["recovery_heat_sensible"] = round(self._between(40, 80))
            made["recovery_heat_latent"] = round(self._between(0, 60))
        if made and self._chance(0.3):
            made["recovery_exhaust_min"] = self._degrees(20, 40)
        return made

    def _winter(self, unit: Values) -> Values:
        made: Values = {}
        if self._chance(0.4):
            made["preheat_lat_db"] = self._degrees(40, 60)
            if self._chance(0.5):
                made |= {"preheat_at": "outdoor", "preheat_lat_db": self._degrees(5, 50)}
        if self._chance(0.75):
            made["heat_lat_db"] = self._degrees(78, 110)
        else:
            air = float(unit.get("heat_airflow") or unit["supply_airflow"])
            each = 0.03 if self.system == "IP" else 0.018
            made["room_heat"] = round(air * each * self._between(0.5, 1), 1)
        return made
