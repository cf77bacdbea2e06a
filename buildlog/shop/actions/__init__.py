"""What people do in the shop."""

from buildlog.shop.actions.clocks import start_clock, stop_clock
from buildlog.shop.actions.entries import amend_entry, close_entry, close_old_drafts, edit_draft, log_entry
from buildlog.shop.actions.tasks import add_task, change_task

__all__ = [
    "add_task",
    "amend_entry",
    "change_task",
    "close_entry",
    "close_old_drafts",
    "edit_draft",
    "log_entry",
    "start_clock",
    "stop_clock",
]
