"""Snapshots, and whether what they were bound to still holds."""

from collections.abc import Iterable
from dataclasses import dataclass
from uuid import UUID

from buildlog.aircraft.models import Aircraft
from buildlog.calcs.models import Snapshot, SnapshotInput
from buildlog.methods import units
from buildlog.methods.declare import Input
from buildlog.methods.result import Result, from_record
from buildlog.parts.models import Installation


@dataclass(frozen=True)
class SnapshotView:
    """A snapshot with its run read back, and the path that made it stale: empty while everything bound holds."""

    snapshot: Snapshot
    result: Result
    path: tuple[str, ...]
    is_superseded: bool

    @property
    def state(self) -> str:
        """Return holds, changed (stale) or history (superseded)."""
        return "history" if self.is_superseded else "changed" if self.path else "holds"


class Standing:
    """What the staleness of every snapshot of an aircraft is worked out from: three queries, whatever their number."""

    def __init__(self, aircraft: Aircraft) -> None:
        rows = aircraft.snapshots.select_related("taken_by").order_by("-taken_at")
        self.snapshots = {row.id: row for row in rows}
        self.followed = {row.supersedes_id: row for row in self.snapshots.values() if row.supersedes_id}
        self.bound: dict[UUID, list[SnapshotInput]] = {}
        for source in SnapshotInput.objects.filter(snapshot__aircraft=aircraft).select_related("part"):
            self.bound.setdefault(source.snapshot_id, []).append(source)
        places = Installation.objects.filter(aircraft=aircraft).select_related("part").order_by("installed_on")
        self.installed: dict[str, list[Installation]] = {}
        for place in places:
            self.installed.setdefault(place.position, []).append(place)

    def path(self, snapshot: Snapshot) -> tuple[str, ...]:
        """Return why a snapshot is stale, the cause first; empty when it holds."""
        for source in self.bound.get(snapshot.id, []):
            if found := self._source(source):
                return found
        return ()

    def _source(self, source: SnapshotInput) -> tuple[str, ...]:
        if source.part_id:
            return self._place(source)
        if not source.source_id:
            return ()
        under = self.snapshots[source.source_id]
        if newer := self.followed.get(under.id):
            said = f"{under} was run again on {newer.taken_at:%Y-%m-%d}"
            return (said, f"{source.name} was taken from the run before it ({source.value})")
        if deeper := self.path(under):
            return (*deeper, f"{source.name} was taken from {under}")
        return ()

    def _place(self, source: SnapshotInput) -> tuple[str, ...]:
        sits = [row for row in self.installed.get(source.position, []) if row.removed_on is None]
        if sits and sits[-1].part_id == source.part_id:
            return ()
        if sits:
            return (
                (
                    f"{source.position}: {sits[-1].part} went in on {sits[-1].installed_on:%Y-%m-%d}, this "
                    f"run spoke of {source.part}"
                ),
            )
        return (f"{source.position}: {source.part} was taken out",)


def snapshot_views(aircraft: Aircraft) -> list[SnapshotView]:
    """Return every snapshot with its standing, newest first."""
    standing = Standing(aircraft)
    return [_view(standing, row) for row in standing.snapshots.values()]


def _view(standing: Standing, row: Snapshot) -> SnapshotView:
    return SnapshotView(row, from_record(row.result), standing.path(row), row.id in standing.followed)


def snapshot_view(aircraft: Aircraft, snapshot_id: UUID) -> SnapshotView | None:
    """Return one snapshot with its standing, or None."""
    standing = Standing(aircraft)
    row = standing.snapshots.get(snapshot_id)
    return _view(standing, row) if row else None


@dataclass(frozen=True)
class Offered:
    """An output of a snapshot that an input may take over."""

    key: str
    words: str


def offers(views: Iterable[SnapshotView], wanted: Input) -> list[Offered]:
    """Return the outputs of snapshots that still hold and whose unit fits an input."""
    found = []
    for view in views:
        if view.state != "holds":
            continue
        for one in view.result.outputs:
            if one.value and units.can_become(one.unit, wanted.unit):
                words = f"{view.snapshot}: {one.label} {one.shown} {units.shown(one.unit)}"
                found.append(Offered(f"{view.snapshot.id}:{one.name}", words))
    return found
