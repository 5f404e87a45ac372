from __future__ import annotations

import asyncio

from textual.app import App

from schedtui.report.page import Heading, Page, Paragraph, Table
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
