"""`schedtui import`: reads a spreadsheet into a schedule file and says where every cell went."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from schedtui.cli import output
from schedtui.cli.command import Command
from schedtui.cli.exit_status import ExitStatus
from schedtui.errors import FileError, ScheduleError, UsageError
from schedtui.files import read_text, write_text
from schedtui.schedule.load import load
from schedtui.text_width import visible

if TYPE_CHECKING:
    import argparse

    from schedtui.files import Stamp
    from schedtui.schedule.document import Document
    from schedtui.sheets.importing import Import


def arguments(parser: argparse.ArgumentParser) -> None:
    """Add what the command takes."""
    parser.add_argument("sheet", metavar="SHEET", help="a workbook (xlsx) or delimited text")
    parser.add_argument("-o", "--output", metavar="FILE", help="the schedule file to write")
    parser.add_argument("--into", metavar="FILE", help="a schedule file to change instead")
    parser.add_argument("--dry-run", action="store_true", help="only say what would be done")
    parser.add_argument(
        "--map",
        action="append",
        default=[],
        metavar="HEADING=key",
        help='what a column is: a key, two with "/" between, or "column" for none (repeatable)',
    )
    parser.add_argument("--units", choices=("IP", "SI"), help="the project's unit system")
    parser.add_argument(
        "--project", metavar="FILE", help="a schedule file to take all but the units from"
    )
    parser.add_argument("--replace", action="store_true", help="overwrite an existing file")


def run(asked: argparse.Namespace) -> ExitStatus:
    """Read the sheet, say where everything went, and write the file.

    Raises:
        FileError: the sheet cannot be read, or the file not written.
        ScheduleError: the file to change, or to take the project from, is not valid.
        UsageError: the words on the command line contradict each other or the sheet.
    """
    # The engine and its matching library are loaded by this command alone.
    from schedtui.sheets.account import account  # noqa: PLC0415
    from schedtui.sheets.importing import read_grids  # noqa: PLC0415
    from schedtui.sheets.merging import based_on, merged  # noqa: PLC0415
    from schedtui.sheets.opening import read_sheets  # noqa: PLC0415
    from schedtui.sheets.writing import schedule_text  # noqa: PLC0415

    _refuse_contradictions(asked)
    there, stamp = _schedule(asked.into or asked.project)
    if there is not None and asked.units and asked.units != there.system:
        raise UsageError(f"schedtui import: the file is in {there.system} units")
    system = there.system if there else asked.units
    taken = frozenset(there.own_columns()) if there and asked.into else frozenset()
    grids = read_sheets(Path(asked.sheet))
    try:
        read = read_grids(grids, system, _told(asked.map), taken)
    except FileError as error:
        raise FileError(f"{asked.sheet}: {error}") from error
    changes: tuple[str, ...] = ()
    if there is None:
        text = schedule_text(read, _title(read, asked.sheet), Path(asked.sheet).name)
    else:
        merge = merged(there, read) if asked.into else based_on(there, read)
        text, changes = merge.text, merge.changes if asked.into else ()
    if not asked.dry_run:
        _write(asked, text, stamp)
    output.result("\n".join([*account(read, changes), _done(asked)]) + "\n")
    return ExitStatus.CLEAR


def _refuse_contradictions(asked: argparse.Namespace) -> None:
    if asked.output and asked.into:
        raise UsageError("schedtui import: -o and --into cannot go together")
    if asked.project and asked.into:
        raise UsageError("schedtui import: --project and --into cannot go together")
    if not (asked.output or asked.into or asked.dry_run):
        raise UsageError("schedtui import: give -o FILE, --into FILE or --dry-run")


def _schedule(file: str | None) -> tuple[Document | None, Stamp | None]:
    """Return the schedule of a file without a fault, and what the file was."""
    if not file:
        return None, None
    found = read_text(Path(file))
    document = load(found.text, file)
    if document.problems:
        raise ScheduleError(document.problems, file)
    return document, found.stamp


def _told(pairs: list[str]) -> dict[str, str]:
    told = {}
    for pair in pairs:
        heading, equals, key = pair.rpartition("=")
        if not equals or not heading.strip() or not key.strip():
            raise UsageError(f'schedtui import: --map "{pair}" is not of the form HEADING=key')
        told[heading.strip()] = key.strip()
    return told


def _title(read: Import, sheet: str) -> str:
    return " ".join(read.title.split()) or Path(sheet).stem or "Schedule"


def _write(asked: argparse.Namespace, text: str, stamp: Stamp | None) -> None:
    if asked.into:
        write_text(Path(asked.into), text, expected=stamp)
    else:
        write_text(Path(asked.output), text, expected=None, replace=asked.replace)


def _done(asked: argparse.Namespace) -> str:
    file = visible(asked.into or asked.output or "")
    return "nothing written" if asked.dry_run else f"{file} written"


COMMAND = Command(
    "reads a spreadsheet into a schedule file and says where every cell went",
    "schedtui import schedule.xlsx -o works.toml",
    arguments,
    run,
)
