"""Telling the demo's story once more: every act through its action, at its moment in the past, in the order of time."""

from collections import Counter
from collections.abc import Callable
from dataclasses import dataclass

from django.db import transaction

from buildlog.aircraft.models import Aircraft, User
from buildlog.demo.cast import Cast, Step
from buildlog.demo.pictures import Drawn, drawing
from buildlog.demo.steps import measuring, reckoning, site, stock, work
from buildlog.demo.story import Story, read_story


@dataclass(frozen=True)
class Loaded:
    """What came of it: the aircraft, the accounts and their one password, and how many acts were done."""

    aircraft: Aircraft
    people: list[User]
    password: str
    acts: int


def is_loaded(story: Story) -> bool:
    """Return whether the demo aircraft is on this site."""
    return Aircraft.objects.filter(serial=story.tables["aircraft"]["serial"]).exists()


def load_demo(story: Story | None = None, say: Callable[[str], None] = print) -> Loaded | None:
    """Load the demo aircraft whole or not at all; None when it is there already.

    Raises Refused where an act of the story breaks a rule of the record, KeyError for a name that has no row yet.
    """
    story = story or read_story()
    if is_loaded(story):
        return None
    by_time = sorted((snap.spec for snap in story.snaps.values()), key=lambda spec: spec.taken)
    with drawing(by_time) as drawn, transaction.atomic():
        cast = site.begin(story)
        acts = sorted(every_step(story, cast, drawn))
        _tell(acts, say)
    return Loaded(cast.aircraft, list(cast.users.values()), story.tables["password"], len(acts))


def every_step(story: Story, cast: Cast, drawn: Drawn) -> list[Step]:
    """Return all acts of the story, unsorted."""
    return [
        *site.steps(story, cast),
        *stock.steps(story, cast, drawn),
        *measuring.steps(story, cast),
        *work.steps(story, cast),
        *reckoning.steps(story, cast),
    ]


def _tell(acts: list[Step], say: Callable[[str], None]) -> None:
    of_month = Counter(step.at.strftime("%Y-%m") for step in acts)
    done: Counter[str] = Counter()
    for step in acts:
        month = step.at.strftime("%Y-%m")
        step.act()
        done[month] += 1
        if done[month] == of_month[month] and step.at.month % 3 == 0:
            say(f"  {step.at:%B %Y}: {sum(done.values())} of {len(acts)} acts")
