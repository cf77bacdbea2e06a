"""Every page of the site, found in the resolver, and values for the words in its address."""

import importlib
import pkgutil
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any
from uuid import UUID

from django.urls import URLPattern, URLResolver, get_resolver, reverse

from buildlog.aircraft.models import Aircraft
from buildlog.web.access import Rule
from tests import makers


@dataclass(frozen=True)
class Page:
    """One pattern: its name, its rule, the words in its address in order."""

    name: str
    route: str
    rule: Rule | None
    words: tuple[str, ...]

    @property
    def of_aircraft(self) -> bool:
        return "aircraft_id" in self.words

    @property
    def rows(self) -> tuple[str, ...]:
        """The words that name a row of the aircraft."""
        return tuple(word for word in self.words if word != "aircraft_id")

    def url(self, aircraft: Aircraft, rows_of: Aircraft | None = None) -> str:
        """Return an address; `rows_of` gives the rows of another aircraft."""
        values: dict[str, Any] = {word: argument(self, word, rows_of or aircraft) for word in self.rows}
        if self.of_aircraft:
            values["aircraft_id"] = aircraft.id
        return reverse(self.name, kwargs=values)


def pages() -> list[Page]:
    """Return every page of the site."""
    return list(_below(get_resolver(), "", ()))


def _below(resolver: URLResolver, route: str, words: tuple[str, ...]) -> Iterator[Page]:
    for pattern in resolver.url_patterns:
        here = route + str(pattern.pattern)
        found = words + tuple(getattr(pattern.pattern, "converters", {}))
        if isinstance(pattern, URLPattern):
            yield Page(pattern.name or "", here, getattr(pattern.callback, "rule", None), found)
        else:
            yield from _below(pattern, here, found)


def arguments() -> dict[str, Any]:
    """Return the makers of address words that the rooms' test makers list as ARGUMENTS."""
    found: dict[str, Any] = {}
    for module in pkgutil.iter_modules(makers.__path__):
        found |= getattr(importlib.import_module(f"tests.makers.{module.name}"), "ARGUMENTS", {})
    return found


def argument(page: Page, word: str, aircraft: Aircraft) -> Any:
    """Return a value for one word of an address; a word that nobody makes fails the test by name."""
    known = arguments()
    maker = known.get(f"{page.name}:{word}") or known.get(word)
    assert maker, f"page {page.name}: nothing in tests/makers/*.ARGUMENTS makes <{word}>"
    return maker(aircraft)


def unknown_id() -> UUID:
    return UUID("018f0000-0000-7000-8000-00000000dead")
