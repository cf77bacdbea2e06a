"""Reading the ledger: heads, and the trail of a record."""

from dataclasses import dataclass
from typing import TypeVar
from uuid import UUID

from buildlog.errors import Refused
from buildlog.ledger.actions import said
from buildlog.ledger.ids import HasId
from buildlog.ledger.models import Event, Record

Row = TypeVar("Row", bound=Record)


@dataclass(frozen=True)
class Head:
    """The last event of a chain; with its digest it anchors everything before it."""

    chain: UUID
    seq: int
    hash: str

    @property
    def anchor(self) -> str:
        """Return the head as it is printed and coded: BL1:chain:number:digest."""
        return f"BL1:{self.chain}:{self.seq}:{self.hash}"


@dataclass(frozen=True)
class Told:
    """One event as a person reads it."""

    seq: int
    kind: str
    at: str
    actor: UUID | None
    subject: UUID | None
    text: str
    hash: str


def sent_before(model: type[Row], client_id: UUID, aircraft: HasId) -> Row | None:
    """Return the row that an earlier sending of the same form made, or None.

    Raises Refused when the identifier belongs to a row of another aircraft.
    """
    row = model._default_manager.filter(pk=client_id).first()
    if row is not None and row.aircraft_id != aircraft.id:  # type: ignore[attr-defined]
        raise Refused("This form was used before, for something else. Open it anew.")
    return row


def head(aircraft: HasId) -> Head:
    """Return the last event of an aircraft's chain."""
    seq, digest = Event.objects.filter(chain=aircraft.id).order_by("-seq").values_list("seq", "hash")[0]
    return Head(aircraft.id, seq, digest)


def told(aircraft: HasId, *, subject: UUID | None = None, before: int | None = None, most: int = 100) -> list[Told]:
    """Return the newest events of an aircraft, or those about one row, newest first; `before` pages on."""
    rows = Event.objects.filter(chain=aircraft.id).select_related("said").order_by("-seq")
    if subject is not None:
        rows = rows.filter(subject=subject)
    if before is not None:
        rows = rows.filter(seq__lt=before)
    return [_told(event) for event in rows[:most]]


def _told(event: Event) -> Told:
    text = said(event)["text"] if hasattr(event, "said") else "(what this event said was erased)"
    return Told(event.seq, event.kind, event.at, event.actor, event.subject, text, event.hash)
