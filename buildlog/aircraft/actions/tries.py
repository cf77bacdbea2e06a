"""Wrong passwords and codes: each makes the next try wait longer, and none locks a person out for good.

The try is written down before it is looked at, so that guesses sent at once are all counted.
"""

import datetime as dt
import hashlib

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import FailedSignIn
from buildlog.errors import Refused

LONGEST = 15 * 60  # seconds
KEPT = dt.timedelta(days=1)
# Tries without a wait: few for one account from one network, more for a whole network (a club has one address).
FREE_ACCOUNT, FREE_NETWORK = 4, 20


def _key(*parts: str) -> str:
    return hashlib.sha256("\n".join(("failed-sign-in/1", *parts)).encode()).hexdigest()


def _keys(account: str, network: str) -> tuple[tuple[str, int], ...]:
    return (_key(account, network), FREE_ACCOUNT), (_key(network), FREE_NETWORK)


def wait_after(failures: int, free: int) -> int:
    """Return the seconds to wait after so many wrong tries: none at first, then doubling up to fifteen minutes."""
    return 0 if failures < free else min(LONGEST, 2 ** min(failures - free + 1, 20))


def _left(key: str, free: int, now: dt.datetime) -> int:
    moments = FailedSignIn.objects.filter(key=key, at__gt=now - KEPT).order_by("-at").values_list("at", flat=True)
    failed = list(moments[: free + 20])
    if not failed:
        return 0
    return max(0, int((failed[0] + dt.timedelta(seconds=wait_after(len(failed), free)) - now).total_seconds()))


def in_words(seconds: int) -> str:
    """Return a wait as a person says it."""
    if seconds <= 90:
        return f"{max(seconds, 1)} seconds"
    return f"{-(-seconds // 60)} minutes"


@transaction.atomic(durable=True)
def begin_try(*, account: str, network: str, field: str | None = None, at: dt.datetime | None = None) -> None:
    """Count a try as wrong until `forget_tries` says otherwise; refuse it while the wait is not over."""
    now = at or timezone.now()
    FailedSignIn.objects.filter(at__lt=now - KEPT).delete()
    left = max(_left(key, free, now) for key, free in _keys(account, network))
    if left:
        raise Refused(f"Too many wrong tries. Nothing is locked: try again in {in_words(left)}.", field=field)
    FailedSignIn.objects.bulk_create(FailedSignIn(key=key, at=now) for key, _ in _keys(account, network))


@transaction.atomic
def forget_tries(*, account: str, network: str, steps: int = 1) -> None:
    """Take back what turned out right: all tries of this account from here, and the last `steps` of the network."""
    (own, _), (shared, _) = _keys(account, network)
    FailedSignIn.objects.filter(key=own).delete()
    last = FailedSignIn.objects.filter(key=shared).order_by("-at", "-id").values_list("id", flat=True)[:steps]
    FailedSignIn.objects.filter(id__in=list(last)).delete()
