"""What a person typed, and how it changes.

The catalogue of keys, the document of cells, edits with their inverses, and the way from a file's
text to cells and back. Computes no air.
"""
