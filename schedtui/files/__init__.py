"""Reads files whole and writes them so that no crash leaves half of one.

A file that was read has a stamp, and is written over only while its content is still that. A file
is written beside itself and renamed; one that a renaming would change (other names, an owner that
cannot be given) is written in place, after a copy that a broken-off writing is finished from. What
stands in a file is not known here, and no line ending is ever translated.
"""

from schedtui.files.in_place import finish_broken_writing
from schedtui.files.reading import (
    LARGEST,
    FileText,
    Stamp,
    digest_of,
    looks_the_same,
    read_text,
    real,
)
from schedtui.files.system import reason_of, sync_folder, write_all
from schedtui.files.writing import sweep, write_text

__all__ = [
    "LARGEST",
    "FileText",
    "Stamp",
    "digest_of",
    "finish_broken_writing",
    "looks_the_same",
    "read_text",
    "real",
    "reason_of",
    "sweep",
    "sync_folder",
    "write_all",
    "write_text",
]
