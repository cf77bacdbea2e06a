"""A one-time code for the first account of an empty record."""

from typing import Any

from django.core.management.base import BaseCommand

from buildlog.aircraft.actions import make_setup_code
from buildlog.errors import Refused


class Command(BaseCommand):
    """Print the code, once, good for an hour."""

    help = "Print a one-time code for the first account."

    def handle(self, *args: Any, **options: Any) -> None:
        """Make the code, or say that an account exists."""
        try:
            self.stdout.write(f"Set up the first account with this code, within the hour: {make_setup_code()}")
        except Refused as refusal:
            self.stdout.write(refusal.text)
