"""A one-time code for the first account of an empty record."""

from typing import Any

from django.core.management.base import BaseCommand

from buildlog.aircraft.actions import make_setup_code
from buildlog.aircraft.models import User


class Command(BaseCommand):
    """Print a code while nobody has an account; say nothing afterwards."""

    help = "Print a one-time code for the first account."

    def handle(self, *args: Any, **options: Any) -> None:
        """Make the code when it is wanted."""
        if User.objects.exists():
            return
        code = make_setup_code()
        self.stdout.write(f"Nobody has an account yet. Open /first-run and use this code within the hour: {code}")
