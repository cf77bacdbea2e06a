"""What a chapter of the binder is, and what every chapter may ask of the book it stands in."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any

from buildlog.binder.book import Book


@dataclass(frozen=True)
class Chapter:
    """One chapter: its page is `templates/binder/chapters/<key>.html`, filled by `context(book)`.

    order: its place and its number, so that page 4-12 keeps its name when a jurisdiction leaves another chapter out.
    late: its page names pages of other chapters, so it is laid out after them.
    """

    key: str
    title: str
    order: int
    context: Callable[[Book], Mapping[str, Any]]
    late: bool = False
