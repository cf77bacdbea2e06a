"""How dates are written and read; Django finds them by language, before the settings."""
