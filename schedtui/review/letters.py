"""The letters by which a working tells streams of air apart: what subscript stands for which.

An evaluation asks for them only where someone collects its steps. Computes nothing.

o outdoor, r room, ret return, x exhaust, rec recovered, m mixed, n mixed for the coil alone,
a past a fan that blows through, b around the coil past such a fan, e entering the coil, l leaving
it, d what it is to leave where it runs otherwise, k the row's own entering air, w past a
wrap-around, j joined by what went around, g past a fan that draws through, h reheated, u leaving
the unit, v needed by the room, s supply; a first coil's symbols end in 1. In heating lp leaves the
preheat and eh enters the heating coil; what leaves that is the supply air.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Protocol

from schedtui.review.figure import known

if TYPE_CHECKING:
    from collections.abc import Mapping

    from schedtui.air.state import State
    from schedtui.schedule.catalogue.unit import Unit

Names = tuple[str, "Mapping[str, str]"]
"""The subscript of a property that has none, and what the other subscripts become."""

MEANINGS: Mapping[str, str] = {
    "o": "outdoor air",
    "r": "room air",
    "ret": "return air",
    "x": "exhaust through the recovery",
    "rec": "outdoor air behind the recovery",
    "m": "mixed air",
    "n": "the coil's own mixture, richer in outdoor air",
    "cr": "return air in the coil's mixture",
    "a": "mixed air past the fan",
    "b": "air around the coil",
    "c": "through the cooling coil",
    "e": "entering the cooling coil",
    "l": "leaving the cooling coil",
    "d": "scheduled to leave the cooling coil, which runs otherwise here",
    "k": "entering as scheduled in the row",
    "w": "past the wrap-around's second side",
    "wd": "past the wrap-around, as scheduled",
    "j": "behind the coil, joined by what went around",
    "jd": "behind the coil, as scheduled",
    "f": "at the supply fan",
    "g": "past the supply fan",
    "h": "reheated",
    "u": "leaving the unit, as it is to be",
    "v": "supply air that the room needs",
    "s": "supply air",
    "duct": "duct between unit and room",
    "l1": "leaving the first coil",
    "d1": "scheduled to leave the first coil, which runs dry here",
    "sat": "saturated",
    "adp": "at the apparatus dew point",
    "el": "at the entering dry bulb and the leaving humidity ratio",
    "ed": "at the entering dry bulb and the humidity ratio scheduled to leave",
    "kl": "at the row's entering dry bulb and the leaving humidity ratio",
    "el1": "at the first coil's entering dry bulb and its leaving humidity ratio",
    "rs": "at the room's dry bulb and the supply's humidity ratio",
    "rv": "at the room's dry bulb and the humidity ratio that it needs",
    "out": "behind the fan",
    "ex": "exhaust leaving the recovery",
    "min": "least that the exhaust may leave the recovery at",
    "lp": "leaving the preheat",
    "eh": "entering the heating coil",
    "ra": "return air through its fan",
    "rf": "at the return fan",
    "fc": "at the face of the cooling coil",
    "fh": "at the face of the heating coil",
    "cw": "water of the cooling coil",
    "hw": "water of the heating coil",
    "pw": "water of the preheat",
}
"""What each subscript means, for the legend of a working."""

_FIRST_COIL = {one: f"{one}1" for one in ("l", "el", "t", "s", "w", "d")}


class CoolingPath(Protocol):
    """What the letters of a cooling condition hang on."""

    unit: Unit

    @property
    def blows_through(self) -> bool:
        """Whether the supply fan blows through the coil."""

    @property
    def recovery_acts(self) -> bool:
        """Whether a recovery lowers the coil's load."""

    @property
    def richer_at_coil(self) -> bool:
        """Whether the coil's stream is richer in outdoor air."""

    @property
    def bypass_mass(self) -> float:
        """Dry air around the coil."""

    @property
    def has_precool(self) -> bool:
        """Whether a first coil stands in front of the cooling coil."""

    @property
    def wrap(self) -> float:
        """What a wrap-around cools and warms by."""

    @property
    def coil_mode(self) -> str:
        """Whether the coil runs wet, dry or not at all."""

    @property
    def drawn_through_warm(self) -> bool:
        """Whether a fan that draws through warms the air."""

    @property
    def before_reheat(self) -> State:
        """Air that leaves the cooling part of the unit."""

    @property
    def reheated(self) -> State:
        """Air behind the reheat."""


class Letters:
    """The letters of an air path of which nothing more is known."""

    @property
    def fan_inlet(self) -> str:
        """The air at the supply fan's inlet."""
        return "f"

    def supply_mass(self) -> Names:
        """Name the steps of the supply mass flow."""
        return "s", {"a": self.fan_inlet}

    def fan(self) -> Names:
        """Name the steps of the supply fan."""
        return "", {"i": self.fan_inlet}

    def fan_of_aim(self) -> Names:
        """Name the steps of the fan where the air behind it is what is given."""
        return "", {"i": self.behind_aim}

    def back_over_fan(self) -> Names:
        """Name the steps of going back from the unit's leaving air over its fan."""
        return self.behind_aim, {"i": "u", "d": "f"}

    @property
    def behind_aim(self) -> str:
        """The air in front of the fan where the air behind it is what is given."""
        return "f"

    def fan_volume(self) -> Names:
        """Name the steps of the volume at the supply fan's inlet."""
        return self.fan_inlet, {}


class CoolingLetters(Letters):
    """The letters of a unit's air at a cooling condition.

    Args:
        at: the evaluation.
    """

    def __init__(self, at: CoolingPath) -> None:
        self._at = at

    # Which letter the air of a place has

    @property
    def fan_inlet(self) -> str:
        """The air at the supply fan's inlet."""
        return "m" if self._at.blows_through else self.behind_coil

    @property
    def intake(self) -> str:
        """Outdoor air as it comes to be mixed."""
        return "rec" if self._at.recovery_acts else "o"

    @property
    def to_coil(self) -> str:
        """The air that goes to the coils."""
        if self._at.blows_through:
            return "a"
        return "n" if self._at.richer_at_coil else "m"

    @property
    def around(self) -> str:
        """The air that goes around the coil."""
        returned = self._at.unit.bypass_source == "return"
        if self._at.blows_through:
            return "b" if returned else "a"
        return "ret" if returned else "m"

    @property
    def warmed(self) -> str:
        """The coil's air past a wrap-around."""
        return "w" if self._at.wrap else "l"

    @property
    def behind_coil(self) -> str:
        """The air behind the coil with what went around it."""
        return "j" if known(lambda: self._at.bypass_mass) else self.warmed

    @property
    def aim(self) -> str:
        """The air that the coil is to leave: l where it does, d where it runs otherwise."""
        return "l" if known(lambda: self._at.coil_mode) in {None, "wet"} else "d"

    @property
    def warmed_aim(self) -> str:
        """The air that the coil is to leave, past a wrap-around."""
        return ("w" if self.aim == "l" else "wd") if self._at.wrap else self.aim

    @property
    def behind_aim(self) -> str:
        """The same with what went around the coil; what leaves the unit where no fan warms it."""
        if not known(lambda: self._at.drawn_through_warm):
            return "u"
        return ("j" if self.aim == "l" else "jd") if self._at.bypass_mass else self.warmed_aim

    @property
    def before_reheat(self) -> str:
        """The air that leaves the cooling part of the unit."""
        return "g" if self._at.drawn_through_warm else self.behind_coil

    @property
    def reheated(self) -> str:
        """The air behind the reheat."""
        warmed = self._at.reheated.db > self._at.before_reheat.db
        return "h" if warmed else self.before_reheat

    # What the symbols of a computation become

    def exhaust(self) -> Names:
        """Name the steps of a recovery, whose exhaust may be as much as the outdoor air."""
        names = {"i": "o"}
        return "", names if self._at.unit.stated("exhaust_airflow") else names | {"x": "o"}

    def mixing(self) -> Names:
        """Name the steps of the mixed air."""
        return "m", {"p": "o", "a": self.intake, "q": "ret", "b": "ret"}

    def mixing_for_coil(self) -> Names:
        """Name the steps of the coil's own mixture."""
        return "n", {"p": "o", "a": self.intake, "q": "cr", "b": "ret"}

    def to_coil_past_fan(self) -> Names:
        """Name the steps of the air to the coil past a fan that blows through."""
        return "a", {"i": "n" if self._at.richer_at_coil else "m", "d": "f"}

    def precooling(self) -> Names:
        """Name the steps of a first coil."""
        return "1", {"e": self.to_coil, **_FIRST_COIL}

    def entering(self) -> Names:
        """Name the steps of a wrap-around's first side."""
        return "e", {"i": "l1" if self._at.has_precool else self.to_coil, "d": "w"}

    def scheduled_leaving(self) -> Names:
        """Name the steps of the scheduled leaving air, of the unit or of the coil."""
        return "u" if self._at.unit.cool_lat_at == "unit" else self.aim, {}

    def left_by_loads(self) -> Names:
        """Name the steps of a leaving state that follows from the loads."""
        names = {"l": self.aim, "el": f"e{self.aim}", "t": "tk", "s": "sk"}
        if self._at.unit.stated("cool_eat_db", "cool_eat_wb"):
            names |= {"e": "k", "el": "kl"}
        return "", names

    def unmixing(self) -> Names:
        """Name the steps of taking out of the air behind the coil what went around it."""
        return self.warmed_aim, {"p": "s", "a": self.behind_aim, "q": "b", "b": self.around}

    def back_over_wrap(self) -> Names:
        """Name the steps of going back over a wrap-around's second side."""
        return self.aim, {"i": self.warmed_aim if self._at.bypass_mass else self.behind_aim,
                          "d": "w"}  # fmt: skip

    def past_wrap(self) -> Names:
        """Name the steps of a wrap-around's second side."""
        return "w", {"i": "l", "d": "w"}

    def rejoining(self) -> Names:
        """Name the steps of the air that went around the coil joining in again."""
        return "j", {"p": "c", "a": self.warmed, "q": "b", "b": self.around}

    def past_fan(self) -> Names:
        """Name the steps of the air past a fan that draws through."""
        return "g", {"i": self.behind_coil, "d": "f"}

    def reheating(self) -> Names:
        """Name the steps of the reheated air."""
        return "h", {"i": self.before_reheat}

    def reheat_load(self) -> Names:
        """Name the steps of the reheat's load."""
        return "", {"c": "s", "e": self.before_reheat, "l": self.reheated, "h": "rh"}

    def supply(self) -> Names:
        """Name the steps of the supply air past the duct."""
        return "s", {"i": self.reheated, "d": "duct"}


class HeatingPath(Protocol):
    """What the letters of a heating condition hang on."""

    unit: Unit

    @property
    def blows_through(self) -> bool:
        """Whether the supply fan blows through the coil."""

    @property
    def recovers(self) -> bool:
        """Whether outdoor air passes a recovery."""

    @property
    def preheats_outdoor(self) -> bool:
        """Whether a preheat stands in the outdoor air."""


class HeatingLetters(Letters):
    """The letters of a unit's air at a heating condition, whose room air is the return air.

    Args:
        at: the evaluation.
    """

    def __init__(self, at: HeatingPath) -> None:
        self._at = at

    # Which letter the air of a place has

    @property
    def fan_inlet(self) -> str:
        """The air at the supply fan's inlet."""
        return "m" if self._at.blows_through else "s"

    @property
    def to_recovery(self) -> str:
        """Outdoor air as it meets the recovery or the return air."""
        return "lp" if self._at.preheats_outdoor else "o"

    @property
    def intake(self) -> str:
        """Outdoor air as it comes to be mixed."""
        return "rec" if self._at.recovers else self.to_recovery

    @property
    def to_coils(self) -> str:
        """The air that goes to the coils."""
        return "a" if self._at.blows_through else "m"

    @property
    def to_preheat(self) -> str:
        """The air that goes to the preheat."""
        return "o" if self._at.preheats_outdoor else self.to_coils

    # What the symbols of a computation become

    def preheating(self) -> Names:
        """Name the steps of the air past the preheat."""
        return "lp", {"i": self.to_preheat}

    def preheat_load(self) -> Names:
        """Name the steps of the preheat's load."""
        flow = "o" if self._at.preheats_outdoor else "s"
        return "", {"c": flow, "e": self.to_preheat, "l": "lp", "h": "ph"}

    def exhaust(self) -> Names:
        """Name the steps of the recovery, whose exhaust may be as much as the outdoor air."""
        names = {"i": self.to_recovery, "ret": "r"}
        return "", names if self._at.unit.stated("exhaust_airflow") else names | {"x": "o"}

    def mixing(self) -> Names:
        """Name the steps of the mixed air."""
        return "m", {"p": "o", "a": self.intake, "q": "r", "b": "r"}

    def moistening(self) -> Names:
        """Name the steps of the moisture that the outdoor air lacks."""
        return "o", {"o": self.intake}
