"""Issues of the record in print."""

from typing import ClassVar

from django.db import models

from buildlog.aircraft.models import Aircraft, User
from buildlog.files.models import Document
from buildlog.ledger.models import Record


class BinderIssue(Record):
    """One print of the record as of one ledger head. The job's progress lives on the row itself."""

    outside_record: ClassVar[frozenset[str]] = frozenset({"progress", "heartbeat_at", "failure"})

    class Paper(models.TextChoices):
        A4 = "a4", "A4"
        LETTER = "letter", "Letter"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="binders")
    number = models.PositiveIntegerField()
    paper = models.CharField(max_length=10, choices=Paper)
    leave_out = models.JSONField(default=list)  # keys of chapters not printed
    working_copy = models.BooleanField(default=True)
    head_seq = models.PositiveIntegerField()
    head_hash = models.CharField(max_length=64)
    as_of = models.DateField()
    asked_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    asked_at = models.DateTimeField()
    document = models.ForeignKey(Document, on_delete=models.PROTECT, null=True, related_name="+")
    pages = models.PositiveIntegerField(default=0)
    progress = models.CharField(max_length=120, blank=True)
    heartbeat_at = models.DateTimeField(null=True)
    failure = models.CharField(max_length=300, blank=True)

    class Meta:
        ordering = ["-number"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "number"], name="binder_number_once")]
