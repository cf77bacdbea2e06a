"""The desk: one aircraft at a glance, with what is still open and where it is cured."""
