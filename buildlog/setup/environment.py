"""The environment made from the lock file: a folder `.venv`, filled once, checked by a stamp afterwards."""

import hashlib
import subprocess
import sys
import tempfile
import venv
from pathlib import Path

MARK = "# ---- tests ----"


class NotSet(Exception):
    """The machine cannot do what was asked; the text is one sentence for the person at it."""


def python(root: Path) -> Path:
    """Return the interpreter of the environment."""
    return root / ".venv" / "bin" / "python"


def inside(root: Path) -> bool:
    """Return whether this process runs in the environment already."""
    return Path(sys.prefix).resolve() == (root / ".venv").resolve()


def parts(lock: str) -> tuple[str, str]:
    """Return the run-time part and the test part of a lock file."""
    run, mark, tests = lock.partition(MARK)
    if not mark:
        raise NotSet("requirements.lock has no part for tests; make it anew with `manage.py lock`.")
    return run, tests


def stamp_of(text: str) -> str:
    """Return what fixes an environment: the packages and the Python they were installed for."""
    return hashlib.sha256(f"{sys.version_info[:2]}\n{text}".encode()).hexdigest()


def ensure(root: Path, *, tests: bool) -> None:
    """Make the environment when it is missing or its lock changed; say what is done; do nothing otherwise."""
    run, more = parts((root / "requirements.lock").read_text(encoding="utf-8"))
    _part(root, "run", run, "Installing the packages Buildlog runs on")
    if tests:
        _part(root, "tests", more, "Installing what the tests need")


def _part(root: Path, name: str, text: str, words: str) -> None:
    stamp = root / ".venv" / f".{name}-stamp"
    if stamp.is_file() and stamp.read_text() == stamp_of(text) and python(root).is_file():
        return
    if not python(root).is_file():
        print("Making the environment in .venv", flush=True)
        try:
            venv.create(root / ".venv", with_pip=True)
        except (OSError, subprocess.CalledProcessError) as fault:
            raise NotSet(
                f"The environment could not be made ({fault}). On Debian: apt-get install python3-venv"
            ) from None
    print(f"{words}: {text.count('==')} packages", flush=True)
    with tempfile.NamedTemporaryFile("w", suffix=".txt") as listed:
        listed.write(text)
        listed.flush()
        command = [
            str(python(root)),
            "-m",
            "pip",
            "install",
            "--quiet",
            "--disable-pip-version-check",
            "--require-hashes",
        ]
        if subprocess.run([*command, "--no-deps", "-r", listed.name], check=False).returncode:
            raise NotSet("The packages could not be installed. Is the network there? What pip said stands above.")
    stamp.write_text(stamp_of(text))
