"""The printing process: reads a copy of the record, writes one PDF, tells its progress line by line.

Started by the binder's job with BUILDLOG_DATABASE naming the copy, so that the web and the worker never load the
layout engine and a long print never holds the live database.
"""

import json
import resource
from argparse import ArgumentParser
from pathlib import Path
from typing import Any

from django.core.management.base import BaseCommand

from buildlog.binder.assemble import assemble
from buildlog.binder.book import Book
from buildlog.binder.models import BinderIssue

MEMORY_LIMIT = 4 * 2**30  # bytes of address space; the demo needs a tenth of it


class Command(BaseCommand):
    """Print one issue from a copy of the record; the last line said is what was made, as JSON."""

    help = "Part of printing a binder; not meant to be typed."
    requires_system_checks: list[str] = []

    def add_arguments(self, parser: ArgumentParser) -> None:
        """Take the issue and the file to write."""
        parser.add_argument("issue")
        parser.add_argument("out", type=Path)

    def handle(self, *args: Any, **options: Any) -> None:
        """Assemble the binder."""
        resource.setrlimit(resource.RLIMIT_AS, (MEMORY_LIMIT, MEMORY_LIMIT))
        book = Book(BinderIssue.objects.select_related("aircraft", "asked_by").get(id=options["issue"]))
        out: Path = options["out"]
        pages = assemble(book, out, out.with_suffix(".parts"), self._tell)
        made = {"pages": pages, "head_seq": book.head.seq, "head_hash": book.head.hash}
        self._tell(json.dumps(made | {"working_copy": book.is_working_copy}))

    def _tell(self, text: str) -> None:
        self.stdout.write(text)
        self.stdout.flush()
