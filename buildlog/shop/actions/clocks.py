"""A person's running clock: work paper, no part of the record."""

import datetime as dt

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import User
from buildlog.shop.models import Clock, Task


@transaction.atomic
def start_clock(*, by: User, task: Task, at: dt.datetime | None = None) -> Clock:
    """Start the person's clock on a task; one that runs on it already goes on, one on another task starts anew."""
    clock = Clock.objects.filter(user=by).first()
    if clock is not None and clock.task_id == task.id:
        return clock
    Clock.objects.filter(user=by).delete()
    return Clock.objects.create(user=by, task=task, started_at=at or timezone.now())


@transaction.atomic
def stop_clock(*, by: User, at: dt.datetime | None = None) -> tuple[Task, int] | None:
    """Stop the person's clock and return its task and minutes; None when none ran."""
    clock = Clock.objects.select_related("task").filter(user=by).first()
    if clock is None:
        return None
    minutes = max(1, round(((at or timezone.now()) - clock.started_at).total_seconds() / 60))
    clock.delete()
    return clock.task, min(minutes, 24 * 60)
