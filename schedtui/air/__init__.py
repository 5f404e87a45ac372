"""Moist air and what happens to it; knows nothing of schedules, fields or files."""
