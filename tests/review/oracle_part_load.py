"""Part load by the real-gas model: control and room found together, by Newton's method.

The balances are those of a room at its dry bulb: the supply air takes the sensible load, and what
it takes of moisture is the latent load. They are two equations in what the control does and in the
room's humidity ratio, solved at once and not one within the other. Nothing of the program is
imported.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from functools import cached_property
from typing import TYPE_CHECKING

from tests.review.oracle import Moist, moist, root, secant
from tests.review.oracle_cooling import CoolingPath

if TYPE_CHECKING:
    from collections.abc import Callable

    from tests.review.oracle import Values

ALL_BUT = 1e-9  # so much of the air still goes through the coil at the end of the bypass

SETTLED = 1e-11  # of the room's sensible load
FLAT = 1e-6  # a moisture balance that hardly hangs on the room's humidity
MOISTEST = 0.03  # a humidity ratio that no room here comes to


@dataclass(frozen=True)
class Tried:
    """What control and room are tried at: mass in kg/s, dry bulbs in K."""

    w: float
    bypass: float
    mass: float
    leaving: Moist
    reheat: float | None = None


class TriedPath(CoolingPath):
    """The cooling path with the control set by hand and the room as humid as is tried."""

    def __init__(self, design: CoolingPath, tried: Tried) -> None:
        self.design, self.tried = design, tried
        self.system, self.units, self.p = design.system, design.units, design.p
        self.condition, self.unit, self.basis = design.condition, design.unit, design.basis
        self.kept = {}

    @cached_property
    def room(self) -> Moist:
        return self.design.room.at(w=self.tried.w)

    @cached_property
    def supply_mass(self) -> float:
        return self.tried.mass

    def outdoor_mass(self, supply: float) -> float:
        return min(self.design.outdoor_mass(self.design.supply_mass), supply)

    def bypass(self, supply: float) -> float:
        if self._returns_around and supply:  # no more than what returns of the air that is left
            return min(self.tried.bypass, 1 - self.outdoor_mass(supply) / supply)
        return self.tried.bypass

    def aimed_at(self, supply: float) -> Moist:  # noqa: ARG002
        return self.tried.leaving

    def past_fan(self, inlet: Moist, supply: float) -> Moist:  # noqa: ARG002  the rise holds
        mass = self.design.supply_mass
        before = self.design.fan_inlet(mass)
        return inlet.at(t=inlet.t + self.design.past_fan(before, mass).t - before.t)

    def reheated(self, supply: float) -> Moist:
        air = self.before_reheat(supply)
        return air if self.tried.reheat is None else air.at(t=max(air.t, self.tried.reheat))

    def surplus(self) -> float:
        """Return the sensible heat taken beyond the room's load, as a share of the design's."""
        supplied, load = self.supply(self.tried.mass), self.unit["room_sensible"]
        taken = self.tried.mass * (self.room.at(w=supplied.w).h - supplied.h) / self.units.load
        return float(taken / load - self.condition.get("sensible_load", 100) / 100)

    def moist_surplus(self) -> float:
        """Return the latent heat taken beyond the room's load, as a share of its sensible load."""
        supplied, load = self.supply(self.tried.mass), self.unit["room_sensible"]
        taken = self.tried.mass * (self.room.h - self.room.at(w=supplied.w).h) / self.units.load
        latent = self.unit["room_latent"] * self.condition.get("latent_load", 100) / 100
        return float((taken - latent) / load)


class PartLoad:
    """A unit that sheds load, where it settles."""

    def __init__(self, project: Values, condition: Values, unit: Values) -> None:
        self.design = CoolingPath(project, condition, unit)
        self.control = unit.get("capacity_control", "coil")
        self.reaches, self.sheds = True, True
        self.settled = self._settled()

    def _at(self, tried: Tried) -> TriedPath:
        return TriedPath(self.design, tried)

    def _settled(self) -> TriedPath:
        design = self.design
        mass = design.supply_mass
        start = Tried(design.room.w, design.bypass(mass), mass, design.aimed_at(mass))
        full = self._room_of(start)
        if self._at(full).surplus() <= 0:
            self.sheds = False
            return self._at(full)
        shed = {
            "bypass": self._by_bypass,
            "reheat": self._by_reheat,
            "airflow": self._by_airflow,
            "coil": self._by_coil,
        }[self.control]
        return self._at(shed(full))

    def _room_of(self, tried: Tried) -> Tried:
        """Return a setting with the humidity ratio that the room comes to in it."""

        def gap(w: float) -> float:
            return self._at(replace(tried, w=w)).moist_surplus()

        slope = (gap(tried.w * 1.01) - gap(tried.w)) / 0.01
        if slope > FLAT:
            w = secant(gap, tried.w, tried.w * 1.01)
            if abs(gap(w)) < SETTLED:
                return replace(tried, w=w)
        return replace(tried, w=root(gap, 0.0, MOISTEST))

    def _both(
        self, tried: Tried, set_to: Callable[[Tried, float], Tried], first: float, step: float
    ) -> Tried:
        """Return where both balances hold, by Newton's method with differences."""
        x, w = first, tried.w

        def gaps(x: float, w: float) -> tuple[float, float]:
            path = self._at(replace(set_to(tried, x), w=w))
            return path.surplus(), path.moist_surplus()

        for _ in range(20):
            a, b = gaps(x, w)
            if abs(a) < SETTLED and abs(b) < SETTLED:
                return replace(set_to(tried, x), w=w)
            ax, bx = gaps(x + step, w)
            aw, bw = gaps(x, w * 1.0001)
            a_x, b_x = (ax - a) / step, (bx - b) / step
            a_w, b_w = (aw - a) / (w * 1e-4), (bw - b) / (w * 1e-4)
            det = a_x * b_w - a_w * b_x
            if abs(det) < FLAT * abs(a_x) / w:
                break
            x -= (a * b_w - b * a_w) / det
            w -= (b * a_x - a * b_x) / det
            if not 0 < w < MOISTEST:
                break
        return self._one_within_the_other(tried, set_to, first, step)

    def _one_within_the_other(
        self, tried: Tried, set_to: Callable[[Tried, float], Tried], first: float, step: float
    ) -> Tried:
        """Return the same by halving, where a coil that turns dry bends the moisture balance."""

        def controlled(w: float) -> Tried:
            def gap(x: float) -> float:
                return self._at(replace(set_to(tried, x), w=w)).surplus()

            return replace(set_to(tried, secant(gap, first, first + step)), w=w)

        def gap(w: float) -> float:
            return self._at(controlled(w)).moist_surplus()

        return controlled(root(gap, tried.w * 0.3, MOISTEST))

    def _by_bypass(self, tried: Tried) -> Tried:
        def set_to(tried: Tried, share: float) -> Tried:
            return replace(tried, bypass=share)

        design, most = self.design, 1 - ALL_BUT
        if design.unit.get("bypass_source") == "return":
            most = min(most, 1 - design.outdoor_mass(tried.mass) / tried.mass)
        end = set_to(tried, max(most, tried.bypass))
        if most <= tried.bypass or self._at(end).surplus() > 0:
            self.reaches = False
            return self._room_of(end)
        return self._both(tried, set_to, (tried.bypass + most) / 2, 1e-5)

    def _by_reheat(self, tried: Tried) -> Tried:
        def set_to(tried: Tried, t: float) -> Tried:
            return replace(tried, reheat=t)

        cold = self._at(tried).before_reheat(tried.mass).t
        return self._both(tried, set_to, (cold + self.design.room.t) / 2, 1e-3)

    def _by_airflow(self, tried: Tried) -> Tried:
        def set_to(tried: Tried, mass: float) -> Tried:
            return replace(tried, mass=mass)

        unit = self.design.unit
        share = unit.get("supply_airflow_min", 0) / unit["supply_airflow"]
        least = max(self.design.outdoor_mass(tried.mass), tried.mass * share)
        if least >= tried.mass:
            return self._by_reheat(tried)
        end = self._room_of(set_to(tried, least))
        if self._at(end).surplus() > 0:
            return self._by_reheat(end)
        return self._both(tried, set_to, (least + tried.mass) / 2, tried.mass * 1e-5)

    def _by_coil(self, tried: Tried) -> Tried:
        cold = tried.leaving
        humidity = min(cold.get("R"), 1.0)

        def set_to(tried: Tried, t: float) -> Tried:
            return replace(tried, leaving=moist(t, cold.p, "R", humidity))

        off = replace(tried, leaving=cold.at(t=cold.t + 60))
        entering = self._at(off).coil_entering(tried.mass)
        if entering.t <= cold.t:
            return tried
        if self._at(off).surplus() > 0:
            self.reaches = False
            return self._room_of(off)
        return self._both(tried, set_to, (cold.t + entering.t) / 2, 1e-3)

    def figures(self) -> dict[str, float]:
        """Return what is compared, in the project's units."""
        path, mass = self.settled, self.settled.tried.mass
        made = path.figures()
        heat = path.reheated(mass).h - path.before_reheat(mass).h
        made["reheat_load"] = mass * heat / path.units.load
        made["room_rh"] = path.room.get("R") * 100
        made["room_w"] = path.room.w
        return made
