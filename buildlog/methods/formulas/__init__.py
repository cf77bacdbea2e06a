"""The formulas, one file for each method or for a pair that is one formula read both ways."""
