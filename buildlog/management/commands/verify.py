"""Whether the record agrees with its ledger, and each file with its digest."""

import json
import sys
from argparse import ArgumentParser
from typing import Any

from django.core.management.base import BaseCommand
from django.db import DatabaseError

from buildlog.files.queries import file_faults
from buildlog.ledger.verify import Finding, check


class Command(BaseCommand):
    """Exit 0 when everything agrees, 1 with findings, 2 when it could not run."""

    help = "Check chains, bodies, rows, guards, anchors and, with --files, every original."

    def add_arguments(self, parser: ArgumentParser) -> None:
        """Take --files, --anchor (repeatable) and --json."""
        parser.add_argument("--files", action="store_true", help="read every original and compare its digest")
        parser.add_argument("--anchor", action="append", default=[], help="an anchor as printed on a binder")
        parser.add_argument("--json", action="store_true", help="print a report as JSON")

    def handle(self, *args: Any, **options: Any) -> None:
        """Run the checks and print what was found."""
        try:
            fold, findings = check(options["anchor"])
            findings += [Finding("", None, text, remedy) for text, remedy in file_faults(read=options["files"])]
        except DatabaseError as error:
            self.stderr.write(f"Verify could not run: {error}")
            sys.exit(2)
        heads = {chain: {"seq": seq, "hash": digest} for chain, (seq, digest) in fold.heads.items()}
        if options["json"]:
            report = {"events": fold.events, "heads": heads, "findings": [finding.as_json() for finding in findings]}
            self.stdout.write(json.dumps(report, indent=2))
        else:
            self._say(fold.events, len(heads), findings)
        if findings:
            sys.exit(1)

    def _say(self, events: int, chains: int, findings: list[Finding]) -> None:
        for finding in findings:
            where = f"chain {finding.chain}, event {finding.seq}: " if finding.seq is not None else ""
            self.stdout.write(f"{where}{finding.text} {finding.remedy}")
        self.stdout.write(f"{events} events in {chains} chains read, {len(findings)} findings.")
        self.stdout.write(
            "Agreement proves that nothing was altered by hand since it was written, up to the last anchor kept "
            "elsewhere; it does not prove that a statement was true or a clock right."
        )
