"""Work in the shop: tasks, and entries of what was done on a day by whom."""

from typing import ClassVar, Self

from django.db import models
from django.db.models import Q

from buildlog.aircraft.models import Aircraft, Section, User, Zone
from buildlog.files.models import Photo
from buildlog.ledger.models import Record
from buildlog.parts.models import Batch
from buildlog.readings.models import Instrument


class Task(Record):
    """A piece of work in a section. Its state is worked out from entries, sign-offs and findings."""

    class Kind(models.TextChoices):
        FABRICATE = "fabricate", "Fabricate"
        ASSEMBLE = "assemble", "Assemble"
        INSTALL = "install", "Install"
        TEST = "test", "Test"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="tasks")
    section = models.ForeignKey(Section, on_delete=models.PROTECT, related_name="tasks")
    number = models.CharField(max_length=20)
    title = models.CharField(max_length=160)
    kind = models.CharField(max_length=12, choices=Kind)
    plan_sheet = models.CharField(max_length=40, blank=True)
    plan_revision = models.CharField(max_length=20, blank=True)
    planned_minutes = models.PositiveIntegerField(default=0)
    zone = models.ForeignKey(Zone, on_delete=models.PROTECT, null=True, related_name="tasks")
    waiting_for = models.CharField(max_length=160, blank=True)
    not_needed_reason = models.CharField(max_length=200, blank=True)
    place = models.PositiveIntegerField(default=0)

    class Meta:
        ordering = ["section__place", "place", "number"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "number"], name="task_number_once")]

    def __str__(self) -> str:
        return f"{self.number} {self.title}"


class EntryQuery(models.QuerySet["Entry"]):
    """Words to ask for entries."""

    def on_record(self) -> Self:
        """Return the closed entries; only these count as evidence."""
        return self.exclude(closed_at=None)

    def drafts(self) -> Self:
        """Return work papers that their author may still change."""
        return self.filter(closed_at=None)

    def current(self) -> Self:
        """Return closed entries that no closed amendment replaces."""
        return self.on_record().exclude(amendments__closed_at__isnull=False)


class Entry(Record):
    """What was done on one date on one task. A draft is its author's; once closed it is only amended."""

    guard = "closable"

    class ClosedHow(models.TextChoices):
        AUTHOR = "author", "by its author"
        AUTOMATIC = "automatic", "automatically"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="entries")
    task = models.ForeignKey(Task, on_delete=models.PROTECT, null=True, related_name="entries")
    author = models.ForeignKey(User, on_delete=models.PROTECT, related_name="entries")
    author_role = models.CharField(max_length=20)
    worked_on = models.DateField()
    note = models.TextField()
    plan_sheet = models.CharField(max_length=40, blank=True)
    plan_revision = models.CharField(max_length=20, blank=True)
    place = models.CharField(max_length=120, blank=True)
    finishes_task = models.BooleanField(default=False)
    amends = models.ForeignKey("self", on_delete=models.PROTECT, null=True, related_name="amendments")
    amend_reason = models.CharField(max_length=300, blank=True)
    version = models.PositiveIntegerField(default=1)
    device_at = models.DateTimeField(null=True)  # the phone's clock when Save was pressed
    saved_at = models.DateTimeField()
    closed_at = models.DateTimeField(null=True)
    closed_how = models.CharField(max_length=10, choices=ClosedHow, blank=True)

    objects = EntryQuery.as_manager()

    class Meta:
        ordering = ["-worked_on", "-saved_at"]
        constraints = [
            models.UniqueConstraint(fields=["amends"], condition=Q(closed_at__isnull=False), name="entry_amended_once"),
            models.CheckConstraint(
                condition=Q(closed_at=None, closed_how="") | (Q(closed_at__isnull=False) & ~Q(closed_how="")),
                name="entry_closed_says_how",
            ),
        ]
        indexes = [models.Index(fields=["aircraft", "worked_on"], name="entry_day")]


class EntryRevision(models.Model):
    """A draft as it was saved once; work paper, kept until 90 days after closing, no part of the record.

    `sibling` marks a text that came on top of an older version than the draft had by then: kept beside, never merged.
    """

    entry = models.ForeignKey(Entry, on_delete=models.PROTECT, related_name="revisions")
    version = models.PositiveIntegerField()
    sibling = models.BooleanField(default=False)
    fields = models.JSONField()
    saved_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    saved_at = models.DateTimeField()


class LabourLine(Record):
    """Who worked how long in what capacity; whether work was paid is a fact of each line."""

    guard: ClassVar[str] = "part-of-entry"

    class Capacity(models.TextChoices):
        BUILDER = "builder", "Builder"
        HELPER = "helper", "Helper, unpaid"
        PAID = "paid", "Paid"

    entry = models.ForeignKey(Entry, on_delete=models.PROTECT, related_name="labour")
    person = models.ForeignKey(User, on_delete=models.PROTECT, null=True, related_name="labour")
    person_name = models.CharField(max_length=120)
    capacity = models.CharField(max_length=10, choices=Capacity)
    minutes = models.PositiveIntegerField()

    class Meta:
        constraints = [
            models.CheckConstraint(condition=Q(minutes__gt=0, minutes__lte=24 * 60), name="labour_within_a_day")
        ]


class ProcessRecord(Record):
    """The conditions of a joint or coat that cannot be seen later; `details` holds the fields of its kind as text."""

    guard = "part-of-entry"

    class Kind(models.TextChoices):
        ADHESIVE = "adhesive", "Adhesive"
        RESIN = "resin", "Resin"
        WELD = "weld", "Weld"
        DOPE = "dope", "Dope or coating"
        TORQUE = "torque", "Torque"

    entry = models.ForeignKey(Entry, on_delete=models.PROTECT, related_name="processes")
    kind = models.CharField(max_length=10, choices=Kind)
    batch = models.ForeignKey(Batch, on_delete=models.PROTECT, null=True, related_name="processes")
    instrument = models.ForeignKey(Instrument, on_delete=models.PROTECT, null=True, related_name="processes")
    details = models.JSONField(default=dict)


class EntryPhoto(Record):
    """A photo in an entry, in the order it was added."""

    guard = "part-of-entry"

    entry = models.ForeignKey(Entry, on_delete=models.PROTECT, related_name="photo_links")
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, related_name="entry_links")
    place = models.PositiveSmallIntegerField(default=0)

    class Meta:
        ordering = ["place"]
        constraints = [models.UniqueConstraint(fields=["entry", "photo"], name="entry_photo_once")]


class Clock(models.Model):
    """A person's running clock on a task: the start is stored, the display computed. No part of the record."""

    user = models.OneToOneField(User, on_delete=models.CASCADE, related_name="clock")
    task = models.ForeignKey(Task, on_delete=models.CASCADE, related_name="clocks")
    started_at = models.DateTimeField()
