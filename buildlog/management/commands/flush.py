"""Emptying a database is for the tests alone: nothing of a record is removed."""

from typing import Any

from django.core.management.base import CommandError
from django.core.management.commands import flush
from django.db import connection

from buildlog.ledger import guards


class Command(flush.Command):
    """Django's flush, for a test database only, between taking the guards down and putting them up."""

    def handle(self, **options: Any) -> None:
        """Empty a test database; refuse any other."""
        name = str(connection.settings_dict["NAME"])
        if "memory" not in name and "test_" not in name:
            raise CommandError("Nothing of the record is removed. This command serves the tests only.")
        guards.drop()
        try:
            super().handle(**options)
        finally:
            guards.make()
