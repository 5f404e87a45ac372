"""The terminal program: what is seen, which keys do what, and nothing that computes or keeps."""
