"""What a binder printed now would lack, worked out from the record."""

import datetime as dt
from dataclasses import dataclass

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.queries import stated
from buildlog.calcs.queries import SnapshotView, snapshot_views
from buildlog.conformity.models import Squawk
from buildlog.methods.result import OUTSIDE, UNDECIDED
from buildlog.parts.models import Installation, Part
from buildlog.profiles import load
from buildlog.readings.limits import NOT_MEASURED
from buildlog.readings.queries import Present, presents
from buildlog.shop.models import Entry


@dataclass(frozen=True)
class Gap:
    """One thing that is missing or open: what it is, which, and the page that cures it."""

    what: str
    which: tuple[str, ...]
    cure: str


def gaps(aircraft: Aircraft, on: dt.date) -> list[Gap]:
    """Return every gap of an aircraft on a day, in a fixed number of queries; none of them can be left out."""
    parts = list(aircraft.parts.all())
    installed = list(Installation.objects.in_place().filter(aircraft=aircraft).select_related("part"))
    runs = [view for view in snapshot_views(aircraft) if not view.is_superseded]
    drafts = Entry.objects.filter(aircraft=aircraft).drafts().select_related("author").order_by("worked_on")
    waiting = [row for row in installed if row.part.inspection == Part.Inspection.WAITING]
    measured = presents(aircraft)
    late = [str(row) for row in aircraft.batches.filter(expires_on__lt=on)]
    found = [
        Gap("Checks of the conversion without evidence", _checks(aircraft), "conversion"),
        Gap("Calculations that came out of limits", _said(runs, {OUTSIDE, UNDECIDED}), "calculations"),
        Gap("Calculations that are stale", tuple(str(v.snapshot) for v in runs if v.path), "calculations"),
        Gap("Readings out of limits or undecided", _measured(measured, {"outside", "undecided"}), "readings"),
        Gap("Characteristics not measured", _measured(measured, {NOT_MEASURED}), "readings"),
        Gap("Parts of unknown origin", tuple(str(row) for row in parts if row.origin == Part.Origin.UNKNOWN), "parts"),
        Gap("Parts installed without receiving inspection", tuple(str(row.part) for row in waiting), "parts"),
        Gap("Batches past their expiry", tuple(late), "batches"),
        Gap("Drafts not on the record", tuple(map(_draft, drafts)), "entries"),
        Gap("Squawks that are open", _squawks(aircraft), "squawks"),
        Gap("Deviations without a decision", _deviations(aircraft), "deviations"),
        Gap("No weighing is on the record", _unweighed(aircraft), "weight-and-balance"),
    ]
    return [gap for gap in found if gap.which]


def _measured(rows: list[Present], states: set[str]) -> tuple[str, ...]:
    return tuple(str(row.characteristic) for row in rows if row.state in states)


def _said(runs: list[SnapshotView], verdicts: set[str]) -> tuple[str, ...]:
    return tuple(str(view.snapshot) for view in runs if view.result.verdict in verdicts)


def _checks(aircraft: Aircraft) -> tuple[str, ...]:
    """Return the checks that apply, or may apply, to this conversion: in doubt a check applies."""
    known = stated(aircraft)
    return tuple(check.title for check in load.checklist().values() if load.applies(check, known).answer != "no")


def _draft(row: Entry) -> str:
    return f"{row.worked_on:%Y-%m-%d} by {row.author.name}"


def _squawks(aircraft: Aircraft) -> tuple[str, ...]:
    """Return the open squawks, those that stop the next step first."""
    order = Squawk.Due.values
    rows = sorted(aircraft.squawks.filter(clearing=None), key=lambda row: (order.index(row.due), row.number))
    return tuple(f"{row.number} {row.title}, {row.get_due_display().lower()}" for row in rows)


def _deviations(aircraft: Aircraft) -> tuple[str, ...]:
    return tuple(f"{row.number} {row.title}" for row in aircraft.deviations.filter(decision=None).order_by("number"))


def _unweighed(aircraft: Aircraft) -> tuple[str, ...]:
    return () if aircraft.weighings.exists() else ("empty mass not known",)
