"""The terminal program: a table of units, a pane about one of them, a title and a hint.

Turns keys into edits of the session and shows what its review then says. Computes nothing.
"""

from __future__ import annotations

import asyncio
from typing import TYPE_CHECKING, Any, ClassVar

from textual.app import App, ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Container
from textual.screen import ModalScreen

from schedtui.errors import AmountError
from schedtui.screen import hints, looks, seek
from schedtui.screen.actions import ACTIONS
from schedtui.screen.around import Around
from schedtui.screen.bars import HINT_STYLE, Bar
from schedtui.screen.filing import Filing
from schedtui.screen.grid import Grid
from schedtui.screen.mending import Mending
from schedtui.screen.question import Answer, Question
from schedtui.screen.tally import Tally
from schedtui.screen.terse_update import terse
from schedtui.screen.unit_table import UnitTable

if TYPE_CHECKING:
    from collections.abc import Callable

    from textual import events
    from textual.screen import Screen

    from schedtui.screen import said
    from schedtui.screen.ending import Ending
    from schedtui.session.history import Done
    from schedtui.session.session import Session

_WIDE = 140  # columns from which the pane stands beside the table
_LEAST = (60, 16)

_SLICE = 0.008  # s that a key may have to wait while units are being reviewed
_PAUSE = 0.001  # s in between, for keys and painting
_DROP, _STAY = "drop", "stay"
_STAY_ANSWER = Answer("escape", "Esc", "stay", _STAY)


class ScheduleApp(App[None]):
    """An open schedule on the screen.

    Args:
        session: the schedule.
        ending: what tells it to end; nothing does if not given.
    """

    ENABLE_COMMAND_PALETTE = False
    CSS_PATH = "screen.tcss"
    HORIZONTAL_BREAKPOINTS = [(0, "-narrow"), (_WIDE, "-wide")]  # noqa: RUF012  the library's type
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding(action.key, action.name, action.label, show=False, priority=action.overriding)
        for action in ACTIONS
    ]

    def __init__(self, session: Session, ending: Ending | None = None) -> None:
        super().__init__()
        self._session = session
        self._ending = ending
        self._table = UnitTable(session.review)
        self._grid = Grid(self._table, empty="No unit yet.", tell=self._hear, id="units")
        self._around = Around(session, self._table, self._grid)
        self._filing = Filing(self, session, self)
        self._around.pane.acts = Mending(self, session, self._around, self).acts
        self._around.marks = lambda: self._filing.marks
        self._settling = False
        self._begun_at: tuple[int, str] | None = None

    def get_theme_variable_defaults(self) -> dict[str, str]:
        """Give the style sheet the palette's colours."""
        return {"ground": looks.SLATE, "faint": looks.ASH}

    def check_action(self, action: str, parameters: tuple[object, ...]) -> bool | None:  # noqa: ARG002
        """Leave every key to a question while one is asked."""
        return not isinstance(self.screen, ModalScreen)

    def _display(self, screen: Screen[Any], renderable: Any) -> None:
        super()._display(screen, terse(renderable))

    # -- the screen ------------------------------------------------------------------------

    def compose(self) -> ComposeResult:
        """Lay out the title, the table, the pane and the hint."""
        yield self._around.title
        with Container(id="parts"):
            yield self._grid
            yield self._around.pane
        yield self._around.bar
        yield Bar(HINT_STYLE, id="small")

    def on_mount(self) -> None:
        """Show the schedule, the cursor on the worst that was found."""
        small = "Terminal {} × {}: {} × {} needed."
        bar = self.query_one("#small", Bar)
        bar.show(lambda width: small.format(width, self.size.height, *_LEAST))
        self._begun_at = self._grid.cursor
        self._begin()
        self._around.show_title()
        self._around.show_pane()
        if self._session.waiting:
            self.set_timer(_PAUSE, self._go_on)
        self._end_when_told()
        problems = self._session.document.problems
        if problems:
            first = f"line {problems[0].line}: {problems[0]}"
            self._around.hint(f"{len(problems)} to mend in the file, the first in {first}")
        else:
            self._around.show_hint()
        self._filing.begin()

    def _go_on(self) -> None:
        """Review some of the units that wait, then look after the keys again."""
        self._show_changes(self._session.go_on(_SLICE))
        if self._session.waiting:
            self.set_timer(_PAUSE, self._go_on)
        elif self._grid.cursor == self._begun_at and self._grid.editing is None:
            self._around.show_pane()
            self._begin()

    def _end_when_told(self) -> None:
        """Leave, and give the terminal back, when the system asks the program to end."""
        if self._ending is not None:
            loop = asyncio.get_running_loop()
            self._ending.by(lambda status: loop.call_soon_threadsafe(self._leave_with, status))

    def _leave_with(self, status: int) -> None:
        self.exit(return_code=status)

    # -- what filing needs -------------------------------------------------------------------

    def editing(self) -> bool:
        """Tell whether a cell is being edited."""
        return self._grid.editing is not None

    def say(self, words: str) -> None:
        """Say something in the hint line."""
        self._around.hint(words)

    def show_title(self) -> None:
        """Show the title with its marks."""
        self._around.show_title()

    def point_at(self, step: Done) -> None:
        """Go to the cell that a step was about."""
        for row_id, key in self._session.cells_of(step):
            if key in self._column_keys:
                self._grid.move_to(row_id, key)

    def show_anew(self) -> None:
        """Show a schedule of which anything may be another."""
        self._table.start_over(self._session.review)
        self._around.tally = Tally(self._session.review)
        self._grid.source_changed(columns=True)
        self._around.show_title()
        self._around.show_pane()

    def _begin(self) -> None:
        """Put the cursor on the worst that was found, if anything was."""
        begin = seek.worst(self._session.review.units, self._column_keys)
        if begin is not None:
            self._grid.move_to(*begin)
            self._begun_at = begin

    def on_resize(self, event: events.Resize) -> None:
        """Say how large the terminal must be while it is too small."""
        fits = event.size.width >= _LEAST[0] and event.size.height >= _LEAST[1]
        screen = self.screen_stack[0]
        screen.set_class(not fits, "-small")
        if fits and screen.focused is None:
            self._focus_part()

    @property
    def _column_keys(self) -> frozenset[str]:
        return frozenset(column.key for column in self._table.columns)

    # -- what is done in the table -----------------------------------------------------------

    def _hear(self, message: said.Said) -> None:
        """Answer what a person did in the table; mostly by saying what is there now."""
        match message:
            case Grid.EditTaken():
                self._take(message)
            case Grid.ClearAsked():
                self._clear(message)
            case Grid.ReadOnly():
                self._around.hint(f"Not to be typed into. {self._around.about()}")
            case Grid.CursorMoved():
                self._around.follow()
                self._around.show_hint()
                if self._grid.editing is None:
                    self._filing.look()
            case _:
                self._around.show_hint()

    def _take(self, message: said.EditTaken) -> None:
        """Take what was typed, or say beside the cell why it cannot be taken."""
        grid, row_id, key = message.grid, message.row_key, message.column_key
        if message.touched:
            try:
                self.do(row_id, lambda: self._session.set_cell("unit", row_id, key, message.text))
            except AmountError as error:
                grid.refuse(str(error))
                self._around.hint(f'Not taken: "{message.text}" {error}')
                return
        grid.end_edit(message.then)
        if self._grid.cursor == (row_id, key):  # else it is shown since the cursor has moved
            self._around.show_pane()
            self._around.show_hint()

    def _clear(self, message: said.ClearAsked) -> None:
        """Clear a cell of the unit's own; ask about one that comes from the defaults."""
        row_id, key = message.row_key, message.column_key
        unit = self._session.review.units[row_id].unit
        inherited = unit.inherited.get(key)
        if key in unit.own:
            try:
                self.do(row_id, lambda: self._session.set_cell("unit", row_id, key, ""))
            except AmountError as error:
                self._around.answer = (
                    f"Not cleared: {self._session.field('unit', key).label} {error}"
                )
            self._around.show_pane()
            self._around.show_hint()
        elif inherited is None:
            self._around.hint("Nothing to clear here")
        else:
            self._ask_without(row_id, key, inherited.text)

    def _ask_without(self, row_id: int, key: str, text: str) -> None:
        label = self._session.review.units[row_id].label
        field = self._session.field("unit", key)

        def answered(answer: str | None) -> None:
            if answer == _DROP:
                self.do(row_id, lambda: self._session.without_default(row_id, key))
                self._around.show_pane()
                self._around.show_hint()

        says = f"{field.label} {text} comes from [defaults], which hold for every unit."
        without = Answer("enter", "Enter", f"do without it for {label}", _DROP)
        self.push_screen(Question(says, (without, _STAY_ANSWER)), answered)

    def do(self, row_id: int, edit: Callable[[], frozenset[int]]) -> None:
        """Carry out an edit, show what it makes of the review, and remember to say so."""
        before = self._session.review.units[row_id].status
        changed = edit()
        after = self._session.review.units[row_id]
        if changed:
            self._around.answer = hints.answer(after.label, before, after.status)
        self._around.answer = self._session.kept.trouble() or self._around.answer
        self._show_changes(changed)

    def _show_changes(self, changed: frozenset[int]) -> None:
        columns = self._table.show(self._session.review, changed)
        self._around.tally.show(self._session.review, changed)
        self._grid.source_changed(rows=changed, columns=columns)
        self._around.show_title()
        due = self._session.kept.due()
        if due is not None and not self._settling:
            self._settling = True
            self.set_timer(max(due, _PAUSE), self._settle)

    def _settle(self) -> None:
        """Have the edits on the disk, when nobody waits for a key."""
        self._settling = False
        self._session.kept.settle()

    # -- actions ---------------------------------------------------------------------------

    def action_help(self) -> None:
        """Show the help as large as the screen, or put it away."""
        self._around.helping = not self._around.helping
        self.screen.set_class(self._around.helping, "-enlarged")
        self._around.show_pane()
        self._focus_part()

    def action_to_table(self) -> None:
        """Go back to the table."""
        self._around.helping = False
        self.screen.remove_class("-enlarged")
        self._around.show_pane()
        self._grid.focus()

    def action_stay(self) -> None:
        """Say how to quit."""
        self._around.hint("ctrl+c does not quit; ctrl+q does")

    def _focus_part(self) -> None:
        (self._around.pane if self.screen.has_class("-enlarged") else self._grid).focus()

    def on_descendant_focus(self) -> None:
        """Say what the keys do in the part that has them now."""
        self._around.show_hint()

    def action_save(self) -> None:
        """Save, or say why that is not possible."""
        self._filing.save()

    def action_save_as(self) -> None:
        """Save under another name."""
        self._filing.save_as()

    def action_undo(self) -> None:
        """Take the last step back."""
        self._turn(self._session.undo, "Taken back", "Nothing to take back")

    def action_redo(self) -> None:
        """Do again what was taken back."""
        self._turn(self._session.redo, "Done again", "Nothing to do again")

    def _turn(
        self, turn: Callable[[], tuple[Any, frozenset[int]] | None], done: str, nothing: str
    ) -> None:
        if self._grid.editing is not None:
            self._around.hint("Enter or Esc first: a cell is being edited")
            return
        turned = turn()
        if turned is None:
            self._around.hint(nothing)
            return
        step, changed = turned
        self._show_changes(changed)
        self.point_at(step)
        self._around.show_pane()
        self._around.hint(f"{done}: {step.name}")

    def action_next_row(self) -> None:
        """Go to the next unit to look at."""
        self._seek_unit(1)

    def action_previous_row(self) -> None:
        """Go to the previous unit to look at."""
        self._seek_unit(-1)

    def _seek_unit(self, direction: int) -> None:
        cursor = self._grid.cursor
        if cursor is None or self._grid.editing is not None:
            return
        found = seek.next_unit(self._session.review.units, cursor[0], direction)
        if found is None:
            self._around.hint("No other unit to look at")
        else:
            self._grid.move_to(found, cursor[1])

    def action_next_finding(self) -> None:
        """Go to the next cell that a finding blames."""
        cursor = self._grid.cursor
        if cursor is None or self._grid.editing is not None:
            return
        found = seek.next_finding(self._session.review.units, *cursor, self._column_keys)
        if found is None:
            self._around.hint("Nothing found in any unit; schedtui check tells the rest")
        else:
            self._around.show_findings()
            self._grid.move_to(*found)

    def action_turn_pane(self) -> None:
        """Show the next page in the pane."""
        if self._around.helping:
            self.action_to_table()
            return
        self._around.turn_page()

    def action_other_part(self) -> None:
        """Go from the table to the pane, and back."""
        if self._grid.has_focus and self._grid.editing is None:
            self._around.pane.focus()
        elif self._around.pane.has_focus:
            self.action_to_table()

    def action_enlarge_pane(self) -> None:
        """Make the pane as large as the screen, or as small as it was."""
        if self.screen.has_class("-enlarged"):
            self.action_to_table()
        elif self._grid.editing is None:
            self.screen.add_class("-enlarged")
            self._focus_part()

    def action_leave(self) -> None:
        """Quit, asking first where something is unsaved."""
        self._filing.leave()
