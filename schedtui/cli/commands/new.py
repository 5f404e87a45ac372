"""`schedtui new`: writes a small valid schedule to start from."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from schedtui.cli import output
from schedtui.cli.command import Command
from schedtui.cli.exit_status import ExitStatus
from schedtui.errors import UsageError
from schedtui.files import write_text
from schedtui.schedule.typed import toml_text
from schedtui.text_width import visible

if TYPE_CHECKING:
    import argparse

    from schedtui.units import System

_NUMBERS: dict[System, dict[str, str]] = {
    "IP": {"altitude": "0", "length": "ft", "summer_db": "92.0", "summer_wb": "75.0",
           "winter_db": "5.0", "winter_wb": "4.0", "room_db": "75", "room_rh": "50"},
    "SI": {"altitude": "0", "length": "m", "summer_db": "33.0", "summer_wb": "24.0",
           "winter_db": "-15.0", "winter_wb": "-15.5", "room_db": "24", "room_rh": "50"},
}  # fmt: skip

_TEMPLATE = """\
# An air-handling-unit schedule. Numbers are in the project's units, as typed.
format = 1

[project]
title = {title}
units = "{units}"
altitude = {altitude}          # {length} above sea level
airflow_basis = "standard"     # or "site", or "actual"

[defaults]                     # hold for every unit that does not state its own
room_db = {room_db}
room_rh = {room_rh}

[[condition]]                  # put the site's own numbers here
name = "summer"
season = "cooling"
outdoor_db = {summer_db}
outdoor_wb = {summer_wb}

[[condition]]
name = "winter"
season = "heating"
outdoor_db = {winter_db}
outdoor_wb = {winter_wb}

[[unit]]
tag = "AHU-1"
"""


def arguments(parser: argparse.ArgumentParser) -> None:
    """Add what the command takes."""
    parser.add_argument("file", metavar="FILE", help="the file to write")
    parser.add_argument("--units", choices=("IP", "SI"), default="IP", help="its unit system")
    parser.add_argument("--title", help="the project's title (default: the file's name)")
    parser.add_argument("--replace", action="store_true", help="overwrite an existing file")


def run(asked: argparse.Namespace) -> ExitStatus:
    """Write the file, which must not exist unless it is to be replaced.

    Raises:
        FileError: it exists, or cannot be written.
        UsageError: its title is blank.
    """
    path = Path(asked.file)
    title = path.stem if asked.title is None else asked.title
    if not title.strip():
        raise UsageError("schedtui new: --title must not be blank")
    text = _TEMPLATE.format(title=toml_text(title), units=asked.units, **_NUMBERS[asked.units])
    write_text(path, text, expected=None, replace=asked.replace)
    name = visible(asked.file)
    output.result(f"{name} written; open it with: schedtui {name}\n")
    return ExitStatus.CLEAR


COMMAND = Command(
    "writes a small valid schedule to start from",
    "schedtui new works.toml --units SI",
    arguments,
    run,
)
