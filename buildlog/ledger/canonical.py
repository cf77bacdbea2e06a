"""One spelling for every record: canonical JSON as RFC 8785 orders it, without floats.

A float has several spellings, a Decimal none in JSON, so both are refused: minutes are whole numbers, values of
calculations are decimal strings, moments are text in UTC.
"""

import datetime as dt
import json
from collections.abc import Mapping, Sequence
from decimal import Decimal
from typing import Any
from uuid import UUID

WHOLE_NUMBER_LIMIT = 2**53 - 1


class NotCanonical(TypeError):
    """A value that has no canonical spelling; `path` tells where it stands."""


def encode(value: Any) -> bytes:
    """Return the canonical JSON of null, bool, int within 2**53-1, str, list, dict with ASCII keys.

    Raises NotCanonical for floats, Decimals, dates, lone surrogates, U+0000 and anything else.
    """
    _refuse_strays(value, "$")
    return json.dumps(value, sort_keys=True, separators=(",", ":"), ensure_ascii=False).encode()


def _refuse_strays(value: Any, path: str) -> None:
    if value is None or isinstance(value, bool):
        return
    if isinstance(value, int):
        if abs(value) > WHOLE_NUMBER_LIMIT:
            raise NotCanonical(f"{path}: {value} is beyond 2**53 - 1")
    elif isinstance(value, str):
        _refuse_bad_text(value, path)
    elif isinstance(value, Mapping):
        for key, inner in value.items():
            if not isinstance(key, str) or not key.isascii():
                raise NotCanonical(f"{path}: key {key!r} is not ASCII text")
            _refuse_strays(inner, f"{path}.{key}")
    elif isinstance(value, list):
        for index, inner in enumerate(value):
            _refuse_strays(inner, f"{path}[{index}]")
    else:
        raise NotCanonical(f"{path}: {type(value).__name__} has no canonical spelling")


def _refuse_bad_text(text: str, path: str) -> None:
    if "\x00" in text or any(0xD800 <= ord(sign) <= 0xDFFF for sign in text):
        raise NotCanonical(f"{path}: text with U+0000 or half a surrogate pair")


def moment(at: dt.datetime) -> str:
    """Return an aware moment as `YYYY-MM-DDTHH:MM:SS.ffffffZ`."""
    return at.astimezone(dt.UTC).strftime("%Y-%m-%dT%H:%M:%S.%fZ")


def plain(value: Any) -> Any:
    """Return a database value as something canonical JSON can hold."""
    if isinstance(value, UUID):
        return str(value)
    if isinstance(value, Decimal):
        return format(value, "f")
    if isinstance(value, dt.datetime):
        return moment(value)
    if isinstance(value, dt.date | dt.time):
        return value.isoformat()
    if isinstance(value, Mapping):
        return {str(key): plain(inner) for key, inner in value.items()}
    if isinstance(value, Sequence) and not isinstance(value, str | bytes):
        return [plain(inner) for inner in value]
    return value
