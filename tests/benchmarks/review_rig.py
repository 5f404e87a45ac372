"""Measures the review alone, no file read and nothing printed in the time that counts.

    python tests/benchmarks/review_rig.py [UNITS]

- a row at one condition: its cooling path evaluated, and the row judged by every check;
- a corner rerun: one check asked again about another reading of a row's digits;
- a schedule at four conditions against a plain psychrolib loop over as many states of air, both in
  this process and in turns, so that the machine is the same for both;
- one edit in the same schedule ten times over.

The loop is what anybody would write in an afternoon: the seven states of each unit at each
condition with all their properties, and the coil's loads. It judges nothing.
"""

from __future__ import annotations

import sys
import time
from pathlib import Path
from typing import TYPE_CHECKING

HERE = Path(__file__).parent
sys.path[:0] = [str(HERE), str(HERE.parents[1])]  # the folder is no package

import psychrolib  # noqa: E402  found by the line above
from large_schedule import UNITS, schedule  # noqa: E402

from schedtui.review.checks import cool_row_balance  # noqa: E402
from schedtui.review.cooling import Cooling  # noqa: E402
from schedtui.review.figure import known  # noqa: E402
from schedtui.review.quantities import (  # noqa: E402
    COOLING_FIGURES,
    COOLING_STATES,
    HEATING_FIGURES,
    HEATING_STATES,
)
from schedtui.review.reviewed import review  # noqa: E402
from schedtui.schedule.edit import SetCell  # noqa: E402
from schedtui.schedule.load import load  # noqa: E402
from schedtui.schedule.typed import Typed  # noqa: E402
from schedtui.schedule.view import view  # noqa: E402

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.review.reviewed import Review

REPEATS = 5
OUTDOORS = ((93.0, 74.0), (80.0, 73.5), (5.0, 3.9), (25.0, 22.5))
WINTERS = """
[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5.0
outdoor_wb = 3.9

[[condition]]
name = "mild winter"
season = "heating"
outdoor_db = 25.0
outdoor_wb = 22.5

[[plant]]
name = "chilled water"
serves = "cooling"
capacity = 400000

[[plant]]
name = "hot water"
serves = "heating"
capacity = 400000

[defaults]
room_heat_db = 70
heat_ewt = 180
heat_lwt = 150

[[unit]]"""


def text_of(units: int) -> str:
    """Return a schedule with two cooling and two heating conditions, all sides filled."""
    return schedule(units).replace("[[unit]]", WINTERS, 1)


def least(run: Callable[[], object], times: int = 1) -> float:
    """Return the least time of a run of several [s]."""
    taken = []
    for _ in range(REPEATS):
        begun = time.perf_counter()
        for _ in range(times):
            run()
        taken.append((time.perf_counter() - begun) / times)
    return min(taken)


def _state(db: float, w: float, pressure: float) -> tuple[float, ...]:
    p = psychrolib
    return (
        p.GetTWetBulbFromHumRatio(db, w, pressure),
        p.GetTDewPointFromHumRatio(db, w, pressure),
        p.GetRelHumFromHumRatio(db, w, pressure),
        p.GetMoistAirEnthalpy(db, w),
        p.GetMoistAirVolume(db, w, pressure),
    )


def loop(units: int) -> int:
    """Compute the states of every unit at every condition by psychrolib alone; count them."""
    p = psychrolib
    p.SetUnitSystem(p.IP)
    pressure = p.GetStandardAtmPressure(1250)
    count = 0
    for number in range(units):
        airflow = 4000 + number * 37 % 16000
        for db, wb in OUTDOORS:
            w = p.GetHumRatioFromTWetBulb(db, wb, pressure)
            room = p.GetHumRatioFromRelHum(75.0, 0.5, pressure)
            leaving = p.GetHumRatioFromTWetBulb(53.0, 52.2, pressure)
            mixed_w, mixed_db = 0.8 * room + 0.2 * w, 0.8 * 77.0 + 0.2 * db
            states = [
                _state(*air, pressure)
                for air in (
                    (db, w), (77.0, room), (mixed_db, mixed_w), (mixed_db, mixed_w),
                    (53.0, leaving), (56.0, leaving), (75.0, room),
                )
            ]  # fmt: skip
            mass = airflow * 60 * 0.075
            total = mass * (states[3][3] - states[4][3])
            sensible = mass * (0.24 + 0.444 * mixed_w) * (mixed_db - 53.0)
            count += len(states) if total and sensible else 0
    return count


def every_state(reviewed: Review) -> int:
    """Ask for every state with all its properties, and every figure, as a report does."""
    count = 0
    for unit in reviewed.units.values():
        for at in unit.case.evaluations:
            cooling = isinstance(at, Cooling)
            for _, name in COOLING_STATES if cooling else HEATING_STATES:
                state = known(getattr, at, name)
                if state is not None:
                    known(lambda air=state: (air.wb, air.dp, air.rh, air.v))
                    count += 1
            for figure in COOLING_FIGURES if cooling else HEATING_FIGURES:
                known(figure.get, at)
    return count


def one_row() -> tuple[float, float, float]:
    """Measure a row at one condition: evaluated, judged, and a corner asked again [s]."""
    alone = schedule(1)
    rows = view(load(alone.replace("[[unit]]", '[[unit]]\nconditions = ["summer peak"]')))
    reviewed = next(iter(review(rows).units.values()))
    (condition,) = reviewed.case.conditions
    unit, site = reviewed.unit, reviewed.case.site

    def evaluate() -> object:
        at = Cooling(unit, condition, site)
        return at.coil, at.room_met

    find = cool_row_balance.CHECK.unit
    assert find is not None
    case = type(reviewed.case)

    def corner() -> object:
        return list(find(case(unit.replaced({"cool_eat_wb": 66.2}), rows, site)))

    return least(evaluate, 200), least(lambda: review(rows), 50), least(corner, 200)


def edited(units: int) -> tuple[float, float]:
    """Measure a whole review, and the one after one edit [s]."""
    before = view(load(text_of(units)))
    reviewed = review(before)
    row = before.units[units // 2].row_id
    edit = SetCell("unit", row, "cool_total", Typed("123.4", 123.4, "123.4"))

    def again() -> object:
        document, _ = edit.apply(before.document)
        return review(view(document, before), reviewed)

    begun = time.perf_counter()
    review(before)
    return time.perf_counter() - begun, least(again)


def main() -> None:
    """Measure, and print the figures."""
    units = int(sys.argv[1]) if len(sys.argv) > 1 else UNITS
    evaluated, judged, corner = one_row()
    rows = view(load(text_of(units)))
    plain, checked, told = [], [], []
    states = 0
    for _ in range(REPEATS):  # in turns
        begun = time.perf_counter()
        count = loop(units)
        plain.append(time.perf_counter() - begun)
        begun = time.perf_counter()
        reviewed = review(rows)
        checked.append(time.perf_counter() - begun)
        states = every_state(reviewed)
        told.append(time.perf_counter() - begun)
    many = units * 10
    whole, edit = edited(many)
    findings = len(reviewed.all_findings)
    of_loop = f"{min(checked) / min(plain):.2f} × the loop"
    told_of_loop = f"{min(told) / min(plain):.2f} × the loop"
    lines = (
        f"one row, one condition, evaluated  {evaluated * 1e3:8.3f} ms",
        f"one row, one condition, judged     {judged * 1e3:8.3f} ms",
        f"a corner asked again               {corner * 1e3:8.3f} ms",
        f"{units} units, {len(OUTDOORS)} conditions, {findings} findings:",
        f"psychrolib loop                    {min(plain):8.3f} s    {count} states",
        f"reviewed                           {min(checked):8.3f} s  = {of_loop}",
        f"and every state and figure asked   {min(told):8.3f} s  = {told_of_loop}, {states} states",
        f"{many} units                         {whole:8.3f} s  = {whole / min(checked):.1f} times",
        f"one edit in {many}                   {edit * 1e3:8.1f} ms",
    )
    sys.stdout.write("\n".join(lines) + "\n")


if __name__ == "__main__":
    main()
