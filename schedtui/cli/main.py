"""The command line: finds the command that is asked for, or opens the screen.

Every exception of ours ends here, as one line and an exit status.
"""

from __future__ import annotations

import argparse
from functools import cache
from typing import TYPE_CHECKING, NoReturn

from schedtui import __version__, discover
from schedtui.cli import commands, output
from schedtui.cli.exit_status import ExitStatus
from schedtui.errors import SchedtuiError, ScheduleError, UsageError
from schedtui.report.page import CAUTION

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from schedtui.cli.command import Command

_ABOUT = """\
Checks air-handling-unit schedules: recomputes every unit's coil at its site's altitude and design
conditions and holds it against what is scheduled."""


class _Parser(argparse.ArgumentParser):
    """A parser whose complaint is one line, and whose help is a result like any other."""

    def error(self, message: str) -> NoReturn:
        raise UsageError(f"{self.prog}: {message}; see {self.prog} --help")

    def _print_message(self, message: str, file: object = None) -> None:  # noqa: ARG002  the library's own signature
        output.result(message)


@cache
def all_commands() -> Mapping[str, Command]:
    """Return every command by its name."""
    return {
        module.__name__.rpartition(".")[2].removesuffix("_"): module.COMMAND
        for module in discover.modules(commands)
    }


def run(arguments: Sequence[str], open_screen: Callable[[str], int]) -> int:
    """Carry out a command line and return the exit status.

    Args:
        arguments: the words after the program's name.
        open_screen: opens a file in the terminal and returns the exit status.
    """
    try:
        return _dispatch(arguments, open_screen)
    except ScheduleError as error:
        output.problems(error.file, error.problems)
    except SchedtuiError as error:
        output.failure(str(error))
    except BrokenPipeError:
        pass  # whoever read us has gone, and need not be told
    except KeyboardInterrupt:
        output.failure("interrupted")
    return ExitStatus.FAILED


def _dispatch(arguments: Sequence[str], open_screen: Callable[[str], int]) -> int:
    known = all_commands()
    if arguments and arguments[0] not in known and not arguments[0].startswith("-"):
        if len(arguments) > 1:
            names = ", ".join(known)
            raise UsageError(
                f'schedtui: "{arguments[0]}" is no command and opens alone as a file; '
                f"commands: {names}"
            )
        return open_screen(arguments[0])
    parsed = _parser(known).parse_args(arguments)
    return int(known[parsed.command].run(parsed))


def _parser(known: Mapping[str, Command]) -> argparse.ArgumentParser:
    parser = _Parser(
        prog="schedtui",
        usage="schedtui FILE | COMMAND …",
        description=_ABOUT,
        epilog=f"schedtui FILE opens a schedule in the terminal. {CAUTION}",
    )
    parser.add_argument("--version", action="version", version=f"schedtui {__version__}")
    parts = parser.add_subparsers(prog="schedtui", dest="command", metavar="COMMAND", required=True)
    for name, command in known.items():
        part = parts.add_parser(
            name,
            help=command.summary,
            description=command.summary,
            epilog=f"Example: {command.example}",
        )
        command.arguments(part)
    return parser
