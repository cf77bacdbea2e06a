"""Pages about people, rights, the aircraft and its conversion."""
