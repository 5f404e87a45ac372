from __future__ import annotations

import asyncio

from schedtui.errors import ScheduleError
from schedtui.screen.broken_page import BrokenPage
from schedtui.session.session import Session
from tests.screen.conftest import SCHEDULE

BROKEN = SCHEDULE.replace("[[condition]]", "[[condition] \x1b[31m")


def shown(app):
    return "\n".join(strip.text for strip in app.screen._compositor.render_strips())


def played(tmp_path, scene):
    file = tmp_path / "try.toml"
    file.write_text(BROKEN, encoding="utf-8")

    async def play():
        try:
            Session.open(file)
        except ScheduleError as error:
            app = BrokenPage(file, error, lambda: Session.open(file))
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.pause()
            await scene(app, pilot, file)
        return app

    return asyncio.run(play())


def test_it_says_the_line_and_shows_it_as_data(tmp_path):
    async def scene(app, pilot, file):
        text = shown(app)
        assert "try.toml cannot be opened" in text
        assert "line 11:" in text
        assert "[[condition] ␛[31m" in text
        await pilot.press("ctrl+c", "x", "enter")
        assert not app._exit
        file.write_text(SCHEDULE + "[", encoding="utf-8")
        await pilot.press("enter")
        assert f"line {SCHEDULE.count(chr(10)) + 1}:" in shown(app)
        file.unlink()
        await pilot.press("enter")
        assert "no such file" in shown(app)

    app = played(tmp_path, scene)
    assert app.return_value is None


def test_once_mended_it_is_opened(tmp_path):
    async def scene(_, pilot, file):
        file.write_text(SCHEDULE, encoding="utf-8")
        await pilot.press("enter")

    assert played(tmp_path, scene).return_value.document.rows("unit")


def test_it_sees_by_itself_that_it_is_mended(tmp_path):
    async def scene(app, pilot, file):
        file.write_text(SCHEDULE, encoding="utf-8")
        while not app._exit:
            await pilot.pause(0.05)

    assert played(tmp_path, scene).return_value is not None


def test_one_may_leave(tmp_path):
    async def scene(app, pilot, _):
        await pilot.press("ctrl+q")
        assert app._exit

    app = played(tmp_path, scene)
    assert app.return_value is None
    assert isinstance(app.error, ScheduleError)
