"""Calculations frozen as they were run."""

from typing import Self

from django.db import models

from buildlog.aircraft.models import Aircraft, User
from buildlog.ledger.models import Record
from buildlog.parts.models import Part
from buildlog.readings.models import Characteristic, Reading


class SnapshotQuery(models.QuerySet["Snapshot"]):
    """Words to ask for snapshots."""

    def current(self) -> Self:
        """Return the snapshots that no later run supersedes."""
        return self.filter(superseded_by=None)


class Snapshot(Record):
    """One run of a method: inputs, outputs, checks and worked steps, with a digest. A new run supersedes it."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="snapshots")
    method = models.SlugField(max_length=60)
    version = models.PositiveSmallIntegerField()
    title = models.CharField(max_length=160)
    label = models.CharField(max_length=160, blank=True)  # the builder's word for this run: "static, new propeller"
    result = models.JSONField()  # labels, units, limits and source included: it prints when its method is gone
    digest = models.CharField(max_length=64)
    supersedes = models.OneToOneField("self", on_delete=models.PROTECT, null=True, related_name="superseded_by")
    taken_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    taken_at = models.DateTimeField()

    objects = SnapshotQuery.as_manager()

    class Meta:
        ordering = ["-taken_at"]

    def __str__(self) -> str:
        return f"{self.title}: {self.label}" if self.label else self.title


class SnapshotInput(Record):
    """Where one input of a snapshot came from, when it was not typed."""

    guard = "append"

    snapshot = models.ForeignKey(Snapshot, on_delete=models.PROTECT, related_name="sources")
    name = models.CharField(max_length=60)
    characteristic = models.ForeignKey(Characteristic, on_delete=models.PROTECT, null=True, related_name="+")
    reading = models.ForeignKey(Reading, on_delete=models.PROTECT, null=True, related_name="snapshot_uses")
    part = models.ForeignKey(Part, on_delete=models.PROTECT, null=True, related_name="snapshot_uses")
    position = models.CharField(max_length=60, blank=True)  # the input holds for the part in this position
    source = models.ForeignKey(Snapshot, on_delete=models.PROTECT, null=True, related_name="uses")
    output = models.CharField(max_length=60, blank=True)  # which output of the source snapshot
    value = models.CharField(max_length=60, blank=True)  # the bound value as it was, with unit
