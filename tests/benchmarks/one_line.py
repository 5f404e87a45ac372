"""The least program the library makes: what start and memory are compared with."""

from __future__ import annotations

from textual.app import App, ComposeResult
from textual.widgets import Static


class OneLine(App[None]):
    """One line of text."""

    def compose(self) -> ComposeResult:
        """Return the line."""
        yield Static("ready")


if __name__ == "__main__":
    OneLine().run()
