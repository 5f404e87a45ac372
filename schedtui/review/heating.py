"""A unit's air at one heating condition. Judges nothing."""

from __future__ import annotations

from schedtui.review.airpath import AirPath


class Heating(AirPath):
    """One unit at one heating condition."""
