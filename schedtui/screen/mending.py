"""What is done about the finding that is meant in the pane: cleared, accepted, taken back.

Asks with questions over the screen; the session does what is answered. Must not know how a remedy
is found, nor of cells.
"""

from __future__ import annotations

from datetime import datetime
from typing import TYPE_CHECKING, Protocol

from schedtui.errors import AmountError
from schedtui.review.accept import LAPSED
from schedtui.review.finding import Severity
from schedtui.review.remedy import remedies_by_check
from schedtui.screen import hints
from schedtui.screen.question import Answer, Question, TextQuestion
from schedtui.session import putting_right

if TYPE_CHECKING:
    from collections.abc import Callable

    from textual.app import App

    from schedtui.review.finding import Finding
    from schedtui.review.remedy import Remedy
    from schedtui.screen.around import Around
    from schedtui.session.history import Done
    from schedtui.session.session import Session

    Edit = Callable[[], frozenset[int]]

_STAY = "stay"
_STAY_ANSWER = Answer("escape", "Esc", "leave it as it is", _STAY)
_MOST_DIGITS = 9


class Desk(Protocol):
    """What mending needs of what is on the screen."""

    def do(self, row_id: int, edit: Edit) -> None:
        """Carry out an edit of a unit, and show what it makes of the review."""

    def point_at(self, step: Done) -> None:
        """Go to the cell that a step was about."""


class Mending:
    """What is done about findings.

    Args:
        app: what is on the screen, to ask over it.
        session: the schedule.
        around: what says which finding is meant, and where things are said.
        desk: what carries out an edit and shows it.
    """

    def __init__(self, app: App[None], session: Session, around: Around, desk: Desk) -> None:
        self._app = app
        self._session = session
        self._around = around
        self._desk = desk
        self._initials = ""  # asked once, as long as the program runs
        self.acts = {"enter": self.clear, "a": self.accept, "t": self.take_back}

    # -- a remedy ----------------------------------------------------------------------------

    def clear(self) -> None:
        """Clear the short finding that is meant with its remedy, or ask with which."""
        meant, reviewed = self._around.meant, self._around.reviewed
        if not meant or reviewed is None:
            return
        finding = meant[0]
        if finding.accepted:
            self._around.hint("It is accepted; t takes that back")
            return
        if finding.severity is not Severity.SHORT:
            self._around.hint(f"Enter clears what is short; {finding.check} is not")
            return
        cures = remedies_by_check(reviewed).get(finding.check, ())[:_MOST_DIGITS]
        if not cures:
            self._around.hint(f"No one number clears {finding.check}, nor two together")
        elif len(cures) == 1:
            self._take(finding, cures[0])
        else:
            self._ask_which(finding, cures)

    def _ask_which(self, finding: Finding, cures: tuple[Remedy, ...]) -> None:
        answers = [
            Answer(str(number), str(number), hints.about_remedy(one), str(number))
            for number, one in enumerate(cures, 1)
        ]

        def answered(answer: str | None) -> None:
            if answer is not None and answer != _STAY:
                self._take(finding, cures[int(answer) - 1])

        says = f"What shall clear {finding.check} of {finding.subject.label}?"
        self._app.push_screen(Question(says, (*answers, _STAY_ANSWER)), answered)

    def _take(self, finding: Finding, remedy: Remedy) -> None:
        worse = f"; worse: {', '.join(remedy.worsens)}" if remedy.worsens else ""
        self._step(finding, lambda: putting_right.put_right(self._session, finding, remedy), worse)

    # -- acceptances -------------------------------------------------------------------------

    def accept(self) -> None:
        """Accept what is meant: asks why, and the first time by whom."""
        meant = self._around.meant
        if not meant:
            return
        if meant[0].accepted:
            self._around.hint("It is accepted already; t takes that back")
            return
        if meant[0].check == LAPSED:
            self._around.hint("Accept the finding itself, or take the lapsed acceptance out with t")
            return

        def why(reason: str | None) -> None:
            if not reason or not reason.strip():
                self._around.hint("Not accepted: no reason given")
            elif self._initials:
                self._accept(meant, reason)
            else:
                ask = TextQuestion("Your initials:", "", "accept; asked only this once")
                self._app.push_screen(ask, lambda initials: who(initials, reason))

        def who(initials: str | None, reason: str) -> None:
            self._initials = (initials or "").strip()
            if self._initials:
                self._accept(meant, reason)
            else:
                self._around.hint("Not accepted: no initials given")

        what = f"Why is this accepted: {putting_right.told(meant)}?"
        self._app.push_screen(TextQuestion(what, "", "accept for this reason"), why)

    def _accept(self, meant: tuple[Finding, ...], reason: str) -> None:
        by, today = self._initials, datetime.now().astimezone().date()
        self._step(meant[0], lambda: putting_right.accept(self._session, meant, by, reason, today))

    def take_back(self) -> None:
        """Take back that what is meant is accepted."""
        meant = self._around.meant
        if not meant:
            return
        if not meant[0].accepted and meant[0].check != LAPSED:
            self._around.hint("Nothing to take back: it is not accepted")
            return
        self._step(meant[0], lambda: putting_right.take_back(self._session, meant))

    # -- what follows ------------------------------------------------------------------------

    def _step(self, finding: Finding, edit: Edit, worse: str = "") -> None:
        """Take a step about a finding and say what it was, what turned worse, what the unit is."""
        row_id, before = finding.subject.row_id, self._session.history.last
        was = self._session.review.units[row_id].status
        try:
            self._desk.do(row_id, edit)
        except AmountError as error:
            self._around.hint(f"Not taken: {error}")
            return
        step, now = self._session.history.last, self._session.review.units[row_id]
        if step is not None and step is not before:
            self._desk.point_at(step)
            stands = hints.answer(now.label, was, now.status)
            name = step.name.partition(" (clears ")[0] + worse if worse else step.name
            self._around.answer = self._session.kept.trouble() or f"{name}. {stands}"
        self._around.show_pane()
        self._around.show_hint()
