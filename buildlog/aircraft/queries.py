"""Who may see which aircraft, and as what."""

from uuid import UUID

from django.utils import timezone

from buildlog.aircraft.models import Aircraft, Member, ReviewLink, User
from buildlog.aircraft.roles import Role


def membership(*, user: User, aircraft_id: UUID) -> Member | None:
    """Return the person's membership of this aircraft today, with the aircraft."""
    return (
        Member.objects.select_related("aircraft", "user")
        .filter(user=user, aircraft_id=aircraft_id, ended_on=None)
        .first()
    )


def review_membership(link_id: str | None, aircraft_id: UUID, chapter: str) -> Member | None:
    """Return a reviewer by link as an unsaved member, or None when the link does not open this part of the record."""
    if not link_id:
        return None
    link = (
        ReviewLink.objects.select_related("aircraft")
        .filter(id=link_id, aircraft_id=aircraft_id, revoked_at=None, expires_at__gt=timezone.now())
        .first()
    )
    if link is None or (chapter and chapter not in link.chapters):
        return None
    return Member(aircraft=link.aircraft, role=Role.LINK, authority=link.name)


def aircraft_of(user: User) -> list[Aircraft]:
    """Return the aircraft this person is a member of, in their order of serial."""
    return list(Aircraft.objects.for_user(user).order_by("designation", "serial"))


def people_of(aircraft: Aircraft) -> list[Member]:
    """Return everyone who is a member today, builders first."""
    order = {role.value: place for place, role in enumerate(Role)}
    rows = aircraft.members.select_related("user").filter(ended_on=None)
    return sorted(rows, key=lambda member: (order[member.role], member.user.name))
