"""Reads TOML of any form with the place of each value, and writes edits back into its text.

`read_source` gives values, characters and lines; `splice` carries out changes so that nothing
else in the text changes, and proves it. This package must not know what a schedule is:
no key of one is named in it.
"""

from schedtui.schedule.toml_source.changes import (
    Append,
    Arrange,
    Change,
    Drop,
    Path,
    Piece,
    Put,
    Remove,
)
from schedtui.schedule.toml_source.locate import Kind, Place
from schedtui.schedule.toml_source.recover import BadValue
from schedtui.schedule.toml_source.source import Source, read_source
from schedtui.schedule.toml_source.splice import splice

__all__ = [
    "Append",
    "Arrange",
    "BadValue",
    "Change",
    "Drop",
    "Kind",
    "Path",
    "Piece",
    "Place",
    "Put",
    "Remove",
    "Source",
    "read_source",
    "splice",
]
