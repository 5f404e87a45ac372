"""Sheets: a schedule as it comes, out of a spreadsheet or a paste, and every cell of it told of.

`grid` is what a sheet is once it is read; `opening` reads a file into grids. `tables` finds the
schedules in a grid, `match` says which key each column is, `place` makes units of the rows, and
`writing` and `merging` put them into a schedule file. May use the schedule's catalogue; must not
know of review, commands or screen.
"""
