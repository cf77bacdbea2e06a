"""Engineering formulas, one file each, and what is made from their declarations. No Django, no rows, no clock."""
