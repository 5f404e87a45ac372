"""The commands, one module each, found by looking."""
