"""Entries: kept as drafts in the evening and put on the record ten minutes later; amendments."""

from collections.abc import Iterator
from datetime import datetime, timedelta
from functools import partial

from buildlog.demo.cast import Cast, Step
from buildlog.demo.clock import moment
from buildlog.demo.story import Row, Story
from buildlog.ledger.ids import uuid7
from buildlog.shop import actions as shop
from buildlog.shop.draft import Draft, Labour, Process
from buildlog.shop.models import Entry
from buildlog.shop.spans import read_minutes

CAPACITY = {"builder": "builder", "helper": "helper", "assist": "paid", "viewer": "helper", "inspector": "helper"}
LOOKED_OVER = timedelta(minutes=10)
NOT_DETAILS = {"kind", "batch", "instrument"}


def steps(story: Story, cast: Cast) -> Iterator[Step]:
    """Yield the entries and the amendments to some of them."""
    rows = {row["id"]: row for row in story.rows("entry")}
    for place, row in enumerate(rows.values()):
        at = moment(row["on"], "21:25")
        yield Step(at, place, partial(_keep, cast, row, at))
        if not row.get("draft"):
            yield Step(at + LOOKED_OVER, place, partial(_close, cast, row, at + LOOKED_OVER))
    for place, row in enumerate(story.rows("amend")):
        at = moment(row["on"], "21:45")
        yield Step(at, place, partial(_amend, cast, rows[row["of"]], row, at))


def _keep(cast: Cast, row: Row, at: datetime) -> None:
    cast.entries[row["id"]] = shop.log_entry(
        aircraft=cast.aircraft, by=cast.users[row["by"]], client_id=uuid7(), draft=_draft(cast, row), at=at
    )


def _close(cast: Cast, row: Row, at: datetime) -> None:
    cast.entries[row["id"]] = shop.close_entry(
        aircraft=cast.aircraft, by=cast.users[row["by"]], entry=cast.entries[row["id"]], at=at
    )


def _amend(cast: Cast, first: Row, row: Row, at: datetime) -> None:
    said = {**first, "note": row["note"], "labour": row.get("labour", first["labour"])}
    made: Entry = shop.amend_entry(
        aircraft=cast.aircraft,
        by=cast.users[row["by"]],
        entry=cast.entries[row["of"]],
        client_id=uuid7(),
        draft=_draft(cast, said),
        amend_reason=row["reason"],
        at=at,
    )
    cast.entries[row["of"]] = made


def _draft(cast: Cast, row: Row) -> Draft:
    task = cast.tasks[row["task"]] if "task" in row else None
    return Draft(
        worked_on=row["on"],
        note=row["note"],
        task=task,
        labour=[_labour(cast, one.strip()) for one in row["labour"].split(",")],
        photos=[cast.photos[key] for key in row["photos"]],
        processes=[_process(cast, row["process"])] if "process" in row else [],
        plan_sheet=task.plan_sheet if task else "",
        plan_revision=task.plan_revision if task else "",
        place="Old dairy, Hollerbeck",
        finishes_task=row.get("finishes", False),
    )


def _labour(cast: Cast, text: str) -> Labour:
    who, _, time = text.rpartition(" ")
    person = cast.users[who]
    return Labour(person.name, CAPACITY[cast.roles[who]], read_minutes(time, field="labour"), person)


def _process(cast: Cast, said: Row) -> Process:
    return Process(
        kind=said["kind"],
        details={name: value for name, value in said.items() if name not in NOT_DETAILS},
        batch=cast.batches[said["batch"]] if "batch" in said else None,
        instrument=cast.instruments[said["instrument"]] if "instrument" in said else None,
    )
