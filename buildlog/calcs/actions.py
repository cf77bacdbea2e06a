"""Freezing a run of a method as a snapshot, with where its inputs came from."""

import datetime as dt
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any
from uuid import UUID

from django.db import IntegrityError, transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, User
from buildlog.calcs.models import Snapshot, SnapshotInput
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.ledger.queries import sent_before
from buildlog.methods.catalogue import methods
from buildlog.methods.result import VERDICT_WORDS
from buildlog.methods.run import run
from buildlog.parts.models import Installation


@dataclass(frozen=True)
class Source:
    """One input that was taken from another snapshot, not typed: its name, the snapshot and which output of it."""

    name: str
    snapshot: Snapshot
    output: str
    value: str  # the value with its unit, as it was taken


def take_snapshot(
    *,
    aircraft: Aircraft,
    by: User,
    client_id: UUID,
    method: str,
    given: Mapping[str, Any],
    label: str = "",
    sources: Sequence[Source] = (),
    holds_for: Sequence[Installation] = (),
    supersedes: Snapshot | None = None,
    at: dt.datetime | None = None,
) -> Snapshot:
    """Run a method and keep the run as it is. The same `client_id` again returns the first snapshot.

    sources: inputs bound to outputs of other snapshots. holds_for: the parts this run speaks of, in their positions.
    Raises Refused at the field of an input that cannot be read.
    """
    if first := sent_before(Snapshot, client_id, aircraft):
        return first
    result = run(methods()[method], given)
    try:
        with transaction.atomic():
            snapshot = Snapshot.objects.create(
                id=client_id,
                aircraft=aircraft,
                method=method,
                version=result.version,
                title=result.title,
                label=label,
                result=result.as_recorded(),
                digest=result.digest,
                supersedes=supersedes,
                taken_by=by,
                taken_at=at or timezone.now(),
            )
            rows = [*_bound(snapshot, sources), *_held(snapshot, holds_for)]
            verdict = f": {VERDICT_WORDS[result.verdict].lower()}" if result.verdict else ""
            text = f"kept calculation {snapshot}{verdict}"
            ledger.write(aircraft=aircraft, by=by, kind="snapshot.taken", about=snapshot, rows=rows, text=text, at=at)
    except IntegrityError:
        raise Refused("That run was superseded already. Open the newest one and run it again.") from None
    return snapshot


def _bound(snapshot: Snapshot, sources: Sequence[Source]) -> list[SnapshotInput]:
    return [
        SnapshotInput.objects.create(
            snapshot=snapshot, name=one.name, source=one.snapshot, output=one.output, value=one.value
        )
        for one in sources
    ]


def _held(snapshot: Snapshot, holds_for: Sequence[Installation]) -> list[SnapshotInput]:
    return [
        SnapshotInput.objects.create(snapshot=snapshot, name="", part=one.part, position=one.position)
        for one in holds_for
    ]
