"""Binder issues for tests, and the words that the page addresses of the binder take."""

from pathlib import Path
from tempfile import NamedTemporaryFile
from uuid import uuid4

from buildlog.aircraft.models import Aircraft
from buildlog.binder import actions
from buildlog.binder.jobs import Printed
from buildlog.binder.models import BinderIssue
from buildlog.ledger.queries import head
from tests import make


def issue(*, aircraft: Aircraft, paper: str = "a4") -> BinderIssue:
    """Return an issue that was asked for."""
    return actions.begin_issue(aircraft=aircraft, by=make.builder_of(aircraft), client_id=uuid4(), paper=paper)


def issued(*, aircraft: Aircraft) -> BinderIssue:
    """Return an issue with a file, without the seconds of printing it."""
    row, at = issue(aircraft=aircraft), head(aircraft)
    with NamedTemporaryFile() as file:
        file.write(f"%PDF-1.7 {row.id}".encode())
        file.flush()
        return actions.issue_binder(issue=row, printed=Printed(3, at.seq, at.hash, True), file=Path(file.name))


ARGUMENTS = {"issue_id": lambda aircraft: issued(aircraft=aircraft).id}
