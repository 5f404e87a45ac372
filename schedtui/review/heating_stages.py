"""The stages of a heating condition's working, in the order that the air takes.

Says which figure stands where and what is said of it; computes nothing, and formats nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.figure import known
from schedtui.review.fluid_side import HEATING, HEATING_SIDES
from schedtui.review.stages import Outcome, Stop, fan_words, flow_words, outcome
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD, MOISTURE_FLOW

if TYPE_CHECKING:
    from collections.abc import Iterator

    from schedtui.review.heating import Heating

_OF_HEATING = (
    "room_heat_db", "room_heat", "heat_lat_db", "heat_total", "preheat_lat_db", "preheat_total",
    "humidifier",
)  # fmt: skip


def nothing_heats(unit: Unit) -> bool:
    """Tell whether a unit's row says nothing of heating."""
    return not any(map(unit.stated, _OF_HEATING))


def heating_outcomes(at: Heating) -> Iterator[Outcome]:
    """Yield what a heating condition requires beside what is scheduled, or done in the room."""
    unit, system = at.unit, at.site.system
    loads = {
        Unit.preheat_total: known(lambda: at.preheat_load),
        Unit.heat_total: known(lambda: at.heat_load),
    }
    for field, load in loads.items():
        yield from outcome(field.label, LOAD, load, unit.value_of(field))
    needs = unit.value_of(Unit.room_heat)
    if needs is not None:
        met = known(lambda: at.room_heat_met)
        yield from outcome("Room heat, met", LOAD, needs * at.condition.sensible_load / 100, met)
    moisture, scheduled = known(lambda: at.humidifier_load), unit.value_of(Unit.humidifier)
    yield from outcome("Moisture to add", MOISTURE_FLOW, moisture, scheduled)
    for side in HEATING_SIDES:
        if side.runs(unit) and side.stated(unit):
            label = f"{'Heating' if side is HEATING else 'Preheat'} water carries"
            carried = known(side.carried, unit, system)
            yield from outcome(label, LOAD, loads[side.total], carried)


# Where each figure of the air path stands


def _takes_outdoor_air(at: Heating) -> bool:
    return at.outdoor_mass > 0


def _recovers(at: Heating) -> bool:
    return at.recovers


def _room_words(at: Heating) -> str:
    if at.unit.stated("room_heat_rh"):
        return ""
    return "No humidity of the room is stated: it holds what moisture the outdoor air brings."


def _flow_words(at: Heating) -> str:
    said = [flow_words(at)]
    if at.unit.heat_airflow is not None:
        said.insert(0, "In heating the unit supplies heat_airflow.")
    return " ".join(filter(None, said))


def _frost_words(at: Heating) -> str:
    share = at.recovery_share
    if at.room.db <= at.to_recovery.db:
        return "The return air is no warmer than the outdoor air: the recovery does not act."
    if share == 0:
        return "The return air itself is no warmer than the exhaust may be: nothing is recovered."
    if share < 1:
        return (
            "The exhaust would freeze at the rated effectiveness. The recovery is held back so "
            "far that the exhaust leaves at the least temperature allowed."
        )
    if at.exhaust_mass == 0:
        return "No exhaust passes the recovery: there is nothing to freeze."
    return "The exhaust does not freeze: the recovery works with all of its effectiveness."


def _preheat_words(at: Heating) -> str:
    if at.preheat_leaving is at.preheat_entering:
        return "The air is no colder than that: the preheat adds nothing here."
    return ""


def _leaving_words(at: Heating) -> str:
    said = []
    if not at.unit.stated("heat_lat_db"):
        said.append("No leaving air is scheduled: it is what the room's heat needs.")
    if at.heat_leaving is at.heat_entering:
        said.append("The air is no colder than that: the heating coil adds nothing here.")
    if not at.blows_through:
        said.append("The heat of the fan that draws through is not counted, the safe side.")
    return " ".join(said)


HEATING_STOPS: tuple[Stop[Heating], ...] = (
    Stop("Outdoor air in heating", ("outdoor",), "o",
         lambda at: bool(at.unit.outdoor_airflow) or not at.unit.stated("room_heat_rh")),
    Stop("Room and return air in heating", ("room",), "r", words=_room_words),
    Stop("Supply and outdoor air flow in heating",
         ("supply_mass", "outdoor_mass", "outdoor_fraction"), words=_flow_words),
    Stop("Outdoor air past the preheat", ("preheat_leaving",), "lp",
         lambda at: at.preheats_outdoor and _takes_outdoor_air(at), _preheat_words),
    Stop("Preheat load", ("preheat_load",),
         where=lambda at: at.preheats_outdoor and _takes_outdoor_air(at)),
    Stop("Frost limit of the recovery", ("recovery_share",), where=_recovers, words=_frost_words),
    Stop("Outdoor air behind the recovery in heating", ("recovered",), "rec", _recovers),
    Stop("Mixed air in heating", ("mixed",), "m"),
    Stop("Volume at the supply fan's inlet in heating", ("fan_inlet_volume",),
         where=lambda at: at.blows_through and at.basis == "actual"),
    Stop("Supply fan in heating, blowing through", ("fan_heat",),
         where=lambda at: at.blows_through, words=fan_words),
    Stop("Air to the heating coils", ("to_coils",), "a", lambda at: at.blows_through),
    Stop("Air leaving the preheat", ("preheat_leaving",), "lp",
         lambda at: at.preheats_mixed, _preheat_words),
    Stop("Preheat load", ("preheat_load",), where=lambda at: at.preheats_mixed),
    Stop("Air entering the heating coil", ("heat_entering",), "eh"),
    Stop("Air leaving the heating coil, the supply air", ("heat_leaving",), "s",
         words=_leaving_words),
    Stop("Volume at the supply fan's inlet in heating", ("fan_inlet_volume",),
         where=lambda at: not at.blows_through and at.basis == "actual"),
    Stop("Heating coil load", ("heat_load",)),
    Stop("What the supply air brings the room", ("room_heat_met",),
         where=lambda at: at.unit.stated("heat_lat_db")),
    Stop("Moisture to add", ("humidifier_load",),
         where=lambda at: at.unit.stated("room_heat_rh") and _takes_outdoor_air(at)),
)  # fmt: skip
