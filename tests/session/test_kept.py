"""A process killed at each operation on a file: nothing that was accepted is gone.

The operations are those that the program asks the system for; the child counts them and kills
itself at one, before it or, of a writing, in the middle of it.
"""

from __future__ import annotations

import fcntl
import json
import os
import shutil
import signal
import warnings
from functools import partial
from pathlib import Path

import pytest

from schedtui.schedule.save import source_text
from schedtui.session.recovery import told
from tests.session.conftest import EVERYTHING

NAMES = (
    *("open", "write", "fsync", "fchmod", "fchown", "ftruncate", "close"),
    *("mkdir", "link", "replace", "rename", "unlink"),
)
EDITS = ("400", "401", "402")


class Operations:
    """Counts the operations on files from now on, and kills the process at one of them.

    Args:
        at: which one, from 0; a number that is never reached to kill at none.
        halfway: whether half of a writing is done first.
    """

    def __init__(self, at, *, halfway):
        self.at, self.halfway = at, halfway
        self.done = []
        self.names = {}
        for name in NAMES:
            setattr(os, name, partial(self.call, name, getattr(os, name)))
        fcntl.flock = partial(self.call, "flock", fcntl.flock)

    def call(self, name, real, *arguments, **named):
        if len(self.done) == self.at:
            if self.halfway and name == "write":
                real(arguments[0], arguments[1][: len(arguments[1]) // 2])
            os.kill(os.getpid(), signal.SIGKILL)
        what = arguments[0]
        result = real(*arguments, **named)
        if name == "open":
            self.names[result] = self.role(what)
        role = self.names.get(what) if isinstance(what, int) else self.role(what)
        self.done.append(f"{name} {role}")
        if name == "replace":
            now = self.role(arguments[1])
            self.names = {number: now if one == role else one for number, one in self.names.items()}
        return result

    @staticmethod
    def role(path):
        name = Path(os.fspath(path)).name
        if name.startswith(".") and ".toml." in name:
            return "temporary file"
        if ".save." in name:
            return "copy begun"
        for ending, role in ENDINGS.items():
            if name.endswith(ending):
                return role
        return {"works.toml": "schedule"}.get(name, "folder")


ENDINGS = {
    ".journal": "journal",
    ".begun": "journal begun",
    ".aside": "journal set aside",
    ".open": "lock",
    ".save": "copy",
    "other.toml": "other schedule",
}


def play(machine, scene, at=10**9, *, halfway=False):
    """Play a scene in a child; return what it had done, and the operations unless it was killed."""
    reading, writing = os.pipe()
    with warnings.catch_warnings():
        warnings.simplefilter("ignore")  # later versions warn of a fork beside threads
        pid = os.fork()
    if pid == 0:
        try:
            tell = partial(os.write, writing)
            operations = Operations(at, halfway=halfway)
            scene(machine, lambda what: tell(f"{what}\n".encode()))
            tell(json.dumps(operations.done).encode())
        finally:
            os._exit(0)
    os.close(writing)
    with os.fdopen(reading, "r", encoding="utf-8") as stream:
        *said, last = stream.read().split("\n")
    os.waitpid(pid, 0)
    return said, json.loads(last) if last else None


def edit(session, tell, text):
    first = next(iter(session.review.units))
    session.set_cell("unit", first, "cool_total", text)
    tell(text)


def edits(machine, tell):
    session = machine.open()
    for text in EDITS:
        edit(session, tell, text)
    session.kept.settle()


def save(machine, tell):
    session = machine.open()
    edit(session, tell, EDITS[0])
    edit(session, tell, EDITS[1])
    session.save()
    edit(session, tell, EDITS[2])
    session.save()
    session.close(keep=True)


def save_as(machine, tell):
    session = machine.open()
    edit(session, tell, EDITS[0])
    session.save_as(machine.file.with_name("other.toml"))
    tell("other")


def merge(machine, tell):
    session = machine.open()
    edit(session, tell, EDITS[0])
    machine.file.write_text(EVERYTHING.replace("7000", "7100"), encoding="utf-8")
    tell("theirs")
    session.merge(session.compare())
    edit(session, tell, EDITS[1])
    session.save()


SCENES = {
    "edits": edits,
    "save": save,
    "save of one with hard links": save,
    "save as": save_as,
    "merge": merge,
}
FIRST = EVERYTHING.replace("cool_total = 100 ", "cool_total = {} ")


def prepare(machine, scene):
    for one in (machine.file, machine.lock, machine.file.with_name("other.toml")):
        one.unlink(missing_ok=True)
    shutil.rmtree(machine.state, ignore_errors=True)
    machine.file.write_text(EVERYTHING, encoding="utf-8")
    machine.file.with_name("second").unlink(missing_ok=True)
    if scene == "save of one with hard links":
        machine.file.with_name("second").hardlink_to(machine.file)


def whole(scene):
    """Return every text that the file may have."""
    theirs = EVERYTHING.replace("7000", "7100")
    begun = (EVERYTHING, theirs) if scene == "merge" else (EVERYTHING,)
    return {
        one.replace("cool_total = 100 ", f"cool_total = {text} ")
        for one in begun
        for text in ("100", *EDITS)
    }


def opened_again(machine):
    """Open what a killed process has left, bring back what is offered.

    Returns:
        The text it would be saved with, and the edits that are kept to be looked at.
    """
    session = machine.open()
    if session.offered:
        session.bring_back(session.offered)
    text = source_text(session.document)
    kept = [line for found in session.kept.left for line in told(found.edits())]
    machine.kill(session)
    return text, kept


def check(machine, scene, at, *, halfway):
    prepare(machine, scene)
    said, _ = play(machine, SCENES[scene], at, halfway=halfway)
    links = scene == "save of one with hard links"
    if not links:
        assert machine.text in whole(scene)
    text, kept = opened_again(machine)
    assert machine.text in whole(scene), "once it is opened again, it is whole in any case"
    if links:
        assert machine.file.samefile(machine.file.with_name("second"))
    if "theirs" in said:
        assert "7100" in text
    other = machine.file.with_name("other.toml")
    if other.exists():
        assert other.read_text("utf-8") == EVERYTHING.replace("= 100 ", "= 400 ")
        return
    assert "other" not in said
    taken = [one for one in said if one in EDITS]
    # The edit under way may be in the journal already.
    lawful = (*(taken[-1:] or ["100"]), *EDITS[len(taken) : len(taken) + 1])
    there = any(f"cool_total = {one} " in text for one in lawful)
    # Somebody else's change makes the edits before it not fit: they are kept, not applied.
    assert scene == "merge" or not kept
    assert there or (scene == "merge" and any(one.endswith(f"→ {taken[-1]}") for one in kept))


def operations_of(machine, scene):
    prepare(machine, scene)
    _, done = play(machine, SCENES[scene])
    return done


FOLDER_SYNCED = ["open folder", "fsync folder", "close folder"]
OPENED = ["open schedule", "open lock", "write lock", "close lock"]
BEGUN = [
    *("open journal begun", "flock journal begun", "write journal begun", "replace journal begun"),
    *FOLDER_SYNCED,
]
EDIT = ["write journal"]
NOTED = ["fsync journal", "write journal", "fsync journal"]
RENAMED = [
    *("open temporary file", "fchmod temporary file", "write temporary file"),
    *("fsync temporary file", "close temporary file", "replace temporary file", *FOLDER_SYNCED),
]
COPIED = [
    *("open copy begun", "write copy begun", "fsync copy begun", "close copy begun"),
    *("replace copy begun", *FOLDER_SYNCED),
]
OVERWRITTEN = [
    *("open schedule", "write schedule", "ftruncate schedule", "fsync schedule", "close schedule"),
    "unlink copy",
]
ENDED = ["unlink journal", "close journal"]
SAVED = [*NOTED, "open schedule", *RENAMED, *ENDED]
MADE = ["mkdir folder", "mkdir folder"]
CLOSED = ["open lock", "close lock", "unlink lock"]
LISTED = {
    "edits": [*OPENED, *MADE, *BEGUN, *EDIT, *EDIT, *EDIT, "fsync journal"],
    "save": [*OPENED, *MADE, *BEGUN, *EDIT, *EDIT, *SAVED, *BEGUN, *EDIT, *SAVED, *CLOSED],
    "save of one with hard links": [
        *(*OPENED, *MADE, *BEGUN, *EDIT, *EDIT, *NOTED, "open schedule", "open schedule"),
        *("mkdir folder", *COPIED, *OVERWRITTEN, *ENDED, *BEGUN, *EDIT, *NOTED),
        *("open schedule", "open schedule", *COPIED, *OVERWRITTEN, *ENDED, *CLOSED),
    ],
}


@pytest.mark.parametrize("scene", LISTED)
def test_the_operations_are_these(machine, scene):
    assert operations_of(machine, scene) == LISTED[scene]


def killed_at(machine, scene, every=1):
    done = operations_of(machine, scene)
    for at in range(0, len(done), every):
        for halfway in (False, True) if done[at].startswith("write") else (False,):
            check(machine, scene, at, halfway=halfway)


@pytest.mark.parametrize("scene", ["edits", "save"])
def test_killed_at_each_operation_nothing_accepted_is_gone(machine, scene):
    killed_at(machine, scene)


@pytest.mark.parametrize("scene", [one for one in SCENES if one not in {"edits", "save"}])
def test_killed_at_some_operations_nothing_accepted_is_gone(machine, scene):
    killed_at(machine, scene, every=5)


@pytest.mark.slow
@pytest.mark.parametrize("scene", SCENES)
def test_killed_at_every_operation_of_all_scenes_nothing_accepted_is_gone(machine, scene):
    killed_at(machine, scene)
