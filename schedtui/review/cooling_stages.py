"""The stages of a cooling condition's working, in the order that the air takes.

Says which figure stands where and what is said of it; computes nothing, and formats nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.figure import known
from schedtui.review.fluid_side import COOLING
from schedtui.review.part_load import PartLoad
from schedtui.review.stages import Outcome, Stage, Stop, fan_words, flow_words, outcome
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIR_MASS_FLOW, HUMIDITY_RATIO, LOAD, RATIO, REFRIGERATION, TEMPERATURE

if TYPE_CHECKING:
    from collections.abc import Iterator

    from schedtui.air.step import Number
    from schedtui.review.cooling import Cooling


def cooling_outcomes(at: Cooling) -> Iterator[Outcome]:
    """Yield what a cooling condition requires beside what is scheduled, or done in the room."""
    unit, share = at.unit, at.condition
    for label, quantity, stated, required in (
        ("Cooling total", LOAD, Unit.cool_total, lambda: at.required_total),
        ("Cooling sensible", LOAD, Unit.cool_sensible, lambda: at.required_sensible),
        ("Cooling tons", REFRIGERATION, Unit.cool_tons, lambda: at.coil.tons),
        ("First coil total", LOAD, Unit.precool_total, lambda: at.precool.total),
        ("Reheat", LOAD, Unit.reheat_total, lambda: at.reheat_load),
    ):
        yield from outcome(label, quantity, known(required), unit.value_of(stated))
    for label, stated, percent, met in (
        ("Room sensible, met", Unit.room_sensible, share.sensible_load,
         lambda: at.room_met.sensible),
        ("Room latent, met", Unit.room_latent, share.latent_load, lambda: at.room_met.latent),
    ):  # fmt: skip
        load = unit.value_of(stated)
        if load is not None:
            yield from outcome(label, LOAD, load * percent / 100, known(met))
    if COOLING.runs(unit) and COOLING.stated(unit):
        carried = known(COOLING.carried, unit, at.site.system)
        yield from outcome("Cooling water carries", LOAD, known(lambda: at.coil.total), carried)


def part_load_stage(at: PartLoad) -> Stage:
    """Return what control and room settle at, which nothing but a search finds."""
    settings = at.settings
    given: list[Number] = [
        ("W_r", settings.room_w, HUMIDITY_RATIO),
        ("m_s", settings.supply_mass, AIR_MASS_FLOW),
        ("m_o", at.outdoor_mass, AIR_MASS_FLOW),
        ("x_b", settings.bypass, RATIO),
        ("q_f", at.fan_heat, LOAD),
    ]
    if _warms_again(at):
        given += [("t_h", at.reheated.db, TEMPERATURE), ("q_rh", at.reheat_load, LOAD)]
    words = (
        f"The room has less than its design loads, and the unit sheds the rest by {at.control}. "
        "Its setting and the room's humidity hang on each other and are found by search: what "
        "they settle at goes in here, and comes out as what the supply air does in the room."
    )
    return Stage("What part load settles at", (words,), given=tuple(given))


# Where each figure of the air path stands


def _takes_outdoor_air(at: Cooling) -> bool:
    return at.outdoor_mass > 0


def _is_wet(at: Cooling) -> bool:
    return at.coil_mode == "wet"


def _recovery_words(at: Cooling) -> str:
    if at.recovery_acts:
        return ""
    which = "enthalpy" if at.unit.recovery_latent else "dry bulb"
    return (
        f"The recovery would not lower the {which} of the outdoor air, so it does not act here "
        "and the outdoor air passes as it is."
    )


def _flow_words(at: Cooling) -> str:
    return "" if isinstance(at, PartLoad) else flow_words(at)


def _takes_volume_at_fan(at: Cooling) -> bool:
    return at.basis == "actual" and not isinstance(at, PartLoad)


def _warms_again(at: Cooling) -> bool:
    return at.reheated.db > at.before_reheat.db


def _is_to_reheat(at: Cooling) -> bool:
    return _warms_again(at) if isinstance(at, PartLoad) else at.unit.stated("reheat_lat_db")


def _leaving_words(at: Cooling) -> str:
    if isinstance(at, PartLoad):
        if at.estimated:
            return "An estimate: the air leaves with the relative humidity that it has at design."
        return "The coil leaves the air as at design."
    said = []
    if at.leaving_from == "loads":
        said.append(
            "The leaving air follows from the scheduled total and sensible capacity, so nothing "
            "can be judged by it."
        )
    if at.goes_back and not at.blows_through and at.fan_heat:
        said.append(
            "Going back over the fan the turn shown is the settled one: the air that comes out "
            "is the one that the fan's heat was taken for."
        )
    return " ".join(said)


def _unit_words(at: Cooling) -> str:
    if at.leaving_from == "room":
        return "No leaving air is scheduled: it is what the room's loads need."
    return "The scheduled leaving air is that of the unit."


def _reheat_words(at: Cooling) -> str:
    return (
        "" if _warms_again(at) else "The air is no colder than that: the reheat adds nothing here."
    )


def _mode_words(at: Cooling) -> str:
    if at.coil_mode == "dry":
        return (
            "The coil runs dry: the entering air holds less moisture than the air it is to "
            "leave, and a coil adds none. It leaves at the scheduled dry bulb with the moisture "
            "it entered with."
        )
    if at.coil_mode == "off":
        return (
            "The coil is off: the entering air is no warmer than the air it is to leave, and a "
            "cooling coil does not heat. The air passes as it is."
        )
    return ""


COOLING_STOPS: tuple[Stop[Cooling], ...] = (
    Stop("Outdoor air", ("outdoor",), "o", lambda at: bool(at.unit.outdoor_airflow)),
    Stop("Room air", ("room",), "r", lambda at: at.unit.stated("room_db")
         or not at.unit.stated("return_db")),
    Stop("Return air", ("return_air",), "ret"),
    Stop("Supply and outdoor air flow", ("supply_mass", "outdoor_mass", "outdoor_fraction"),
         words=_flow_words),
    Stop("Outdoor air behind the recovery", ("recovery_reaches",), "rec",
         lambda at: at.has_recovery and _takes_outdoor_air(at), _recovery_words),
    Stop("Mixed air", ("mixed",), "m"),
    Stop("Air flow through and around the coil", ("bypass_mass", "coil_mass")),
    Stop("Volume at the supply fan's inlet", ("fan_inlet_volume",),
         where=lambda at: at.blows_through and _takes_volume_at_fan(at)),
    Stop("Supply fan, blowing through", ("fan_heat",),
         where=lambda at: at.blows_through, words=fan_words),
    Stop("The coil's own mixture", ("mixed_for_coil",), "n", lambda at: at.richer_at_coil),
    Stop("Air to the coil", ("to_coil",), "a", lambda at: at.blows_through),
    Stop("Air around the coil", ("bypassed",), lambda at: at.letters.around,
         lambda at: at.blows_through and at.bypass_mass > 0),
    Stop("Air leaving the first coil", ("precooled",), "l1", lambda at: at.has_precool),
    Stop("First coil's load", ("precool",), where=lambda at: at.has_precool),
    Stop("Air entering the coil", ("coil_entering",), "e"),
    Stop("Entering air as scheduled in the row", ("row_entering",), "k",
         lambda at: at.leaving_from == "loads" and at.unit.stated("cool_eat_db", "cool_eat_wb")),
    Stop("Air that is to leave the unit", ("leaving_unit",), "u",
         lambda at: at.goes_back and not isinstance(at, PartLoad), _unit_words),
    Stop("Air that the coil is to leave", ("leaving_aimed_at",),
         lambda at: at.letters.aim, words=_leaving_words),
    Stop("Air leaving the coil", ("coil_leaving",), "l", lambda at: not _is_wet(at), _mode_words),
    Stop("Coil load", ("coil",)),
    Stop("Apparatus dew point and bypass factor", ("adp", "bypass_factor"), where=_is_wet),
    Stop("Air past the wrap-around's second side", ("past_wrap",), "w",
         lambda at: at.wrap > 0),
    Stop("Air joined by what went around the coil", ("rejoined",), "j",
         lambda at: at.bypass_mass > 0),
    Stop("Volume at the supply fan's inlet", ("fan_inlet_volume",),
         where=lambda at: not at.blows_through and _takes_volume_at_fan(at)),
    Stop("Supply fan, drawing through", ("fan_heat", "fan_rise"),
         where=lambda at: not at.blows_through, words=fan_words),
    Stop("Air past the fan", ("before_reheat",), "g", lambda at: at.drawn_through_warm),
    Stop("Reheated air", ("reheated",), lambda at: at.letters.reheated,
         _is_to_reheat, _reheat_words),
    Stop("Reheat load", ("reheat_load",),
         where=lambda at: _is_to_reheat(at) and _warms_again(at)),
    Stop("Supply air", ("supply",), "s"),
    Stop("What the supply air does in the room", ("room_met",)),
    Stop("Net capacity", ("required_total", "required_sensible"),
         where=lambda at: at.unit.cool_basis == "net"),
)  # fmt: skip
