"""The ledger's tables, and the base of every table that it guards."""

from typing import Any, ClassVar

from django.db import models

from buildlog.ledger.canonical import plain
from buildlog.ledger.ids import uuid7


class Record(models.Model):
    """A row of the record: its identifier can be made on a phone, its columns stand in the ledger.

    `guard` says what the database itself refuses: "append" no change and no removal at all, "closable" none once
    `closed_at` is set, "part-of-entry" none once the entry it belongs to is closed, "kept" no removal.
    `outside_record` names the columns that are not evidence (a password, the progress of a print job).
    """

    guard: ClassVar[str] = "kept"
    outside_record: ClassVar[frozenset[str]] = frozenset()

    id = models.UUIDField(primary_key=True, default=uuid7, editable=False)

    class Meta:
        abstract = True

    def as_recorded(self) -> dict[str, Any]:
        """Return every column that counts, by column name, in canonical values."""
        return {
            field.attname: plain(getattr(self, field.attname))
            for field in self._meta.concrete_fields
            if field.name not in self.outside_record
        }


class Event(models.Model):
    """One line of a chain: what was done, by whom; written once, never changed."""

    chain = models.UUIDField()
    seq = models.PositiveIntegerField()
    v = models.PositiveSmallIntegerField(default=1)
    kind = models.CharField(max_length=60)
    subject = models.UUIDField(null=True)
    ref_seq = models.PositiveIntegerField(null=True)
    actor = models.UUIDField(null=True)
    at = models.CharField(max_length=27)
    body = models.CharField(max_length=64)
    prev = models.CharField(max_length=64)
    hash = models.CharField(max_length=64, unique=True)

    class Meta:
        db_table = "ledger_event"
        constraints = [models.UniqueConstraint(fields=["chain", "seq"], name="event_seq_once")]
        indexes = [models.Index(fields=["chain", "subject"], name="event_subject")]


class EventBody(models.Model):
    """What an event says, apart from its line, so that it can be erased without breaking the chain."""

    event = models.OneToOneField(Event, primary_key=True, on_delete=models.PROTECT, related_name="said")
    salt = models.CharField(max_length=32)
    body = models.TextField()

    class Meta:
        db_table = "ledger_body"


class Withdrawal(Record):
    """Something taken back with a reason: an evidence link, a sign-off, a photo. The thing itself stays legible."""

    guard = "append"

    chain = models.UUIDField()
    kind = models.CharField(max_length=30)
    subject = models.UUIDField(unique=True)
    reason = models.TextField()
    by_id = models.UUIDField()
    by_name = models.CharField(max_length=120)
    at = models.DateTimeField()
