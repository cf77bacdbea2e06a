"""Issues of the binder as a person reads them."""

import datetime as dt
from dataclasses import dataclass

from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.binder.models import BinderIssue

QUIET = dt.timedelta(minutes=3)  # a print that says nothing for so long has stopped


@dataclass(frozen=True)
class IssueView:
    """One issue and how far it is: printed, printing (with its progress in words), or not printed (with the reason)."""

    issue: BinderIssue
    state: str
    words: str

    @property
    def is_printing(self) -> bool:
        """Return whether it is worth looking again."""
        return self.state == "printing"


def view(issue: BinderIssue, *, now: dt.datetime | None = None) -> IssueView:
    """Return an issue with its state, worked out from its row: a killed print is told by its silence."""
    now = now or timezone.now()
    if issue.document_id:
        return IssueView(issue, "printed", f"{issue.pages} pages")
    if issue.failure:
        return IssueView(issue, "not-printed", issue.failure)
    if issue.heartbeat_at is None or now - issue.heartbeat_at > QUIET:
        return IssueView(issue, "not-printed", "The print stopped half-way. Print again; the record is untouched.")
    return IssueView(issue, "printing", issue.progress)


def issues(aircraft: Aircraft) -> list[IssueView]:
    """Return all issues of an aircraft, newest first, in one query."""
    rows = aircraft.binders.select_related("asked_by", "document__blob").order_by("-number")
    return [view(row) for row in rows]
