"""What a command is: its words on the command line and the function that runs it."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    import argparse
    from collections.abc import Callable

    from schedtui.cli.exit_status import ExitStatus


@dataclass(frozen=True, slots=True)
class Command:
    """A command; each module of `cli.commands` has one, called COMMAND, and gives it its name.

    Args:
        summary: what it does, in one line.
        example: a command line that shows its use.
        arguments: adds its arguments to a parser.
        run: does the work.
    """

    summary: str
    example: str
    arguments: Callable[[argparse.ArgumentParser], None]
    run: Callable[[argparse.Namespace], ExitStatus]
