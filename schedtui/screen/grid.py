"""The one table widget: a cursor, an edit in a cell, and repainting no more than has changed.

It draws any `TableSource` and says in messages what the person did; what a text means, whether
it is accepted and where the cursor goes then is for whoever holds the grid.
Must not know of schedules.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar, TypeAlias

from textual.geometry import Region
from textual.scroll_view import ScrollView

from schedtui.screen import looks, said
from schedtui.screen.cell_editor import EDIT_KEYS, CellEdit
from schedtui.screen.painter import HEADING_LINES, EditField, TableSource, edit_over
from schedtui.screen.viewport import Viewport

if TYPE_CHECKING:
    from collections.abc import Callable, Collection, Sequence

    from textual import events
    from textual.strip import Strip

    from schedtui.screen.said import Then

_TAKES: dict[str, Then] = {"enter": "down", "tab": "right", "shift+tab": "left"}
_WHEEL_ROWS = 3


class Grid(ScrollView, can_focus=True):
    """A table with frozen columns, two heading lines and a cell editor.

    Args:
        source: what is drawn.
        empty: what is said where there are no rows.
        edit_text: the text an edit of what is there begins with; the cell's text if not given.
        tell: is told at once what the person did, so that what follows from it is painted in one
            frame with what the grid paints; if not given, messages are posted.
        id: the widget's name in the screen.
    """

    ALLOW_SELECT = False
    DEFAULT_CSS: ClassVar[str] = f"""
    Grid {{
        height: 1fr;
        overflow: hidden hidden;
        background: {looks.SLATE};
    }}
    """

    CursorMoved: TypeAlias = said.CursorMoved
    EditBegun: TypeAlias = said.EditBegun
    EditLeft: TypeAlias = said.EditLeft
    EditTaken: TypeAlias = said.EditTaken
    EditChanged: TypeAlias = said.EditChanged
    ClearAsked: TypeAlias = said.ClearAsked
    ReadOnly: TypeAlias = said.ReadOnly

    def __init__(
        self,
        source: TableSource,
        *,
        empty: str = "Nothing here yet.",
        edit_text: Callable[[int, str], str] | None = None,
        tell: Callable[[said.Said], object] | None = None,
        id: str | None = None,  # noqa: A002 - the library's name for it
    ) -> None:
        super().__init__(id=id)
        self._view = Viewport(source, empty)
        self._edit_text = edit_text or (lambda row, column: source.cell(row, column).text)
        self._tell: Callable[[said.Said], object] = tell or self.post_message
        self._edit: CellEdit | None = None
        self._begun_with: str | None = None
        self._field: EditField | None = None
        view = self._view
        self._keys: dict[str, Callable[[], None]] = {
            "up": lambda: self._step(-1, 0),
            "down": lambda: self._step(1, 0),
            "left": lambda: self._step(0, -1),
            "right": lambda: self._step(0, 1),
            "home": lambda: self._go(view.row, view.next_typed(-1, 1)),
            "end": lambda: self._go(view.row, len(view.columns) - 1),
            "pageup": lambda: self._turn_page(-1),
            "pagedown": lambda: self._turn_page(1),
            "ctrl+home": lambda: self._go(0, view.column),
            "ctrl+end": lambda: self._go(len(view.rows) - 1, view.column),
            "ctrl+right": lambda: self._go(view.row, view.next_group(1)),
            "ctrl+left": lambda: self._go(view.row, view.next_group(-1)),
            "tab": lambda: self._tab(1),
            "shift+tab": lambda: self._tab(-1),
            "enter": self._edit_what_is_there,
            "f2": self._edit_what_is_there,
            "delete": self._ask_to_clear,
        }

    # -- what it shows ---------------------------------------------------------------------

    @property
    def cursor(self) -> tuple[int, str] | None:
        """The row and the column of the cursor; None while there are no rows or no columns."""
        return self._view.cursor

    @property
    def editing(self) -> CellEdit | None:
        """The edit under way, if any."""
        return self._edit

    @property
    def rows_shown(self) -> Sequence[int]:
        """The rows on the screen, from the top."""
        return self._view.rows_shown

    @property
    def cursor_region(self) -> Region:
        """The cells of the cursor, relative to the widget; empty while it has none."""
        place, y = self._view.place, self._view.line_of(self._view.row)
        return Region() if place is None or y is None else Region(place.x, y, place.width + 1, 1)

    def source_changed(self, *, rows: Collection[int] | None = None, columns: bool = False) -> None:
        """Paint anew what changed; an edit stays open while its cell is there.

        Args:
            rows: the rows whose cells may have changed, or None for all; rows that came, went or
                moved are noticed in any case.
            columns: whether the columns changed.
        """
        view, before = self._view, self.cursor
        moved = view.read_rows()
        if columns:
            view.read_columns()
        if self.cursor != before:
            self._edit = self._field = None
        if moved or columns or rows is None:
            view.forget_painted()
            self._rearrange()
        else:
            for row_key in set(rows).intersection(view.rows_shown):
                places = view.changed_places(row_key)
                if places is None:
                    self._refresh_cells(view.row_of(row_key), 0, self.size.width)
                for place in places or ():
                    self._refresh_cells(view.row_of(row_key), place.x, place.end)
        self._tell_if_moved(before)

    def mark(self, rows: Collection[int], columns: Collection[str]) -> None:
        """Show a block of cells as marked; nothing is marked where either is empty."""
        wanted = (frozenset(rows), frozenset(columns))
        if not all(wanted):
            wanted = (frozenset(), frozenset())
        old = self._view.marked
        touched = wanted[0] ^ old[0] if wanted[1] == old[1] else wanted[0] | old[0]
        self._view.marked = wanted
        for row_key in touched.intersection(self._view.rows_shown):
            self._refresh_cells(self._view.row_of(row_key), 0, self.size.width)

    # -- moving ----------------------------------------------------------------------------

    def move_to(self, row_key: int, column_key: str) -> None:
        """Put the cursor on a cell, bringing it into sight; unknown keys leave it where it is."""
        view = self._view
        self._go(view.row_of(row_key, view.row), view.column_of(column_key, view.column))

    def move(self, then: Then) -> None:
        """Move on as after an edit: a row down, or to the next cell that can be typed into."""
        if then == "down":
            self._step(1, 0)
        elif then != "stay":
            self._tab(1 if then == "right" else -1)

    def _step(self, rows: int, columns: int) -> None:
        self._go(self._view.row + rows, self._view.column + columns)

    def _turn_page(self, pages: int) -> None:
        if self._view.turn_page(pages):
            self._refresh_body()
        self._step(pages * self._view.page, 0)

    def _tab(self, direction: int) -> None:
        """Go to the next cell to type into, at the end of a row to the next row's first."""
        view = self._view
        row, column = view.row, view.next_typed(view.column, direction)
        if column == view.column and 0 <= row + direction < len(view.rows):
            row += direction
            column = view.next_typed(-1 if direction > 0 else len(view.columns), direction)
        self._go(row, column)

    def _go(self, row: int, column: int) -> None:
        view, before, old_row = self._view, self.cursor, self._view.row
        if before is None:
            return
        if self._edit is not None:
            self._show_edit(None)
        self._refresh_cursor()
        view.row = max(0, min(row, len(view.rows) - 1))
        view.column = max(0, min(column, len(view.columns) - 1))
        self._scroll_as_needed()
        self._refresh_cursor()
        if old_row != view.row:
            self._refresh_cells(old_row, 0, 1)  # the pointer
            self._refresh_cells(view.row, 0, 1)
        self._tell_if_moved(before)

    def _tell_if_moved(self, before: tuple[int, str] | None) -> None:
        now = self.cursor
        if now is not None and now != before:
            self._tell(self.CursorMoved(self, *now))

    # -- editing ---------------------------------------------------------------------------

    def begin_edit(self, text: str, *, replace: bool = False) -> None:
        """Open an edit of the cell under the cursor, or say that nothing can be typed there.

        Args:
            text: what to begin with.
            replace: whether the text was typed over the cell, so that it is a change already.
        """
        cursor = self.cursor
        if cursor is None:
            return
        if self._view.columns[self._view.column].computed:
            self._tell(self.ReadOnly(self, *cursor))
            return
        self._scroll_as_needed()
        self._begun_with = None if replace else text
        self._show_edit(CellEdit.of(text))
        self._tell(self.EditBegun(self, *cursor))
        if replace:
            self._tell(self.EditChanged(self, text))

    def end_edit(self, then: Then = "stay") -> None:
        """Close the edit, whatever became of its text, and move on."""
        if self._edit is not None:
            self._show_edit(None)
        self.move(then)

    def refuse(self, why: str) -> None:
        """Say beside the cell why the edit's text cannot be accepted; the edit stays open."""
        if self._edit is not None:
            self._show_edit(self._edit.refuse(why))

    def _ask_to_clear(self) -> None:
        cursor = self.cursor
        if cursor is not None:
            computed = self._view.columns[self._view.column].computed
            self._tell((self.ReadOnly if computed else self.ClearAsked)(self, *cursor))

    def _edit_what_is_there(self) -> None:
        if self.cursor is not None:
            self.begin_edit(self._edit_text(*self.cursor))

    def _show_edit(self, edit: CellEdit | None) -> None:
        view, old = self._view, self._field
        self._edit = edit
        self._field = edit_over(view.layout, view.place, edit) if edit and view.place else None
        new = self._field
        if old is not None and new is not None:
            self._refresh_cells(view.row, *old.difference(new))
            return
        self._refresh_cursor()
        for field in filter(None, (old, new)):
            self._refresh_cells(view.row, field.x, field.end)

    def _change_edit(self, edit: CellEdit) -> None:
        before = self._edit
        if edit == before:
            return
        self._show_edit(edit)
        if before is None or edit.text != before.text:
            self._tell(self.EditChanged(self, edit.text))

    # -- keys and mouse --------------------------------------------------------------------

    def on_key(self, event: events.Key) -> None:
        """Move, edit, or leave the key to whoever holds the grid."""
        done = self._edit_key(event) if self._edit is not None else self._table_key(event)
        if done:
            event.stop()
            event.prevent_default()

    def _table_key(self, event: events.Key) -> bool:
        action = self._keys.get(event.key)
        if action is not None:
            action()
        elif event.is_printable and event.character is not None:
            self.begin_edit(event.character, replace=True)
        else:
            return False
        return True

    def _edit_key(self, event: events.Key) -> bool:
        edit, cursor = self._edit, self.cursor
        if edit is None or cursor is None:
            return False
        if event.key in _TAKES:
            then, touched = _TAKES[event.key], self._begun_with != edit.text
            self._tell(self.EditTaken(self, *cursor, edit.text, then, touched=touched))
        elif event.key == "escape":
            self.end_edit()
            self._tell(self.EditLeft(self, *cursor))
        elif event.key in EDIT_KEYS:
            self._change_edit(EDIT_KEYS[event.key](edit))
        elif event.is_printable and event.character is not None:
            self._change_edit(edit.insert(event.character))
        else:
            return event.key in self._keys  # what moves the cursor waits for the edit's end
        return True

    def on_paste(self, event: events.Paste) -> None:
        """Put the first line of a pasted text into the edit; without one, leave it to others."""
        if self._edit is not None:
            event.stop()
            line = next(iter(event.text.splitlines()), "")
            self._change_edit(self._edit.insert("".join(filter(str.isprintable, line))))

    def on_click(self, event: events.Click) -> None:
        """Put the cursor on the cell that was clicked."""
        place = self._view.layout.at(event.x)
        row = self._view.top + event.y - HEADING_LINES
        if self._edit is None and place is not None and event.y >= HEADING_LINES:
            self._go(row, self._view.columns.index(place.column))

    def on_mouse_scroll_down(self, event: events.MouseScrollDown) -> None:
        """Move the cursor down."""
        event.stop()
        if self._edit is None:
            self._step(_WHEEL_ROWS, 0)

    def on_mouse_scroll_up(self, event: events.MouseScrollUp) -> None:
        """Move the cursor up."""
        event.stop()
        if self._edit is None:
            self._step(-_WHEEL_ROWS, 0)

    # -- painting --------------------------------------------------------------------------

    def on_resize(self) -> None:
        """Arrange everything for the new size."""
        self._view.resize(*self.size)
        self._rearrange()

    def render_line(self, y: int) -> Strip:
        """Return one line of the widget."""
        return self._view.line(y, self._field)

    def _rearrange(self) -> None:
        self._view.bring_into_sight()
        if self._edit is not None:
            self._show_edit(self._edit)
        self.refresh()

    def _scroll_as_needed(self) -> None:
        rows_moved, columns_moved = self._view.bring_into_sight()
        if columns_moved:
            self.refresh()
        elif rows_moved:
            self._refresh_body()

    def _refresh_body(self) -> None:
        self.refresh(Region(0, HEADING_LINES, self.size.width, self._view.page))

    def _refresh_cursor(self) -> None:
        place = self._view.place
        if place is not None:
            self._refresh_cells(self._view.row, place.x, place.end)

    def _refresh_cells(self, row: int, start: int, end: int) -> None:
        y = self._view.line_of(row)
        if y is not None and end > start:
            self.refresh(Region(start, y, end - start, 1))
