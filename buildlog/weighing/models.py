"""What the aircraft weighs, and the cases it will be loaded in."""

from django.db import models

from buildlog.aircraft.models import Aircraft, User
from buildlog.calcs.models import Snapshot
from buildlog.files.models import Photo
from buildlog.ledger.models import Record
from buildlog.readings.models import Instrument


class Weighing(Record):
    """Scale readings with tare and level attitude, and the list of what was aboard."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="weighings")
    weighed_on = models.DateField()
    place = models.CharField(max_length=120, blank=True)
    attitude = models.CharField(max_length=200)  # how level was shown
    fuel_state = models.CharField(max_length=200)
    aboard = models.TextField()  # the equipment list at weighing
    instrument = models.ForeignKey(Instrument, on_delete=models.PROTECT, null=True, related_name="weighings")
    snapshot = models.ForeignKey(Snapshot, on_delete=models.PROTECT, related_name="weighings")
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, null=True, related_name="weighings")
    recorded_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    recorded_at = models.DateTimeField()

    class Meta:
        ordering = ["-weighed_on", "-recorded_at"]


class Envelope(Record):
    """The mass and CG limits of the design, as corner points, and whose figures they are."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="envelopes")
    corners = models.JSONField()  # [[arm mm, mass kg], ...] as decimal text
    source = models.CharField(max_length=200)
    set_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    set_at = models.DateTimeField()

    class Meta:
        ordering = ["-set_at"]


class LoadingCase(Record):
    """One way of loading the aircraft, worked out by the loading method."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="loading_cases")
    title = models.CharField(max_length=160)
    weighing = models.ForeignKey(Weighing, on_delete=models.PROTECT, related_name="cases")
    snapshot = models.ForeignKey(Snapshot, on_delete=models.PROTECT, related_name="loading_cases")
    recorded_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    recorded_at = models.DateTimeField()

    class Meta:
        ordering = ["title"]
