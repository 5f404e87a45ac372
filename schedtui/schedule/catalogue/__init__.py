"""Every key of the schedule file: what it is called, measures, accepts and defaults to.

The loader, its messages, the table on screen, the commands and the README read it from here.
Knows how a value is typed and nothing of what is computed from it.
"""
