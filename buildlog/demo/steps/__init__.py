"""The acts of the demo's story, room by room; each module turns rows of the fixtures into steps."""
