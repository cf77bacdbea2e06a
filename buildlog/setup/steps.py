"""The commands `start`, `test`, `gate` and `lock`, step by step."""

import argparse
import os
import socket
import subprocess
import sys
import tempfile
from pathlib import Path

from buildlog.setup import system
from buildlog.setup.environment import MARK, NotSet, python


def start(root: Path, arguments: list[str]) -> int:
    """Set up, migrate, and serve with a worker beside it; `--prepare` stops before serving."""
    asked = _start_arguments(arguments)
    folder = Path(os.environ.get("BUILDLOG_DATA", root / ".var"))
    folder.mkdir(mode=0o700, parents=True, exist_ok=True)
    os.environ.setdefault("DJANGO_SETTINGS_MODULE", "buildlog.settings")
    if (wanted := system.missing_libraries()) and not system.install(wanted):
        print("Starting without printing binders.", flush=True)
        os.environ["BUILDLOG_PRINTING"] = "0"
    _must(root, "migrate", "--verbosity=0", words="Bringing the database up to date")
    _must(root, "check_start", words="Checking the database and its folder")
    _must(root, "setup_code", words="Looking for the first account")
    if asked.prepare:
        print("Everything is prepared.", flush=True)
        return 0
    return _serve(root, asked.port)


def _start_arguments(arguments: list[str]) -> argparse.Namespace:
    parser = argparse.ArgumentParser(prog="manage.py start", description="Set up and serve Buildlog.")
    parser.add_argument("--port", type=int, default=8000)
    parser.add_argument("--prepare", action="store_true", help="all but serving")
    return parser.parse_args(arguments)


def _django(root: Path, *arguments: str) -> list[str]:
    return [str(python(root)), "-m", "django", *arguments]


def _must(root: Path, *arguments: str, words: str) -> None:
    print(words, flush=True)
    if subprocess.run(_django(root, *arguments), cwd=root, check=False).returncode:
        raise NotSet(f"That did not work: {words.lower()}. The reason stands above; nothing else was done.")


def _serve(root: Path, port: int) -> int:
    with socket.socket() as probe:
        probe.setsockopt(socket.SOL_SOCKET, socket.SO_REUSEADDR, 1)
        try:
            probe.bind(("127.0.0.1", port))
        except OSError:
            raise NotSet(f"Port {port} is taken. Start with another one: --port {port + 1}") from None
    worker = subprocess.Popen(
        _django(root, "db_worker"), cwd=root, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL
    )
    try:
        return subprocess.run(_django(root, "serve", str(port)), cwd=root, check=False).returncode
    finally:
        worker.terminate()
        worker.wait(timeout=20)


def check(root: Path, arguments: list[str], *, install: bool) -> int:
    """Format, lint, types, migrations, then pytest; its closing line is the last one. 0 when all of it holds."""
    wanted = [*system.missing_libraries(), *([] if system.browser() else ["chromium"])]
    if install and wanted:
        system.install(wanted)
    bin_ = python(root).parent
    with tempfile.TemporaryDirectory() as data:
        environment = {**os.environ, "BUILDLOG_DATA": data, "DJANGO_SETTINGS_MODULE": "buildlog.settings"}
        steps: dict[str, list[str | Path]] = {
            "Format": [bin_ / "ruff", "format", "--check", "--quiet", "."],
            "Lint": [bin_ / "ruff", "check", "--quiet", "."],
            "Types": [bin_ / "mypy"],
            "Migrations": [*_django(root, "makemigrations", "--check", "--dry-run")],
            "Tests": [python(root), "-m", "pytest", "-q", *arguments],
        }
        failed = []
        for words, command in steps.items():
            print(f"{words} …", flush=True)
            if subprocess.run([str(one) for one in command], cwd=root, env=environment, check=False).returncode:
                failed.append(words)
    if before := [words for words in failed if words != "Tests"]:
        print(f"Not clean: {', '.join(before)}", file=sys.stderr)
    return 1 if failed else 0


def lock(root: Path) -> int:
    """Make requirements.lock anew from pyproject.toml; no download address is kept in it."""
    with tempfile.TemporaryDirectory() as folder:
        subprocess.run([sys.executable, "-m", "venv", folder], check=True)
        bin_ = Path(folder, "bin")
        subprocess.run([bin_ / "pip", "install", "--quiet", "uv"], check=True)
        common: list[str | Path] = [
            bin_ / "uv",
            "export",
            "-q",
            "--no-emit-project",
            "--no-dev",
            "--no-annotate",
            "--no-header",
        ]
        run = subprocess.run(common, cwd=root, check=True, capture_output=True, text=True).stdout
        every = subprocess.run(
            [*common, "--group", "test"], cwd=root, check=True, capture_output=True, text=True
        ).stdout
    (root / "uv.lock").unlink(missing_ok=True)
    known = {one.split(" ")[0] for one in _items(run)}
    tests = [one for one in _items(every) if one.split(" ")[0] not in known]
    head = "# Exact packages with their digests, for pip --require-hashes; remade by `manage.py lock`."
    (root / "requirements.lock").write_text("\n".join([head, *_items(run), MARK, *tests, ""]), encoding="utf-8")
    return 0


def _items(text: str) -> list[str]:
    items: list[str] = []
    for line in text.splitlines():
        if line.startswith(" ") and items:
            items[-1] += f"\n{line}"
        elif line.strip():
            items.append(line)
    return items
