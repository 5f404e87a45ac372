"""A schedule on the screen, and somebody before it who presses keys and reads."""

from __future__ import annotations

import asyncio

import pytest

from schedtui.screen.app import ScheduleApp
from schedtui.session.session import Session

SCHEDULE = """\
# Invented, to try the screen on.
[project]
title = "Try Works"
units = "IP"
altitude = 1200

[defaults]
room_db = 75.0
room_rh = 50

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[unit]]
tag = "AHU-1"
serves = "Offices [north] \\u001b[31m"

[[unit]]
tag = "AHU-2"
supply_airflow = 9440
outdoor_airflow = 1800
return_rise = 2.0
cool_eat_db = 80.0
cool_eat_wb = 66.0
cool_lat_db = 53.0
cool_lat_wb = 52.0
cool_total = 100

[[unit]]
tag = "AHU-3"
supply_airflow = 9,440

[[unit]]
tag = "AHU-4"
supply_airflow = 5000
cool_lat_db = 53.0
cool_lat_wb = 55.0
"""


class Desk:
    """Somebody before the program."""

    def __init__(self, app, pilot, file):
        self.app, self.pilot, self.file = app, pilot, file

    async def press(self, *keys):
        for key in keys:
            await self.pilot.press(key)
        await self.pilot.pause()

    async def type(self, text):
        await self.press(*(_KEYS.get(character, character) for character in text))

    @property
    def lines(self):
        return [strip.text for strip in self.app.screen._compositor.render_strips()]

    @property
    def title(self):
        return self.lines[0]

    @property
    def hint(self):
        return self.lines[-1]

    @property
    def text(self):
        return "\n".join(self.lines)

    @property
    def pointed(self):
        """The line of the cursor."""
        return next(line for line in self.lines if line.startswith(">"))

    def row(self, tag):
        return next(line for line in self.lines if line[4:].startswith(tag))

    @property
    def on_disk(self):
        return self.file.read_text(encoding="utf-8")


_KEYS = {" ": "space", ".": "full_stop", ",": "comma", "/": "slash", "-": "minus"}


@pytest.fixture
def at_desk(tmp_path):
    """Return what runs a scene with the schedule open at a size."""

    def run(scene, size=(80, 24), text=SCHEDULE, at_once=float("inf"), keeping=None):
        file = tmp_path / "try.toml"
        if text is not None:
            file.write_text(text, encoding="utf-8")

        async def play():
            app = ScheduleApp(Session.open(file, at_once, keeping))
            async with app.run_test(size=size) as pilot:
                await pilot.pause()
                await scene(Desk(app, pilot, file))
            return app

        return asyncio.run(play())

    return run
