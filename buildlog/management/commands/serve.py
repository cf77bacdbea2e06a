"""Serve with waitress, and say where."""

import socket
from argparse import ArgumentParser
from typing import Any

import waitress
from django.conf import settings
from django.core.management.base import BaseCommand

from buildlog.wsgi import application


class Command(BaseCommand):
    """Serve the pages until stopped."""

    help = "Serve the pages; `manage.py start` calls it."

    def add_arguments(self, parser: ArgumentParser) -> None:
        """Take the port."""
        parser.add_argument("port", type=int)

    def handle(self, *args: Any, **options: Any) -> None:
        """Print the address and serve."""
        port = options["port"]
        self.stdout.write(f"Buildlog answers at http://localhost:{port}/")
        self.stdout.write(
            f"For a phone in the same network, name this machine first: BUILDLOG_HOSTS=localhost,{_name()}"
        )
        self.stdout.flush()
        address = "0.0.0.0" if set(settings.ALLOWED_HOSTS) - {"localhost", "127.0.0.1", "[::1]"} else "127.0.0.1"
        waitress.serve(application, host=address, port=port, threads=8, max_request_body_size=400 * 2**20, ident=None)


def _name() -> str:
    return socket.gethostname()
