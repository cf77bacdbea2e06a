"""Secrets of one installation, made once and readable by its owner alone."""

import os
import secrets
from pathlib import Path


def read_secret(path: Path) -> str:
    """Return the secret kept in `path`, making it on the first call (mode 0600, on disk before it is used)."""
    if not path.exists():
        path.parent.mkdir(parents=True, exist_ok=True, mode=0o700)
        try:
            file = os.open(path, os.O_WRONLY | os.O_CREAT | os.O_EXCL, 0o600)
        except FileExistsError:
            return path.read_text().strip()
        with os.fdopen(file, "w") as out:
            out.write(secrets.token_urlsafe(64))
            out.flush()
            os.fsync(out.fileno())
    return path.read_text().strip()
