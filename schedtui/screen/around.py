"""What stands around the table and what it says now: the title, the pane, the hint.

Reads the session and the place of the cursor; changes neither.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.report.findings import short_site
from schedtui.report.page import Page
from schedtui.report.unit import read_together, unit_air_page, unit_findings_page
from schedtui.report.working import unit_working_page
from schedtui.review.accept import LAPSED, key_of
from schedtui.review.finding import Severity
from schedtui.screen import actions, hints, seek
from schedtui.screen.bars import HINT_STYLE, TITLE_STYLE, Bar, hint_line, title_line
from schedtui.screen.detail_pane import DetailPane
from schedtui.screen.help_page import help_page
from schedtui.screen.tally import Tally
from schedtui.screen.unit_table import MARK, UnitTable

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    from schedtui.review.finding import Finding
    from schedtui.review.reviewed import UnitReview
    from schedtui.screen.grid import Grid
    from schedtui.session.session import Session

_PAGES: tuple[tuple[str, Callable[[UnitReview], Page]], ...] = (
    ("Findings", unit_findings_page),
    ("Air", unit_air_page),
    ("Working", unit_working_page),
)
_FINDINGS = 0  # place of the page whose entries can be meant
_HELP = "Help"


class Around:
    """The title, the pane and the hint of an open schedule.

    Args:
        session: the schedule.
        table: its units as a table.
        grid: the table on the screen.
    """

    def __init__(self, session: Session, table: UnitTable, grid: Grid) -> None:
        self._session = session
        self._table = table
        self._grid = grid
        self._page = 0
        self.tally = Tally(session.review)
        self.title = Bar(TITLE_STYLE, id="title")
        self.pane = DetailPane([name for name, _ in _PAGES], id="pane")
        self.bar = Bar(HINT_STYLE, id="hint")
        self.helping = False
        self.marks: Callable[[], str] = lambda: ""  # what the title says besides the file's name
        self._place = 0  # the entry that is meant
        self._meant: tuple[Finding, ...] = ()  # its findings as they were
        self.pane.chose = self._choose
        self.answer = ""  # what an edit has done, to be said once the cursor has come to rest

    @property
    def reviewed(self) -> UnitReview | None:
        """The unit under the cursor."""
        cursor = self._grid.cursor
        return self._session.review.units.get(cursor[0]) if cursor else None

    def show_title(self) -> None:
        """Show the file, the project, the site, and the counts."""
        session = self._session
        file = session.path.name + self.marks()
        project = session.schedule.project.title or "No title"
        site = short_site(session.review).replace("  ", " ")
        counts: tuple[str, ...] = self.tally.texts
        if session.waiting:
            units = len(session.review.units)
            counts = (f"checked {units - session.waiting} of {units}",)
        self.title.show(lambda width: title_line(width, file, project, site, counts))

    def show_pane(self) -> None:
        """Show the page about the unit under the cursor, or the help."""
        reviewed = self.reviewed
        if self.helping:
            self.pane.show(_HELP, help_page(*self._here()), about=_HELP)
            return
        name, page = _PAGES[self._page]
        if reviewed is None:
            self.pane.show(name, Page(()))
        elif self._page == _FINDINGS:
            shown = unit_findings_page(reviewed, self._session.schedule)
            entries = self._entries
            place = self._place_among(entries) if entries else None
            if place is not None:
                self._mean(place)
            self.pane.show(name, shown, about=reviewed.unit.row_id, meant=place)
        else:
            self.pane.show(name, page(reviewed), about=reviewed.unit.row_id)

    # -- the finding that is meant -----------------------------------------------------------

    @property
    def meant(self) -> tuple[Finding, ...]:
        """The findings of the entry that is meant; none where the pane shows something else."""
        entries = self._entries
        return entries[self._place_among(entries)] if entries else ()

    @property
    def _entries(self) -> tuple[tuple[Finding, ...], ...]:
        reviewed = self.reviewed
        if reviewed is None or self.helping or self._page != _FINDINGS:
            return ()
        return read_together(reviewed.findings)

    def _place_among(self, entries: Sequence[tuple[Finding, ...]]) -> int:
        """Return the place of what was meant among a unit's entries as they are now."""
        here = {one.subject.row_id for one in entries[0]}
        if here != {one.subject.row_id for one in self._meant}:
            return 0
        keys = {key_of(one) for one in self._meant}
        same = [place for place, ones in enumerate(entries) if keys & set(map(key_of, ones))]
        if self._place in same or not same:
            return min(self._place, len(entries) - 1)
        return same[0]

    def _mean(self, place: int) -> None:
        self._place, self._meant = place, self._entries[place]

    def _choose(self, place: int) -> None:
        """Mean another entry, as the pane has been told to."""
        self._mean(place)
        self.show_hint()

    def follow(self) -> None:
        """Mean what blames the cell under the cursor, if anything does, and show the page."""
        cursor, entries = self._grid.cursor, self._entries
        if cursor is not None and entries:
            columns = frozenset(column.key for column in self._table.columns)
            blaming = [
                place
                for place, ones in enumerate(entries)
                if seek.blames(ones[0], cursor[1], columns)
            ]
            here = self._place_among(entries)
            self._mean(here if here in blaming or not blaming else blaming[0])
        self.show_pane()

    def _here(self) -> tuple[str, tuple[str, ...]]:
        """Return what the help says first: about the cell under the cursor."""
        cursor, reviewed = self._grid.cursor, self.reviewed
        if cursor is None or reviewed is None:
            return "", ()
        key = cursor[1]
        if key == MARK or self._table.computed(key) is not None:
            return f"Here: {reviewed.label}", (self.about(),)
        field = self._session.field("unit", key)
        accepted = hints.accepted(field, self._session.document.system)
        return f"Here: {reviewed.label}, {key}", (self.about(), f"Accepted: {accepted}")

    def hint(self, about: str, *, whole: bool = True) -> None:
        """Say something in the hint line, with the keys of the place one is in.

        Args:
            about: what is said.
            whole: whether it has to be read to its end, so that the keys take what is left.
        """
        keys = self._keys_here()
        self.bar.show(lambda width: hint_line(width, about, keys, whole=whole))

    def show_hint(self) -> None:
        """Say what an edit has done, if it has, or what is under the cursor."""
        answer, self.answer = self.answer, ""
        about = self.about()
        if self.pane.has_focus and self.meant:
            about = hints.about_findings(self.meant)
        self.hint(answer or about, whole=bool(answer))

    def _keys_here(self) -> Sequence[str]:
        cursor = self._grid.cursor
        if self.helping:
            return actions.HELP_HINT
        if self.pane.has_focus:
            large = self.pane.screen.has_class("-enlarged")
            if self.meant:
                keys = actions.LARGE_FINDINGS_HINT if large else actions.FINDINGS_HINT
                return (*_acts(self.meant[0]), *keys)
            return actions.LARGE_HINT if large else actions.PANE_HINT
        if self._grid.editing is not None:
            return actions.EDIT_HINT
        computed = cursor is not None and (
            cursor[1] == MARK or self._table.computed(cursor[1]) is not None
        )
        return actions.COMPUTED_HINT if computed else actions.TABLE_HINT

    def about(self) -> str:
        """Say what is under the cursor, or in the edit there."""
        cursor, reviewed = self._grid.cursor, self.reviewed
        if cursor is None or reviewed is None:
            return ""
        row_id, key = cursor
        computed, cell = self._table.computed(key), self._table.cell(row_id, key)
        if key == MARK:
            return hints.about_mark(reviewed)
        if computed is not None:
            return hints.about_computed(computed, cell)
        field = self._session.field("unit", key)
        edit = self._grid.editing
        if edit is not None:
            note = self._session.conversion("unit", key, edit.text)
            return note or hints.about_edit(field, self._session.document.system)
        return hints.about_scheduled(reviewed, field, cell)

    def show_findings(self) -> None:
        """Show the pane's first page, where the findings are."""
        if self.helping or self._page:
            self.helping, self._page = False, 0
            self.show_pane()

    def turn_page(self) -> None:
        """Show the pane's next page."""
        self._page = (self._page + 1) % len(_PAGES)
        self.show_pane()


def _acts(finding: Finding) -> tuple[str, ...]:
    """Return the keys that do something about a finding."""
    if finding.accepted or finding.check == LAPSED:
        return (actions.TAKES_BACK,)
    clears = finding.severity is Severity.SHORT
    return (actions.CLEARS, actions.ACCEPTS) if clears else (actions.ACCEPTS,)
