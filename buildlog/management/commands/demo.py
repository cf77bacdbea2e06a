"""Load the demo aircraft."""

from time import monotonic
from typing import Any

from django.core.management.base import BaseCommand

from buildlog.demo.load import load_demo


class Command(BaseCommand):
    """Load the invented demo aircraft with two years of work; a second time it changes nothing."""

    help = "Load the demo aircraft, once."

    def handle(self, *args: Any, **options: Any) -> None:
        """Load it, and say who can sign in."""
        self.stdout.write("Loading the demo aircraft: two years of an invented build, photos drawn as it goes.")
        begun = monotonic()
        made = load_demo(say=self.stdout.write)
        if made is None:
            self.stdout.write("The demo aircraft is here already; nothing was changed.")
            return
        self.stdout.write(f"{made.aircraft}: {made.acts} acts in {monotonic() - begun:.0f} s. Sign in as one of")
        for person in made.people:
            self.stdout.write(f"  {person.sign_in:<8} {person.name}")
        self.stdout.write(f"with the password {made.password}, which everyone knows: keep this site to yourself.")
