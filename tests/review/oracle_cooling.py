"""The cooling air path by the real-gas model: its stations in the order the air takes.

What stands in a schedule file is read here as plain values; nothing of the program is imported.
Where the leaving state is stated at the unit, or follows from the room, the path is gone back from
there, over fan and bypass to the coil.
"""

from __future__ import annotations

from functools import cached_property

from tests.review.oracle import (
    TON,
    AirPath,
    Moist,
    joined,
    moist,
    of_enthalpy,
    root,
    secant,
    station,
)


class CoolingPath(AirPath):
    """One unit at one cooling condition, from the bare values of a schedule file."""

    @property
    def airflow(self) -> float:
        return float(self.unit["supply_airflow"])

    @property
    def exhaust(self) -> Moist:
        return self.return_air

    def share(self, key: str) -> float:
        return self.unit.get(key, 0) / 100

    # From outdoors to the mixed air

    @cached_property
    def room(self) -> Moist:
        return self.humid(self.unit, "room")

    @cached_property
    def return_air(self) -> Moist:
        if "return_db" not in self.unit:
            return self.warmer(self.room, self.unit.get("return_rise", 0.0))
        if "return_wb" in self.unit or "return_rh" in self.unit:
            return self.humid(self.unit, "return")
        return self.room.at(t=self.units.kelvin(self.unit["return_db"]))

    def recovers(self, supply: float) -> bool:
        some = self.share("recovery_sensible") or self.share("recovery_latent")
        return bool(some and self.outdoor_mass(supply))

    @station
    def recovered(self, supply: float) -> Moist:
        """Outdoor air behind a recovery, or beside one that would load the coil."""
        sensible, latent = self.share("recovery_sensible"), self.share("recovery_latent")
        after = self.past_recovery(self.outdoor, supply, sensible, latent)
        pays = after.h < self.outdoor.h if latent else after.t < self.outdoor.t
        return after if pays else self.outdoor

    @station
    def intake(self, supply: float) -> Moist:
        return self.recovered(supply) if self.recovers(supply) else self.outdoor

    @station
    def mixed(self, supply: float) -> Moist:
        out = self.outdoor_mass(supply)
        return joined(self.intake(supply), out, self.return_air, supply - out)

    # Around the coil and to it

    def bypass(self, supply: float) -> float:
        """Return the share of the supply mass around the coil."""
        share = self.share("bypass")
        if "cool_airflow" in self.unit:
            share = max(1 - self.unit["cool_airflow"] / self.airflow, 0.0)
        if self._returns_around:
            share = min(share, 1 - self.outdoor_mass(supply) / supply)
        return float(share)

    @property
    def _returns_around(self) -> bool:
        return bool(self.unit.get("bypass_source") == "return")

    def _blown(self, air: Moist, supply: float) -> Moist:
        """Return air past a blow-through fan, whose heat each pound takes alike."""
        if not self.blows_through:
            return air
        mixed = self.mixed(supply)
        heat = self.past_fan(mixed, supply).h - mixed.h
        return of_enthalpy(air.h + heat, air.w, self.p)

    @station
    def around(self, supply: float) -> Moist:
        return self._blown(self.return_air if self._returns_around else self.mixed(supply), supply)

    @station
    def to_coil(self, supply: float) -> Moist:
        if not self._returns_around or not self.bypass(supply):
            return self._blown(self.mixed(supply), supply)
        out, through = self.outdoor_mass(supply), supply * (1 - self.bypass(supply))
        rest = max(through - out, 0.0)
        return self._blown(joined(self.intake(supply), out, self.return_air, rest), supply)

    def _cooled(self, entering: Moist, aimed: Moist) -> Moist:
        """Return air behind a coil that aims at a state; it never heats, nor moistens."""
        if entering.t <= aimed.t:
            return entering
        return aimed.at(w=min(aimed.w, entering.w))

    @station
    def precooled(self, supply: float) -> Moist:
        unit = self.unit
        if "precool_lat_db" not in unit:
            return self.to_coil(supply)
        first = self.bulb(unit["precool_lat_db"], unit["precool_lat_wb"])
        return self._cooled(self.to_coil(supply), first)

    @property
    def wrap(self) -> float:
        return float(self.unit.get("wrap_drop", 0.0))

    @station
    def coil_entering(self, supply: float) -> Moist:
        return self.warmer(self.precooled(supply), -self.wrap)

    # What the coil aims at

    @station
    def aimed_at(self, supply: float) -> Moist:
        unit = self.unit
        if "cool_lat_wb" in unit:
            stated = self.bulb(unit["cool_lat_db"], unit["cool_lat_wb"])
            return self._back(stated, supply) if unit.get("cool_lat_at") == "unit" else stated
        if "cool_lat_db" in unit:
            return self._by_loads(supply)
        return self._back(self._by_room(supply), supply)

    def _by_loads(self, supply: float) -> Moist:
        unit = self.unit
        entering = self.coil_entering(supply)
        if "cool_eat_db" in unit and "cool_eat_wb" in unit:
            entering = self.bulb(unit["cool_eat_db"], unit["cool_eat_wb"])
        # What the fan adds to a net capacity, to total and sensible alike, leaves the latent.
        latent = (unit["cool_total"] - unit["cool_sensible"]) * self.units.load
        corner = entering.h - latent / (supply * (1 - self.bypass(supply)))
        w = root(lambda w: entering.at(w=w).h - corner, 0.0, 0.2)
        return Moist(self.units.kelvin(unit["cool_lat_db"]), w, self.p)

    def _by_room(self, supply: float) -> Moist:
        """Return the air that the unit must deliver for the room's loads."""
        unit, room, load = self.unit, self.room, self.units.load
        latent = room.h - unit["room_latent"] * load / supply
        w = root(lambda w: room.at(w=w).h - latent, 0.0, 0.2)
        there = room.at(w=w)
        supplied = of_enthalpy(there.h - unit["room_sensible"] * load / supply, w, self.p)
        return self.warmer(supplied, -unit.get("duct_rise", 0.0))

    def _back(self, unit_leaving: Moist, supply: float) -> Moist:
        """Return the coil's leaving air behind which the unit delivers a given one."""
        air = unit_leaving if self.blows_through else self.before_fan(unit_leaving, supply)
        share = self.bypass(supply)
        if share:
            around = self.around(supply)
            h, w = (
                (air.h - share * around.h) / (1 - share),
                (air.w - share * around.w) / (1 - share),
            )
            air = self._of_any(h, w)
        return self.warmer(air, -self.wrap)

    def _of_any(self, h: float, w: float) -> Moist:
        first = self.room.t - 15.0
        return Moist(secant(lambda t: Moist(t, w, self.p).h - h, first, first + 5.0), w, self.p)

    # From the coil to the room

    @station
    def coil_leaving(self, supply: float) -> Moist:
        return self._cooled(self.coil_entering(supply), self.aimed_at(supply))

    @station
    def rejoined(self, supply: float) -> Moist:
        share = self.bypass(supply)
        left = self.warmer(self.coil_leaving(supply), self.wrap)
        return joined(left, 1 - share, self.around(supply), share)

    def fan_inlet(self, supply: float) -> Moist:
        return self.mixed(supply) if self.blows_through else self.rejoined(supply)

    @station
    def before_reheat(self, supply: float) -> Moist:
        air = self.rejoined(supply)
        return air if self.blows_through else self.past_fan(air, supply)

    @station
    def reheated(self, supply: float) -> Moist:
        air = self.before_reheat(supply)
        if "reheat_lat_db" not in self.unit:
            return air
        return air.at(t=max(air.t, self.units.kelvin(self.unit["reheat_lat_db"])))

    @station
    def supply(self, supply: float) -> Moist:
        return self.warmer(self.reheated(supply), self.unit.get("duct_rise", 0.0))

    # Results

    def figures(self) -> dict[str, float]:
        """Return the figures by their names in the JSON, in the project's units."""
        units, m = self.units, self.supply_mass
        entering, leaving = self.coil_entering(m), self.coil_leaving(m)
        supplied, room = self.supply(m), self.room
        through = m * (1 - self.bypass(m))
        total = through * (entering.h - leaving.h)
        sensible = through * (entering.at(w=leaving.w).h - leaving.h)
        inlet = self.fan_inlet(m)
        past = self.past_fan(inlet, m)
        warm = room.at(w=supplied.w).h
        out = self.outdoor_mass(m)
        made = {
            "supply_mass": m / units.mass,
            "outdoor_mass": out / units.mass,
            "coil_mass": through / units.mass,
            "outdoor_fraction": out / m,
            "coil_total": total / units.load,
            "coil_sensible": sensible / units.load,
            "coil_latent": (total - sensible) / units.load,
            "tons": total / TON,
            "condensate": through * (entering.w - leaving.w) / units.moisture,
            "fan_heat": m * (past.h - inlet.h) / units.load,
            "fan_rise": (past.t - inlet.t) / units.degree,
            "room_sensible_met": m * (warm - supplied.h) / units.load,
            "room_latent_met": m * (room.h - warm) / units.load,
            "bypass": self.bypass(m) * 100,
        }
        if "reheat_lat_db" in self.unit:
            heat = self.reheated(m).h - self.before_reheat(m).h
            made["reheat_load"] = m * heat / units.load
        return made

    def precool_total(self) -> float:
        """Return what the first of two coils takes out [MBH | kW]."""
        m = self.supply_mass
        heat = self.to_coil(m).h - self.precooled(m).h
        return m * (1 - self.bypass(m)) * heat / self.units.load

    def states(self) -> dict[str, Moist]:
        """Return the states of the path by their names in the JSON."""
        m = self.supply_mass
        made = {"outdoor": self.outdoor}
        if self.recovers(m):
            made["recovered"] = self.recovered(m)
        return made | {
            "return": self.return_air,
            "mixed": self.mixed(m),
            "coil_entering": self.coil_entering(m),
            "coil_leaving": self.coil_leaving(m),
            "supply": self.supply(m),
            "room": self.room,
        }

    def apparatus_dew_point(self) -> float | None:
        """Return it [°F | °C]: the crossing next to the leaving air, None where none is near."""
        m = self.supply_mass
        entering, leaving = self.coil_entering(m), self.coil_leaving(m)
        if entering.w - leaving.w < 1e-5:
            return None
        slope = (entering.w - leaving.w) / (entering.t - leaving.t)

        def gap(t: float) -> float:
            return moist(t, self.p, "R", 1.0).w - (leaving.w + slope * (t - leaving.t))

        t = leaving.t
        while t > leaving.t - 20 and gap(t) > 0:
            t -= 0.25
        if t == leaving.t or gap(t) > 0:
            return None
        return self.units.degrees(root(gap, t, t + 0.25))
