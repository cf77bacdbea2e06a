"""Migrate with the guards down, and put them up again: rebuilding a table would drop them without a word."""

from typing import Any

from django.core.management.commands import migrate

from buildlog.ledger import guards


class Command(migrate.Command):
    """Django's migrate between taking the guards down and putting them up."""

    def handle(self, *args: Any, **options: Any) -> None:
        """Migrate; when it fails, the guards of the tables that exist stand again all the same."""
        guards.drop()
        try:
            super().handle(*args, **options)
        finally:
            guards.make()
