"""Tasks and entries for tests, and the words that the page addresses of the shop take."""

import datetime as dt
import itertools
from typing import Any
from uuid import uuid4

from buildlog.aircraft.models import Aircraft, Section, User
from buildlog.shop import actions
from buildlog.shop.draft import Draft, Labour
from buildlog.shop.models import Entry, Task
from tests import make

_count = itertools.count(1)


def task(
    *, aircraft: Aircraft, section: Section | None = None, title: str = "Fit the carburettor", **more: Any
) -> Task:
    """Return a planned task."""
    said = {"section": section or make.section(aircraft=aircraft), "number": str(next(_count)), "kind": "install"}
    by = make.builder_of(aircraft)
    return actions.add_task(aircraft=aircraft, by=by, client_id=uuid4(), title=title, **(said | more))


def draft(*, note: str = "Fitted rib 5", minutes: int = 90, name: str = "Ada Berg", **more: Any) -> Draft:
    """Return what an entry says."""
    said: dict[str, Any] = {"worked_on": dt.date(2026, 3, 14), "labour": [Labour(name, "builder", minutes)]}
    return Draft(note=note, **(said | more))


def entry(*, aircraft: Aircraft, by: User | None = None, closed: bool = True, **more: Any) -> Entry:
    """Return an entry, on the record unless told otherwise."""
    by = by or make.builder_of(aircraft)
    row = actions.log_entry(aircraft=aircraft, by=by, client_id=uuid4(), draft=draft(**more))
    return actions.close_entry(aircraft=aircraft, by=by, entry=row) if closed else row


ARGUMENTS = {
    "task_id": lambda aircraft: task(aircraft=aircraft).id,
    "entry-edit:entry_id": lambda aircraft: entry(aircraft=aircraft, closed=False, minutes=1).id,
    "entry_id": lambda aircraft: entry(aircraft=aircraft, minutes=1).id,
}
