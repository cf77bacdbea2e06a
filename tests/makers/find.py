"""What the page addresses of the find room take, and rows of rooms that have no pages yet."""

import datetime as dt

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.conformity.models import Deviation, Squawk
from buildlog.ledger import actions as ledger
from tests import make
from tests.makers.parts import part

DAY = dt.date(2026, 4, 2)


@transaction.atomic
def squawk(*, aircraft: Aircraft, number: int = 1, title: str = "Fuel line chafes", due: str = "later") -> Squawk:
    """Return an open squawk."""
    by = make.builder_of(aircraft)
    said = {"raised_on": DAY, "raised_by": by, "raised_at": timezone.now()}
    row = Squawk.objects.create(aircraft=aircraft, number=number, title=title, due=due, **said)
    ledger.write(aircraft=aircraft, by=by, kind="squawk.raised", about=row, text=f"raised squawk {number}: {title}")
    return row


@transaction.atomic
def deviation(*, aircraft: Aircraft, number: int = 1, title: str = "Rib 5 edge distance") -> Deviation:
    """Return a deviation nobody has decided on."""
    by = make.builder_of(aircraft)
    said = {"raised_on": DAY, "raised_by": by, "raised_at": timezone.now()}
    words = {"plan_says": "10 mm", "built_as": "8.5 mm", "reason": "drilled off the mark", "plan_sheet": "22"}
    row = Deviation.objects.create(aircraft=aircraft, number=number, title=title, **words, **said)
    ledger.write(aircraft=aircraft, by=by, kind="deviation.raised", about=row, text=f"noted deviation {number}")
    return row


ARGUMENTS = {"subject_id": lambda aircraft: part(aircraft=aircraft).id}
