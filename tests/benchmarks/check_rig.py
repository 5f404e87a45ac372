"""Holds `schedtui check` on a long schedule against a plain psychrolib loop over as many states.

    python tests/benchmarks/check_rig.py [UNITS]

The loop is what anybody would write in an afternoon: for each unit and cooling condition the
outdoor, return, mixed, entering, leaving, supply and room state with all their properties, and the
coil's total and sensible. It reads no file, judges nothing and says nothing. Both run in
processes of their own, one after the other, so that the machine is the same for both.
"""

from __future__ import annotations

import json
import os
import subprocess
import sys
import tempfile
import time
from pathlib import Path

HERE = Path(__file__).parent
ROOT = HERE.parents[1]
sys.path.insert(0, str(HERE))  # the folder is no package, however this file is loaded

from large_schedule import UNITS, schedule  # noqa: E402 - found by the line above

REPEATS = 5
CONDITIONS = ((93.0, 74.0), (80.0, 73.5))
STATES = 7  # of each unit at each condition

LOOP = """
import sys
import psychrolib as p
p.SetUnitSystem(p.IP)
units, conditions = int(sys.argv[1]), {conditions}
pressure = p.GetStandardAtmPressure(1250)
def state(db, w):
    wb = p.GetTWetBulbFromHumRatio(db, w, pressure)
    dp = p.GetTDewPointFromHumRatio(db, w, pressure)
    rh = p.GetRelHumFromHumRatio(db, w, pressure)
    return db, w, wb, dp, rh, p.GetMoistAirEnthalpy(db, w), p.GetMoistAirVolume(db, w, pressure)
count = 0
for number in range(units):
    airflow = 4000 + number * 37 % 16000
    for db, wb in conditions:
        w = p.GetHumRatioFromTWetBulb(db, wb, pressure)
        room = p.GetHumRatioFromRelHum(75.0, 0.5, pressure)
        leaving = p.GetHumRatioFromTWetBulb(53.0, 52.2, pressure)
        mixed_w, mixed_db = 0.8 * room + 0.2 * w, 0.8 * 77.0 + 0.2 * db
        states = [state(*air) for air in (
            (db, w), (77.0, room), (mixed_db, mixed_w), (mixed_db, mixed_w), (53.0, leaving),
            (56.0, leaving), (75.0, room))]
        mass = airflow * 60 * 0.075
        total = mass * (states[3][5] - states[4][5])
        sensible = mass * (0.24 + 0.444 * mixed_w) * (mixed_db - 53.0)
        count += len(states)
print(count)
"""


def seconds(command: list[str], environment: dict[str, str]) -> tuple[float, str]:
    """Return the least time that a command takes of several runs, and what it prints."""
    taken = []
    for _ in range(REPEATS):
        begun = time.perf_counter()
        done = subprocess.run(
            command, env=environment, cwd=ROOT, capture_output=True, text=True, check=False
        )
        taken.append(time.perf_counter() - begun)
        if done.returncode not in {0, 1}:
            raise SystemExit(done.stderr)
    return min(taken), done.stdout


def main() -> None:
    """Measure, and print both times and their ratio."""
    units = int(sys.argv[1]) if len(sys.argv) > 1 else UNITS
    environment = {**os.environ, "PYTHONPATH": str(ROOT)}
    with tempfile.TemporaryDirectory() as folder:
        file = Path(folder) / "measured.toml"
        file.write_text(schedule(units), encoding="utf-8")
        check = [sys.executable, "-m", "schedtui", "check", str(file)]
        text, _ = seconds(check, environment)
        full, printed = seconds([*check, "--format", "json"], environment)
    loop = [sys.executable, "-c", LOOP.format(conditions=CONDITIONS), str(units)]
    plain, count = seconds(loop, environment)
    found = json.loads(printed)["units"]
    states = sum(
        isinstance(figure, dict) and "db" in figure
        for unit in found
        for condition in unit["conditions"].values()
        for figure in condition.values()
    )
    lines = (
        f"{units} units, {len(CONDITIONS)} conditions",
        f"psychrolib loop      {plain:6.2f} s   {int(count)} states",
        f"check, text          {text:6.2f} s = {text / plain:.2f} × the loop",
        f"check, JSON          {full:6.2f} s = {full / plain:.2f} × the loop   {states} states",
    )
    sys.stdout.write("\n".join(lines) + "\n")


if __name__ == "__main__":
    main()
