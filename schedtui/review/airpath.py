"""What cooling and heating have in common: outdoor air, flows, and the supply fan.

Each state and number is a figure: computed when first asked for, absent with the keys that would
give it. Judges nothing.
"""

from __future__ import annotations

from abc import ABC, abstractmethod
from typing import TYPE_CHECKING, Any, Self, cast

from schedtui.air import fan
from schedtui.air.derivation import same_moisture
from schedtui.air.flow import AirflowBasis, dry_air_mass
from schedtui.air.step import DEFINITION, Step, Steps
from schedtui.errors import Absent, AirError
from schedtui.review.figure import figure
from schedtui.review.letters import Letters, Names
from schedtui.schedule.catalogue.condition import HUMIDITIES, Condition
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIR_MASS_FLOW, RATIO

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.air.state import State
    from schedtui.review.site import Site
    from schedtui.schedule.catalogue.field import Field

_SETTLED = 1e-12  # relative change at which an iteration has settled
_MOST_TURNS = 100


class AirPath(ABC):
    """One unit at one condition.

    Args:
        unit: the unit as scheduled.
        condition: the design condition.
        site: where the unit stands.
        steps: a working to append to, in the order that figures are asked for.
        supply_mass: the dry air supplied [lb/h | kg/s], for a trial of what follows from it; None
            to have it from the supply airflow.
    """

    def __init__(
        self,
        unit: Unit,
        condition: Condition,
        site: Site,
        steps: Steps | None = None,
        supply_mass: float | None = None,
    ) -> None:
        self.unit = unit
        self.condition = condition
        self.site = site
        self.steps = steps
        self._tried_mass = supply_mass

    @property
    def name(self) -> str:
        """The condition's name."""
        return self.condition.name or ""

    def of(self, unit: Unit) -> Self:
        """Return another unit, or another reading of this one, at the same condition."""
        return type(self)(unit, self.condition, self.site)

    @property
    def letters(self) -> Letters:
        """The letters of the streams, for a working."""
        return Letters()

    def lettered(self, bare: str = "", **subscripts: str) -> Steps | None:
        """Return a place for steps with letters for their streams; None where nobody collects any.

        Args:
            bare: the letter of a property that has no subscript.
            subscripts: what the others become.
        """
        return None if self.steps is None else self.steps.named(bare, subscripts)

    def named(self, names: Callable[[Any], Names]) -> Steps | None:
        """Return the same with letters that hang on the unit, and are asked for only if needed.

        Args:
            names: gives them; a method of this path's letters.
        """
        return None if self.steps is None else self.steps.named(*names(self.letters))

    @figure
    def outdoor(self) -> State:
        """Outdoor air of the condition."""
        return outdoor_air(self.condition, self.site, self.lettered("o"))

    @property
    @abstractmethod
    def fan_inlet(self) -> State:
        """Air at the supply fan's inlet; which that is, cooling and heating know."""

    # Flows

    @figure
    def basis(self) -> AirflowBasis:
        """What the unit's airflows mean."""
        self.unit.refuse_bad(Unit.airflow_basis)
        return cast("AirflowBasis", self.unit.airflow_basis or self.site.airflow_basis)

    @figure
    def supply_airflow(self) -> float:
        """Volume that the supply fan delivers [cfm | L/s]."""
        airflow = self.unit.need(Unit.supply_airflow)
        if airflow == 0:
            raise Absent("supply_airflow", why="the supply airflow is 0")
        return airflow

    @figure
    def supply_mass(self) -> float:
        """Dry air that the supply fan delivers [lb/h | kg/s]."""
        if self._tried_mass is not None:
            return self._tried_mass
        volume = self._settled_inlet_volume() if self.basis == "actual" else None
        return self.mass_of(self.supply_airflow, volume, self.named(Letters.supply_mass))

    @figure
    def outdoor_mass(self) -> float:
        """Dry outdoor air taken in, at most what is supplied [lb/h | kg/s]."""
        self.unit.refuse_bad(Unit.outdoor_airflow)
        airflow = self.unit.outdoor_airflow or 0.0
        if airflow == 0:
            return 0.0
        # Outdoor air equal to supply air as typed means all of it, whatever the volumes weigh;
        # above that the share is held at 1, since nothing is extrapolated.
        mass = self.supply_mass
        if airflow < self.supply_airflow:
            names, volume = self.lettered("o", a="o"), None
            if self.basis == "actual":
                volume = self.outdoor.specific_volume(names)
            mass = self.mass_of(airflow, volume, names)
        if mass >= self.supply_mass:
            self._append_all_outdoor()
        return min(mass, self.supply_mass)

    def _append_all_outdoor(self) -> None:
        """Say in a working that all of the supply air is outdoor air."""
        if self.steps is not None:
            numbers = (("m_s", self.supply_mass, AIR_MASS_FLOW),)
            name = "outdoor air: all of the supply air"
            mass, of = self.supply_mass, AIR_MASS_FLOW
            self.steps.append(Step("m_o", name, "m_o = m_s", numbers, mass, of, DEFINITION))

    @figure
    def outdoor_fraction(self) -> float:
        """Share of outdoor air in the supply, by mass."""
        share = self.outdoor_mass / self.supply_mass
        if self.steps is not None and share:
            numbers = (
                ("m_o", self.outdoor_mass, AIR_MASS_FLOW),
                ("m_s", self.supply_mass, AIR_MASS_FLOW),
            )
            name, formula = "outdoor share, by mass", "x_o = m_o / m_s"
            self.steps.append(Step("x_o", name, formula, numbers, share, RATIO, DEFINITION))
        return share

    @property
    @abstractmethod
    def exhausted(self) -> tuple[State, str]:
        """The air that leaves through the recovery, with its letter; cooling and heating know."""

    @figure
    def exhaust_mass(self) -> float:
        """Dry air that leaves through the recovery; as much as enters where not given."""
        self.unit.refuse_bad(Unit.exhaust_airflow)
        airflow = self.unit.exhaust_airflow
        if airflow is None:
            return self.outdoor_mass
        volume = None
        if self.basis == "actual":
            air, letter = self.exhausted
            volume = air.specific_volume(self.lettered(letter))
        return self.mass_of(airflow, volume, self.lettered("x", a=self.exhausted[1]))

    def mass_of(self, airflow: float, volume: float | None, steps: Steps | None = None) -> float:
        """Return the dry air in a volume flow [lb/h | kg/s].

        Args:
            airflow: as scheduled [cfm | L/s].
            volume: specific volume where it is taken [ft³/lb | m³/kg], for the actual basis.
            steps: the working to append to.
        """
        return dry_air_mass(airflow, self.basis, self.site.air, volume, steps)

    def _settled_inlet_volume(self) -> float:
        """Return the specific volume at the supply fan's inlet [ft³/lb | m³/kg].

        On the actual basis the supply volume is taken there; the state there may depend on the
        share of outdoor air, and that on the supply mass.
        """
        # Standard air to begin with; a start near the end saves turns, and does not move it.
        mass = dry_air_mass(self.supply_airflow, "site", self.site.air)
        for _ in range(_MOST_TURNS):
            trial = type(self)(self.unit, self.condition, self.site, supply_mass=mass)
            volume = trial.fan_inlet.v
            before = mass
            mass = dry_air_mass(self.supply_airflow, "actual", self.site.air, volume)
            if abs(mass - before) <= _SETTLED * before:
                return volume
        raise Absent(why="the supply air's state at the fan does not settle")

    # Supply fan

    @property
    def blows_through(self) -> bool:
        """Whether the supply fan blows through the coil."""
        self.unit.refuse_bad(Unit.fan_position)
        return self.unit.fan_position == "blow-through"

    @figure
    def fan_heat(self) -> float:
        """Heat that the supply fan puts into the air [MBH | kW]; 0 where nothing gives it."""
        return self.fan_heat_at(self.fan_inlet, self.named(Letters.fan))

    @figure
    def fan_rise(self) -> float:
        """Warming of the air by the supply fan [°F | K]."""
        # A stated rise needs no step.
        steps = None if self.unit.fan_rise is not None else self.named(Letters.fan)
        return fan.rise(self.fan_inlet, self.supply_mass, self.fan_heat, steps)

    @figure
    def fan_inlet_volume(self) -> float:
        """Specific volume at the supply fan's inlet [ft³/lb | m³/kg]."""
        return self.fan_inlet.specific_volume(self.named(Letters.fan_volume))

    def fan_heat_at(self, inlet: State, steps: Steps | None = None) -> float:
        """Return the fan's heat for a state at its inlet [MBH | kW]."""
        unit = self.unit
        unit.refuse_bad(Unit.fan_rise, Unit.fan_power, Unit.fan_total_pressure, Unit.fan_efficiency)
        if unit.fan_rise is not None:
            return fan.heat_of_rise(inlet, self.supply_mass, unit.fan_rise, steps)
        power = self._fan_power(inlet, steps)
        if power is None:
            return 0.0
        unit.refuse_bad(Unit.motor_efficiency)
        unit.refuse_bad(Unit.motor_in_airstream)
        efficiency = unit.motor_efficiency or self.site.limits.motor_efficiency
        motor = efficiency if unit.motor_in_airstream else None
        return fan.heat_to_air(power, self.site.system, motor, steps)

    def _fan_power(self, inlet: State, steps: Steps | None) -> float | None:
        """Return the shaft power of the unit's supply fans, as stated or from their pressure."""
        unit = self.unit
        if unit.fan_power is not None:
            unit.refuse_bad(Unit.fan_count)
            return fan.power_of_all(unit.fan_power, unit.fan_count, steps)
        if unit.fan_total_pressure is None or unit.fan_efficiency is None:
            return None
        airflow = fan.inlet_airflow(inlet, self.supply_mass, steps)
        pressure, efficiency = unit.fan_total_pressure, unit.fan_efficiency
        return fan.shaft_power(airflow, pressure, efficiency, self.site.system, steps)

    def before_fan(self, after: State) -> State:
        """Return the air at the inlet of a fan that leaves it in a given state."""
        inlet = after
        for _ in range(_MOST_TURNS):  # the heat may depend on the volume at the inlet
            rise = fan.rise(inlet, self.supply_mass, self.fan_heat_at(inlet))
            before, inlet = inlet, after.heated_to(after.db - rise)
            if abs(inlet.v - before.v) <= _SETTLED * before.v:
                if self.steps is not None:
                    self._append_back_over_fan(after, inlet)
                return inlet
        raise Absent(why="the air in front of the supply fan does not settle")

    def _append_back_over_fan(self, after: State, inlet: State) -> None:
        """Append the settled turn of going back over the fan: what comes out went into it."""
        back = self.named(Letters.back_over_fan)
        if self.unit.fan_rise is not None:
            after.warmed_by(-self.unit.fan_rise, "in front of the fan", back)
            return
        if back is not None and inlet is not after:
            same_moisture(back, after.w)
        steps = self.named(Letters.fan_of_aim)
        heat = self.fan_heat_at(inlet, steps)
        rise = fan.rise(inlet, self.supply_mass, heat, steps)
        after.warmed_by(-rise, "in front of the fan", back)


def humid_air(
    unit: Unit,
    site: Site,
    db: Field[float | None],
    rh: Field[float | None],
    wb: Field[float | None],
    steps: Steps | None = None,
) -> State:
    """Return the state of a unit's dry bulb with either its relative humidity or its wet bulb.

    Raises:
        Absent: one of the two is not stated, or the humidity is stated twice.
        AirError: there is no such air.
    """
    dry_bulb = unit.need(db)
    if unit.stated(rh.key, wb.key):
        raise Absent(rh.key, wb.key, why=f"{rh.key} and {wb.key} are both stated")
    if unit.stated(wb.key):
        return site.air.by_wet_bulb(dry_bulb, unit.need(wb), steps)
    return site.air.by_relative_humidity(dry_bulb, unit.need(rh), steps)


def outdoor_air(condition: Condition, site: Site, steps: Steps | None = None) -> State:
    """Return the outdoor air of a condition.

    Raises:
        Absent: its dry bulb or its humidity is not stated, or the humidity is stated twice.
        AirError: there is no such air.
    """
    stated = [key for key in HUMIDITIES if condition.stated(key)]
    if len(stated) != 1:
        name = condition.name
        raise Absent(*HUMIDITIES, why=f"condition {name} does not state one outdoor humidity")
    dry_bulb = condition.need(Condition.outdoor_db)
    if stated == ["outdoor_wb"]:
        return site.air.by_wet_bulb(dry_bulb, condition.need(Condition.outdoor_wb), steps)
    if stated == ["outdoor_dp"]:
        return site.air.by_dew_point(dry_bulb, condition.need(Condition.outdoor_dp), steps)
    if stated == ["outdoor_rh"]:
        return site.air.by_relative_humidity(dry_bulb, condition.need(Condition.outdoor_rh), steps)
    state = site.air.by_humidity_ratio(dry_bulb, condition.need(Condition.outdoor_w), steps)
    if state.supersaturated:
        raise AirError(
            f"humidity ratio {state.w:g} is above saturation at the dry bulb {dry_bulb:g}"
        )
    return state
