"""Put a file of published check cases through the methods."""

import sys
from argparse import ArgumentParser
from pathlib import Path
from typing import Any

from django.core.management.base import BaseCommand, CommandError

from buildlog.errors import Refused
from buildlog.methods.cases import faults, read_cases


class Command(BaseCommand):
    """Print each case that fails, then how many passed; exit 1 when one failed."""

    help = "Run a TOML file of check cases; a method that is not there counts as failed."
    requires_system_checks: list[str] = []

    def add_arguments(self, parser: ArgumentParser) -> None:
        """Take the file."""
        parser.add_argument("file", type=Path)

    def handle(self, *args: Any, **options: Any) -> None:
        """Run every case."""
        try:
            cases = read_cases(options["file"])
        except Refused as refusal:
            raise CommandError(refusal.text) from None
        failed = 0
        for case in cases:
            found = faults(case)
            failed += bool(found)
            for fault in found:
                self.stdout.write(f"{fault.case}: {fault.text}")
        self.stdout.write(f"{len(cases) - failed} passed, {failed} failed")
        if failed:
            sys.exit(1)
