"""Put old drafts on the record."""

from typing import Any

from django.core.management.base import BaseCommand

from buildlog.shop.actions import close_old_drafts


class Command(BaseCommand):
    """Close every draft that nobody saved for BUILDLOG_AUTO_CLOSE_DAYS; meant for a daily timer."""

    help = "Put drafts on the record that nobody saved for BUILDLOG_AUTO_CLOSE_DAYS."

    def handle(self, *args: Any, **options: Any) -> None:
        """Close, and say how many."""
        self.stdout.write(f"{close_old_drafts()} drafts put on the record")
