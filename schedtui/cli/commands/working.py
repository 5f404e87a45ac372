"""`schedtui working`: prints the calculation of one unit with its numbers."""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.cli import output
from schedtui.cli.command import Command
from schedtui.cli.commands.check import check_file
from schedtui.cli.exit_status import ExitStatus
from schedtui.errors import UsageError
from schedtui.report.formats import markdown, text
from schedtui.report.working import working_page

if TYPE_CHECKING:
    import argparse

    from schedtui.review.reviewed import Review, UnitReview

_FORMATS = {"text": text.render, "markdown": markdown.render}


def arguments(parser: argparse.ArgumentParser) -> None:
    """Add what the command takes."""
    parser.add_argument("file", metavar="FILE", help="a schedule")
    parser.add_argument("tag", metavar="TAG", help="the unit's tag; all units of that tag")
    parser.add_argument("--condition", metavar="NAME", help="one design condition (default: all)")
    parser.add_argument("--format", choices=tuple(_FORMATS), default="text", help="how to print")


def run(asked: argparse.Namespace) -> ExitStatus:
    """Print the working."""
    reviewed = check_file(asked.file)
    units = _units(reviewed, asked.file, asked.tag)
    if asked.condition is not None:
        _require_condition(units, asked.tag, asked.condition)
    title = f"{reviewed.schedule.project.title or 'No title'} ({asked.file})"
    page = working_page(units, asked.condition, title)
    output.result(_FORMATS[asked.format](page))
    return ExitStatus.CLEAR


def _units(reviewed: Review, file: str, tag: str) -> list[UnitReview]:
    """Return the units of a tag.

    Raises:
        UsageError: there is none; it names the tags there are.
    """
    found = [one for one in reviewed.units.values() if tag in (one.unit.tag, one.label)]
    if not found:
        tags = dict.fromkeys(one.unit.tag for one in reviewed.units.values() if one.unit.tag)
        there = f"there are {_listed(tags)}" if tags else "it has no tagged unit"
        raise UsageError(f'{file}: no unit is tagged "{tag}"; {there}')
    return found


def _require_condition(units: list[UnitReview], tag: str, name: str) -> None:
    """Make sure that a condition applies to one of the units.

    Raises:
        UsageError: it does not; it names those that do.
    """
    names = dict.fromkeys(at.name for one in units for at in one.case.evaluations)
    if name not in names:
        there = f"there are {_listed(names)}" if names else "no condition applies to it"
        raise UsageError(f'{tag} has no condition "{name}"; {there}')


def _listed(names: dict[str, None]) -> str:
    return ", ".join(f'"{name}"' for name in names)


COMMAND = Command(
    "prints the calculation of one unit, step by step with its numbers",
    'schedtui working works.toml AHU-1 --condition "summer peak" --format markdown',
    arguments,
    run,
)
