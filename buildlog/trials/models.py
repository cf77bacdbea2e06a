"""Structured tests: conditions and abort values set beforehand, rows of readings, the verdict from a method."""

from django.db import models

from buildlog.aircraft.models import Aircraft, User
from buildlog.calcs.models import Snapshot
from buildlog.files.models import Photo
from buildlog.ledger.models import Record
from buildlog.readings.models import Instrument


class Trial(Record):
    """One trial as it was run. Its verdict comes from its snapshot; a person may add an opinion, never overwrite it."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="trials")
    key = models.SlugField(max_length=60)
    title = models.CharField(max_length=160)
    run_on = models.DateField()
    place = models.CharField(max_length=120, blank=True)
    people = models.CharField(max_length=200, blank=True)
    conditions = models.TextField(blank=True)
    abort_values = models.TextField()
    instrument = models.ForeignKey(Instrument, on_delete=models.PROTECT, null=True, related_name="trials")
    snapshot = models.ForeignKey(Snapshot, on_delete=models.PROTECT, related_name="trials")
    does_not_count = models.CharField(max_length=200, blank=True)  # a missing condition, in words
    opinion = models.TextField(blank=True)
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, null=True, related_name="trials")
    recorded_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    recorded_at = models.DateTimeField()

    class Meta:
        ordering = ["-run_on", "-recorded_at"]

    def __str__(self) -> str:
        return f"{self.title}, {self.run_on:%Y-%m-%d}"
