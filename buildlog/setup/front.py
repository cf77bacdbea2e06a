"""What runs before Django is there: the standard library only."""

import os
import sys
from pathlib import Path

from buildlog.setup.environment import NotSet, ensure, inside, python
from buildlog.setup.steps import check, lock, start

ROOT = Path(__file__).resolve().parents[2]


def main(arguments: list[str]) -> int:
    """Run one command; a setting that is wrong ends with one sentence."""
    try:
        return _run(_with_data(arguments))
    except NotSet as fault:
        print(fault, file=sys.stderr)
        return 2
    except KeyboardInterrupt:
        return 130


def _with_data(arguments: list[str]) -> list[str]:
    """Take `--data DIR` or `--data=DIR` out of the arguments, wherever it stands, and set it for everything after."""
    rest, waiting = [], iter(arguments)
    for one in waiting:
        if one == "--data":
            folder = next(waiting, "")
        elif one.startswith("--data="):
            folder = one.partition("=")[2]
        else:
            rest.append(one)
            continue
        if not folder:
            raise NotSet("--data needs a folder.")
        os.environ["BUILDLOG_DATA"] = str(Path(folder).resolve())
    return rest


def _run(arguments: list[str]) -> int:
    if tuple(sys.version_info) < (3, 11):
        raise NotSet(f"Buildlog needs Python 3.11 or newer; this is {sys.version.split()[0]}.")
    command, rest = (arguments[0], arguments[1:]) if arguments else ("help", [])
    if command == "lock":
        return lock(ROOT)
    ensure(ROOT, tests=command in {"test", "gate"})
    if not inside(ROOT):
        os.execv(python(ROOT), [str(python(ROOT)), str(ROOT / "manage.py"), *arguments])
    if command == "start":
        return start(ROOT, rest)
    if command in {"test", "gate"}:
        return check(ROOT, rest, install=command == "test")
    return _django(arguments)


def _django(arguments: list[str]) -> int:
    os.environ.setdefault("DJANGO_SETTINGS_MODULE", "buildlog.settings")
    from django.core.management import execute_from_command_line

    execute_from_command_line(["manage.py", *arguments])
    return 0
