"""People, and the aircraft they build: members, sections, zones, and the facts of its conversion."""

from typing import ClassVar, Self

from django.contrib.auth.base_user import AbstractBaseUser, BaseUserManager
from django.db import models
from django.db.models import F, Q

from buildlog.aircraft.roles import ROLE_WORDS, Role
from buildlog.ledger.models import Record


class User(AbstractBaseUser, Record):
    """A person with an account. What they are on an aircraft is said by their membership."""

    outside_record: ClassVar[frozenset[str]] = frozenset({"password", "last_login", "totp_secret", "totp_step"})

    sign_in = models.CharField(max_length=120, unique=True)
    name = models.CharField(max_length=120)
    is_active = models.BooleanField(default=True)
    is_site_admin = models.BooleanField(default=False)
    joined_at = models.DateTimeField()
    totp_secret = models.CharField(max_length=64, blank=True)
    totp_step = models.PositiveBigIntegerField(default=0)  # the last code's time step: a code works once

    USERNAME_FIELD = "sign_in"
    REQUIRED_FIELDS = ["name"]
    objects: ClassVar[BaseUserManager[Self]] = BaseUserManager()

    def __str__(self) -> str:
        return self.name


class AircraftQuery(models.QuerySet["Aircraft"]):
    """Words to ask for aircraft."""

    def for_user(self, user: User) -> Self:
        """Return the aircraft this person is a member of today."""
        return self.filter(members__user=user, members__ended_on=None)


class Aircraft(Record):
    """One aircraft under construction; everything else belongs to exactly one."""

    class Basis(models.TextChoices):
        PLANS = "plans", "Built from plans"
        KIT = "kit", "Built from a kit"
        OWN = "own-design", "Own design"
        REPLICA = "replica", "Replica"

    class Units(models.TextChoices):
        SI = "si", "Metric (kg, mm, N·m)"
        INCH = "inch-pound", "Inch-pound (lb, in, lbf·ft)"

    designation = models.CharField(max_length=120)
    basis = models.CharField(max_length=20, choices=Basis)
    serial = models.CharField(max_length=40, unique=True)
    registration = models.CharField(max_length=20, blank=True)
    seats = models.PositiveSmallIntegerField(default=2)
    plan_set = models.CharField(max_length=120, blank=True)
    jurisdiction = models.SlugField(max_length=40)
    units = models.CharField(max_length=20, choices=Units, default=Units.SI)
    started_on = models.DateField()
    built_at = models.CharField(max_length=160, blank=True)

    objects = AircraftQuery.as_manager()

    def __str__(self) -> str:
        return f"{self.designation}, serial {self.serial}"


class Member(Record):
    """A person in a role on an aircraft, from one day until another."""

    class MemberRole(models.TextChoices):
        BUILDER = Role.BUILDER.value, ROLE_WORDS[Role.BUILDER]
        HELPER = Role.HELPER.value, ROLE_WORDS[Role.HELPER]
        ASSIST = Role.ASSIST.value, ROLE_WORDS[Role.ASSIST]
        INSPECTOR = Role.INSPECTOR.value, ROLE_WORDS[Role.INSPECTOR]
        VIEWER = Role.VIEWER.value, ROLE_WORDS[Role.VIEWER]

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="members")
    user = models.ForeignKey(User, on_delete=models.PROTECT, related_name="memberships")
    role = models.CharField(max_length=20, choices=MemberRole)
    authority = models.CharField(max_length=120, blank=True)  # on whose behalf an inspector comes
    number = models.CharField(max_length=60, blank=True)  # licence or delegation number
    started_on = models.DateField()
    ended_on = models.DateField(null=True)

    # What a reviewer by link may read; None for members, who read everything.
    chapters: frozenset[str] | None = None

    class Meta:
        constraints = [
            models.UniqueConstraint(
                fields=["aircraft", "user"], condition=Q(ended_on=None), name="member_once_at_a_time"
            )
        ]


class Invitation(Record):
    """An offer to join, taken up with a one-time code of which only the digest is kept."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="invitations", null=True)
    role = models.CharField(max_length=20, choices=Member.MemberRole)
    name = models.CharField(max_length=120)
    code_sha256 = models.CharField(max_length=64, unique=True)
    made_at = models.DateTimeField()
    expires_at = models.DateTimeField()
    taken_by = models.ForeignKey(User, on_delete=models.PROTECT, null=True, related_name="+")
    revoked_at = models.DateTimeField(null=True)


class ReviewLink(Record):
    """A reviewer's way in: a long random token that expires; only its digest is kept."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="review_links")
    name = models.CharField(max_length=120)
    token_sha256 = models.CharField(max_length=64, unique=True)
    chapters = models.JSONField(default=list)  # which parts of the record may be seen
    made_by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    made_at = models.DateTimeField()
    expires_at = models.DateTimeField()
    revoked_at = models.DateTimeField(null=True)


class FailedSignIn(models.Model):
    """A wrong password or code, kept a day to slow the next try; no part of the record."""

    key = models.CharField(max_length=64, db_index=True)  # digest of account and network
    at = models.DateTimeField()


class Section(Record):
    """A chapter of the work breakdown; binder page numbers carry its number."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="sections")
    parent = models.ForeignKey("self", on_delete=models.PROTECT, null=True, blank=True, related_name="parts")
    number = models.CharField(max_length=12)
    title = models.CharField(max_length=120)
    place = models.PositiveIntegerField(default=0)

    class Meta:
        ordering = ["place", "number"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "number"], name="section_number_once")]

    def __str__(self) -> str:
        return f"{self.number} {self.title}"


class Zone(Record):
    """A space that will be covered one day."""

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="zones")
    code = models.CharField(max_length=20)
    title = models.CharField(max_length=120)

    class Meta:
        ordering = ["code"]
        constraints = [models.UniqueConstraint(fields=["aircraft", "code"], name="zone_code_once")]

    def __str__(self) -> str:
        return f"{self.code} {self.title}"


class FactQuery(models.QuerySet["Fact"]):
    """Words to ask for facts of the conversion."""

    def present(self) -> Self:
        """Return the last value of each fact."""
        return self.filter(followed_by=None)


class Fact(Record):
    """One fact of this engine installation as it was said at a time; a change is a new row that follows the old one."""

    guard = "append"

    aircraft = models.ForeignKey(Aircraft, on_delete=models.PROTECT, related_name="facts")
    key = models.SlugField(max_length=60)
    value = models.CharField(max_length=200)
    follows = models.OneToOneField("self", on_delete=models.PROTECT, null=True, related_name="followed_by")
    by = models.ForeignKey(User, on_delete=models.PROTECT, related_name="+")
    at = models.DateTimeField()

    objects = FactQuery.as_manager()

    class Meta:
        constraints = [models.CheckConstraint(condition=~Q(follows=F("id")), name="fact_not_after_itself")]
