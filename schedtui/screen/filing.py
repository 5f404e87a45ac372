"""Saving, leaving, and whatever has to be asked about the file: what it asks and what follows.

Asks with questions over the screen; the session does what is answered. Must not know of cells.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Protocol

from schedtui.errors import FileChanged, SchedtuiError
from schedtui.screen.differences import difference_lines, merge_words
from schedtui.screen.question import Answer, Question, TextQuestion
from schedtui.session.recovery import told

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from textual.app import App

    from schedtui.session.comparison import Comparison
    from schedtui.session.history import Done
    from schedtui.session.journal import Found
    from schedtui.session.session import Session

_SAVE, _DROP, _STAY, _OVER, _DISK = "save", "drop", "stay", "over", "disk"
_BOTH, _NAME, _GO_ON, _LEAVE = "both", "name", "go on", "leave"
_BACK, _LOOK, _ASIDE = "back", "look", "aside"
_STAY_ANSWER = Answer("escape", "Esc", "stay", _STAY)
_NAME_ANSWER = Answer("n", "n", "save under another name", _NAME)
_MARGIN = 6  # cells that a question's frame takes


class Desk(Protocol):
    """What filing needs of what is on the screen."""

    def editing(self) -> bool:
        """Tell whether a cell is being edited."""

    def say(self, words: str) -> None:
        """Say something in the hint line."""

    def show_anew(self) -> None:
        """Show a schedule of which anything may be another."""

    def show_title(self) -> None:
        """Show the title with its marks."""

    def point_at(self, step: Done) -> None:
        """Go to the cell that a step was about."""


class Filing:
    """What is done with the file of an open schedule.

    Args:
        app: what is on the screen, to ask over it and to leave it.
        session: the schedule.
        desk: where things are said.
    """

    def __init__(self, app: App[None], session: Session, desk: Desk) -> None:
        self._app = app
        self._session = session
        self._desk = desk
        self._seen_changed = False

    @property
    def marks(self) -> str:
        """What the title says of the file besides its name."""
        unsaved = " *unsaved*" if self._session.unsaved else ""
        return f"{unsaved} *changed on disk*" if self._seen_changed else unsaved

    # -- when it is opened -------------------------------------------------------------------

    def begin(self) -> None:
        """Ask about what others have to do with the file, one after the other."""
        session, name = self._session, self._session.path.name
        if session.mended:
            self._desk.say(f"A save of {name} that was broken off has been finished")
        if session.kept.others is None:
            self._ask_about_left()
            return
        says = f"{name} is also open: {session.kept.others}. Whoever saves second is asked."
        go_on = Answer("enter", "Enter", "go on", _GO_ON)
        leave = Answer("ctrl+q", "ctrl+q", "leave it alone", _LEAVE)
        self._ask(
            Question(says, (go_on, leave)), {_LEAVE: self._app.exit, _GO_ON: self._ask_about_left}
        )

    def _ask_about_left(self) -> None:
        found = self._session.offered
        if found is not None:
            self._ask_to_bring_back(found)
        elif self._session.kept.left:
            self._ask_about_unfit(self._session.kept.left[0])

    def _ask_to_bring_back(self, found: Found, *, looking: bool = False) -> None:
        lines = told(found.edits())
        says = (
            f"An earlier session of {self._session.path.name} ended without saving. "
            f"{_counted(len(lines))} can be brought back."
        )
        answers = [
            Answer("enter", "Enter", "bring them back", _BACK),
            Answer("l", "l", "look at them first", _LOOK),
            Answer("a", "a", f"set them aside; they are kept in {found.file.parent}", _ASIDE),
            Answer("escape", "Esc", "go on without; they are offered again next time", _STAY),
        ]
        follows = {
            _BACK: lambda: self._bring_back(found),
            _LOOK: lambda: self._ask_to_bring_back(found, looking=True),
            _ASIDE: lambda: self._set_aside(found),
        }
        shown = [one for one in answers if not (looking and one.value == _LOOK)]
        self._ask(Question(says, shown, lines if looking else ()), follows)

    def _ask_about_unfit(self, found: Found, *, looking: bool = False) -> None:
        lines = told(found.edits())
        says = (
            f"An earlier session of {self._session.path.name} ended without saving, and the file "
            f"is another by now: {_counted(len(lines))} cannot be brought back, but looked at."
        )
        answers = [
            Answer("enter", "Enter", "go on; they are kept", _STAY),
            Answer("l", "l", "look at them", _LOOK),
            Answer("a", "a", f"set them aside, in {found.file.parent}", _ASIDE),
        ]
        follows = {
            _LOOK: lambda: self._ask_about_unfit(found, looking=True),
            _ASIDE: lambda: self._set_aside(found),
        }
        shown = [one for one in answers if not (looking and one.value == _LOOK)]
        self._ask(Question(says, shown, lines if looking else ()), follows)

    def _bring_back(self, found: Found) -> None:
        count = len(found.edits())
        try:
            self._session.bring_back(found)
        except SchedtuiError as error:
            self._session.kept.set_aside(found)
            self._desk.say(f"Not brought back: {error}; it is kept as {found.aside.name}")
            return
        self._desk.show_anew()
        if self._session.history.last is not None:
            self._desk.point_at(self._session.history.last)
        more = len(self._session.kept.left)
        others = f"; {more} older left, offered next time" if more else ""
        self._desk.say(f"{_counted(count)} brought back, not saved yet{others}")

    def _set_aside(self, found: Found) -> None:
        self._session.kept.set_aside(found)
        self._ask_about_left()

    # -- while it is open --------------------------------------------------------------------

    def look(self) -> None:
        """Notice a file that somebody else has changed."""
        if self._session.changed_on_disk() and not self._seen_changed:
            self._seen_changed = True
            self._desk.show_title()
            self._desk.say("Changed on disk by something else; ctrl+s compares")

    def save(self) -> bool:
        """Save, or say why that is not possible, or ask; tell whether it is saved."""
        if self._is_busy():
            return False
        return self._try(self._session.save)

    def save_as(self) -> None:
        """Ask for another name and save under it."""
        if self._is_busy():
            return
        begun = self._session.path.name
        question = TextQuestion("Save under which name?", begun, "save, and go on with that file")
        self._app.push_screen(question, self._named)

    def _named(self, name: str | None) -> None:
        if name and name.strip():
            path = self._session.path.parent / name.strip()
            self._try(lambda: self._session.save_as(path))

    def leave(self) -> None:
        """Leave, asking first where something is unsaved."""
        if self._is_busy():
            return
        if not self._session.unsaved:
            self._app.exit()
            return
        answers = (
            Answer("enter", "Enter", "save and quit", _SAVE),
            Answer("d", "d", "quit and drop the changes", _DROP),
            _NAME_ANSWER,
            _STAY_ANSWER,
        )
        follows = {_SAVE: self._save_and_leave, _DROP: self._app.exit, _NAME: self.save_as}
        says = f"{self._session.path.name} has unsaved changes."
        self._ask(Question(says, answers), follows)

    def _save_and_leave(self) -> None:
        if self.save():
            self._app.exit()

    def _is_busy(self) -> bool:
        if self._desk.editing():
            self._desk.say("Enter or Esc first: a cell is being edited")
            return True
        return False

    def _try(self, save: Callable[[], None]) -> bool:
        try:
            save()
        except FileChanged:
            self._compare()
            return False
        except SchedtuiError as error:
            self._desk.say(f"Not saved: {self._short(error)}")
            return False
        self._seen_changed = False
        self._desk.show_title()
        self._desk.say(f"Saved {self._session.path}")
        return True

    def _short(self, error: SchedtuiError) -> str:
        """Return what an error says, without the folder that all of it is about."""
        return str(error).replace(f"{self._session.path.parent}/", "")

    # -- when somebody else has changed it ---------------------------------------------------

    def _compare(self) -> None:
        comparison = self._session.compare()
        name = self._session.path.name
        over = Answer("k", "k", "keep what is here: write it over the disk's", _OVER)
        answers = [over, _NAME_ANSWER, _STAY_ANSWER]
        if comparison.theirs is None:
            self._ask_changed(
                f"{name} is no longer what was read: {comparison.why}.", answers, comparison, []
            )
            return
        aside = "; what was done here is set aside" if self._session.unsaved else ""
        answers.insert(0, Answer("d", "d", f"take the disk's{aside}", _DISK))
        if comparison.edits:
            answers.insert(
                0,
                Answer("b", "b", "both: take the disk's with what was done here, and save", _BOTH),
            )
        says = f"{name} has been changed on disk since it was read. {merge_words(comparison)}."
        lines = difference_lines(comparison, self._app.size.width - _MARGIN)
        self._ask_changed(says, answers, comparison, lines)

    def _ask_changed(
        self, says: str, answers: list[Answer], comparison: Comparison, lines: list[str]
    ) -> None:
        follows: Mapping[str, Callable[[], object]] = {
            _OVER: lambda: self._try(lambda: self._session.save(over=comparison)),
            _NAME: self.save_as,
            _DISK: lambda: self._take_disk(comparison),
            _BOTH: lambda: self._take_both(comparison),
        }
        self._ask(Question(says, answers, lines), follows)

    def _take_disk(self, comparison: Comparison) -> None:
        self._session.take_disk(comparison)
        self._seen_changed = False
        self._desk.show_anew()
        self._desk.say(f"{self._session.path.name} as it is on disk")

    def _take_both(self, comparison: Comparison) -> None:
        self._session.merge(comparison)
        self._desk.show_anew()
        if self._try(self._session.save):
            self._desk.say("Saved, the disk's changes and those made here")

    def _ask(self, question: Question, follows: Mapping[str, Callable[[], object]]) -> None:
        def answered(answer: str | None) -> None:
            if answer is not None and answer in follows:
                follows[answer]()

        self._app.push_screen(question, answered)


def _counted(edits: int) -> str:
    return "1 edit" if edits == 1 else f"{edits} edits"
