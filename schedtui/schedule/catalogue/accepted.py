"""The keys of `[[unit.accepted]]` and `[[accepted]]`: a finding that a reviewer has accepted."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table

_accepted = In(Group.REMARKS)


class Accepted(Table):
    """An acceptance: which finding, by whom, when and why."""

    __slots__ = ()
    of = _accepted.text("Of", "OF", 'What a finding of no unit is about: "plant chilled water".')
    check = _accepted.text("Check", "CHECK", "Name of the check.", required=True)
    condition = _accepted.text("Condition", "CONDITION", "Condition of the finding.")
    by = _accepted.text("By", "BY", "Initials of who accepted it.")
    on = _accepted.day("On", "ON", "Day it was accepted.")
    reason = _accepted.text("Reason", "REASON", "Why it is accepted.", required=True)
    fields = _accepted.texts("Fields", "FIELDS", "Fields of the finding.")
    basis = _accepted.text("Basis", "BASIS", "Digest of what the finding was found in.", blank=True)
