"""Measures what a program's table sends to the terminal, and how soon.

    python tests/benchmarks/screen_rig.py [--shows TEXT] [--colours truecolor|256] [-- COMMAND …]

Without a command, the demo table beside this file. The program must show a table with the cursor
in it, in which Tab reaches a cell that takes the number 12. Needs a POSIX system.
"""

from __future__ import annotations

import argparse
import statistics
import sys
import tempfile
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING

HERE = Path(__file__).parent
ROOT = HERE.parents[1]
sys.path.insert(0, str(HERE))  # the folder is no package, however this file is loaded

from terminal import Terminal  # noqa: E402 - found by the line above

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

SIZES = ((160, 45), (80, 24))
REPEATS = 9
LIMITS = {
    (160, "step"): (300, 10),
    (160, "type"): (250, None),
    (160, "take"): (1000, 10),
    (160, "page"): (13_000, 25),
    (80, "page"): (4_000, None),
}


@dataclass(frozen=True, slots=True)
class Figure:
    """What one kind of key cost, the worst of the repeats for bytes, the median for time."""

    name: str
    bytes: int
    milliseconds: float

    @classmethod
    def of(cls, name: str, samples: Sequence[tuple[int, float]]) -> Figure:
        """Return the figure of several samples."""
        return cls(
            name,
            max(count for count, _ in samples),
            statistics.median(spent for _, spent in samples),
        )


def _there_and_back(terminal: Terminal, there: str, back: str) -> Iterable[Figure]:
    samples: dict[str, list[tuple[int, float]]] = {there: [], back: []}
    for _ in range(REPEATS):
        for key in (there, back):
            samples[key].append(terminal.press(key))
    return [Figure.of(f"step {key}", taken) for key, taken in samples.items()]


def _edits(terminal: Terminal) -> Iterable[Figure]:
    typed, taken = [], []
    for _ in range(REPEATS):
        terminal.press("1")
        typed.append(terminal.press("2"))
        taken.append(terminal.press("enter"))
    return [Figure.of("type a character", typed), Figure.of("take a value", taken)]


def keys(terminal: Terminal) -> list[Figure]:
    """Return what each kind of key costs, from a place in the middle of the table."""
    for key in ("ctrl+home", "home", *["tab"] * 3, *["down"] * 4):
        terminal.press(key)
    figures = [
        *_there_and_back(terminal, "down", "up"),
        *_there_and_back(terminal, "right", "left"),
    ]
    for _ in range(8):  # towards the right edge, where a line's whole beginning could be resent
        terminal.press("right")
    figures += [
        Figure.of(f"{figure.name} (right)", [(figure.bytes, figure.milliseconds)])
        for figure in _there_and_back(terminal, "down", "up")
    ]
    terminal.press("tab")
    figures += _edits(terminal)
    pages = [terminal.press("pagedown") for _ in range(REPEATS)]
    pages += [terminal.press("pageup") for _ in range(REPEATS)]
    figures.append(Figure.of("page", pages))
    return figures


def report(columns: int, figures: Iterable[Figure]) -> Iterable[str]:
    """Yield a line for each figure, with its limit and whether it is held."""
    for figure in figures:
        most, longest = LIMITS.get((columns, figure.name.split()[0]), (None, None))
        limit = " ".join([f"≤ {most} B" if most else "", f"≤ {longest} ms" if longest else ""])
        missed = (most and figure.bytes > most) or (longest and figure.milliseconds > longest)
        verdict = "over" if missed else "ok" if most else ""
        yield (
            f"  {figure.name:24} {figure.bytes:7} B {figure.milliseconds:7.1f} ms"
            f"   {limit:18} {verdict}"
        )


def _start(command: Sequence[str], shows: str, environment: dict[str, str]) -> tuple[float, float]:
    with Terminal(command, 160, 45, environment) as terminal:
        seconds = terminal.wait_for(lambda text: shows in text)
        terminal.press("down")
        return seconds, terminal.memory()


def start_and_memory(command: Sequence[str], shows: str, environment: dict[str, str]) -> str:
    """Return start and memory held against a program of one line."""
    least = [sys.executable, str(HERE / "one_line.py")]
    ours, theirs = [], []
    for _ in range(3):
        theirs.append(_start(least, "ready", environment))
        ours.append(_start(command, shows, environment))
    start, memory = (min(one) for one in zip(*ours, strict=True))
    base_start, base_memory = (min(one) for one in zip(*theirs, strict=True))
    return (
        f"start to rows {start:.2f} s = {start / base_start:.2f} × a one-line program (≤ 1.6)\n"
        f"memory {memory:.0f} MB = {memory / base_memory:.2f} ×, "
        f"{memory - base_memory:.0f} MB more (≤ 45)"
    )


def main() -> None:
    """Measure, and print a table."""
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--shows", default="AHU-2", help="text that tells the rows are there")
    parser.add_argument("--colours", choices=("truecolor", "256"), default="truecolor")
    parser.add_argument("command", nargs="*")
    options = parser.parse_args()
    command = options.command or [sys.executable, str(HERE / "demo_table.py")]
    environment = {
        "COLORTERM": "truecolor" if options.colours == "truecolor" else "",
        "PYTHONPATH": str(ROOT),
    }
    for columns, rows in SIZES:
        # Each run is killed: its journal must not be offered to the next one, nor to its owner.
        environment["XDG_STATE_HOME"] = tempfile.mkdtemp()
        with Terminal(command, columns, rows, environment) as terminal:
            terminal.wait_for(lambda text: options.shows in text)
            lines = [f"{columns}×{rows}, {options.colours}", *report(columns, keys(terminal)), ""]
        sys.stdout.write("\n".join(lines))
    environment["XDG_STATE_HOME"] = tempfile.mkdtemp()
    sys.stdout.write(start_and_memory(command, options.shows, environment) + "\n")


if __name__ == "__main__":
    main()
