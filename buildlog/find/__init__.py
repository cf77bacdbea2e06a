"""Finding things in the record of one aircraft, and reading its history."""
