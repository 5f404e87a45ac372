"""Every exception this program raises on purpose, in one tree.

SchedtuiError
├── FileError            a file cannot be read or written (not there, too large, no regular file, …)
│   └── FileChanged      the file on disk is not the one that was read
├── ScheduleError        a file was read but is no valid schedule; carries every problem found
├── SpliceError          edits could not be written into the source without touching something else
├── AmountError          a typed number, or number with unit, cannot be accepted
├── StateError           nothing can be in the stated state
│   ├── AirError         no moist air has the stated properties
│   └── FluidError       a fluid outside its data, freezing included
├── UsageError           a command was asked for something it does not do
└── Absent               a figure cannot be had; names the keys that would give it

Knows nothing of the rest of the program; everything else may import it.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Sequence


class SchedtuiError(Exception):
    """The root: whatever derives from it is reported in one line, never as a traceback."""


class FileError(SchedtuiError):
    """A file cannot be read or written; the text names the file and says why."""


class FileChanged(FileError):
    """The file on disk no longer has the content that was read."""


class AmountError(SchedtuiError):
    """A typed number, or a number with a unit, cannot be accepted; the text says what is."""


class StateError(SchedtuiError):
    """Nothing can be in the stated state, or nothing is known of it there."""


class AirError(StateError):
    """No moist air has the stated properties (a wet bulb above its dry bulb, for one)."""


class FluidError(StateError):
    """A fluid outside the data of its properties, freezing included; the text names the range."""


class SpliceError(SchedtuiError):
    """Writing edits into the source would not have held exactly those edits."""


class UsageError(SchedtuiError):
    """A command line that cannot be carried out."""


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing that keeps a file from being read as a schedule.

    Args:
        line: line in the file, counted from 1; 0 where the problem has no line.
        subject: what it is about: a unit's tag, `condition NAME`, `plant NAME`, `defaults`,
            `project`; empty for the file as a whole.
        key: the key at fault, or empty.
        value: the value as typed, or empty.
        accepted: what is wrong and what would be accepted, as one phrase.
    """

    line: int
    subject: str
    key: str
    value: str
    accepted: str

    def __str__(self) -> str:
        """Return the problem as one phrase, without the file and line."""
        where = " ".join(part for part in (self.subject, self.key) if part)
        if not where:  # the value is then no cell's, but what stands on the line
            return f"{self.value}: {self.accepted}" if self.value else self.accepted
        return (
            f"{where}: {self.value} {self.accepted}" if self.value else f"{where}: {self.accepted}"
        )


class ScheduleError(SchedtuiError):
    """A file is no valid schedule.

    Args:
        problems: every problem found, in the order of their lines; never empty.
        file: the file's name as the person gave it, where it is known.
    """

    def __init__(self, problems: Sequence[Problem], file: str = "") -> None:
        self.problems = tuple(problems)
        self.file = file
        super().__init__(str(self.problems[0]))


class Absent(SchedtuiError):
    """A figure cannot be had because what it needs is not stated, or cannot be read.

    Args:
        keys: the keys to state, in the order they were missed.
        why: a phrase for what is wrong where stating a key is not the cure.
    """

    def __init__(self, *keys: str, why: str = "") -> None:
        self.keys = keys
        self.why = why
        super().__init__(why or f"not stated: {', '.join(keys)}")
