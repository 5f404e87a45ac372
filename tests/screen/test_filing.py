"""What is asked about the file, and what follows from each answer."""

from __future__ import annotations

import os
import socket
import time

import pytest

from schedtui.session.keeping import Keeping
from schedtui.session.lock import Holder
from schedtui.session.session import Session
from tests.screen.conftest import SCHEDULE

EDITED = SCHEDULE.replace("cool_total = 100", "cool_total = 900")


def keeping(folder, user="ann"):
    return Keeping(folder / "state", holder=Holder(user, f"{user}.invalid", 1, 1.8e9))


async def go_to_total(desk):
    """Go to the total of AHU-2."""
    await desk.press("ctrl+up")
    for _ in range(30):
        if desk.hint.startswith("< cool-total-short"):
            return
        await desk.press("ctrl+g")
    raise AssertionError(desk.text)


async def edit(desk, text="900"):
    await go_to_total(desk)
    await desk.type(text)
    await desk.press("enter")


def said(desk):
    return " ".join(desk.text.split())


def left_behind(folder, *texts):
    """Leave a journal as a session does that was told to end."""
    file = folder / "try.toml"
    file.write_text(SCHEDULE, encoding="utf-8")
    session = Session.open(file, keeping=keeping(folder))
    row_id = list(session.review.units)[1]
    for text in texts:
        session.set_cell("unit", row_id, "cool_total", text)
    session.close(keep=True)
    return file


def test_edits_left_behind_are_brought_back_with_enter(at_desk, tmp_path):
    left_behind(tmp_path, "800", "900")

    async def scene(desk):
        assert "2 edits can be brought back" in said(desk)
        await desk.press("enter")
        assert "900" in desk.row("AHU-2")
        assert "*unsaved*" in desk.title
        assert "2 edits brought back, not saved yet" in desk.hint
        await desk.press("ctrl+z")
        assert "800" in desk.row("AHU-2")
        await desk.press("ctrl+y", "ctrl+s")
        assert desk.on_disk == EDITED

    at_desk(scene, keeping=keeping(tmp_path))
    assert list((tmp_path / "state" / "journals").iterdir()) == []


def test_edits_left_behind_are_looked_at_first(at_desk, tmp_path):
    left_behind(tmp_path, "800", "900")

    async def scene(desk):
        await desk.press("l")
        assert "AHU-2 cooling total 800 → 900" in said(desk)
        assert "l look" not in said(desk)
        await desk.press("x", "down", "enter")
        assert "900" in desk.row("AHU-2")

    at_desk(scene, keeping=keeping(tmp_path))


@pytest.mark.parametrize(("key", "kept"), [("a", ".aside"), ("escape", ".journal")])
def test_edits_left_behind_are_set_aside_or_left_for_later(at_desk, tmp_path, key, kept):
    left_behind(tmp_path, "900")

    async def scene(desk):
        await desk.press(key)
        await go_to_total(desk)
        assert " 100" in desk.row("AHU-2")
        assert "unsaved" not in desk.title
        await desk.press("ctrl+q")

    app = at_desk(scene, keeping=keeping(tmp_path))
    app._session.close(keep=False)
    assert [one.suffix for one in (tmp_path / "state" / "journals").iterdir()] == [kept]


def test_edits_that_do_not_fit_can_be_looked_at_and_are_kept(at_desk, tmp_path):
    file = left_behind(tmp_path, "900")
    file.write_text(SCHEDULE.replace("1200", "1300"), encoding="utf-8")

    async def scene(desk):
        assert "1 edit cannot be brought back" in said(desk)
        await desk.press("l")
        assert "AHU-2 cooling total 100 → 900" in said(desk)
        await desk.press("enter")
        await go_to_total(desk)
        assert " 100" in desk.row("AHU-2")

    at_desk(scene, text=None, keeping=keeping(tmp_path))
    assert len(list((tmp_path / "state" / "journals").glob("*.journal"))) == 1


def test_a_journal_that_cannot_be_read_is_kept_and_said(at_desk, tmp_path):
    left_behind(tmp_path, "900")
    (journal,) = (tmp_path / "state" / "journals").iterdir()
    journal.write_text(journal.read_text().replace('"at":1', '"at":77'))

    async def scene(desk):
        await desk.press("enter")
        assert "Not brought back: its edit 1 of 1 cannot be read" in desk.hint
        await edit(desk)
        await desk.press("ctrl+s")
        assert desk.on_disk == EDITED

    at_desk(scene, keeping=keeping(tmp_path))
    assert journal.with_suffix(".aside").exists()


def test_whoever_else_has_it_open_is_named_and_hinders_nobody(at_desk, tmp_path):
    file = tmp_path / "try.toml"
    file.write_text(SCHEDULE, encoding="utf-8")
    other = Session.open(file, keeping=Keeping(tmp_path / "bob", holder=of_this_host()))

    async def scene(desk):
        assert f"also open: bob on {socket.gethostname()} since" in said(desk)
        await desk.press("enter")
        await edit(desk)
        await desk.press("ctrl+s")
        assert desk.on_disk == EDITED

    at_desk(scene, keeping=keeping(tmp_path))
    other.close(keep=False)

    async def leaves(desk):
        await desk.press("ctrl+q")
        assert desk.app._exit

    other = Session.open(file, keeping=Keeping(tmp_path / "bob", holder=of_this_host()))
    at_desk(leaves, keeping=keeping(tmp_path))
    other.close(keep=False)


def of_this_host():
    return Holder("bob", socket.gethostname(), os.getpid(), time.time())


async def changed_meanwhile(desk, *pairs):
    await edit(desk)
    theirs = desk.on_disk
    for before, after in pairs:
        assert before in theirs
        theirs = theirs.replace(before, after)
    desk.file.write_text(theirs, encoding="utf-8")
    return theirs


def test_a_change_on_disk_is_noticed_and_nothing_is_written_over(at_desk):
    async def scene(desk):
        theirs = await changed_meanwhile(desk, ("Try Works", "Their Works"))
        await desk.press("up")
        assert "*changed on disk*" in desk.title
        assert desk.hint.startswith("Changed on disk by something else; ctrl+s compares")
        await desk.press("ctrl+s")
        assert "They touch different cells" in said(desk)
        assert "project title Their Works Try Works Try Works" in said(desk)
        assert "AHU-2 cooling total 100 900 100" in said(desk)
        await desk.press("escape")
        assert desk.on_disk == theirs
        assert "*unsaved*" in desk.title

    at_desk(scene, size=(100, 30))


def test_both_are_had_where_they_touch_different_cells(at_desk):
    async def scene(desk):
        theirs = await changed_meanwhile(desk, ("Try Works", "Their Works"))
        await desk.press("ctrl+s", "b")
        assert desk.on_disk == theirs.replace("cool_total = 100", "cool_total = 900")
        assert "Their Works" in desk.title
        assert "changed on disk" not in desk.title
        assert "unsaved" not in desk.title

    at_desk(scene, size=(120, 30))


def test_the_same_cell_is_kept_or_taken(at_desk):
    async def keeps(desk):
        await changed_meanwhile(desk, ("cool_total = 100", "cool_total = 250"))
        await desk.press("ctrl+s")
        assert "!= AHU-2 cooling total 250 900 100" in said(desk)
        await desk.press("b")
        assert "cool_total = 250" in desk.on_disk, "both is not offered"
        await desk.press("k")
        assert desk.on_disk == EDITED

    at_desk(keeps)

    async def takes(desk):
        await changed_meanwhile(desk, ("cool_total = 100", "cool_total = 250"))
        await desk.press("ctrl+s", "d")
        assert "250" in desk.row("AHU-2")
        assert "unsaved" not in desk.title

    at_desk(takes)


def test_with_the_disks_anything_may_be_another(at_desk):
    other = '[project]\ntitle = "Other"\nunits = "SI"\n\n[[unit]]\ntag = "X-1"\n'

    async def scene(desk):
        await edit(desk)
        desk.file.write_text(other, encoding="utf-8")
        await desk.press("ctrl+s", "d")
        assert "X-1" in desk.pointed
        assert "SI" in desk.title
        await desk.press("ctrl+z", "ctrl+down", "ctrl+g", "home")
        await desk.type("Y")
        await desk.press("enter", "ctrl+s")
        assert 'tag = "Y"' in desk.on_disk

    at_desk(scene)


def test_saved_under_another_name_both_files_are_there(at_desk, tmp_path):
    async def scene(desk):
        theirs = await changed_meanwhile(desk, ("cool_total = 100", "cool_total = 250"))
        await desk.press("ctrl+s", "n")
        assert "Save under which name?" in desk.text
        for _ in "try.toml":
            await desk.press("backspace")
        await desk.type("mine.toml")
        await desk.press("enter")
        assert desk.on_disk == theirs
        assert (tmp_path / "mine.toml").read_text("utf-8") == EDITED
        assert desk.title.startswith("mine.toml")
        assert "unsaved" not in desk.title

    at_desk(scene)


def test_a_name_that_is_taken_is_refused_and_one_may_stay(at_desk, tmp_path):
    (tmp_path / "taken.toml").write_text("kept", encoding="utf-8")

    async def scene(desk):
        await edit(desk)
        await desk.press("f11", "escape", "f11")
        for _ in "try.toml":
            await desk.press("backspace")
        await desk.type("taken.toml")
        await desk.press("enter")
        assert "exists already" in desk.hint
        assert desk.title.startswith("try.toml *unsaved*")
        await desk.press("ctrl+s")
        assert desk.on_disk == EDITED

    at_desk(scene)
    assert (tmp_path / "taken.toml").read_text("utf-8") == "kept"


def test_one_that_has_gone_is_written_again_when_told(at_desk):
    async def scene(desk):
        await edit(desk)
        desk.file.unlink()
        await desk.press("ctrl+s")
        assert "no longer what was read" in said(desk)
        assert "take the disk" not in desk.text
        await desk.press("k")
        assert desk.on_disk == EDITED

    at_desk(scene)


def test_a_save_that_fails_says_why_and_the_next_one_works(at_desk, tmp_path):
    async def scene(desk):
        await edit(desk)
        desk.file.rename(tmp_path / "away")
        desk.file.mkdir()
        await desk.press("ctrl+s", "k")
        assert "Not saved: " in desk.hint
        assert "*unsaved*" in desk.title
        desk.file.rmdir()
        (tmp_path / "away").rename(desk.file)
        await desk.press("ctrl+s")
        assert desk.on_disk == EDITED

    at_desk(scene)


def test_without_a_state_folder_it_is_said_and_the_value_is_taken(at_desk, tmp_path):
    (tmp_path / "state").write_text("in the way", encoding="utf-8")

    async def scene(desk):
        await edit(desk)
        assert desk.hint.startswith("Edits are not safe before a save: ")
        assert "900" in desk.row("AHU-2")
        await desk.press("up")
        await desk.type("901")
        await desk.press("enter")
        assert "not safe" not in desk.hint

    at_desk(scene, keeping=keeping(tmp_path))
