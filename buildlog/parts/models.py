"""What the aircraft is made of: batches of material, parts, and where each part sits from when until when."""

from typing import Self

from django.db import models
from django.db.models import Q

from buildlog.aircraft.models import Aircraft, User
from buildlog.files.models import Document, Photo
from buildlog.ledger.models import Record


class Batch(Record):
    """A lot of raw or consumable material."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="batches")
    code = models.CharField(max_length=40)
    material = models.CharField(max_length=160)
    specification = models.CharField(max_length=160, blank=True)
    lot = models.CharField(max_length=80, blank=True)
    supplier = models.CharField(max_length=120, blank=True)
    quantity = models.CharField(max_length=60, blank=True)  # as on the label: "2.5 m", "1 kg can"
    received_on = models.DateField(null=True)
    expires_on = models.DateField(null=True)
    certificate = models.ForeignKey(Document, on_delete=models.PROTECT, null=True, related_name="+")

    class Meta:
        ordering = ["code"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "code"], name="batch_code_once")]

    def __str__(self) -> str:
        return f"{self.code} {self.material}"


class Part(Record):
    """An identified item. A rejected part cannot be installed; an unknown origin is listed in the binder."""

    class Origin(models.TextChoices):
        MADE = "made-here", "Made here"
        KIT = "kit", "From the kit"
        STANDARD = "standard-hardware", "Standard hardware"
        RELEASED = "released-aviation", "Released aviation part"
        ROAD = "road-vehicle-new", "Road vehicle part, new"
        INDUSTRIAL = "industrial-new", "Industrial part, new"
        SALVAGED = "salvaged", "Salvaged"
        UNKNOWN = "unknown", "Unknown"

    class Inspection(models.TextChoices):
        WAITING = "waiting", "Not inspected yet"
        ACCEPTED = "accepted", "Accepted"
        REJECTED = "rejected", "Rejected"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="parts")
    number = models.CharField(max_length=80)
    name = models.CharField(max_length=160)
    serial = models.CharField(max_length=80, blank=True)
    origin = models.CharField(max_length=20, choices=Origin)
    supplier = models.CharField(max_length=120, blank=True)
    received_on = models.DateField(null=True)
    inspection = models.CharField(max_length=10, choices=Inspection, default=Inspection.WAITING)
    inspection_note = models.CharField(max_length=300, blank=True)
    expires_on = models.DateField(null=True)
    life = models.CharField(max_length=160, blank=True)  # "replace at 500 h", with whose figure it is
    critical = models.BooleanField(default=False)
    note = models.TextField(blank=True)
    added_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    added_at = models.DateTimeField()

    class Meta:
        ordering = ["number", "serial"]

    def __str__(self) -> str:
        return f"{self.number} {self.name}"


class PartBatch(Record):
    """A part was made from a batch."""

    guard = "append"
    part = models.ForeignKey(Part, on_delete=models.PROTECT, related_name="batch_links")
    batch = models.ForeignKey(Batch, on_delete=models.PROTECT, related_name="part_links")

    class Meta:
        constraints = [models.UniqueConstraint(fields=["part", "batch"], name="part_batch_once")]


class PartDocument(Record):
    """A paper that belongs to a part."""

    guard = "append"
    part = models.ForeignKey(Part, on_delete=models.PROTECT, related_name="document_links")
    document = models.ForeignKey(Document, on_delete=models.PROTECT, related_name="part_links")

    class Meta:
        constraints = [models.UniqueConstraint(fields=["part", "document"], name="part_document_once")]


class PartPhoto(Record):
    """A picture of a part."""

    guard = "append"
    part = models.ForeignKey(Part, on_delete=models.PROTECT, related_name="photo_links")
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, related_name="part_links")

    class Meta:
        constraints = [models.UniqueConstraint(fields=["part", "photo"], name="part_photo_once")]


class InstallationQuery(models.QuerySet["Installation"]):
    """Words to ask for installations."""

    def in_place(self) -> Self:
        """Return the installations that have not ended."""
        return self.filter(removed_on=None)


class Installation(Record):
    """A part in a position from one day until another; history stays."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="installations")
    position = models.CharField(max_length=60)  # key of a declared position, or the builder's own words
    part = models.ForeignKey(Part, on_delete=models.PROTECT, related_name="installations")
    installed_on = models.DateField()
    recorded_at = models.DateTimeField()
    installed_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    removed_on = models.DateField(null=True)
    removal_reason = models.CharField(max_length=200, blank=True)

    objects = InstallationQuery.as_manager()

    class Meta:
        ordering = ["position", "-installed_on"]
        constraints = [
            models.UniqueConstraint(
                fields=["aircraft", "position"], condition=Q(removed_on=None), name="position_holds_one_part"
            )
        ]
