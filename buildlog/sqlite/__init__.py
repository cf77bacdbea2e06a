"""SQLite as this record needs it."""
