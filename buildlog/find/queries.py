"""Looking through one aircraft: a fixed number of queries, one for each kind, whatever is asked."""

from collections.abc import Sequence
from dataclasses import dataclass
from uuid import UUID

from django.db.models import Q, QuerySet
from django.urls import NoReverseMatch, reverse

from buildlog.aircraft.models import Aircraft
from buildlog.find.asking import Asked, Bit, excerpt
from buildlog.find.kinds import KINDS, Kind, Row
from buildlog.profiles import load

FEW, MANY = 8, 200
HINTS = 12


@dataclass(frozen=True)
class Hit:
    """One result: where it opens, its title with the words marked, what it says, its state and photo."""

    url: str
    trail: str
    title: list[Bit]
    text: list[Bit]
    state: str = ""
    photo: UUID | None = None


@dataclass(frozen=True)
class Found:
    """The results of one kind; `more` when there are more than are shown."""

    key: str
    title: str
    hits: list[Hit]
    more: bool


def find(aircraft: Aircraft, asked: Asked, *, only: str = "") -> list[Found]:
    """Return what fits, kind by kind; with `only` one kind, and more of it."""
    most = MANY if only else FEW
    found = [_found(aircraft, kind, asked, most) for kind in KINDS if only in {"", kind.key}]
    if only in {"", "checks"}:
        found.append(_checks(aircraft, asked, most))
    return [one for one in found if one.hits]


def _found(aircraft: Aircraft, kind: Kind, asked: Asked, most: int) -> Found:
    rows = list(_fitting(aircraft, kind, asked)[: most + 1])
    return Found(kind.key, kind.title, [_hit(aircraft, kind, row, asked) for row in rows[:most]], len(rows) > most)


def _fitting(aircraft: Aircraft, kind: Kind, asked: Asked) -> QuerySet[Row]:
    rows = kind.rows(aircraft)
    if set(asked.narrow) - set(kind.narrow) or ((asked.spans or asked.before) and not kind.day):
        return rows.none()
    fits = Q()
    for word in asked.words:
        fits &= _says(kind.texts, word)
    for prefix, said in asked.narrow.items():
        fits &= _says(kind.narrow[prefix], said)
    for span in asked.spans:
        fits &= Q((f"{kind.day}__range", (span.first, span.last)))
    if asked.before:
        fits &= Q((f"{kind.day}__lt", asked.before))
    # A join to many rows would give a row twice; the identifiers of what fits are asked for first.
    return rows.filter(id__in=kind.rows(aircraft).filter(fits).order_by().values("id"))


def _says(texts: Sequence[str], word: str) -> Q:
    # SQLite folds only the letters of ASCII, so other spellings of "Ölpumpe" are asked for one by one.
    spellings = {word} if word.isascii() else {word, word.lower(), word.upper(), word.capitalize()}
    either = Q()
    for text in texts:
        for spelling in spellings:
            either |= Q((f"{text}__icontains", spelling))
    return either


def _hit(aircraft: Aircraft, kind: Kind, row: Row, asked: Asked) -> Hit:
    told = kind.told(row)
    trail = reverse("trail", args=[aircraft.id, row.id])
    marked = (*asked.words, *asked.narrow.values())
    url = _page(kind.page, aircraft.id, kind.page_of(row)) or trail
    return Hit(url, trail, excerpt(told.title, marked), excerpt(told.text, marked), told.state, told.photo)


def _checks(aircraft: Aircraft, asked: Asked, most: int) -> Found:
    if not asked.words or asked.spans or asked.before or asked.narrow:
        return Found("checks", "Checks", [], False)
    hits = []
    for check in load.checklist().values():
        if all(word.lower() in f"{check.key} {check.title}".lower() for word in asked.words):
            url = _page("check-page", aircraft.id, check.key) or reverse("conversion", args=[aircraft.id])
            hits.append(Hit(url, "", excerpt(check.title, asked.words), excerpt(check.key, asked.words)))
    return Found("checks", "Checks", hits[:most], len(hits) > most)


def _page(name: str, *args: object) -> str:
    try:
        return reverse(name, args=args)
    except NoReverseMatch:
        return ""


def hints(aircraft: Aircraft) -> list[tuple[str, list[str]]]:
    """Return, for each prefix, what this aircraft has that could stand behind it; three queries."""
    sheets = aircraft.tasks.exclude(plan_sheet="").order_by("plan_sheet").values_list("plan_sheet", flat=True)
    known = {
        "batch": aircraft.batches.order_by("-received_on", "code").values_list("code", flat=True)[:HINTS],
        "zone": aircraft.zones.order_by("code").values_list("code", flat=True)[:HINTS],
        "sheet": sheets.distinct()[:HINTS],
    }
    return [(prefix, [_quoted(prefix, value) for value in values]) for prefix, values in known.items()]


def _quoted(prefix: str, value: str) -> str:
    return f'{prefix}:"{value}"' if " " in value else f"{prefix}:{value}"
