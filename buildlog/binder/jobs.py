"""Printing in a process of its own, from a copy of the record; told to the issue as it goes."""

import json
import logging
import os
import sqlite3
import subprocess
import sys
import tempfile
from collections.abc import Callable
from contextlib import closing
from dataclasses import dataclass
from pathlib import Path

from django.conf import settings
from django.db import connection

from buildlog.binder.models import BinderIssue

log = logging.getLogger("buildlog.binder")


class NotPrinted(Exception):
    """The printing process ended without a binder; the text is a sentence for the person who asked."""


@dataclass(frozen=True)
class Printed:
    """What the printing process made: pages, the ledger head it printed, and whether gaps make it a working copy."""

    pages: int
    head_seq: int
    head_hash: str
    working_copy: bool


def copy_record(to: Path) -> None:
    """Copy the database with SQLite's backup, on this process's own connection: it is never opened twice."""
    if connection.in_atomic_block:
        raise RuntimeError("a copy waits for ever on a transaction of its own process")
    connection.ensure_connection()
    with closing(sqlite3.connect(to)) as copy:
        connection.connection.backup(copy)


def print_to(issue: BinderIssue, out: Path, tell: Callable[[str], None]) -> Printed:
    """Print one issue to `out`; `tell` is called with the progress in words. Raises NotPrinted."""
    printing = settings.DATA_DIR / "printing"
    printing.mkdir(mode=0o700, parents=True, exist_ok=True)
    with tempfile.TemporaryDirectory(dir=printing) as folder:
        copy = Path(folder, "record.sqlite3")
        copy_record(copy)
        made = Path(folder, "binder.pdf")
        printed = _run(issue, copy, made, tell)
        made.replace(out)
    return printed


def _run(issue: BinderIssue, copy: Path, out: Path, tell: Callable[[str], None]) -> Printed:
    environment = {**os.environ, "BUILDLOG_DATABASE": str(copy), "BUILDLOG_DATA": str(settings.DATA_DIR)}
    environment["DJANGO_SETTINGS_MODULE"] = "buildlog.settings"
    command = [sys.executable, "-m", "django", "print_issue", str(issue.id), str(out)]
    with tempfile.TemporaryFile("w+") as errors:
        with subprocess.Popen(
            command, cwd=settings.ROOT, env=environment, stdout=subprocess.PIPE, stderr=errors, text=True
        ) as process:
            assert process.stdout is not None
            last = ""
            for last in process.stdout:
                if not last.startswith("{"):
                    tell(last.strip())
        if process.returncode != 0 or not last.startswith("{"):
            errors.seek(0)
            log.error("printing issue %s ended with %s: %s", issue.number, process.returncode, errors.read()[-4000:])
            raise NotPrinted("The print stopped half-way; the record is untouched. Print again, or ask the host.")
    return Printed(**json.loads(last))
