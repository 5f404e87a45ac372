"""A question over the screen, answered with one key; and one that is answered with a text."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, ClassVar

from rich.text import Text
from textual.containers import Horizontal, Vertical, VerticalScroll
from textual.screen import ModalScreen
from textual.widgets import Static

from schedtui.screen import looks
from schedtui.screen.cell_editor import EDIT_KEYS, CellEdit
from schedtui.text_width import visible

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
        lines: what the question is about, a line each; it scrolls where it is long.
    """

    DEFAULT_CSS: ClassVar[str] = f"""
    Question {{ align: center middle; }}
    Question > Vertical {{
        width: 72; max-width: 90%; height: auto; max-height: 100%; padding: 1 2;
        background: {looks.SHALE}; color: {looks.CHALK};
    }}
    Question > Vertical.-long {{ width: 100%; max-width: 100%; height: 100%; }}
    Question Horizontal {{ height: auto; }}
    Question .key {{ width: 8; }}
    Question .does {{ width: 1fr; }}
    Question VerticalScroll {{
        height: 1fr; background: {looks.SLATE}; scrollbar-size: 1 1; margin-bottom: 1;
    }}
    """

    def __init__(self, text: str, answers: Sequence[Answer], lines: Sequence[str] = ()) -> None:
        super().__init__()
        self._text = text
        self._answers = answers
        self._lines = lines

    def compose(self) -> ComposeResult:
        """Lay out the question, what it is about and, a line each, its answers."""
        with Vertical(classes="-long" if self._lines else None):
            yield Static(Text(visible(self._text) + "\n", style=looks.HEADING))
            if self._lines:
                with VerticalScroll(can_focus=False):
                    lines = "\n".join(map(visible, self._lines))
                    yield Static(Text(lines, style=looks.GROUND, no_wrap=True, overflow="ellipsis"))
            for answer in self._answers:
                with Horizontal():
                    yield Static(Text(answer.name, style=looks.UNIT), classes="key")
                    yield Static(Text(visible(answer.label), style=looks.UNIT), classes="does")

    def on_key(self, event: events.Key) -> None:
        """Take an answer's key, or scroll; every other key is for nobody."""
        event.stop()
        for answer in self._answers:
            if event.key == answer.key:
                self.dismiss(answer.value)
                return
        if not self._lines:
            return
        part = self.query_one(VerticalScroll)
        moves = {
            "down": part.scroll_down, "up": part.scroll_up,
            "pagedown": part.scroll_page_down, "pageup": part.scroll_page_up,
            "home": part.scroll_home, "end": part.scroll_end,
        }  # fmt: skip
        if event.key in moves:
            moves[event.key](animate=False)


class TextQuestion(ModalScreen[str]):
    """Asks for one line of text and returns it; nothing where it was given up.

    Args:
        text: the question.
        begun: what stands there to begin with.
        label: what Enter does.
    """

    DEFAULT_CSS: ClassVar[str] = Question.DEFAULT_CSS.replace("Question", "TextQuestion")

    def __init__(self, text: str, begun: str, label: str) -> None:
        super().__init__()
        self._text = text
        self._edit = CellEdit.of(begun)
        self._label = label

    def compose(self) -> ComposeResult:
        """Lay out the question, the line and what the keys do."""
        with Vertical():
            yield Static(Text(visible(self._text) + "\n", style=looks.HEADING))
            yield Static(self._shown(), id="typed")
            yield Static(Text(f"\nEnter   {self._label}\nEsc     stay", style=looks.UNIT))

    def _shown(self) -> Text:
        text, caret = self._edit.text, self._edit.caret
        shown = Text(visible(text[:caret]), style=looks.EDIT)
        shown.append(visible(text[caret : caret + 1]) or " ", looks.CARET)
        return shown.append(visible(text[caret + 1 :]), looks.EDIT)

    def on_key(self, event: events.Key) -> None:
        """Edit the line, take it or give it up."""
        event.stop()
        if event.key == "enter":
            self.dismiss(self._edit.text)
        elif event.key == "escape":
            self.dismiss("")
        elif event.key in EDIT_KEYS:
            self._become(EDIT_KEYS[event.key](self._edit))
        elif event.is_printable and event.character:
            self._become(self._edit.insert(event.character))

    def on_paste(self, event: events.Paste) -> None:
        """Put in the first line of what was pasted."""
        event.stop()
        lines = event.text.splitlines()
        if lines:
            self._become(self._edit.insert(lines[0]))

    def _become(self, edit: CellEdit) -> None:
        self._edit = edit
        self.query_one("#typed", Static).update(self._shown())
