"""What the checklist is held against, read from tests/profiles/data."""

import tomllib
from pathlib import Path

EXPECTED = tomllib.loads((Path(__file__).parent / "data" / "expected.toml").read_text(encoding="utf-8"))
