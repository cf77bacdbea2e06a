"""The book that is being printed: one issue, and everything that more than one chapter asks of the record."""

import json
from functools import cached_property
from pathlib import Path
from typing import TYPE_CHECKING

from buildlog.binder.gaps import Gap, gaps
from buildlog.binder.models import BinderIssue
from buildlog.files.derived import picture
from buildlog.files.models import Photo
from buildlog.files.queries import is_whole
from buildlog.ledger.models import Event
from buildlog.ledger.queries import Head, head
from buildlog.profiles import load
from buildlog.profiles.shapes import Jurisdiction

if TYPE_CHECKING:
    from buildlog.binder.chapter import Chapter


class Book:
    """One issue while it is printed. What it reads stands still: a copy of the record, made when the print began."""

    def __init__(self, issue: BinderIssue) -> None:
        self.issue = issue
        self.aircraft = issue.aircraft
        self.chapters: list[Chapter] = []  # those of this issue
        self.pages: dict[int, int] = {}  # chapter number -> pages, once laid out
        self.where: dict[str, str] = {}  # anchor -> page, as "7-12"
        self.photo_files: dict[str, Path] = {}  # digest -> derivative, of the chapter being filled

    @cached_property
    def head(self) -> Head:
        """The last event of the aircraft's chain in this copy of the record."""
        return head(self.aircraft)

    @cached_property
    def head_at(self) -> str:
        """The moment of the last event, in UTC."""
        at: str = Event.objects.values_list("at", flat=True).get(chain=self.head.chain, seq=self.head.seq)
        return f"{at[:10]} {at[11:19]} UTC"

    @cached_property
    def jurisdiction(self) -> Jurisdiction:
        """The authority's words and demands."""
        return load.jurisdictions()[self.aircraft.jurisdiction]

    @cached_property
    def gaps(self) -> list[Gap]:
        """What this print lacks; with gaps it is a working copy."""
        return gaps(self.aircraft, self.issue.as_of)

    @property
    def is_working_copy(self) -> bool:
        """Whether this print has gaps."""
        return bool(self.gaps)

    def picture(self, photo: Photo) -> Path | None:
        """Return the derivative of a photo for print; None when its original is not what its digest says."""
        digest = photo.blob.sha256
        if digest not in self.photo_files:
            if not is_whole(digest):
                return None
            self.photo_files[digest] = picture(photo, 1000)
        return self.photo_files[digest]

    @cached_property
    def ledger_lines(self) -> bytes:
        """The aircraft's chain as JSON lines: each event's line and what it says, for anyone who wants to fold it."""
        lines = []
        for event in Event.objects.filter(chain=self.head.chain).select_related("said").order_by("seq"):
            line = {
                name: getattr(event, name) for name in ("seq", "v", "kind", "ref_seq", "at", "body", "prev", "hash")
            }
            line |= {name: str(value) if (value := getattr(event, name)) else None for name in ("subject", "actor")}
            said = {"salt": event.said.salt, "said": event.said.body} if hasattr(event, "said") else {}
            lines.append(json.dumps(line | said, sort_keys=True, ensure_ascii=False))
        return ("\n".join(lines) + "\n").encode()
