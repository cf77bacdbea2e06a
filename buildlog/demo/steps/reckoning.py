"""Calculations, each on its evening, bound to the runs and readings they take values from."""

from collections.abc import Iterator
from datetime import datetime
from functools import partial

from buildlog.calcs import actions as calcs
from buildlog.calcs.actions import Source
from buildlog.calcs.models import Snapshot
from buildlog.demo.cast import Cast, Step
from buildlog.demo.clock import moment
from buildlog.demo.story import Row, Story
from buildlog.ledger.ids import uuid7


def steps(story: Story, cast: Cast) -> Iterator[Step]:
    """Yield the calculations."""
    for place, row in enumerate(story.rows("calc")):
        at = moment(row["on"], "22:00")
        yield Step(at, place, partial(_calc, cast, row, at))


def _calc(cast: Cast, row: Row, at: datetime) -> None:
    sources = [_source(cast.snapshots[one["calc"]], one) for one in row.get("from", [])]
    places = cast.aircraft.installations.in_place().filter(position__in=row.get("holds", []))
    cast.snapshots[row["key"]] = calcs.take_snapshot(
        aircraft=cast.aircraft,
        by=cast.users[row["by"]],
        client_id=uuid7(),
        method=row["method"],
        given={**row["given"], **{one.name: one.value for one in sources}},
        label=row["label"],
        sources=sources,
        holds_for=list(places.select_related("part")),
        supersedes=cast.snapshots[row["supersedes"]] if "supersedes" in row else None,
        at=at,
    )


def _source(under: Snapshot, said: Row) -> Source:
    came = next(one for one in under.result["outputs"] if one["name"] == said["output"])
    return Source(said["name"], under, said["output"], f"{came['value']} {came['unit']}".strip())
