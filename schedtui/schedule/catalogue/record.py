"""The keys of `[record]`, which signing a check writes."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table

_record = In(Group.REMARKS)


class Record(Table):
    """Who signed the check, when, and what was signed.

    Its tables of counts and limits are kept as they stand.
    """

    __slots__ = ()
    by = _record.text("By", "BY", "Who signed.")
    on = _record.day("On", "ON", "Day it was signed.")
    version = _record.text("Version", "VERSION", "Version of the program.", blank=True)
    digest = _record.text("Digest", "DIGEST", "Digest of what was signed.", blank=True)
    open_findings = _record.flag(
        "Open findings", "OPEN", "Whether it was signed with findings open.", default=False
    )
