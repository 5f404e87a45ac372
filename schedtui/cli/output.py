"""What the commands print: results on standard output, problems on standard error.

Alone in writing to either. Whatever comes from a file is made harmless here.
"""

from __future__ import annotations

import sys
from typing import TYPE_CHECKING

from schedtui.errors import Problem
from schedtui.text_width import cut, visible

if TYPE_CHECKING:
    from collections.abc import Iterable

_LONGEST_VALUE = 60


def result(text: str) -> None:
    """Print a result as it is."""
    sys.stdout.write(text)


def failure(text: str) -> None:
    """Print one problem on a line of its own."""
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
