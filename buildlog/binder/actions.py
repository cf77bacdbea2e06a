"""Asking for a binder, and issuing it when it is printed."""

import datetime as dt
import tempfile
from pathlib import Path
from uuid import UUID

from django.conf import settings
from django.db import transaction
from django.db.models import Max
from django.utils import timezone
from django_tasks import task

from buildlog.aircraft.models import Aircraft, User
from buildlog.binder.jobs import NotPrinted, Printed, print_to
from buildlog.binder.models import BinderIssue
from buildlog.errors import Refused
from buildlog.files.actions import keep_document
from buildlog.files.models import Document
from buildlog.ledger import actions as ledger
from buildlog.ledger.queries import head, sent_before

NO_LIBRARIES = (
    "This machine lacks the libraries that printing needs. The record is complete without them; the host installs "
    "libpango-1.0-0, libpangoft2-1.0-0 and libharfbuzz-subset0 and starts again."
)


def ask_for_binder(
    *, aircraft: Aircraft, by: User, client_id: UUID, paper: str, leave_out: list[str], proof: str
) -> BinderIssue:
    """Begin an issue after the proof of who asks, and hand it to the worker; the same `client_id` again is one."""
    if not settings.PRINTING:
        raise Refused(NO_LIBRARIES)
    with transaction.atomic():
        issue = begin_issue(
            aircraft=aircraft, by=by, client_id=client_id, paper=paper, leave_out=leave_out, proof=proof
        )
        if issue.document_id is None:
            print_issue.enqueue(str(issue.id))
    return issue


@transaction.atomic
def begin_issue(
    *,
    aircraft: Aircraft,
    by: User,
    client_id: UUID,
    paper: str,
    leave_out: list[str] | None = None,
    proof: str = "command line",
    at: dt.datetime | None = None,
) -> BinderIssue:
    """Record that a binder was asked for, as of the present ledger head."""
    if first := sent_before(BinderIssue, client_id, aircraft):
        return first
    now = at or timezone.now()
    last = aircraft.binders.aggregate(last=Max("number"))["last"] or 0
    as_of = head(aircraft)
    issue = BinderIssue.objects.create(
        id=client_id,
        aircraft=aircraft,
        number=last + 1,
        paper=paper,
        leave_out=leave_out or [],
        head_seq=as_of.seq,
        head_hash=as_of.hash,
        as_of=timezone.localdate(now),
        asked_by=by,
        asked_at=now,
        progress="Waiting for the printer process",
        heartbeat_at=now,
    )
    text, facts = f"asked for binder issue {issue.number}", {"proof": proof}
    ledger.write(aircraft=aircraft, by=by, kind="binder.asked", about=issue, text=text, facts=facts, at=at)
    return issue


@task()
def print_issue(issue_id: str) -> None:
    """Print one issue and keep it; run by the worker."""
    make_binder(BinderIssue.objects.select_related("aircraft", "asked_by").get(id=issue_id))


def make_binder(issue: BinderIssue) -> BinderIssue:
    """Print an issue in its own process and issue it; a failure is told on the issue, nothing of the record changes."""
    with tempfile.TemporaryDirectory() as folder:
        out = Path(folder, "binder.pdf")
        try:
            printed = print_to(issue, out, lambda text: tell_progress(issue=issue, text=text))
        except NotPrinted as stopped:
            tell_failure(issue=issue, text=str(stopped))
            raise
        return issue_binder(issue=issue, printed=printed, file=out)


def tell_progress(*, issue: BinderIssue, text: str) -> None:
    """Say on the issue how far its print is; no part of the record."""
    BinderIssue.objects.filter(id=issue.id).update(progress=text[:120], heartbeat_at=timezone.now())


def tell_failure(*, issue: BinderIssue, text: str) -> None:
    """Say on the issue that it was not printed."""
    BinderIssue.objects.filter(id=issue.id).update(failure=text[:300], heartbeat_at=timezone.now())


def issue_binder(*, issue: BinderIssue, printed: Printed, file: Path) -> BinderIssue:
    """Keep the printed file and record its digest, its pages and the head it stands for."""
    document = keep_document(
        aircraft=issue.aircraft,
        by=issue.asked_by,
        file=file,
        kind=Document.Kind.BINDER,
        title=f"Inspection binder, issue {issue.number}",
        number=str(issue.number),
        dated_on=issue.as_of,
    )
    with transaction.atomic():
        issue = BinderIssue.objects.select_for_update().select_related("aircraft", "asked_by").get(id=issue.id)
        issue.document, issue.pages = document, printed.pages
        issue.head_seq, issue.head_hash = printed.head_seq, printed.head_hash
        issue.working_copy, issue.progress = printed.working_copy, ""
        issue.save()
        word = "working copy" if issue.working_copy else "without gaps"
        ledger.write(
            aircraft=issue.aircraft,
            by=issue.asked_by,
            kind="binder.issued",
            about=issue,
            text=f"issued binder {issue.number}, {word}, {issue.pages} pages as of event {issue.head_seq}",
            facts={"sha256": document.blob.sha256},
        )
    return issue
