from __future__ import annotations

import asyncio

from textual.app import App

from schedtui.screen.question import Answer, Question, TextQuestion

ANSWERS = (Answer("enter", "Enter", "do it", "do"), Answer("x", "x", "do not", "leave"))


def answers(question, *keys, look=None):
    """Return what a question returns once these keys are pressed."""
    got = []

    async def play():
        app = App()
        async with app.run_test(size=(60, 20)) as pilot:
            app.push_screen(question, got.append)
            await pilot.pause()
            for key in keys:
                await pilot.press(key)
            if look is not None:
                look("\n".join(one.text for one in app.screen._compositor.render_strips()))

    asyncio.run(play())
    return got


def test_only_an_answers_key_answers():
    assert answers(Question("Really?", ANSWERS), "a", "down", "escape") == []
    assert answers(Question("Really?", ANSWERS), "a", "x") == ["leave"]
    assert answers(Question("Really?", ANSWERS), "enter") == ["do"]


def test_what_it_is_about_scrolls_and_is_data():
    lines = [f"line {number} \x1b[31m[b]" for number in range(50)]
    shown = []
    look = shown.append
    assert answers(Question("Really?\x1b[2J", ANSWERS, lines), look=look) == []
    assert "line 0 ␛[31m[b]" in shown[0]
    assert "Really?␛[2J" in shown[0]
    assert answers(Question("Really?", ANSWERS, lines), "end", look=look) == []
    assert "line 49 " in shown[1]
    assert "Enter   do it" in shown[1]
    assert answers(Question("Really?", ANSWERS, lines), "end", "home", look=look) == []
    assert "line 0 " in shown[2]


def test_a_text_is_edited_taken_or_given_up():
    def asked():
        return TextQuestion("Which name?", "a.toml", "take it")

    assert answers(asked(), "enter") == ["a.toml"]
    assert answers(asked(), "home", "b", "c", "enter") == ["bca.toml"]
    assert answers(asked(), "backspace", "left", "delete", "enter") == ["a.to"]
    assert answers(asked(), "q", "escape") == [""]
    assert answers(asked(), "tab", "down") == []
