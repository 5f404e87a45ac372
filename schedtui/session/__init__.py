"""An open schedule: its document, its history, what its review says. No widget in it."""
