"""The terminal program: a table of units, a pane about one of them, a title and a hint.

Turns keys into edits of the session and shows what its review then says. Computes nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Any, ClassVar

from textual.app import App, ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Container

from schedtui.errors import AmountError, SchedtuiError
from schedtui.report.findings import short_counts, short_site
from schedtui.report.page import Page
from schedtui.report.unit import unit_air_page, unit_findings_page
from schedtui.review.reviewed import CLEAR, UnitReview
from schedtui.screen.actions import ACTIONS
from schedtui.screen.bars import HINT_STYLE, TITLE_STYLE, Bar
from schedtui.screen.detail_pane import DetailPane
from schedtui.screen.grid import Grid
from schedtui.screen.help_page import help_page
from schedtui.screen.question import Answer, Question
from schedtui.screen.terse_update import terse
from schedtui.screen.unit_table import UnitTable

if TYPE_CHECKING:
    from collections.abc import Callable

    from textual.screen import Screen

    from schedtui.session.session import Session

_WIDE = 140  # columns from which the pane stands beside the table

_PAGES: tuple[tuple[str, Callable[[UnitReview], Page]], ...] = (
    ("Findings", unit_findings_page),
    ("Air", unit_air_page),
)
_SAVE, _DROP, _STAY = "save", "drop", "stay"


class ScheduleApp(App[None]):
    """An open schedule on the screen.

    Args:
        session: the schedule.
    """

    ENABLE_COMMAND_PALETTE = False
    CSS_PATH = "screen.tcss"
    HORIZONTAL_BREAKPOINTS = [(0, "-narrow"), (_WIDE, "-wide")]  # noqa: RUF012  the library's type
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding(action.key, action.name, action.label, show=False, priority=action.overriding)
        for action in ACTIONS
    ]

    def __init__(self, session: Session) -> None:
        super().__init__()
        self._session = session
        self._table = UnitTable(session.review)
        self._page = 0
        self._helping = False

    def _display(self, screen: Screen[Any], renderable: Any) -> None:
        super()._display(screen, terse(renderable))

    # -- the screen ------------------------------------------------------------------------

    def compose(self) -> ComposeResult:
        """Lay out the title, the table, the pane and the hint."""
        yield Bar(TITLE_STYLE, id="title")
        with Container(id="parts"):
            yield Grid(self._table, empty="No unit yet.", id="units")
            yield DetailPane(id="pane")
        yield Bar(HINT_STYLE, id="hint")

    def on_mount(self) -> None:
        """Show the schedule."""
        self._show_title()
        self._show_pane()
        self._show_keys()

    @property
    def _grid(self) -> Grid:
        return self.query_one("#units", Grid)

    @property
    def _pane(self) -> DetailPane:
        return self.query_one("#pane", DetailPane)

    @property
    def _reviewed(self) -> UnitReview | None:
        """The unit under the cursor."""
        cursor = self._grid.cursor
        return self._session.review.units.get(cursor[0]) if cursor else None

    def _show_title(self) -> None:
        session = self._session
        unsaved = " *unsaved*" if session.unsaved else ""
        title = session.schedule.project.title or "No title"
        left = f"{session.path.name}{unsaved}  {short_site(session.review)}  {title}"
        self.query_one("#title", Bar).show(left, short_counts(session.review))

    def _show_pane(self) -> None:
        if self._helping:
            self._pane.show(help_page())
            return
        reviewed = self._reviewed
        self._pane.show(_PAGES[self._page][1](reviewed) if reviewed else Page(()))

    def _show_keys(self) -> None:
        keys = "  ".join(f"{one.shown} {one.short}" for one in ACTIONS if one.short)
        self._hint(f"Type or Enter to edit  {keys}")

    def _hint(self, left: str, right: str = "") -> None:
        self.query_one("#hint", Bar).show(left, right)

    def _show_changes(self, changed: frozenset[int]) -> None:
        """Show what an edit has made of the review."""
        columns = self._table.show(self._session.review, changed)
        self._grid.source_changed(rows=changed, columns=columns)
        self._show_title()
        self._show_pane()

    # -- the table's messages --------------------------------------------------------------

    def on_grid_cursor_moved(self, message: Grid.CursorMoved) -> None:
        """Say what the cell holds, and show its unit in the pane."""
        self._show_pane()
        self._hint(*self._about(message.column_key))

    def on_grid_edit_begun(self, message: Grid.EditBegun) -> None:
        """Say what the cell accepts."""
        self._hint(*self._accepted(message.column_key))

    def on_grid_edit_changed(self, message: Grid.EditChanged) -> None:
        """Say what a number typed with a unit becomes, before it is taken."""
        cursor = self._grid.cursor
        if cursor is not None:
            note = self._session.conversion("unit", cursor[1], message.text)
            left, right = self._accepted(cursor[1])
            self._hint(note or left, right)

    def on_grid_edit_left(self, message: Grid.EditLeft) -> None:
        """Say again what the cell holds."""
        self._hint(*self._about(message.column_key))

    def on_grid_read_only(self, message: Grid.ReadOnly) -> None:
        """Say what a computed cell is computed from."""
        self._hint(*self._about(message.column_key))

    def on_grid_edit_taken(self, message: Grid.EditTaken) -> None:
        """Take what was typed, or say beside the cell why it cannot be taken."""
        grid = message.grid
        try:
            changed = self._session.set_cell(
                "unit", message.row_key, message.column_key, message.text
            )
        except AmountError as error:
            grid.refuse(str(error))
            return
        self._show_changes(changed)
        grid.end_edit(message.then)

    def _about(self, column_key: str) -> tuple[str, str]:
        computed = self._table.computed(column_key)
        if computed is not None:
            return f"{computed.label}: computed from {computed.of}", "computed"
        if column_key == "mark":
            reviewed = self._reviewed
            return (reviewed.status if reviewed else ""), ""
        field = self._session.field("unit", column_key)
        return f"{field.label}: {field.doc}", f"{field.key}, F1 help"

    def _accepted(self, column_key: str) -> tuple[str, str]:
        field = self._session.field("unit", column_key)
        accepted = field.kind.accepted(self._session.document.system)
        return f"{field.label}, {accepted}: {field.doc}", "Enter takes, Esc leaves"

    # -- actions ---------------------------------------------------------------------------

    def action_help(self) -> None:
        """Show the help in the pane, or put it away."""
        self._helping = not self._helping
        self._show_pane()
        if self._helping:
            self._pane.focus()
        else:
            self._grid.focus()

    def action_save(self) -> None:
        """Save, or say why that is not possible."""
        self._save()

    def _save(self) -> bool:
        if self._grid.editing is not None:
            self._hint("Enter or Esc first: a cell is being edited")
            return False
        try:
            self._session.save()
        except SchedtuiError as error:
            self._hint(f"Not saved: {error}")
            return False
        self._show_title()
        self._hint(f"Saved {self._session.path}")
        return True

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
            return
        turned = turn()
        if turned is None:
            self._hint(nothing)
            return
        step, changed = turned
        self._show_changes(changed)
        self._hint(f"{done}: {step.name}")

    def action_next_row(self) -> None:
        """Go to the next unit to look at."""
        self._seek(1)

    def action_previous_row(self) -> None:
        """Go to the previous unit to look at."""
        self._seek(-1)

    def _seek(self, direction: int) -> None:
        grid, units = self._grid, self._session.review.units
        if grid.cursor is None or grid.editing is not None:
            return
        row_key, column_key = grid.cursor
        order = list(units)[::direction]
        here = order.index(row_key)
        for candidate in (*order[here + 1 :], *order[:here]):
            if units[candidate].status != CLEAR:
                grid.move_to(candidate, column_key)
                return
        self._hint("No other unit to look at")

    def action_turn_pane(self) -> None:
        """Show the next page in the pane."""
        self._helping = False
        self._page = (self._page + 1) % len(_PAGES)
        self._show_pane()

    def action_other_part(self) -> None:
        """Go from the table to the pane, and back."""
        if self._grid.has_focus:
            self._pane.focus()
        else:
            self._grid.focus()

    def action_enlarge_pane(self) -> None:
        """Make the pane as large as the screen, or as small as it was."""
        self.screen.toggle_class("-enlarged")
        if self.screen.has_class("-enlarged"):
            self._pane.focus()
        else:
            self._grid.focus()

    def action_leave(self) -> None:
        """Quit, asking first where something is unsaved."""
        if not self._session.unsaved:
            self.exit()
            return
        answers = (
            Answer("enter", "Enter", "save and quit", _SAVE),
            Answer("d", "d", "quit and drop the changes", _DROP),
            Answer("escape", "Esc", "stay", _STAY),
        )
        name = self._session.path.name
        self.push_screen(Question(f"{name} has unsaved changes.", answers), self._answered)

    def _answered(self, answer: str | None) -> None:
        if answer == _DROP or (answer == _SAVE and self._save()):
            self.exit()
