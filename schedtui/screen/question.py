"""A question over the screen, answered with one key."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, ClassVar

from rich.text import Text
from textual.containers import Vertical
from textual.screen import ModalScreen
from textual.widgets import Static

from schedtui.screen import looks

if TYPE_CHECKING:
    from collections.abc import Sequence

    from textual import events
    from textual.app import ComposeResult


@dataclass(frozen=True, slots=True)
class Answer:
    """One way to answer.

    Args:
        key: the key that gives it.
        name: how the key is called.
        label: what it does.
        value: what it returns.
    """

    key: str
    name: str
    label: str
    value: str


class Question(ModalScreen[str]):
    """Asks and returns the value of the answer given.

    Args:
        text: the question.
        answers: the ways to answer it.
    """

    DEFAULT_CSS: ClassVar[str] = f"""
    Question {{ align: center middle; }}
    Question > Vertical {{
        width: 60; max-width: 90%; height: auto; padding: 1 2;
        background: {looks.SHALE}; color: {looks.CHALK};
    }}
    """

    def __init__(self, text: str, answers: Sequence[Answer]) -> None:
        super().__init__()
        self._text = text
        self._answers = answers

    def compose(self) -> ComposeResult:
        """Lay out the question and, a line each, its answers."""
        with Vertical():
            yield Static(Text(self._text + "\n", style=looks.HEADING))
            for answer in self._answers:
                yield Static(Text(f"{answer.name:<8}{answer.label}", style=looks.UNIT))

    def on_key(self, event: events.Key) -> None:
        """Take an answer's key; every other key is for nobody."""
        event.stop()
        for answer in self._answers:
            if event.key == answer.key:
                self.dismiss(answer.value)
