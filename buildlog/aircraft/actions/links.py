"""Reviewers' links: a token of 256 bits, shown once, that opens chosen chapters for some days."""

import datetime as dt
from collections.abc import Sequence
from uuid import UUID

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.actions.invitations import Offer
from buildlog.aircraft.codes import new_token, token_digest
from buildlog.aircraft.models import Aircraft, ReviewLink, User
from buildlog.aircraft.roles import CHAPTERS
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.ledger.ids import uuid7

DAYS, MOST_DAYS = 14, 60
LINK_GONE = "This link does not fit, was taken back, or is too old. Ask the builder for a new one."


@transaction.atomic
def make_review_link(
    *,
    aircraft: Aircraft,
    by: User,
    name: str,
    chapters: Sequence[str],
    proof: str,
    days: int = DAYS,
    client_id: UUID | None = None,
    at: dt.datetime | None = None,
) -> Offer:
    """Make a link for a reviewer; whoever holds it may read the chapters chosen, and nothing else."""
    if client_id and (sent_before := ReviewLink.objects.filter(id=client_id).first()):
        if sent_before.aircraft_id != aircraft.id:
            raise Refused("This form was used for something else already. Open it again.")
        return Offer(sent_before, "")
    if not name.strip():
        raise Refused("Say who the link is for.", field="name")
    if not 1 <= days <= MOST_DAYS:
        raise Refused(f"A link lasts from 1 to {MOST_DAYS} days.", field="days")
    if not chapters or set(chapters) - set(CHAPTERS):
        raise Refused("Choose the chapters this reviewer may read.", field="chapters")
    now, token = at or timezone.now(), new_token()
    row = ReviewLink.objects.create(
        id=client_id or uuid7(),
        aircraft=aircraft,
        name=name.strip(),
        token_sha256=token_digest(token),
        chapters=[key for key in CHAPTERS if key in chapters],
        made_by=by,
        made_at=now,
        expires_at=now + dt.timedelta(days=days),
    )
    text = f"made a reviewer's link for {row.name}, {days} days"
    ledger.write(aircraft=aircraft, by=by, kind="review-link.made", about=row, text=text, facts={"proof": proof}, at=at)
    return Offer(row, token)


@transaction.atomic
def revoke_review_link(
    *, aircraft: Aircraft, by: User, link: ReviewLink, proof: str, at: dt.datetime | None = None
) -> ReviewLink:
    """Take a link back: it opens nothing from the next page on."""
    if link.revoked_at:
        return link
    link.revoked_at = at or timezone.now()
    link.save(update_fields=["revoked_at"])
    text, facts = f"took back the reviewer's link for {link.name}", {"proof": proof}
    ledger.write(aircraft=aircraft, by=by, kind="review-link.revoked", about=link, text=text, facts=facts, at=at)
    return link


@transaction.atomic
def open_review_link(*, token: str, at: dt.datetime | None = None) -> ReviewLink:
    """Return the link that a token opens, and write down that it was used."""
    now = at or timezone.now()
    link = (
        ReviewLink.objects.select_related("aircraft")
        .filter(token_sha256=token_digest(token), revoked_at=None, expires_at__gt=now)
        .first()
    )
    if link is None:
        raise Refused(LINK_GONE, field="token")
    text = f"reviewer's link for {link.name} was used"
    ledger.write(aircraft=link.aircraft, by=None, kind="review-link.used", about=link, text=text, at=at)
    return link
