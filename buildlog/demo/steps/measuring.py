"""Instruments, characteristics and readings."""

from collections.abc import Iterator
from datetime import date, datetime
from functools import partial

from buildlog.demo.cast import Cast, Step
from buildlog.demo.clock import moment
from buildlog.demo.story import Row, Story
from buildlog.ledger.ids import uuid7
from buildlog.readings import actions as readings


def steps(story: Story, cast: Cast) -> Iterator[Step]:
    """Yield tools on the day they came, characteristics on the day of their first reading, then every reading."""
    for place, row in enumerate(story.rows("instrument")):
        at = moment(row["on"], "12:20")
        yield Step(at, place, partial(_instrument, cast, row, at))
    first: dict[str, date] = {}
    for row in story.rows("reading"):
        first.setdefault(row["of"], row["on"])
    unread = max(first.values())
    for place, row in enumerate(story.rows("characteristic")):
        at = moment(first.get(row["code"], unread), "12:30")
        yield Step(at, place, partial(_characteristic, cast, row, at))
    for place, row in enumerate(story.rows("reading")):
        at = moment(row["on"], "21:20")
        yield Step(at, place, partial(_reading, cast, row, at))


def _instrument(cast: Cast, row: Row, at: datetime) -> None:
    cast.instruments[row["code"]] = readings.add_instrument(
        aircraft=cast.aircraft,
        by=cast.builder,
        client_id=uuid7(),
        code=row["code"],
        title=row["title"],
        uncertainty=row["uncertainty"],
        calibrated_on=row.get("calibrated_on"),
        due_on=row.get("due_on"),
        certificate=cast.documents[row["certificate"]] if "certificate" in row else None,
        at=at,
    )


def _characteristic(cast: Cast, row: Row, at: datetime) -> None:
    said = {name: row.get(name, "") for name in ("code", "title", "unit", "nominal", "lower", "upper", "plan_sheet")}
    cast.characteristics[row["code"]] = readings.add_characteristic(
        aircraft=cast.aircraft, by=cast.builder, client_id=uuid7(), at=at, **said
    )


def _reading(cast: Cast, row: Row, at: datetime) -> None:
    cast.readings[row["key"]] = readings.record_reading(
        aircraft=cast.aircraft,
        by=cast.users[row["by"]],
        characteristic=cast.characteristics[row["of"]],
        client_id=uuid7(),
        entered=row["entered"],
        read_on=row["on"],
        instrument=cast.instruments[row["instrument"]] if "instrument" in row else None,
        photo=cast.photos[row["photo"]] if "photo" in row else None,
        note=row.get("note", ""),
        amends=cast.readings[row["amends"]] if "amends" in row else None,
        amend_reason=row.get("reason", ""),
        at=at,
    )
