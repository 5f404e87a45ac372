"""Documents: what was found and computed, as pages that any format can render."""
