"""Keys go in, and what the screen shows is read."""

from __future__ import annotations

import pytest

from schedtui.screen.app import ScheduleApp
from schedtui.session.session import Session

SIZES = [(80, 24), (160, 45)]


@pytest.mark.parametrize("size", SIZES, ids=str)
def test_it_opens_on_the_worst_and_says_why(at_desk, size):
    async def scene(desk):
        assert desk.pointed.startswith(">?? AHU-3")
        assert "AHU-3: unreadable" in desk.text
        assert "9,440" in desk.text
        await desk.press("ctrl+down", "ctrl+up", "ctrl+up")
        assert desk.pointed.startswith(">!! AHU-2")
        assert "cool-total-short at summer peak" in desk.text

    at_desk(scene, size)


@pytest.mark.parametrize("size", SIZES, ids=str)
def test_the_title_tells_file_project_site_and_counts(at_desk, size):
    async def scene(desk):
        for part in ("try.toml", "Try Works", "IP", "1200 ft", "standard"):
            assert part in desk.title
        assert ("??1 !!" in desk.title) or ("1 unreadable  " in desk.title)
        assert "unsaved" not in desk.title

    at_desk(scene, size)


def test_at_80_columns_ten_rows_and_eight_lines_of_the_pane_are_there(at_desk):
    rows = "".join(f'[[unit]]\ntag = "U-{number}"\n' for number in range(30))

    async def scene(desk):
        assert sum("│" in line and "U-" in line for line in desk.lines) >= 10
        header = next(i for i, line in enumerate(desk.lines) if "[Findings]" in line)
        assert len(desk.lines) - header - 2 == 8

    at_desk(scene, text='[project]\ntitle = "Many"\nunits = "SI"\n' + rows)


def test_a_value_taken_answers_in_its_row(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.type("900")
        assert "Enter takes" in desk.hint
        await desk.press("enter")
        assert not desk.row("AHU-2").startswith(" !!")
        assert "900" in desk.row("AHU-2")
        assert desk.pointed.startswith(">?? AHU-3")  # a row down
        assert desk.hint.startswith("AHU-2 was short, is ")
        assert "*unsaved*" in desk.title

    at_desk(scene)


async def go_to_total(desk):
    """Go to the total of AHU-2."""
    await desk.press("ctrl+up")
    for _ in range(30):
        if desk.hint.startswith("< cool-total-short"):
            return
        await desk.press("ctrl+g")
    raise AssertionError(desk.text)


def test_undo_redo_and_save(at_desk):
    async def scene(desk):
        before = desk.on_disk
        await go_to_total(desk)
        await desk.type("900")
        await desk.press("enter", "ctrl+z")
        assert desk.hint.startswith("Taken back: AHU-2 cooling total 100 → 900")
        assert desk.pointed.startswith(">!! AHU-2")
        assert "unsaved" not in desk.title
        await desk.press("ctrl+y")
        assert desk.hint.startswith("Done again: AHU-2 cooling total 100 → 900")
        await desk.press("ctrl+s")
        assert desk.hint.startswith("Saved ")
        assert desk.on_disk == before.replace("cool_total = 100", "cool_total = 900")
        await desk.press("ctrl+z")
        assert "*unsaved*" in desk.title
        await desk.press("ctrl+z")
        assert desk.hint.startswith("Nothing to take back")

    at_desk(scene)


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("abc", "is not a number"),
        ("94,4", "does not group thousands"),
        ("3 ft", "is no unit of load"),
        ("1e999", "too large"),
    ],
)
def test_what_cannot_be_accepted_is_said_and_the_edit_stays(at_desk, text, said):
    async def scene(desk):
        await go_to_total(desk)
        await desk.type(text)
        await desk.press("enter")
        assert desk.hint.startswith("Not taken: ")
        assert said in desk.hint
        assert text in desk.pointed
        await desk.press("escape")
        assert "100" in desk.pointed
        assert "unsaved" not in desk.title

    at_desk(scene)


def test_out_of_range_is_refused_with_the_range(at_desk):
    async def scene(desk):
        await desk.press("ctrl+up")
        for _ in range(60):
            await desk.press("tab")
            if desk.hint.startswith("Leaving air dry bulb"):
                break
        await desk.type("5000")
        await desk.press("enter")
        assert "-100 to 300" in desk.hint.replace("−", "-")

    at_desk(scene)


def test_a_conversion_is_shown_before_it_is_taken(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.type("264 kW")
        assert desk.hint.startswith("264 kW = 900.8 MBH")  # 3.412 14 MBH a kilowatt
        await desk.press("enter")
        assert " 900.8" in desk.row("AHU-2")

    at_desk(scene)


async def go_to_default(desk):
    await desk.press("ctrl+up", "home")
    for _ in range(60):
        await desk.press("tab")
        if desk.hint.startswith("^ from the defaults"):
            return
    raise AssertionError(desk.text)


def test_a_default_says_so_and_is_stated_only_when_typed_over(at_desk):
    async def scene(desk):
        await go_to_default(desk)
        assert "75.0^" in desk.pointed
        await desk.press("enter", "enter")  # opened and closed: nothing was typed
        assert "75.0^" in desk.row("AHU-2")
        assert "unsaved" not in desk.title
        await desk.press("up")
        await desk.type("75.0")
        await desk.press("enter")
        assert "75.0^" not in desk.row("AHU-2")
        await desk.press("up", "delete")
        assert "75.0^" in desk.pointed

    at_desk(scene)


def test_del_on_a_default_says_where_it_comes_from_and_offers_to_do_without(at_desk):
    async def scene(desk):
        await go_to_default(desk)
        await desk.press("delete")
        assert "comes from [defaults]" in desk.text
        await desk.press("escape")
        assert "75.0^" in desk.pointed
        await desk.press("delete", "enter", "ctrl+s")
        assert "75.0^" not in desk.pointed
        assert 'without = ["room_db"]' in desk.on_disk

    at_desk(scene)


def test_a_required_cell_cannot_be_cleared(at_desk):
    async def scene(desk):
        await desk.press("home", "delete")
        assert desk.hint.startswith("Not cleared: Tag must not be blank")
        assert "AHU-3" in desk.pointed

    at_desk(scene)


def test_a_computed_cell_says_what_it_is_computed_from(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.press("right")
        assert desk.hint.startswith("· Cooling total required: computed from ")
        await desk.type("5")
        assert desk.hint.startswith("Not to be typed into.")
        await desk.press("delete")
        assert desk.hint.startswith("Not to be typed into.")

    at_desk(scene)


def test_quit_asks_only_when_something_is_unsaved(at_desk):
    async def clean(desk):
        await desk.press("ctrl+q")

    assert at_desk(clean)._exit

    async def asks(desk):
        await go_to_total(desk)
        await desk.type("900")
        await desk.press("enter", "ctrl+q")
        assert "try.toml has unsaved changes" in desk.text
        await desk.press(
            "ctrl+s", "ctrl+q", "f1", "x", "escape"
        )  # none of these is an answer but Esc
        assert "AHU-2" in desk.text
        assert "cool_total = 100" in desk.on_disk
        assert not desk.app._exit
        await desk.press("ctrl+q", "enter")
        assert desk.app._exit
        assert "cool_total = 900" in desk.on_disk

    at_desk(asks)

    async def drops(desk):
        await go_to_total(desk)
        await desk.type("900")
        await desk.press("enter", "ctrl+q", "d")
        assert desk.app._exit
        assert "cool_total = 100" in desk.on_disk

    at_desk(drops)


def test_ctrl_c_does_not_quit_even_in_an_edit(at_desk):
    async def scene(desk):
        await desk.press("ctrl+c")
        assert desk.hint.startswith("ctrl+c does not quit")
        await go_to_total(desk)
        await desk.type("12")
        await desk.press("ctrl+c", "ctrl+c")
        assert not desk.app._exit
        await desk.press("enter")
        assert " 12<" in desk.row("AHU-2")

    at_desk(scene)


def test_help_explains_marks_signs_keys_and_the_place(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.press("f1")
        assert "Here: AHU-2, cool_total" in desk.text
        assert "short: the equipment is too small" in desk.text
        assert "computed; cannot be typed into" in desk.text
        await desk.press("end")
        assert "no design" in desk.text
        await desk.press("f1")
        assert desk.pointed.startswith(">!! AHU-2")

    at_desk(scene)


def test_the_pane_turns_takes_the_keys_and_grows(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.press("ctrl+p")
        assert "AHU-2 at summer peak" in desk.text
        await desk.press("ctrl+w", "pagedown")
        assert "─>" in desk.text
        assert "AHU-2 at summer peak" not in desk.text
        assert "ctrl+w table" in desk.hint
        await desk.press("ctrl+l")
        assert "TAG" not in desk.text
        await desk.press("escape")
        assert "TAG" in desk.text
        await desk.press("down")
        assert desk.pointed.startswith(">?? AHU-3")

    at_desk(scene)


def test_a_small_terminal_says_what_it_needs_and_recovers(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.type("90")
        await desk.pilot.resize_terminal(50, 10)
        await desk.pilot.pause()
        assert desk.lines[0].startswith("Terminal 50 × 10: 60 × 16 needed.")
        assert not "".join(desk.lines[1:]).strip()
        await desk.type("77")
        await desk.pilot.resize_terminal(60, 16)
        await desk.pilot.pause()
        await desk.type("0")
        await desk.press("enter")
        assert " 900" in desk.row("AHU-2")

    at_desk(scene)


def test_a_new_size_keeps_cursor_and_edit(at_desk):
    async def scene(desk):
        await go_to_total(desk)
        await desk.type("90")
        for size in ((160, 45), (100, 30), (80, 24)):
            await desk.pilot.resize_terminal(*size)
            await desk.pilot.pause()
            assert "90" in desk.pointed
        await desk.type("1")
        await desk.press("enter")
        assert " 901" in desk.row("AHU-2")

    at_desk(scene)


def test_text_of_the_file_is_data(at_desk):
    async def scene(desk):
        await desk.press("home", "ctrl+home", "right")
        assert "Offices [north] ␛[31m" in desk.pointed

    at_desk(scene)


def test_units_that_wait_are_reviewed_while_keys_are_taken(at_desk):
    many = "".join(
        f'[[unit]]\ntag = "U-{number}"\ncool_lat_db = 53.0\ncool_lat_wb = {wet}\n'
        for number, wet in enumerate([52.0] * 90 + [55.0])
    )

    async def scene(desk):
        for _ in range(200):
            if "of 91" not in desk.title:
                break
            await desk.pilot.pause()
        assert "!=1" in desk.title or "1 conflict" in desk.title
        assert desk.pointed.startswith(">!= U-90")  # it goes to the worst, since no key was pressed

    at_desk(scene, text='[project]\ntitle = "Many"\nunits = "IP"\n' + many, at_once=5)


def test_a_schedule_without_units(at_desk):
    async def scene(desk):
        assert "No unit yet." in desk.text
        await desk.press("ctrl+down", "ctrl+g", "enter", "delete", "f1", "f1", "ctrl+p", "ctrl+z")
        assert not desk.app._exit

    at_desk(scene, text='[project]\ntitle = "None"\nunits = "IP"\n')


# Few cells, so that few checks have anything to say: a new check does not change the picture.
PICTURED = """\
[project]
title = "Pictured Works"
units = "IP"
pressure = 12.3

[defaults]
room_db = 75.0

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 70.0

[[unit]]
tag = "AHU-1"
serves = "Offices, the north range and 冷水機房"

[[unit]]
tag = "AHU-2"
cool_lat_db = 53.0
cool_lat_wb = 55.0

[[unit]]
tag = "AHU-3"
location = "Roof [B]"
cool_flow = 9,440
"""
SCENES = {
    "table": ["ctrl+down"],
    "refused": ["ctrl+down", "x", "enter"],
    "question": ["ctrl+home", "home", "right", "A", "enter", "ctrl+q"],
    "air": ["ctrl+home", "ctrl+down", "ctrl+p", "ctrl+l"],
}


@pytest.mark.parametrize("colour", [True, False], ids=["colour", "plain"])
@pytest.mark.parametrize("size", SIZES, ids=str)
@pytest.mark.parametrize("scene", ["table", "refused"])
def test_picture(snap_compare, monkeypatch, tmp_path, scene, size, colour):
    assert snap_compare(pictured(monkeypatch, tmp_path, colour), SCENES[scene], size)


@pytest.mark.parametrize("scene", ["question", "air"])
def test_picture_of_other_places(snap_compare, monkeypatch, tmp_path, scene):
    assert snap_compare(pictured(monkeypatch, tmp_path, True), SCENES[scene], SIZES[0])


def pictured(monkeypatch, tmp_path, colour):
    if colour:
        monkeypatch.delenv("NO_COLOR", raising=False)
    else:
        monkeypatch.setenv("NO_COLOR", "1")
    file = tmp_path / "pictured.toml"
    file.write_text(PICTURED, encoding="utf-8")
    return ScheduleApp(Session.open(file))
