"""A schedule that has one of everything, and a session that keeps what it must."""

from __future__ import annotations

import os

import pytest

from schedtui.session.keeping import Keeping
from schedtui.session.lock import Holder
from schedtui.session.session import Session

EVERYTHING = """\
# The works' air handlers.
format = 1

[project]
title = "Works"   # kept as it stands
units = "IP"

[limits]
agreement = 2.0

[defaults]
room_db = 75.0
room_rh = 50

[[column]]
key = "mcc"
heading = "Fed from"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[condition]]
name = "winter"
season = "heating"
outdoor_db = -5.0
outdoor_rh = 80

[[plant]]
name = "chilled water"
serves = "cooling"
capacity = 1200

# North wing.
[[unit]]
tag = "AHU-1"
supply_airflow = 9440
outdoor_airflow = 1800
cool_lat_db = 53.0
cool_lat_wb = 52.0
cool_total = 100    # far too small
mcc = "MCC-2"
remarks = ["1", "2"]

[[unit.accepted]]
check = "cool-total-short"
condition = "summer peak"
by = "AB"
on = 2026-11-30
reason = "spare capacity next door"

[[unit.accepted]]
check = "outdoor-share"
by = "CD"
on = 2026-12-01
reason = "as the brief has it"

[[unit]]
tag = "AHU-2"
supply_airflow = 5,000
cool_total = 1e6

# South wing.
[[unit]]
tag = "AHU-3"
supply_airflow = 7000
"""


class Machine:
    """A folder with a schedule, a state folder and a clock that stands until it is moved."""

    def __init__(self, folder):
        self.file = folder / "works.toml"
        self.file.write_text(EVERYTHING, encoding="utf-8")
        self.state = folder / "state"
        self.now = 1.8e9
        self.sessions = 0

    def keeping(self, **holder):
        self.sessions += 1
        given = {"user": "ann", "host": "desk7.invalid", "pid": self.sessions, "since": self.now}
        return Keeping(self.state, lambda: self.now, Holder(**{**given, **holder}))

    def open(self, **holder):
        return Session.open(self.file, keeping=self.keeping(**holder))

    @property
    def text(self):
        return self.file.read_text(encoding="utf-8")

    @property
    def lock(self):
        return self.file.with_name("works.toml.open")

    @property
    def journals(self):
        folder = self.state / "journals"
        return sorted(one.name.rpartition(".")[2] for one in folder.glob("*"))

    def kill(self, session):
        """Do to a session what a kill of its process does: it lets go, and tidies nothing up."""
        journal = session.kept._journal
        if journal._descriptor >= 0:
            os.close(journal._descriptor)
            journal._descriptor = -1
        for found in session.kept.left:
            found.leave()
        session.kept.left.clear()
        self.lock.unlink(missing_ok=True)


@pytest.fixture
def machine(tmp_path):
    return Machine(tmp_path)
