"""From what is wrong to what puts it right, in the pane: keys go in, the screen is read."""

from __future__ import annotations

import re

import pytest

# The coil needs more than its total, at little enough that less air would do as well.
SEVERAL = """\
[project]
title = "Try Works"
units = "IP"
altitude = 1200

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[unit]]
tag = "AHU-1"
room_db = 75.0
room_rh = 50
supply_airflow = 9440
outdoor_airflow = 1800
return_rise = 2.0
fan_rise = 0
cool_eat_db = 80.0
cool_eat_wb = 66.0
cool_lat_db = 53.0
cool_lat_wb = 51.5
cool_total = 370
"""
TWO_UNITS = SEVERAL + '\n[[unit]]\ntag = "AHU-2"\nserves = "Offices"\n'


def meant(desk):
    """Return the head of the entry that the pane's sign stands before."""
    (head,) = re.findall(r">((?:short|conflict|caution|missing) .*)", desk.text)
    return head


async def to_pane(desk):
    await desk.press("escape", "ctrl+home", "ctrl+w", "home")


async def to_finding(desk, check):
    await to_pane(desk)
    for _ in range(20):
        if check in meant(desk):
            return
        await desk.press("down")
    raise AssertionError(desk.text)


@pytest.mark.parametrize("size", [(80, 24), (160, 45)], ids=str)
def test_the_next_finding_is_meant_in_the_pane_too(at_desk, size):
    async def scene(desk):
        seen = set()
        for _ in range(5):
            await desk.press("ctrl+g")
            check = re.match(r"\S (\S+-\S+?)[,.]", desk.hint)[1]  # what the cell is blamed for
            assert meant(desk).split()[1].rstrip(",") == check
            seen.add(check)
        assert "cool-total-short" in seen
        assert len(seen) > 1

    at_desk(scene, size, text=SEVERAL.replace("370", "100"))


def test_the_arrows_go_from_finding_to_finding(at_desk):
    async def scene(desk):
        await to_pane(desk)
        assert meant(desk).startswith("short     cool-total-short")
        assert desk.hint.startswith("cool-total-short at summer peak")
        assert "Enter clears it" in desk.hint
        await desk.press("down")
        assert meant(desk).startswith("conflict  cool-row-balance")
        assert "Enter" not in desk.hint
        assert "a accepts it" in desk.hint
        await desk.press("up")
        assert meant(desk).startswith("short     cool-total-short")
        await desk.press("end")
        assert not meant(desk).startswith("short")

    at_desk(scene, text=SEVERAL)


def test_the_only_remedy_is_taken_with_one_key_and_taken_back_with_another(at_desk):
    async def scene(desk):
        await desk.press("ctrl+up")
        await desk.press("ctrl+w", "home", "enter")
        took = re.match(r"AHU-2 cooling total 100 → (\d+) \(clears cool-total-short\)", desk.hint)
        assert took
        assert f" {took[1]}" in desk.row("AHU-2")
        assert "cool-total-short" not in desk.text.replace(desk.hint, "")
        assert "*unsaved*" in desk.title
        await desk.press("ctrl+z")
        assert desk.hint.startswith(f"Taken back: {took[0]}")
        assert "cool-total-short at summer peak" in desk.text
        assert "unsaved" not in desk.title
        await desk.press("ctrl+y", "ctrl+s")
        assert f"cool_total = {took[1]}" in desk.on_disk

    at_desk(scene)


def test_of_several_remedies_one_is_asked_for(at_desk):
    async def scene(desk):
        await to_pane(desk)
        await desk.press("enter")
        assert "What shall clear cool-total-short of AHU-1?" in desk.text
        offered = {
            match[2]: (match[1], match[3])
            for line in desk.lines
            if (match := re.search(r" (\d) +(\w+) ([\d.]+) \S+", line))
        }
        assert {"cool_total", "cool_lat_wb", "supply_airflow"} <= set(offered)
        await desk.press("escape")
        assert "unsaved" not in desk.title
        key, value = offered["supply_airflow"]
        await desk.press("enter", key)
        assert desk.hint.startswith(
            f"AHU-1 supply airflow 9440 → {value} (clears cool-total-short)"
        )
        await desk.press("ctrl+s")
        assert f"supply_airflow = {value}" in desk.on_disk
        assert "cool_total = 370" in desk.on_disk

    at_desk(scene, text=SEVERAL)


@pytest.mark.parametrize("size", [(80, 24), (120, 40)], ids=str)
def test_what_turns_worse_by_a_remedy_is_said_before_and_after(at_desk, size):
    async def scene(desk):
        await to_pane(desk)
        await desk.press("enter")
        line = next(one for one in desk.lines if "; worse: " in one)
        worse = line.partition("worse: ")[2].strip()
        assert worse
        await desk.press(re.search(r" (\d) ", line)[1])
        assert f"; worse: {worse}" in desk.hint
        await desk.press("ctrl+l")
        assert worse.split(",")[0] in "\n".join(desk.lines[:-1])

    at_desk(scene, size, text=SEVERAL)


def test_what_is_not_short_is_not_cleared_by_a_key(at_desk):
    async def scene(desk):
        await to_finding(desk, "cool-row-balance")
        await desk.press("enter")
        assert desk.hint.startswith("Enter clears what is short; cool-row-balance is not")
        await desk.press("t")
        assert desk.hint.startswith("Nothing to take back")
        assert "unsaved" not in desk.title

    at_desk(scene, text=SEVERAL)


async def accept(desk, check, reason, initials=None):
    await to_finding(desk, check)
    await desk.press("a")
    assert "Why is this accepted: AHU-1 " in desk.text
    await desk.type(reason)
    await desk.press("enter")
    if initials is not None:
        assert "Your initials:" in desk.text
        await desk.type(initials)
        await desk.press("enter")


def test_a_finding_is_accepted_saved_and_still_accepted_when_opened_again(at_desk):
    async def scene(desk):
        await accept(desk, "cool-row-balance", "as agreed", "xy")
        assert desk.hint.startswith("AHU-1 cool-row-balance accepted.")
        assert "(accepted)" in meant(desk)
        await desk.press("ctrl+s")

    at_desk(scene, text=SEVERAL)

    async def again(desk):
        await to_finding(desk, "cool-row-balance")
        assert "(accepted)" in meant(desk)
        assert re.search(r"Accepted by xy on \d{4}-\d\d-\d\d: as agreed", desk.text)
        assert "t takes it back" in desk.hint
        await desk.press("a")
        assert desk.hint.startswith("It is accepted already")
        await desk.press("t")
        assert desk.hint.startswith("AHU-1 cool-row-balance no longer accepted.")
        assert "(accepted)" not in desk.text
        await desk.press("ctrl+s")
        assert desk.on_disk == SEVERAL

    at_desk(again, text=None)


def test_initials_are_asked_once(at_desk):
    async def scene(desk):
        await accept(desk, "cool-row-balance", "as agreed", "xy")
        await accept(desk, "cool-total-short", "next year")
        assert desk.hint.startswith("AHU-1 cool-total-short at summer peak accepted.")
        await desk.press("enter")
        assert desk.hint.startswith("It is accepted; t takes that back")
        await desk.press("ctrl+z")
        assert desk.hint.startswith("Taken back: AHU-1 cool-total-short at summer peak accepted")
        assert "(accepted)" not in meant(desk)

    at_desk(scene, (120, 40), text=SEVERAL)


@pytest.mark.parametrize(
    ("keys", "said"),
    [
        (["escape"], "no reason given"),
        (["space", "enter"], "no reason given"),
        (["x", "enter", "escape"], "no initials given"),
    ],
)
def test_without_reason_or_initials_nothing_is_accepted(at_desk, keys, said):
    async def scene(desk):
        await to_pane(desk)
        await desk.press("a", *keys)
        assert desk.hint.startswith(f"Not accepted: {said}")
        assert "unsaved" not in desk.title

    at_desk(scene, text=SEVERAL)


def test_an_acceptance_that_has_lapsed_is_accepted_anew_or_taken_out(at_desk):
    async def lapse(desk):
        await accept(desk, "cool-row-balance", "as agreed", "xy")
        await to_finding(desk, "cool-total-short")
        await desk.press("enter", "1")
        await to_finding(desk, "acceptance-lapsed")

    async def taken_out(desk):
        await lapse(desk)
        await desk.press("a")
        assert desk.hint.startswith("Accept the finding itself")
        await desk.press("t")
        assert desk.hint.startswith("AHU-1 lapsed acceptance taken out.")
        assert "acceptance-lapsed" not in desk.text

    at_desk(taken_out, (120, 40), text=SEVERAL)

    async def anew(desk):
        await lapse(desk)
        await accept(desk, "cool-row-balance", "agreed again")
        assert "acceptance-lapsed" not in desk.text
        await desk.press("ctrl+s")
        assert desk.on_disk.count("[[unit.accepted]]") == 1

    at_desk(anew, (120, 40), text=SEVERAL)


def test_on_another_page_and_on_a_clear_unit_the_keys_do_nothing(at_desk):
    async def scene(desk):
        await desk.press("ctrl+home", "ctrl+p", "ctrl+w", "enter", "a", "t")
        assert "unsaved" not in desk.title
        assert "Why is this accepted" not in desk.text
        await desk.press("escape", "ctrl+p", "ctrl+p", "ctrl+end", "ctrl+w", "enter", "a", "t")
        assert "unsaved" not in desk.title
        assert "Why is this accepted" not in desk.text

    at_desk(scene, text=TWO_UNITS)
