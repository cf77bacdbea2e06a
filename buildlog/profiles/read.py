"""Strict reading of profile files: every key is asked for by name, a wrong or unknown one stops with its place."""

import tomllib
from collections.abc import Iterator
from datetime import date
from decimal import Decimal
from pathlib import Path
from typing import TypeVar, cast, get_args

from buildlog.profiles.shapes import ProfileError

Word = TypeVar("Word", bound=str)


class Table:
    """One table of a file; remembers which keys were read so that `done` can name a misspelt one."""

    def __init__(self, content: dict[str, object], place: str) -> None:
        self.content = content
        self.place = place
        self.left = set(content)

    def wrong(self, text: str) -> ProfileError:
        """An error that begins with file and key."""
        return ProfileError(f"{self.place}: {text}")

    def _take(self, key: str) -> object:
        self.left.discard(key)
        return self.content.get(key)

    def text(self, key: str, default: str | None = None) -> str:
        """A text; required unless a default is given."""
        value = self._take(key)
        if value is None and default is not None:
            return default
        if not isinstance(value, str) or (not value.strip() and default is None):
            raise self.wrong(f"'{key}' must be a text with something in it")
        return value.strip()

    def word(self, key: str, kind: object, default: Word | None = None) -> Word:
        """One word out of a Literal's."""
        value = self.text(key, default)
        if value not in get_args(kind):
            raise self.wrong(f"'{key}' is '{value}', not one of {', '.join(get_args(kind))}")
        return cast(Word, value)

    def texts(self, key: str) -> tuple[str, ...]:
        """A list of texts, empty where the key is missing."""
        value = self._take(key)
        if value is None:
            return ()
        if not isinstance(value, list) or any(not isinstance(item, str) or not item.strip() for item in value):
            raise self.wrong(f"'{key}' must be a list of texts")
        return tuple(value)

    def yes(self, key: str, default: bool = False) -> bool:
        """true or false."""
        value = self._take(key)
        if value is None:
            return default
        if not isinstance(value, bool):
            raise self.wrong(f"'{key}' must be true or false")
        return value

    def count(self, key: str) -> int | None:
        """A whole number, or None."""
        value = self._take(key)
        if value is not None and (isinstance(value, bool) or not isinstance(value, int)):
            raise self.wrong(f"'{key}' must be a whole number")
        return value

    def number(self, key: str) -> Decimal | None:
        """A number written as text, so that no digit is lost; None where missing."""
        value = self.text(key, "")
        if not value:
            return None
        try:
            return Decimal(value)
        except ArithmeticError as error:
            raise self.wrong(f"'{key}' is '{value}', not a number") from error

    def day(self, key: str) -> date | None:
        """A date, or None."""
        value = self._take(key)
        if value is not None and type(value) is not date:
            raise self.wrong(f"'{key}' must be a date such as 2026-03-14")
        return value

    def table(self, key: str) -> "Table":
        """A table inside this one."""
        value = self._take(key)
        if not isinstance(value, dict):
            raise self.wrong(f"'{key}' must be a table")
        return Table(value, f"{self.place}: {key}")

    def pairs(self, key: str) -> dict[str, str]:
        """A table of texts, in the order written."""
        table = self.table(key)
        return {name: table.text(name) for name in table.content}

    def rows(self, key: str, named_by: str = "key") -> Iterator["Table"]:
        """The tables of a list, each placed by its own key."""
        value = self._take(key)
        if value is not None and not isinstance(value, list):
            raise self.wrong(f"'{key}' must be a list of tables")
        for number, row in enumerate(value or [], start=1):
            if not isinstance(row, dict):
                raise self.wrong(f"'{key}' {number} must be a table")
            yield Table(row, f"{self.place}: {key} {row.get(named_by, number)}")

    def done(self) -> None:
        """Stop on a key nobody asked for: it is a misspelling."""
        if self.left:
            raise self.wrong(f"nothing reads '{sorted(self.left)[0]}'")


def read_file(path: Path) -> Table:
    """The top table of one file."""
    try:
        return Table(tomllib.loads(path.read_text(encoding="utf-8")), path.name)
    except (tomllib.TOMLDecodeError, UnicodeDecodeError) as error:
        raise ProfileError(f"{path.name}: {error}") from error


def once(noun: str, keys: list[str]) -> None:
    """Stop on a key used twice."""
    twice = sorted({key for key in keys if keys.count(key) > 1})
    if twice:
        raise ProfileError(f"{noun} '{twice[0]}' is there twice")
