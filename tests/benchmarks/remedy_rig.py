"""Measures what a reviewer waits for: remedies, what-if, acceptances.

    python tests/benchmarks/remedy_rig.py [UNITS]

- the remedies of every short unit of a schedule, and of one;
- one column adjusted by 5 % in every unit, tried on a copy, with the verdicts that would turn;
- one edit tried on a copy;
- the digest of each short finding's inputs.
"""

from __future__ import annotations

import statistics
import sys
import time
from functools import partial
from pathlib import Path
from typing import TYPE_CHECKING

HERE = Path(__file__).parent
sys.path[:0] = [str(HERE), str(HERE.parents[1])]  # the folder is no package

from large_schedule import UNITS, schedule  # noqa: E402

from schedtui.review.accept import basis  # noqa: E402
from schedtui.review.finding import Severity  # noqa: E402
from schedtui.review.remedy import remedies_by_check  # noqa: E402
from schedtui.review.reviewed import review  # noqa: E402
from schedtui.schedule.edit import SetCell  # noqa: E402
from schedtui.schedule.load import load  # noqa: E402
from schedtui.schedule.typed import Typed  # noqa: E402
from schedtui.schedule.view import view  # noqa: E402
from schedtui.session.what_if import what_if  # noqa: E402
from schedtui.units import decimals, format_number  # noqa: E402

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.review.reviewed import Review

REPEATS = 3
PERCENT = 5
COLUMNS = ("cool_total", "supply_airflow", "heat_flow")


def least(run: Callable[[], object]) -> float:
    """Return the least time of a run of several [s]."""
    taken = []
    for _ in range(REPEATS):
        begun = time.perf_counter()
        run()
        taken.append(time.perf_counter() - begun)
    return min(taken)


def adjusted(reviewed: Review, key: str) -> list[SetCell]:
    """Return the edits that raise one column by 5 %, at the digits typed."""
    edits = []
    for row_id, unit in reviewed.units.items():
        cell = unit.unit.typed(key)
        if cell is not None and isinstance(cell.value, float):
            text = format_number(cell.value * (1 + PERCENT / 100), decimals(cell.text) or 0)
            edits.append(SetCell("unit", row_id, key, Typed(text, float(text), text)))
    return edits


def of_remedies(reviewed: Review) -> list[str]:
    """Return what the remedies and the digests of a schedule's short findings took."""
    each, digests, count = [], [], 0
    for unit in reviewed.units.values():
        short = [one for one in unit.own if one.severity is Severity.SHORT]
        if not short:
            continue
        begun = time.perf_counter()
        count += sum(len(found) for found in remedies_by_check(unit).values())
        each.append((time.perf_counter() - begun) * 1e3)
        for finding in short:
            begun = time.perf_counter()
            basis(finding, reviewed.schedule)
            digests.append((time.perf_counter() - begun) * 1e3)
    if not each:
        return []
    together = f"{count} remedies of {len(each)} short units, {sum(each):.0f} ms together"
    return [
        f"{together}: median {statistics.median(each):.1f} ms, worst {max(each):.1f} ms a unit",
        f"{len(digests)} digests: median {statistics.median(digests):.2f} ms, {max(digests):.2f}",
    ]


def main() -> None:
    """Measure, and print the figures."""
    units = int(sys.argv[1]) if len(sys.argv) > 1 else UNITS
    rows = view(load(schedule(units)))
    whole = least(lambda: review(rows))
    reviewed = review(rows)
    lines = [f"{units} units reviewed               {whole * 1e3:8.1f} ms"]
    for key in COLUMNS:
        edits = adjusted(reviewed, key)
        turned = what_if(reviewed, edits)
        taken = least(partial(what_if, reviewed, edits))
        says = f"{key} +{PERCENT} % in {len(edits)} units"
        lines.append(f"{says:34} {taken * 1e3:8.1f} ms  {len(turned)} verdicts would turn")
    edit = adjusted(reviewed, "cool_total")[:1]
    lines.append(f"one edit tried{'':21}{least(lambda: what_if(reviewed, edit)) * 1e3:8.1f} ms")
    lines += of_remedies(reviewed)
    sys.stdout.write("\n".join(lines) + "\n")


if __name__ == "__main__":
    main()
