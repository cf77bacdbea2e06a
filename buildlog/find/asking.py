"""What a person typed into Find, taken apart: words, dates, and the prefixes batch: zone: sheet: before:."""

import datetime as dt
import re
from collections.abc import Iterable
from dataclasses import dataclass, field

LONGEST = 200
MOST_WORDS = 8
MONTHS = ("jan", "feb", "mar", "apr", "may", "jun", "jul", "aug", "sep", "oct", "nov", "dec")
PREFIXES = {
    "batch": "the code of a batch, like batch:EP-2207",
    "zone": "the code of a zone, like zone:LW-1",
    "sheet": "the number of a plan sheet, like sheet:22",
    "before": "a date, like before:2026-03-14 or before:2026-03",
}
_DAY = re.compile(rf"\b(\d{{1,2}})\s+({'|'.join(MONTHS)})[a-z]*\.?\s+(\d{{4}})\b", re.IGNORECASE)
_PIECE = re.compile(rf'(?:({"|".join(PREFIXES)}):\s*)?("[^"]*"|\S+)', re.IGNORECASE)
_LONE = re.compile(rf"\b({'|'.join(PREFIXES)}):\s*$", re.IGNORECASE)
_DATE = re.compile(r"(\d{4})(?:-(\d{1,2}))?(?:-(\d{1,2}))?")


@dataclass(frozen=True)
class Span:
    """The days a typed date stands for, both ends among them: one day, or a whole month."""

    first: dt.date
    last: dt.date


@dataclass(frozen=True)
class Asked:
    """What is looked for: every word, every date and every prefix has to fit. `puzzles` says what made no sense."""

    text: str
    words: tuple[str, ...] = ()
    spans: tuple[Span, ...] = ()
    before: dt.date | None = None
    narrow: dict[str, str] = field(default_factory=dict)
    puzzles: tuple[str, ...] = ()

    @property
    def is_empty(self) -> bool:
        """Return whether nothing is asked."""
        return not (self.words or self.spans or self.before or self.narrow)


def read(text: str) -> Asked:
    """Return a typed question taken apart; nothing typed is an error."""
    text = text.replace("\x00", "").strip()[:LONGEST]
    rest, puzzles = text, []
    if lone := _LONE.search(rest):
        puzzles.append(_wants(lone[1].lower()))
        rest = rest[: lone.start()]
    words: list[str] = []
    spans: list[Span] = []
    narrow: dict[str, str] = {}
    for prefix, piece in _PIECE.findall(_DAY.sub(_as_iso, rest)):
        said = piece.strip('"').strip()
        span = _span(said)
        if prefix.lower() == "before" and span is None:
            puzzles.append(_wants("before"))
        elif prefix:
            narrow[prefix.lower()] = said
        elif span and "-" in said:
            spans.append(span)
        elif said:
            words.append(said)
    cut = _span(narrow.pop("before", ""))
    kept = {prefix: said for prefix, said in narrow.items() if said}
    return Asked(text, tuple(words[:MOST_WORDS]), tuple(spans), cut.first if cut else None, kept, tuple(puzzles))


def _wants(prefix: str) -> str:
    return f"{prefix}: wants {PREFIXES[prefix]}."


def _as_iso(found: re.Match[str]) -> str:
    day, month, year = found.groups()
    return f"{year}-{MONTHS.index(month.lower()) + 1:02}-{int(day):02}"


def _span(said: str) -> Span | None:
    found = _DATE.fullmatch(said)
    if not found:
        return None
    year, month, day = (int(part) if part else 0 for part in found.groups())
    try:
        first = dt.date(year, month or 1, day or 1)
        if day:
            return Span(first, first)
        ended = dt.date(year + month // 12, month % 12 + 1, 1) if month else dt.date(year + 1, 1, 1)
    except ValueError:
        return None
    return Span(first, ended - dt.timedelta(days=1))


@dataclass(frozen=True)
class Bit:
    """A stretch of a text, and whether it is one of the words looked for."""

    text: str
    is_match: bool


def excerpt(text: str, words: Iterable[str], *, around: int = 60, most: int = 180) -> list[Bit]:
    """Return the stretch of a text around the first word found, taken apart so that the words can be marked."""
    text = " ".join(text.split())
    pattern = "|".join(re.escape(word) for word in sorted(words, key=len, reverse=True))
    places = [found.span() for found in re.finditer(pattern, text, re.IGNORECASE)] if pattern else []
    start = max(places[0][0] - around, 0) if places else 0
    end = min(start + most, len(text))
    bits = [Bit("… ", False)] if start else []
    at = start
    for first, last in places:
        if at <= first and last <= end:
            bits += [Bit(text[at:first], False), Bit(text[first:last], True)]
            at = last
    bits.append(Bit(text[at:end] + (" …" if end < len(text) else ""), False))
    return [bit for bit in bits if bit.text]
