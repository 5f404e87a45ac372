"""`schedtui check`: recalculates schedules and prints the findings."""

from __future__ import annotations

import json
import os
from collections.abc import Iterator, Sequence
from pathlib import Path
from typing import TYPE_CHECKING

from schedtui.cli import output
from schedtui.cli.command import Command
from schedtui.cli.exit_status import ExitStatus
from schedtui.errors import FileError, ScheduleError
from schedtui.files import read_text
from schedtui.report.findings import findings_page
from schedtui.report.findings_csv import findings_csv
from schedtui.report.formats import markdown, text
from schedtui.report.json import review_object
from schedtui.review.finding import WORST_FIRST
from schedtui.review.reviewed import Review, review
from schedtui.schedule.load import load
from schedtui.schedule.view import view

if TYPE_CHECKING:
    import argparse

NEVER = "never"
FORMATS = ("text", "json", "csv", "markdown")

Reviewed = Sequence[tuple[str, Review]]


def arguments(parser: argparse.ArgumentParser) -> None:
    """Add what the command takes."""
    parser.add_argument("paths", nargs="+", metavar="PATH", help="a schedule, or a folder of them")
    parser.add_argument("--format", choices=FORMATS, default="text", help="how to print")
    parser.add_argument(
        "--fail-on",
        choices=[*(severity.word for severity in WORST_FIRST), NEVER],
        default="conflict",
        help="least severity that makes the exit status 1 (default: conflict)",
    )


def run(asked: argparse.Namespace) -> ExitStatus:
    """Check every file that can be read, and go on after one that cannot."""
    reviewed: list[tuple[str, Review]] = []
    failed = False
    for file in _files(asked.paths):
        try:
            reviewed.append((file, check_file(file)))
        except ScheduleError as error:
            failed = True
            output.problems(error.file, error.problems)
        except FileError as error:
            failed = True
            output.failure(str(error))
    many = len(asked.paths) > 1 or _is_folder(asked.paths[0])
    if reviewed or many:
        output.result(_printed(reviewed, asked.format, many=many))
    if failed:
        return ExitStatus.FAILED
    found = any(_fails(one, asked.fail_on) for _, one in reviewed)
    return ExitStatus.FOUND if found else ExitStatus.CLEAR


def check_file(file: str) -> Review:
    """Read and review a schedule.

    Raises:
        FileError: it cannot be read, or is a folder without schedules.
        ScheduleError: it has anything in it that cannot be read as a schedule.
    """
    if not file:
        raise FileError('"" is no name of a file')
    if _is_folder(file):
        raise FileError(f"{file}: there is no .toml file in this folder")
    document = load(read_text(Path(file)).text, file)
    if document.problems:
        raise ScheduleError(document.problems, file)
    return review(view(document))


def _files(paths: Sequence[str]) -> Iterator[str]:
    """Yield each file, and those of each folder; a folder that has none for itself."""
    for path in paths:
        inside = sorted(Path(path).glob("*.toml")) if _is_folder(path) else []
        yield from [str(one) for one in inside if not one.is_dir()] or [path]


def _is_folder(path: str) -> bool:
    return os.path.isdir(path)  # noqa: PTH112  a Path's raises where the system does not say


def _printed(reviewed: Reviewed, form: str, *, many: bool) -> str:
    if form == "json":
        objects = [review_object(one, file) for file, one in reviewed]
        whole = objects if many else objects[0]
        return json.dumps(whole, ensure_ascii=False, indent=2, allow_nan=False) + "\n"
    if form == "csv":
        return findings_csv(reviewed)
    render = {"text": text.render, "markdown": markdown.render}[form]
    return "\n".join(render(findings_page(one, file)) for file, one in reviewed)


def _fails(reviewed: Review, fail_on: str) -> bool:
    if fail_on == NEVER:
        return False
    counts = reviewed.counts()
    for severity in WORST_FIRST:
        if counts[severity.word]:
            return True
        if severity.word == fail_on:
            break
    return False


COMMAND = Command(
    "recalculates schedules and prints what it finds, worst first",
    "schedtui check works.toml --format json --fail-on short",
    arguments,
    run,
)
