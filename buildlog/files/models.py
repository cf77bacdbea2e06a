"""Originals kept byte for byte, and what is said about them."""

from typing import ClassVar, Self

from django.db import models
from django.db.models import Exists, OuterRef

from buildlog.aircraft.models import Aircraft, User
from buildlog.ledger.models import Record, Withdrawal


class Blob(Record):
    """The bytes of one file, found in the store by their digest."""

    guard: ClassVar[str] = "append"

    sha256 = models.CharField(max_length=64, unique=True)
    size = models.PositiveBigIntegerField()
    media_type = models.CharField(max_length=60)
    kept_at = models.DateTimeField()


class PhotoQuery(models.QuerySet["Photo"]):
    """Words to ask for photos."""

    def current(self) -> Self:
        """Return the photos that were not withdrawn."""
        return self.exclude(Exists(Withdrawal.objects.filter(subject=OuterRef("id"))))


class Photo(Record):
    """A picture of an aircraft; its day is wall-clock time where it was taken, and says where that came from."""

    class TimeSource(models.TextChoices):
        CAPTURE = "capture", "taken in the log page"
        EXIF = "exif", "camera's own time"
        FILE = "file", "time of the file"
        ASKED = "asked", "said by a person"
        NONE = "none", "not known"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="photos")
    blob = models.ForeignKey(Blob, on_delete=models.PROTECT, related_name="photos")
    name = models.CharField(max_length=255, blank=True)  # as the phone called it: text only, never a path
    taken_on = models.DateField(null=True)
    taken_time = models.TimeField(null=True)
    time_source = models.CharField(max_length=10, choices=TimeSource, default=TimeSource.NONE)
    camera = models.CharField(max_length=120, blank=True)
    width = models.PositiveIntegerField()
    height = models.PositiveIntegerField()
    caption = models.CharField(max_length=300, blank=True)
    shows_builder = models.BooleanField(default=False)
    added_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    added_at = models.DateTimeField()

    objects = PhotoQuery.as_manager()

    class Meta:
        constraints = [models.UniqueConstraint(fields=["aircraft", "blob"], name="photo_bytes_once")]
        indexes = [models.Index(fields=["aircraft", "taken_on"], name="photo_day")]


class Document(Record):
    """A paper: invoice, release certificate, drawing, scanned signed page. Kept whole, never shown inline."""

    class Kind(models.TextChoices):
        INVOICE = "invoice", "Invoice"
        RELEASE = "release-certificate", "Release certificate"
        CERTIFICATE = "certificate", "Material or test certificate"
        DRAWING = "drawing", "Drawing"
        SIGNED = "signed-page", "Signed page, scanned"
        WORKING = "calculation", "Worked calculation"
        LETTER = "letter", "Letter or form"
        BINDER = "binder", "Binder as printed"
        OTHER = "other", "Other"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="documents")
    blob = models.ForeignKey(Blob, on_delete=models.PROTECT, related_name="documents")
    kind = models.CharField(max_length=24, choices=Kind)
    title = models.CharField(max_length=200)
    number = models.CharField(max_length=80, blank=True)
    dated_on = models.DateField(null=True)
    name = models.CharField(max_length=255, blank=True)
    added_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    added_at = models.DateTimeField()

    def __str__(self) -> str:
        return self.title
