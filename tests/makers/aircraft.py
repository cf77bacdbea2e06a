"""Rows of the aircraft room, and the words that its page addresses take."""

import datetime as dt

from buildlog.aircraft import actions
from buildlog.aircraft.actions import Offer
from buildlog.aircraft.models import Aircraft, Zone
from buildlog.aircraft.roles import CHAPTERS
from tests import make


def zone(*, aircraft: Aircraft, code: str = "LW-1", title: str = "Left wing, root bay") -> Zone:
    """Return a zone, or the one that is there under this code."""
    by = make.builder_of(aircraft)
    found = Zone.objects.filter(aircraft=aircraft, code=code).first()
    return found or actions.add_zone(aircraft=aircraft, by=by, code=code, title=title)


def invitation(*, aircraft: Aircraft, role: str = "helper", at: dt.datetime | None = None) -> Offer:
    """Return an open invitation with its code."""
    by = make.builder_of(aircraft)
    return actions.invite(aircraft=aircraft, by=by, name="Nils Dahl", role=role, proof="password", at=at)


def review_link(
    *, aircraft: Aircraft, chapters=tuple(CHAPTERS), days: int = 14, at: dt.datetime | None = None
) -> Offer:
    """Return an open reviewer's link with its token."""
    by = make.builder_of(aircraft)
    return actions.make_review_link(
        aircraft=aircraft, by=by, name="Reviewer Moll", chapters=chapters, days=days, proof="password", at=at
    )


# Words in page addresses: each gives a value for a page of this aircraft. A room lists its own the same way; where one
# word means different things, the name of the page stands before it: "trial-add:key".
ARGUMENTS = {
    "section_id": lambda aircraft: make.section(aircraft=aircraft).id,
    "zone_id": lambda aircraft: zone(aircraft=aircraft).id,
    "member_id": lambda aircraft: make.member(aircraft=aircraft, user=make.user(), role="viewer").id,
    "invitation_id": lambda aircraft: invitation(aircraft=aircraft).row.id,
    "link_id": lambda aircraft: review_link(aircraft=aircraft).row.id,
    "mark": lambda aircraft: "0123456789abcdef",
}
