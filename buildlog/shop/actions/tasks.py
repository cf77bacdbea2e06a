"""Tasks: planned and changed by the builder."""

import datetime as dt
from typing import Any
from uuid import UUID

from django.db import IntegrityError, transaction

from buildlog.aircraft.models import Aircraft, User
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.ledger.queries import sent_before
from buildlog.shop.models import Task

TAKEN = "There is a task with this number."


def add_task(*, aircraft: Aircraft, by: User, client_id: UUID, at: dt.datetime | None = None, **said: Any) -> Task:
    """Plan a task: section, number, title, kind, plan sheet and revision, planned minutes, zone."""
    if first := sent_before(Task, client_id, aircraft):
        return first
    try:
        with transaction.atomic():
            task = Task.objects.create(id=client_id, aircraft=aircraft, place=aircraft.tasks.count(), **said)
            ledger.write(aircraft=aircraft, by=by, kind="task.added", about=task, text=f"planned task {task}", at=at)
    except IntegrityError:
        raise Refused(TAKEN, field="number") from None
    return task


def change_task(*, aircraft: Aircraft, by: User, task: Task, at: dt.datetime | None = None, **said: Any) -> Task:
    """Change what a task says; what was done on it stays."""
    for name, value in said.items():
        setattr(task, name, value)
    try:
        with transaction.atomic():
            task.save()
            ledger.write(aircraft=aircraft, by=by, kind="task.changed", about=task, text=f"changed task {task}", at=at)
    except IntegrityError:
        raise Refused(TAKEN, field="number") from None
    return task
