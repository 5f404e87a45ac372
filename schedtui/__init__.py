"""schedtui: checks air-handling-unit schedules in the terminal and headless."""

__version__ = "0.1.0"
