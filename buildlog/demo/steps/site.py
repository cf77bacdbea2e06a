"""People, sections, zones, tasks and the facts of the conversion."""

from collections.abc import Iterator
from functools import partial
from typing import Any

from buildlog.aircraft import actions
from buildlog.aircraft.models import Aircraft
from buildlog.demo.cast import Cast, Step
from buildlog.demo.clock import moment
from buildlog.demo.story import Row, Story
from buildlog.ledger.ids import uuid7
from buildlog.shop import actions as shop


def begin(story: Story) -> Cast:
    """Make the first builder's account and the aircraft, on the day the story begins."""
    first, said = story.rows("person")[0], dict(story.tables["aircraft"])
    at = moment(said["started_on"], "07:40")
    password = story.tables["password"]
    user = actions.create_user(
        sign_in=first["sign_in"], name=first["name"], password=password, is_site_admin=True, at=at
    )
    aircraft: Aircraft = actions.create_aircraft(by=user, at=at, **said)
    return Cast(aircraft, users={first["key"]: user}, roles={first["key"]: first["role"]})


def steps(story: Story, cast: Cast) -> Iterator[Step]:
    """Yield the acts that set the house up, and the evenings at the Conversion page."""
    begun = story.tables["aircraft"]["started_on"]
    for place, row in enumerate(story.rows("person")[1:]):
        yield Step(moment(row["started_on"], "08:00"), place, partial(_join, cast, row, story.tables["password"]))
    for place, (number, title) in enumerate(story.tables["sections"].items()):
        yield Step(moment(begun, "08:10"), place, partial(_section, cast, number, title, moment(begun, "08:10")))
    for place, (code, title) in enumerate(story.tables["zones"].items()):
        yield Step(moment(begun, "08:20"), place, partial(_zone, cast, code, title, moment(begun, "08:20")))
    for place, row in enumerate(story.rows("task")):
        yield Step(moment(begun, "08:30"), place, partial(_task, cast, row, moment(begun, "08:30")))
    for row in story.rows("said"):
        at = moment(row["on"], "22:20")
        act: Any = partial(_state, cast, row, at)
        yield Step(at, 0, act)


def _join(cast: Cast, row: Row, password: str) -> None:
    at = moment(row["started_on"], "08:00")
    user = actions.create_user(sign_in=row["sign_in"], name=row["name"], password=password, at=at)
    actions.add_member(
        aircraft=cast.aircraft,
        by=cast.builder,
        user=user,
        role=row["role"],
        authority=row.get("authority", ""),
        number=row.get("number", ""),
        started_on=row["started_on"],
        at=at,
    )
    cast.users[row["key"]], cast.roles[row["key"]] = user, row["role"]


def _section(cast: Cast, number: str, title: str, at: Any) -> None:
    parent = cast.sections.get(number.rpartition(".")[0])
    cast.sections[number] = actions.add_section(
        aircraft=cast.aircraft, by=cast.builder, number=number, title=title, parent=parent, at=at
    )


def _zone(cast: Cast, code: str, title: str, at: Any) -> None:
    cast.zones[code] = actions.add_zone(aircraft=cast.aircraft, by=cast.builder, code=code, title=title, at=at)


def _task(cast: Cast, row: Row, at: Any) -> None:
    cast.tasks[row["number"]] = shop.add_task(
        aircraft=cast.aircraft,
        by=cast.builder,
        client_id=uuid7(),
        section=cast.sections[row["section"]],
        number=row["number"],
        title=row["title"],
        kind=row["kind"],
        plan_sheet=row.get("plan_sheet", ""),
        plan_revision=row.get("revision", ""),
        planned_minutes=row["hours"] * 60,
        zone=cast.zones[row["zone"]] if "zone" in row else None,
        waiting_for=row.get("waiting_for", ""),
        at=at,
    )


def _state(cast: Cast, row: Row, at: Any) -> None:
    actions.state_facts(aircraft=cast.aircraft, by=cast.users[row["by"]], stated=row["facts"], at=at)
