"""The shop's clock in the demo's past: local time with the offset it had on that day."""

import datetime as dt

WINTER, SUMMER = dt.timezone(dt.timedelta(hours=1)), dt.timezone(dt.timedelta(hours=2))


def moment(day: dt.date, time: str) -> dt.datetime:
    """Return the moment of a shop time like "21:30" on a day, in the offset the shop had then."""
    zone = SUMMER if _last_sunday(day.year, 3) <= day < _last_sunday(day.year, 10) else WINTER
    return dt.datetime.combine(day, dt.time.fromisoformat(time), tzinfo=zone)


def _last_sunday(year: int, month: int) -> dt.date:
    last = dt.date(year, month, 31)
    return last - dt.timedelta(days=(last.weekday() + 1) % 7)
