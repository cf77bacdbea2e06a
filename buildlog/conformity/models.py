"""Evidence for checks, decisions on them, signatures, and what is wrong or built otherwise."""

from typing import Self

from django.db import models
from django.db.models import Exists, OuterRef, Q

from buildlog.aircraft.models import Aircraft, User
from buildlog.calcs.models import Snapshot
from buildlog.files.models import Document, Photo
from buildlog.ledger.models import Record, Withdrawal
from buildlog.parts.models import Part
from buildlog.readings.models import Reading
from buildlog.shop.models import Entry, Task
from buildlog.trials.models import Trial

EVIDENCE_KINDS = ("photo", "entry", "document", "part", "reading", "trial", "snapshot")


def exactly_one(names: tuple[str, ...]) -> Q:
    """Return the condition that exactly one of the named columns is filled."""
    whole = Q()
    for name in names:
        whole |= Q(**{f"{other}__isnull": other != name for other in names})
    return whole


class Withdrawable(models.QuerySet["models.Model"]):
    """Rows that can be taken back with a reason."""

    def standing(self) -> Self:
        """Return the rows that were not withdrawn."""
        return self.exclude(Exists(Withdrawal.objects.filter(subject=OuterRef("id"))))


class EvidenceLink(Record):
    """One piece of evidence offered in one slot of one check, with the digest it had when it was linked."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="evidence")
    check_key = models.SlugField(max_length=60)
    slot = models.SlugField(max_length=60)
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, null=True, related_name="evidence")
    entry = models.ForeignKey(Entry, on_delete=models.PROTECT, null=True, related_name="evidence")
    document = models.ForeignKey(Document, on_delete=models.PROTECT, null=True, related_name="evidence")
    part = models.ForeignKey(Part, on_delete=models.PROTECT, null=True, related_name="evidence")
    reading = models.ForeignKey(Reading, on_delete=models.PROTECT, null=True, related_name="evidence")
    trial = models.ForeignKey(Trial, on_delete=models.PROTECT, null=True, related_name="evidence")
    snapshot = models.ForeignKey(Snapshot, on_delete=models.PROTECT, null=True, related_name="evidence")
    digest = models.CharField(max_length=64)
    shows_on = models.DateField()  # the day the evidence speaks of: a later change at a watched position outdates it
    note = models.CharField(max_length=300, blank=True)
    linked_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    linked_at = models.DateTimeField()

    objects = Withdrawable.as_manager()

    class Meta:
        ordering = ["linked_at"]
        constraints = [
            models.CheckConstraint(condition=exactly_one(EVIDENCE_KINDS), name="evidence_is_one_thing"),
        ]
        indexes = [models.Index(fields=["aircraft", "check_key"], name="evidence_of_check")]


class Disposition(Record):
    """A named decision on a check: it does not apply, it is met otherwise, or its risk is accepted. Never hidden."""

    guard = "append"

    class Kind(models.TextChoices):
        NOT_APPLICABLE = "not-applicable", "Not applicable"
        MET_OTHERWISE = "met-otherwise", "Met otherwise"
        ACCEPTED_RISK = "accepted-risk", "Accepted risk"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="dispositions")
    check_key = models.SlugField(max_length=60)
    kind = models.CharField(max_length=20, choices=Kind)
    reason = models.TextField()
    name = models.CharField(max_length=120)  # printed name of who decided
    decided_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    decided_at = models.DateTimeField()

    objects = Withdrawable.as_manager()

    class Meta:
        ordering = ["decided_at"]


class SignOff(Record):
    """A named person's statement on what they saw, bound to the digest of exactly that."""

    guard = "append"

    class Meaning(models.TextChoices):
        PERFORMED = "performed", "Performed"
        INSPECTED = "inspected-accepted", "Inspected and accepted"
        WITNESSED = "witnessed", "Witnessed"
        REVIEWED = "reviewed", "Reviewed"
        REJECTED = "rejected", "Rejected"

    class Way(models.TextChoices):
        ACCOUNT = "own-account", "On their own account"
        WITNESSED = "witnessed-device", "Witnessed on the builder's device"
        INK = "ink", "In ink, scanned by the builder"

    class Subject(models.TextChoices):
        CHECK = "check", "Check"
        TASK = "task", "Task"
        ENTRY = "entry", "Entry"
        SQUAWK = "squawk", "Squawk"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="sign_offs")
    subject_kind = models.CharField(max_length=10, choices=Subject)
    subject_key = models.CharField(max_length=60)  # key of the check, or the identifier of the row
    subject_title = models.CharField(max_length=200)
    meaning = models.CharField(max_length=20, choices=Meaning)
    statement = models.TextField()  # exactly the words that were shown
    bound_digest = models.CharField(max_length=64)
    targets = models.JSONField(default=list)  # [{kind, id, digest}] of everything the signer saw
    signer = models.ForeignKey(User, on_delete=models.PROTECT, related_name="sign_offs")
    printed_name = models.CharField(max_length=120)
    role = models.CharField(max_length=20)
    authority = models.CharField(max_length=120, blank=True)
    number = models.CharField(max_length=60, blank=True)
    way = models.CharField(max_length=20, choices=Way)
    proof = models.CharField(max_length=40)  # how the signer proved who they are: "password", "password and code"
    scan = models.ForeignKey(Document, on_delete=models.PROTECT, null=True, related_name="sign_offs")
    remark = models.TextField(blank=True)
    signed_at = models.DateTimeField()

    objects = Withdrawable.as_manager()

    class Meta:
        ordering = ["signed_at"]
        indexes = [models.Index(fields=["aircraft", "subject_kind", "subject_key"], name="sign_off_subject")]


class Squawk(Record):
    """Something wrong or left to do; cleared by an entry or a sign-off, never removed."""

    class Due(models.TextChoices):
        CLOSING = "before-closing", "Before closing"
        RUN = "before-first-run", "Before first run"
        FLIGHT = "before-flight", "Before flight"
        LATER = "later", "Later"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="squawks")
    number = models.PositiveIntegerField()
    title = models.CharField(max_length=200)
    detail = models.TextField(blank=True)
    due = models.CharField(max_length=20, choices=Due)
    check_key = models.SlugField(max_length=60, blank=True)
    task = models.ForeignKey(Task, on_delete=models.PROTECT, null=True, related_name="squawks")
    part = models.ForeignKey(Part, on_delete=models.PROTECT, null=True, related_name="squawks")
    trial = models.ForeignKey(Trial, on_delete=models.PROTECT, null=True, related_name="squawks")
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, null=True, related_name="squawks")
    raised_on = models.DateField()
    raised_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    raised_at = models.DateTimeField()

    class Meta:
        ordering = ["-number"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "number"], name="squawk_number_once")]


class SquawkClearing(Record):
    """What cleared a squawk."""

    guard = "append"

    squawk = models.OneToOneField(Squawk, on_delete=models.PROTECT, related_name="clearing")
    entry = models.ForeignKey(Entry, on_delete=models.PROTECT, null=True, related_name="cleared_squawks")
    note = models.TextField()
    cleared_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    cleared_at = models.DateTimeField()


class Deviation(Record):
    """A departure from drawing, plan or standard."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="deviations")
    number = models.PositiveIntegerField()
    title = models.CharField(max_length=200)
    plan_says = models.TextField()
    built_as = models.TextField()
    reason = models.TextField()
    plan_sheet = models.CharField(max_length=80, blank=True)
    check_key = models.SlugField(max_length=60, blank=True)
    task = models.ForeignKey(Task, on_delete=models.PROTECT, null=True, related_name="deviations")
    part = models.ForeignKey(Part, on_delete=models.PROTECT, null=True, related_name="deviations")
    photo = models.ForeignKey(Photo, on_delete=models.PROTECT, null=True, related_name="deviations")
    raised_on = models.DateField()
    raised_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    raised_at = models.DateTimeField()

    class Meta:
        ordering = ["-number"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "number"], name="deviation_number_once")]


class DeviationDecision(Record):
    """Who decided what on a deviation, and why."""

    guard = "append"

    class Decision(models.TextChoices):
        AS_BUILT = "accept-as-built", "Accepted as built"
        REWORK = "rework", "Rework to the plan"
        SCRAP = "scrap", "Scrap and make again"

    deviation = models.OneToOneField(Deviation, on_delete=models.PROTECT, related_name="decision")
    decision = models.CharField(max_length=20, choices=Decision)
    reason = models.TextField()
    name = models.CharField(max_length=120)
    decided_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    decided_at = models.DateTimeField()
