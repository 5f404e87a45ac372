from __future__ import annotations

from schedtui.report.formats.text import render
from schedtui.review.registry import registered
from schedtui.screen.actions import ACTIONS
from schedtui.screen.help_page import help_page
from schedtui.screen.looks import Look, mark_of, sign_of
from schedtui.screen.pane_lines import page_lines


def test_every_mark_sign_key_and_check_is_explained():
    lines = [line.text.split() for line in page_lines(help_page(), 100)]
    firsts = {line[0] for line in lines if line}
    unused = {Look.MARK_ACCEPTED}
    shown = {mark_of(look) for look in Look if look not in unused} | {
        sign_of(look) for look in Look
    }
    assert {text for text in shown if text.strip()} <= firsts
    assert {action.shown for action in ACTIONS} <= firsts
    assert set(registered()) <= firsts


def test_it_begins_with_the_place_one_is_in():
    text = render(help_page("Here: AHU-1, tag", ("Tag: its name.",)))
    assert text.startswith("Here: AHU-1, tag\n\nTag: its name.\n")
