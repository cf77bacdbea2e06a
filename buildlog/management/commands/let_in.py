"""Let a person in again who lost password or phone: for whoever has the console of the server, and nobody else."""

from typing import Any

from django.core.management.base import BaseCommand, CommandError, CommandParser

from buildlog.aircraft import actions
from buildlog.aircraft.codes import new_code
from buildlog.aircraft.queries import user_named
from buildlog.errors import Refused


class Command(BaseCommand):
    """`manage.py let_in SIGN_IN`: a new password is printed once; the second step is taken away."""

    help = "Give a person a new password, printed once, and take away the second step of the sign-in."

    def add_arguments(self, parser: CommandParser) -> None:
        """Ask for the sign-in."""
        parser.add_argument("sign_in")

    def handle(self, *args: Any, **options: Any) -> None:
        """Set the password and say what was done."""
        user = user_named(options["sign_in"])
        if user is None:
            raise CommandError(f"Nobody signs in as {options['sign_in']}.")
        password = new_code()
        try:
            actions.let_in(user=user, new_password=password)
        except Refused as refusal:
            raise CommandError(refusal.text) from refusal
        self.stdout.write(
            f"{user.name} signs in as {user.sign_in} with this password, and changes it then:\n{password}"
        )
