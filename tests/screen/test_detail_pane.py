from __future__ import annotations

import asyncio

from textual.app import App

from schedtui.report.page import Entries, Entry, Heading, Page, Paragraph, Table
from schedtui.screen.detail_pane import DetailPane

LONG = Page(tuple(Paragraph(f"line {number}") for number in range(20)))
WIDE = Page((Table(("a", "b"), (("x" * 50, "1" * 30),), frozenset({1})),))


class Program(App[None]):
    def compose(self):
        yield DetailPane(["Findings", "Air"], id="pane")


def play(page, scene, name="Findings"):
    async def run():
        app = Program()
        async with app.run_test(size=(40, 9)) as pilot:
            pane = app.query_one(DetailPane)
            pane.show(name, page, about=1)
            pane.focus()
            await pilot.pause()

            async def press(*keys):
                await pilot.press(*keys)
                await pilot.pause()
                return [strip.text for strip in app.screen._compositor.render_strips()]

            await scene(pane, press)

    asyncio.run(run())


def test_it_scrolls_and_says_how_far():
    async def scene(_pane, press):
        lines = await press()
        assert lines[0].startswith("─>[Findings] Air ─")
        assert lines[0].endswith(" 1 to 8 of 39 ─")
        assert lines[1].startswith(" line 0")
        assert (await press("pagedown"))[1].startswith(" line 4")
        assert (await press("down", "down"))[1].startswith(" line 5")
        assert (await press("end"))[8].startswith(" line 19")
        assert (await press("pagedown", "down"))[8].startswith(" line 19")
        assert (await press("home", "up"))[1].startswith(" line 0")

    play(LONG, scene)


def test_what_is_wider_has_a_sign_and_scrolls_sideways():
    async def scene(_pane, press):
        lines = await press()
        assert lines[2].endswith("x›")
        lines = await press("right")
        assert lines[2].startswith("‹x")
        lines = await press(*["right"] * 9)
        assert lines[2].endswith("1 ")
        lines = await press(*["left"] * 9)
        assert lines[2].startswith(" x")

    play(WIDE, scene)


def test_the_same_thing_said_anew_stays_where_it_is_scrolled():
    async def scene(pane, press):
        await press("pagedown")
        pane.show("Findings", Page((*LONG.blocks, Paragraph("more"))), about=1)
        assert (await press())[1].startswith(" line 4")
        pane.show("Findings", LONG, about=2)
        assert (await press())[1].startswith(" line 0")

    play(LONG, scene)


def test_a_page_of_another_name_stands_alone():
    async def scene(_pane, press):
        assert (await press())[0].startswith("─>[Help]──")

    play(Page((Heading("Keys"),)), scene, "Help")


ENTRIES = Page(
    (
        Heading("AHU-1: short"),
        Entries(tuple(Entry("short", f"head {n}", (f"line {n}",) * n) for n in range(1, 13))),
    )
)


def test_an_entry_that_is_meant_has_a_sign_and_stays_in_sight():
    async def scene(pane, press):
        told, done = [], []
        pane.chose, pane.acts = told.append, {"enter": lambda: done.append(pane._meant)}
        await press("enter")
        assert done == []  # nothing is meant
        pane.show("Findings", ENTRIES, about=1, meant=0)

        def meant(lines):
            (line,) = [line for line in lines if line.startswith(">")]
            return line.split()[2]

        lines = await press()
        assert lines[1].startswith(" AHU-1: short")
        assert meant(lines) == "1"
        assert meant(await press("down", "down")) == "3"
        assert meant(await press("up")) == "2"
        assert meant(await press("pagedown", "pagedown")) == str(told[-1] + 1)
        here = told[-1] + 1
        await press("enter")
        assert done == [here - 1]
        for _ in range(here + 1):  # line by line to its end, then to the next
            if told[-1] != here - 1:
                break
            lines = await press("down")
        assert meant(lines) == str(here + 1)
        assert meant(await press("home")) == "1"
        await press("end")
        assert told[-1] == 11
        lines = await press("up")  # the last is longer than the pane: a line back first
        assert told[-1] == 11
        assert lines[-1].split() == ["line", "12"]

    play(ENTRIES, scene)
