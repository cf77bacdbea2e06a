"""Identifiers made on the device: UUID version 7, so that rows sort by the moment they were begun."""

import secrets
import time
from typing import Protocol
from uuid import UUID

# Accounts, keys and backups belong to no aircraft; their events stand in one chain of the site.
SITE_CHAIN = UUID("00000000-0000-7000-8000-000000000000")


class HasId(Protocol):
    """Anything with a UUID: an aircraft names its chain, a user names the actor."""

    @property
    def id(self) -> UUID: ...


def uuid7() -> UUID:
    """Return a new UUID version 7 (RFC 9562, section 5.7): 48 bits of milliseconds, then random bits."""
    value = (time.time_ns() // 1_000_000) << 80 | secrets.randbits(80)
    value = value & ~(0xF << 76) | 0x7 << 76
    value = value & ~(0x3 << 62) | 0x2 << 62
    return UUID(int=value)
