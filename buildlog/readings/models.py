"""What was measured: instruments with their calibration, characteristics with limits, readings."""

from typing import Self

from django.db import models
from django.db.models import Exists, OuterRef

from buildlog.aircraft.models import Aircraft, User
from buildlog.files.models import Document, Photo
from buildlog.ledger.models import Record, Withdrawal


class Instrument(Record):
    """A measuring tool and until when its calibration counts."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="instruments")
    code = models.CharField(max_length=40)
    title = models.CharField(max_length=160)
    uncertainty = models.CharField(max_length=60, blank=True)  # expanded, k = 2, with unit: "0.5 kg"
    calibrated_on = models.DateField(null=True)
    due_on = models.DateField(null=True)
    certificate = models.ForeignKey(Document, on_delete=models.PROTECT, null=True, related_name="+")

    class Meta:
        ordering = ["code"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "code"], name="instrument_code_once")]

    def __str__(self) -> str:
        return f"{self.code} {self.title}"


class Characteristic(Record):
    """Something measurable of the aircraft. Its present value is the last accepted reading, before that the nominal."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="characteristics")
    code = models.CharField(max_length=40)
    title = models.CharField(max_length=160)
    unit = models.CharField(max_length=30, blank=True)
    nominal = models.CharField(max_length=40, blank=True)  # decimal text in `unit`
    lower = models.CharField(max_length=40, blank=True)
    upper = models.CharField(max_length=40, blank=True)
    plan_sheet = models.CharField(max_length=80, blank=True)

    class Meta:
        ordering = ["code"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "code"], name="characteristic_code_once")]

    def __str__(self) -> str:
        return f"{self.code} {self.title}"


class ReadingQuery(models.QuerySet["Reading"]):
    """Words to ask for readings."""

    def current(self) -> Self:
        """Return the readings that no later reading corrects and nobody withdrew."""
        return self.filter(amended_by=None).exclude(Exists(Withdrawal.objects.filter(subject=OuterRef("id"))))


class Reading(Record):
    """A measured value of a characteristic; a wrong one is corrected by a new one that names it."""

    guard = "append"

    characteristic = models.ForeignKey(Characteristic, on_delete=models.PROTECT, related_name="readings")
    entered = models.CharField(max_length=60)  # value and unit as typed
    value = models.CharField(max_length=40)  # decimal text in the characteristic's unit
    uncertainty = models.CharField(max_length=40, blank=True)  # expanded, k = 2, in the characteristic's unit
    instrument = models.ForeignKey(Instrument, on_delete=models.PROTECT, null=True, related_name="readings")
    read_on = models.DateField()
    read_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    recorded_at = models.DateTimeField()
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, null=True, related_name="readings")
    note = models.CharField(max_length=300, blank=True)
    amends = models.OneToOneField("self", on_delete=models.PROTECT, null=True, related_name="amended_by")
    amend_reason = models.CharField(max_length=300, blank=True)

    objects = ReadingQuery.as_manager()

    class Meta:
        ordering = ["-read_on", "-recorded_at"]
