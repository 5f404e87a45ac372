"""The checks, one module each, named after the fault that it finds."""
