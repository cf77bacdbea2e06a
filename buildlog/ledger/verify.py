"""Whether the record still agrees with its ledger.

It proves that the data agree with each other, and with every anchor given. It cannot prove that a statement was true,
that a clock was right, or that the owner of the machine did not rewrite everything after the last outside anchor.
"""

import hashlib
import json
import re
from collections.abc import Iterator
from dataclasses import asdict, dataclass
from typing import Any
from uuid import UUID

from django.apps import apps

from buildlog.ledger import canonical, guards
from buildlog.ledger.actions import NO_PREVIOUS, body_digest, event_digest
from buildlog.ledger.models import Event, Record

HEX64 = re.compile(r"[0-9a-f]{64}\Z")
AT = re.compile(r"\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{6}Z\Z")
ANCHOR = re.compile(r"BL1:([0-9a-f-]{36}):(\d+):([0-9a-f]{64})\Z")


@dataclass(frozen=True)
class Finding:
    """One thing that does not agree, where it stands, and what to do about it."""

    chain: str
    seq: int | None
    text: str
    remedy: str

    def as_json(self) -> dict[str, Any]:
        """Return the finding as plain JSON values."""
        return asdict(self)


@dataclass(frozen=True)
class Copy:
    """The last copy of a row in the ledger: digest of its columns, and which columns those were."""

    chain: str
    seq: int
    columns: tuple[str, ...]
    digest: str


RESTORE = "Compare with a backup from before; restore if the backup agrees with its anchors."


class Fold:
    """All chains read once: findings on the way, and the last copy of every row."""

    def __init__(self) -> None:
        self.findings: list[Finding] = []
        self.copies: dict[tuple[str, str], Copy] = {}
        self.heads: dict[str, tuple[int, str]] = {}
        self.events = 0

    def read(self) -> None:
        """Read every event in order of its chain."""
        erased = set(Event.objects.filter(kind="body.erase").values_list("chain", "ref_seq"))
        rows = Event.objects.select_related("said").order_by("chain", "seq")
        for event in rows.iterator(chunk_size=500):
            self.events += 1
            self._line(event)
            self._body(event, was_erased=(event.chain, event.seq) in erased)

    def _say(self, event: Event, text: str) -> None:
        self.findings.append(Finding(str(event.chain), event.seq, text, RESTORE))

    def _line(self, event: Event) -> None:
        chain = str(event.chain)
        seq, prev = self.heads.get(chain, (-1, NO_PREVIOUS))
        if event.seq != seq + 1:
            self._say(event, f"Event {seq + 1} is missing before this one.")
        if event.prev != prev:
            self._say(event, "This event does not follow the one before it.")
        if not all(HEX64.match(text) for text in (event.body, event.prev, event.hash)) or not AT.match(event.at):
            self._say(event, "A digest or moment of this event is not spelled as it was written.")
        if event_digest(event) != event.hash:
            self._say(event, "The line of this event was changed.")
        self.heads[chain] = (event.seq, event.hash)

    def _body(self, event: Event, *, was_erased: bool) -> None:
        if not hasattr(event, "said"):
            if not was_erased:
                self._say(event, "What this event says is gone, and no later event erased it.")
            return
        spelled = event.said.body.encode()
        if not re.fullmatch(r"[0-9a-f]{32}", event.said.salt) or body_digest(event.said.salt, spelled) != event.body:
            self._say(event, "What this event says was changed.")
            return
        body = json.loads(spelled)
        if canonical.encode(body) != spelled:
            self._say(event, "What this event says is not spelled canonically.")
        for row in body.get("rows", []):
            self._keep(event, row["model"], row["fields"])
        for row in body.get("removed", []):
            self.copies.pop((row["model"], row["id"]), None)

    def _keep(self, event: Event, model: str, fields: dict[str, Any]) -> None:
        columns = tuple(sorted(fields))
        self.copies[model, fields["id"]] = Copy(str(event.chain), event.seq, columns, _digest(fields))


def _digest(fields: dict[str, Any]) -> str:
    return hashlib.sha256(canonical.encode(fields)).hexdigest()


def _rows(fold: Fold) -> Iterator[Finding]:
    """Compare every row of the record with its last copy."""
    seen: set[tuple[str, str]] = set()
    for model in apps.get_models():
        if not issubclass(model, Record):
            continue
        for row in model._default_manager.iterator(chunk_size=500):
            key = (model.__name__, str(row.pk))
            seen.add(key)
            yield from _row(row, fold.copies.get(key), key)
    for key in fold.copies.keys() - seen:
        copy = fold.copies[key]
        yield Finding(copy.chain, copy.seq, f"{key[0]} {key[1]} stands in the ledger, but its row is gone.", RESTORE)


def _row(row: Record, copy: Copy | None, key: tuple[str, str]) -> Iterator[Finding]:
    if copy is None:
        yield Finding("", None, f"{key[0]} {key[1]} has no event: it was not written by an action.", RESTORE)
        return
    fields = row.as_recorded()
    if _digest({name: fields.get(name) for name in copy.columns}) != copy.digest:
        yield Finding(copy.chain, copy.seq, f"{key[0]} {key[1]} is not as its last event says.", RESTORE)


def _anchors(fold: Fold, anchors: list[str]) -> Iterator[Finding]:
    for text in anchors:
        match = ANCHOR.match(text.strip())
        if match is None:
            yield Finding("", None, f"{text!r} is not an anchor.", "Give it as printed: BL1:chain:number:digest.")
            continue
        chain, seq, digest = match[1], int(match[2]), match[3]
        if not Event.objects.filter(chain=UUID(chain), seq=seq, hash=digest).exists():
            yield Finding(chain, seq, "The record does not hold the event that this anchor names.", RESTORE)


def check(anchors: list[str] | None = None) -> tuple[Fold, list[Finding]]:
    """Return the fold of all chains and everything that does not agree: guards, lines, bodies, rows, anchors."""
    fold = Fold()
    fold.read()
    remedy = "Run migrate, which puts the guards up, then verify; find out who took them down."
    found = [Finding("", None, text, remedy) for text in guards.faults()]
    return fold, found + fold.findings + list(_rows(fold)) + list(_anchors(fold, anchors or []))
