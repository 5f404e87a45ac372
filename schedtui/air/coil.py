"""Coils: the load of a cooling or heating coil, and the air that leaves one.

Customary air-side definitions throughout: the heat that leaves with the condensate is told, and is
not taken off the total.

Knows nothing of water, nor of which numbers are scheduled and which computed.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Final, Literal

from schedtui.air.derivation import saturation
from schedtui.air.flow import (
    PER_HOUR,
    PER_THOUSAND,
    enthalpy_difference,
    heat_flow,
    moisture_flow,
)
from schedtui.air.saturation import first_crossing
from schedtui.air.step import HANDBOOK, HANDBOOK_COILS, Number, Step, Steps, enthalpy_step
from schedtui.errors import AirError
from schedtui.units import (
    AIR_MASS_FLOW,
    ENTHALPY,
    HUMIDITY_RATIO,
    LOAD,
    MOISTURE_FLOW,
    RATIO,
    REFRIGERATION,
    TEMPERATURE,
    System,
)

if TYPE_CHECKING:
    from schedtui.air.state import State

CoilMode = Literal["wet", "dry", "off"]
"""How a cooling coil runs: removing moisture, cooling only, or not at all."""

LOAD_PER_TON: Final[dict[System, float]] = {"IP": 12.0, "SI": 3.5168528}
"""A ton of refrigeration, 12 000 Btu/h [MBH | kW]."""

_CONDENSATE_ENTHALPY: Final[dict[System, str]] = {"IP": "(t_l − 32)", "SI": "4.186 · t_l"}
_CONDENSATE_UNITS: Final[dict[System, str]] = {"IP": " / 1000", "SI": " / 3600"}
_DRY = 1e-9  # humidity ratio that a coil must take out to count as wet


@dataclass(frozen=True, slots=True)
class CoilLoad:
    """What a cooling coil does to the air.

    Args:
        total: total heat taken out [MBH | kW].
        sensible: sensible heat taken out [MBH | kW].
        latent: the rest of the total [MBH | kW].
        shr: sensible over total; None where the total is 0.
        tons: the total in tons of refrigeration.
        condensate: moisture taken out [lb/h | kg/h].
        condensate_heat: heat that leaves with it, part of the total [MBH | kW].
    """

    total: float
    sensible: float
    latent: float
    shr: float | None
    tons: float
    condensate: float
    condensate_heat: float


def coil_load(mass: float, entering: State, leaving: State, steps: Steps | None = None) -> CoilLoad:
    """Return the load of a cooling coil from the air on its two sides.

    Args:
        mass: dry air through the coil [lb/h | kg/s].
        entering: air that enters.
        leaving: air that leaves.
        steps: the working to append to.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, moist air cooling and dehumidification;
    the split after ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils.

    >>> from schedtui.air.state import Air
    >>> air = Air("IP", 14.696)
    >>> load = coil_load(45_000, air.by_wet_bulb(80, 67), air.by_wet_bulb(55, 54))
    >>> load.total, load.sensible
    (399.5, 274.3)
    """
    air, system = entering.air, entering.air.system
    total = heat_flow(mass, entering.h - leaving.h, system)
    # Sensible: from the entering to the leaving dry bulb at the leaving humidity ratio.
    corner = air.enthalpy(entering.db, leaving.w)
    sensible = heat_flow(mass, corner - leaving.h, system)
    condensate = moisture_flow(mass, entering.w - leaving.w, system)
    load = CoilLoad(
        total=total,
        sensible=sensible,
        latent=total - sensible,
        shr=sensible / total if total else None,
        tons=total / LOAD_PER_TON[system],
        condensate=condensate,
        condensate_heat=_condensate_heat(condensate, leaving),
    )
    if steps is not None:
        _append_load(steps, mass, entering, leaving, corner, load)
        _append_condensate(steps, mass, entering, leaving, load)
    return load


def heating_load(
    mass: float, entering: State, leaving_db: float, steps: Steps | None = None
) -> float:
    """Return the load of a heating coil [MBH | kW].

    Args:
        mass: dry air through the coil [lb/h | kg/s].
        entering: air that enters.
        leaving_db: dry bulb that it leaves at [°F | °C].
        steps: the working to append to.

    Raises:
        AirError: the dry bulb is out of range.

    Source: ASHRAE Handbook—Fundamentals, ch. 1, moist air sensible heating.
    """
    system = entering.air.system
    # A mixture's enthalpy is not to the last bit that of its dry bulb: no warming, no load.
    leaving = entering if leaving_db == entering.db else entering.heated_to(leaving_db)
    load = heat_flow(mass, leaving.h - entering.h, system)
    if steps is not None:
        numbers: tuple[Number, ...] = (
            ("m_c", mass, AIR_MASS_FLOW),
            ("h_l", leaving.h, ENTHALPY),
            ("h_e", entering.h, ENTHALPY),
        )
        formula = f"q_h = m_c · (h_l − h_e){PER_THOUSAND[system]}"
        steps.append(Step("q_h", "heating load", formula, numbers, load, LOAD, HANDBOOK))
    return load


def apparatus_dew_point(
    entering: State, leaving: State, steps: Steps | None = None
) -> float | None:
    """Return the apparatus dew point [°F | °C], None where the coil has none.

    It is where the straight line from entering to leaving air in the temperature–humidity plane
    first meets saturation beyond the leaving air. A dry coil has none, nor has one whose line
    passes saturation by.

    Args:
        entering: air that enters the coil.
        leaving: air that leaves it.
        steps: the working to append to.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils; AHRI 410.
    """
    adp = None
    if entering.db > leaving.db and entering.w - leaving.w > _DRY:
        adp = first_crossing(entering, leaving)
    if steps is not None and adp is not None:
        _append_adp(steps, entering, leaving, adp)
    return adp


def bypass_factor(entering: State, leaving: State, adp: float, steps: Steps | None = None) -> float:
    """Return the share of the air that passes the coil untouched, as it were.

    Args:
        entering: air that enters the coil.
        leaving: air that leaves it.
        adp: apparatus dew point [°F | °C].
        steps: the working to append to.

    Raises:
        AirError: the entering air is as cold as the apparatus dew point.

    Source: ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils.
    """
    if not entering.db > adp:
        raise AirError("the entering air is no warmer than the apparatus dew point")
    factor = (leaving.db - adp) / (entering.db - adp)
    if steps is not None:
        numbers: tuple[Number, ...] = (
            ("t_l", leaving.db, TEMPERATURE),
            ("t_adp", adp, TEMPERATURE),
            ("t_e", entering.db, TEMPERATURE),
        )
        formula = "BF = (t_l − t_adp) / (t_e − t_adp)"
        steps.append(Step("BF", "bypass factor", formula, numbers, factor, RATIO, HANDBOOK_COILS))
    return factor


def leaving_of(
    entering: State,
    mass: float,
    lat_db: float,
    total: float,
    sensible: float,
    steps: Steps | None = None,
) -> State:
    """Return the leaving state that a stated total and sensible load leave behind.

    The latent load, total less sensible, is what the moisture taken out gives up at the entering
    dry bulb; the leaving humidity ratio follows from it.

    Args:
        entering: air that enters the coil.
        mass: dry air through the coil [lb/h | kg/s].
        lat_db: leaving dry bulb [°F | °C].
        total: total load [MBH | kW].
        sensible: sensible load [MBH | kW].
        steps: the working to append to.

    Raises:
        AirError: no air flows, sensible is above total, or the latent load is more than all the
            moisture of the entering air.

    Source: the definition of `coil_load`, solved for the leaving humidity ratio.
    """
    if sensible > total:
        raise AirError("a sensible load above the total leaves no leaving state")
    air = entering.air
    corner = entering.h - enthalpy_difference(mass, total - sensible, air.system)
    leaving = air.by_dry_bulb_and_enthalpy(entering.db, corner).heated_to(lat_db)
    if steps is not None:
        _append_leaving(steps, entering, mass, total, sensible, corner, leaving)
    return leaving


def coil_leaving(
    entering: State, scheduled_leaving: State, steps: Steps | None = None
) -> tuple[State, CoilMode]:
    """Return the air that leaves a cooling coil held at its scheduled leaving state, and its mode.

    A coil never heats: entering air no warmer than the scheduled leaving dry bulb passes as it is.
    A coil never moistens: entering air drier than the scheduled leaving air keeps its moisture.

    Args:
        entering: air that enters the coil.
        scheduled_leaving: air that is to leave it.
        steps: the working to append to, where the coil runs dry; d is the scheduled leaving air.
    """
    if entering.db <= scheduled_leaving.db:
        return entering, "off"
    if entering.w < scheduled_leaving.w:
        dry = entering.heated_to(scheduled_leaving.db)
        if steps is not None:
            _append_dry(steps, entering, dry)
        return dry, "dry"
    return scheduled_leaving, "wet"


def _condensate_heat(condensate: float, leaving: State) -> float:
    """Return the enthalpy flow of the condensate, liquid at the leaving dry bulb [MBH | kW].

    Source: ASHRAE Handbook—Fundamentals 2017, ch. 1, enthalpy of water in eq. 33: t − 32 Btu/lb,
    4.186 t kJ/kg.
    """
    if leaving.air.system == "IP":
        return condensate * (leaving.db - 32) / 1000
    return condensate * 4.186 * leaving.db / 3600


def _append_dry(steps: Steps, entering: State, leaving: State) -> None:
    """Append the air that leaves a coil at its scheduled dry bulb and no drier than it entered."""
    t_d, w_e = ("t_d", leaving.db, TEMPERATURE), ("W_e", entering.w, HUMIDITY_RATIO)
    name = "leaving dry bulb: as scheduled"
    steps.append(Step("t_l", name, "t_l = t_d", (t_d,), leaving.db, TEMPERATURE, HANDBOOK_COILS))
    name = "leaving humidity ratio: as it entered"
    steps.append(Step("W_l", name, "W_l = W_e", (w_e,), leaving.w, HUMIDITY_RATIO, HANDBOOK_COILS))
    t_l, w_l = ("t_l", leaving.db, TEMPERATURE), ("W_l", leaving.w, HUMIDITY_RATIO)
    name = "enthalpy of the leaving air"
    steps.append(enthalpy_step(leaving.air.system, "h_l", name, t_l, w_l, leaving.h))


def _append_adp(steps: Steps, entering: State, leaving: State, adp: float) -> None:
    """Append the apparatus dew point and, for it, both sides of the equation that it solves."""
    t_adp: Number = ("t_adp", adp, TEMPERATURE)
    name = "apparatus dew point: the temperature where line and saturation meet, as shown next"
    formula = "W_sat(t_adp) = W_adp(t_adp)"
    steps.append(Step("t_adp", name, formula, (), adp, TEMPERATURE, HANDBOOK_COILS))
    slope = (entering.w - leaving.w) / (entering.db - leaving.db)
    numbers: tuple[Number, ...] = (
        ("W_l", leaving.w, HUMIDITY_RATIO),
        ("W_e", entering.w, HUMIDITY_RATIO),
        t_adp,
        ("t_l", leaving.db, TEMPERATURE),
        ("t_e", entering.db, TEMPERATURE),
    )
    formula = "W_adp = W_l + (W_e − W_l) · (t_adp − t_l) / (t_e − t_l)"
    name = "humidity ratio there on the line through entering and leaving air"
    w = leaving.w + slope * (adp - leaving.db)
    steps.append(Step("W_adp", name, formula, numbers, w, HUMIDITY_RATIO, HANDBOOK_COILS))
    saturation(steps, leaving.air.formulas, t_adp, leaving.air.pressure)


def _append_load(
    steps: Steps, mass: float, entering: State, leaving: State, corner: float, load: CoilLoad
) -> None:
    """Append total, sensible, latent, their ratio and the tons."""
    system = entering.air.system
    m: Number = ("m_c", mass, AIR_MASS_FLOW)
    h_e: Number = ("h_e", entering.h, ENTHALPY)
    h_l: Number = ("h_l", leaving.h, ENTHALPY)
    h_el: Number = ("h_el", corner, ENTHALPY)
    q_t: Number = ("q_t", load.total, LOAD)
    q_s: Number = ("q_s", load.sensible, LOAD)
    per = PER_THOUSAND[system]
    total = f"q_t = m_c · (h_e − h_l){per}"
    sensible = f"q_s = m_c · (h_el − h_l){per}"
    steps.append(Step("q_t", "coil total", total, (m, h_e, h_l), load.total, LOAD, HANDBOOK))
    steps.append(
        enthalpy_step(
            system,
            "h_el",
            "enthalpy at the entering dry bulb and the leaving humidity ratio",
            ("t_e", entering.db, TEMPERATURE),
            ("W_l", leaving.w, HUMIDITY_RATIO),
            corner,
        )
    )
    steps.append(
        Step("q_s", "coil sensible", sensible, (m, h_el, h_l), load.sensible, LOAD, HANDBOOK)
    )
    steps.append(
        Step("q_l", "coil latent", "q_l = q_t − q_s", (q_t, q_s), load.latent, LOAD, HANDBOOK)
    )
    if load.shr is not None:
        name = "sensible heat ratio"
        steps.append(Step("SHR", name, "SHR = q_s / q_t", (q_s, q_t), load.shr, RATIO, HANDBOOK))
    tons = f"tons = q_t / {LOAD_PER_TON[system]:.8g}"
    steps.append(Step("tons", "total in tons", tons, (q_t,), load.tons, REFRIGERATION, HANDBOOK))


def _append_condensate(
    steps: Steps, mass: float, entering: State, leaving: State, load: CoilLoad
) -> None:
    """Append the condensate and the heat that leaves with it."""
    system = entering.air.system
    numbers: tuple[Number, ...] = (
        ("m_c", mass, AIR_MASS_FLOW),
        ("W_e", entering.w, HUMIDITY_RATIO),
        ("W_l", leaving.w, HUMIDITY_RATIO),
    )
    formula = f"m_w = m_c · (W_e − W_l){PER_HOUR[system]}"
    water = load.condensate
    steps.append(Step("m_w", "condensate", formula, numbers, water, MOISTURE_FLOW, HANDBOOK))
    formula = f"q_w = m_w · {_CONDENSATE_ENTHALPY[system]}{_CONDENSATE_UNITS[system]}"
    numbers = (("m_w", water, MOISTURE_FLOW), ("t_l", leaving.db, TEMPERATURE))
    name = "heat that leaves with the condensate; part of the total, not taken off it"
    steps.append(Step("q_w", name, formula, numbers, load.condensate_heat, LOAD, HANDBOOK))


def _append_leaving(
    steps: Steps,
    entering: State,
    mass: float,
    total: float,
    sensible: float,
    corner: float,
    leaving: State,
) -> None:
    """Append how the leaving humidity ratio follows from the loads."""
    times, coefficients = {
        "IP": (" · 1000", ("0.24", "1061", "0.444")),
        "SI": ("", ("1.006", "2501", "1.86")),
    }[entering.air.system]
    numbers: tuple[Number, ...] = (
        ("h_e", entering.h, ENTHALPY),
        ("q_t", total, LOAD),
        ("q_s", sensible, LOAD),
        ("m_c", mass, AIR_MASS_FLOW),
    )
    formula = f"h_el = h_e − (q_t − q_s){times} / m_c"
    name = "enthalpy at the entering dry bulb and the leaving humidity ratio"
    steps.append(Step("h_el", name, formula, numbers, corner, ENTHALPY, HANDBOOK))
    dry, vapour, steam = coefficients
    formula = f"W_l = (h_el − {dry} · t_e) / ({vapour} + {steam} · t_e)"
    numbers = (("h_el", corner, ENTHALPY), ("t_e", entering.db, TEMPERATURE))
    name = "leaving humidity ratio"
    steps.append(Step("W_l", name, formula, numbers, leaving.w, HUMIDITY_RATIO, HANDBOOK))
    t_l, w_l = ("t_l", leaving.db, TEMPERATURE), ("W_l", leaving.w, HUMIDITY_RATIO)
    name = "enthalpy of the leaving air"
    steps.append(enthalpy_step(entering.air.system, "h_l", name, t_l, w_l, leaving.h))
