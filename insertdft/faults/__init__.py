"""Single stuck-at faults: lists, classes, coverage of patterns, proofs that no test exists."""
