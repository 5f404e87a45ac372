"""The heating air path by the real-gas model: its stations in the order the air takes.

What stands in a schedule file is read here as plain values; nothing of the program is imported. A
draw-through fan's heat is not counted, a blow-through one's stands in front of the coils.
"""

from __future__ import annotations

from functools import cached_property

from tests.review.oracle import AirPath, Moist, joined, moist, of_enthalpy, station


class HeatingPath(AirPath):
    """One unit at one heating condition, from the bare values of a schedule file."""

    @property
    def airflow(self) -> float:
        return float(self.unit.get("heat_airflow", self.unit["supply_airflow"]))

    @property
    def exhaust(self) -> Moist:
        return self.room

    @cached_property
    def room(self) -> Moist:
        """The room; without a humidity of its own as moist as the recovered outdoor air.

        W_room = W_rec and W_rec = W_o − ε (W_o − W_room) make W_room = W_o.
        """
        t = self.units.kelvin(self.unit["room_heat_db"])
        if "room_heat_rh" in self.unit:
            return moist(t, self.p, "R", self.unit["room_heat_rh"] / 100)
        return self.outdoor.at(t=t)

    def _heated(self, air: Moist, key: str) -> Moist:
        """Return air behind a coil with a scheduled leaving dry bulb; it never cools."""
        return air.at(t=max(air.t, self.units.kelvin(self.unit[key])))

    def _preheats(self, at: str) -> bool:
        return "preheat_lat_db" in self.unit and self.unit.get("preheat_at", "mixed") == at

    # From outdoors to the coils

    @cached_property
    def to_recovery(self) -> Moist:
        if self._preheats("outdoor"):
            return self._heated(self.outdoor, "preheat_lat_db")
        return self.outdoor

    def effectiveness(self) -> tuple[float, float]:
        unit = self.unit
        sensible = unit.get("recovery_heat_sensible", unit.get("recovery_sensible", 0))
        latent = unit.get("recovery_heat_latent", unit.get("recovery_latent", 0))
        return sensible / 100, latent / 100

    def recovers(self, supply: float) -> bool:
        return bool(any(self.effectiveness()) and self.outdoor_mass(supply))

    def working_share(self, supply: float) -> float:
        """Return the share of its effectiveness that frost leaves a recovery."""
        outdoor, room, units = self.to_recovery, self.room, self.units
        if room.t <= outdoor.t:
            return 0.0
        sensible, latent = self.effectiveness()
        out, exhaust = self.outdoor_mass(supply), self.exhaust_mass(supply)
        flow = out
        if self.unit.get("recovery_basis", "least flow") == "least flow":
            flow = min(out, exhaust)
        t = room.t - sensible * flow / exhaust * (room.t - outdoor.t)
        w = room.w - latent * flow / exhaust * (room.w - outdoor.w)
        freezing = 32.0 if self.system == "IP" else 0.0
        least = units.kelvin(self.unit.get("recovery_exhaust_min", freezing))
        if t >= least or w <= moist(t, self.p, "R", 1.0).w:
            return 1.0
        return max((room.t - least) / (room.t - t), 0.0)

    @station
    def recovered(self, supply: float) -> Moist:
        share = self.working_share(supply)
        sensible, latent = self.effectiveness()
        return self.past_recovery(self.to_recovery, supply, sensible * share, latent * share)

    @station
    def intake(self, supply: float) -> Moist:
        return self.recovered(supply) if self.recovers(supply) else self.to_recovery

    @station
    def mixed(self, supply: float) -> Moist:
        out = self.outdoor_mass(supply)
        return joined(self.intake(supply), out, self.room, supply - out)

    # The coils

    @station
    def to_coils(self, supply: float) -> Moist:
        mixed = self.mixed(supply)
        return self.past_fan(mixed, supply) if self.blows_through else mixed

    @station
    def heat_entering(self, supply: float) -> Moist:
        air = self.to_coils(supply)
        return self._heated(air, "preheat_lat_db") if self._preheats("mixed") else air

    @station
    def heat_leaving(self, supply: float) -> Moist:
        entering = self.heat_entering(supply)
        if "heat_lat_db" in self.unit:
            return self._heated(entering, "heat_lat_db")
        there = entering.at(t=self.room.t)
        load = self.unit["room_heat"] * self.condition.get("sensible_load", 100) / 100
        needed = of_enthalpy(there.h + load * self.units.load / supply, there.w, self.p)
        return needed if needed.t > entering.t else entering

    def fan_inlet(self, supply: float) -> Moist:
        return self.mixed(supply) if self.blows_through else self.heat_leaving(supply)

    # Results

    def figures(self) -> dict[str, float]:
        """Return the figures by their names in the JSON, in the project's units."""
        units, m = self.units, self.supply_mass
        out = self.outdoor_mass(m)
        entering, leaving = self.heat_entering(m), self.heat_leaving(m)
        made = {
            "supply_mass": m / units.mass,
            "outdoor_mass": out / units.mass,
            "outdoor_fraction": out / m,
            "heat_load": m * (leaving.h - entering.h) / units.load,
        }
        if self._preheats("outdoor"):
            made["preheat_load"] = out * (self.to_recovery.h - self.outdoor.h) / units.load
        elif self._preheats("mixed"):
            made["preheat_load"] = m * (entering.h - self.to_coils(m).h) / units.load
        if "heat_lat_db" in self.unit:
            made["room_heat_met"] = m * (leaving.h - leaving.at(t=self.room.t).h) / units.load
        if "room_heat_rh" in self.unit:
            lacking = max(self.room.w - self.intake(m).w, 0.0)
            made["humidifier_load"] = out * lacking / units.moisture
        return made

    def states(self) -> dict[str, Moist]:
        """Return the states of the path by their names in the JSON."""
        m = self.supply_mass
        made = {"outdoor": self.outdoor}
        if self.recovers(m):
            made["recovered"] = self.recovered(m)
        if self._preheats("outdoor"):
            made["preheat_leaving"] = self.to_recovery
        elif self._preheats("mixed"):
            made["preheat_leaving"] = self.heat_entering(m)
        return made | {
            "return": self.room,
            "mixed": self.mixed(m),
            "heat_leaving": self.heat_leaving(m),
            "room": self.room,
        }
