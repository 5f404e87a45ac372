"""What the commands print: results on standard output, problems on standard error.

Alone in writing to either. Whatever comes from a file is made harmless here.
"""

from __future__ import annotations

import io
import os
import sys
from typing import TYPE_CHECKING

from schedtui.errors import FileError, Problem
from schedtui.text_width import cut, visible

if TYPE_CHECKING:
    from collections.abc import Iterable

_LONGEST_VALUE = 60

# A result has lines, so a line feed stays; nothing else in it may act on a terminal.
_HARMLESS = {
    code: visible(chr(code)) for code in (*range(0x20), *range(0x7F, 0xA0)) if code != ord("\n")
}


def result(text: str) -> None:
    """Print a result, with a question mark for what the terminal's encoding lacks.

    Raises:
        BrokenPipeError: whoever read the output has gone.
        FileError: the output cannot be written.
    """
    if sys.stdout is None:
        raise FileError("standard output is closed")
    if isinstance(sys.stdout, io.TextIOWrapper):
        sys.stdout.reconfigure(errors="replace")
    try:
        sys.stdout.write(text.translate(_HARMLESS))
        sys.stdout.flush()
    except OSError as error:
        _drop_output()
        if isinstance(error, BrokenPipeError):
            raise
        raise FileError(f"standard output cannot be written: {error.strerror}") from error


def _drop_output() -> None:
    """Have nothing more go to standard output, where the interpreter would trip over it again."""
    os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())


def failure(text: str) -> None:
    """Print one problem on a line of its own."""
    if sys.stderr is not None:
        sys.stderr.write(f"{visible(text)}\n")


def problems(file: str, found: Iterable[Problem]) -> None:
    """Print each problem of a file as `file:line: what is wrong`."""
    for problem in found:
        where = f"{file}:{problem.line}" if problem.line else file
        failure(f"{where}: {_sentence(problem)}")


def _sentence(problem: Problem) -> str:
    """Return the problem with its value cut to what a line can bear."""
    value = cut(visible(problem.value), _LONGEST_VALUE)
    return str(Problem(problem.line, problem.subject, problem.key, value, problem.accepted))
