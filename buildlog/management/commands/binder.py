"""Print a binder from the command line."""

import shutil
from argparse import ArgumentParser
from pathlib import Path
from typing import Any

from django.core.management.base import BaseCommand, CommandError

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.queries import people_of
from buildlog.binder.actions import begin_issue, make_binder
from buildlog.binder.jobs import NotPrinted
from buildlog.binder.models import BinderIssue
from buildlog.files.store import path_of
from buildlog.ledger.ids import uuid7
from buildlog.profiles import load


class Command(BaseCommand):
    """Issue a binder of one aircraft and write it to a file."""

    help = "Print the inspection binder of an aircraft."

    def add_arguments(self, parser: ArgumentParser) -> None:
        """Take the serial, the file to write and the paper."""
        parser.add_argument("serial", nargs="?", help="may be left out where there is one aircraft")
        parser.add_argument("--out", type=Path, required=True, help="the file to write")
        parser.add_argument("--paper", choices=BinderIssue.Paper.values)

    def handle(self, *args: Any, **options: Any) -> None:
        """Print, and say where it is and what it stands for."""
        aircraft = _aircraft(options["serial"])
        out: Path = options["out"].resolve()
        if not out.parent.is_dir():
            raise CommandError(f"There is no folder {out.parent} to write to.")
        paper = options["paper"] or load.jurisdictions()[aircraft.jurisdiction].paper
        issue = begin_issue(aircraft=aircraft, by=people_of(aircraft)[0].user, client_id=uuid7(), paper=paper)
        try:
            issue = make_binder(issue)
        except NotPrinted as stopped:
            raise CommandError(str(stopped)) from stopped
        assert issue.document is not None
        shutil.copyfile(path_of(issue.document.blob.sha256), out)
        self.stdout.write(f"Issue {issue.number}, {issue.pages} pages, as of ledger event {issue.head_seq}: {out}")
        self.stdout.write(f"Digest {issue.document.blob.sha256}")


def _aircraft(serial: str | None) -> Aircraft:
    rows = Aircraft.objects.filter(serial=serial) if serial else Aircraft.objects.all()
    found = list(rows[:2])
    if len(found) == 1:
        return found[0]
    known = ", ".join(Aircraft.objects.order_by("serial").values_list("serial", flat=True)) or "none"
    raise CommandError(f"Name one aircraft by its serial. Known: {known}.")
