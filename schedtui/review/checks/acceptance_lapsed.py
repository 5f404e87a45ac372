"""An acceptance no longer holds: its finding was found in other numbers, or is gone.

What a reviewer accepted was a finding in certain inputs. When one of them changes, someone has to
look again. It is found where acceptances are held against findings, and has no finder of its own.
"""

from __future__ import annotations

from schedtui.review.check import Check
from schedtui.review.finding import Severity

CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Every acceptance is of a finding that stands, found in the same inputs.",
    source="by definition",
)
