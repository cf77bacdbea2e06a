"""The profiles, read once and kept: checklist, groups, facts, positions and jurisdictions as frozen rows."""

import hashlib
import json
from collections.abc import Mapping
from functools import cache
from pathlib import Path
from types import MappingProxyType

from buildlog.profiles import conditions
from buildlog.profiles.conditions import Applies, FactValue
from buildlog.profiles.read import Table, once, read_file
from buildlog.profiles.read_checks import read_check
from buildlog.profiles.read_jurisdictions import read_demands, read_jurisdiction
from buildlog.profiles.shapes import Check, Fact, FactKind, Group, Jurisdiction, Option, Position, ProfileError

HERE = Path(__file__).parent


@cache
def facts() -> Mapping[str, Fact]:
    """Every fact a conversion is asked for, by key, in the order of the form."""
    top = read_file(HERE / "facts.toml")
    rows = [_read_fact(row) for row in top.rows("fact")]
    top.done()
    once("fact", [fact.key for fact in rows])
    return MappingProxyType({fact.key: fact for fact in rows})


def _read_fact(row: Table) -> Fact:
    options = tuple(Option(option.text("value"), option.text("word")) for option in row.rows("options", "value"))
    kind: FactKind = row.word("kind", FactKind)
    fact = Fact(
        key=row.text("key"),
        label=row.text("label"),
        help=row.text("help"),
        kind=kind,
        group=row.text("group"),
        options=options,
        low=row.count("low"),
        high=row.count("high"),
    )
    row.done()
    if (kind == "choice") != (len(options) > 1):
        raise row.wrong("a choice needs two options or more, and nothing else has any")
    if kind == "count" and (fact.low is None or fact.high is None):
        raise row.wrong("a count needs 'low' and 'high'")
    return fact


@cache
def positions() -> Mapping[str, Position]:
    """The places on the aircraft that hold a part, by key."""
    top = read_file(HERE / "positions.toml")
    rows = []
    for row in top.rows("position"):
        rows.append(Position(row.text("key"), row.text("title"), row.text("group")))
        row.done()
    top.done()
    once("position", [position.key for position in rows])
    return MappingProxyType({position.key: position for position in rows})


@cache
def _checklist_files() -> tuple[tuple[Group, tuple[Check, ...]], ...]:
    read = [read_checklist_file(path) for path in sorted((HERE / "checklists").glob("*.toml"))]
    once("group", [group.key for group, _ in read])
    once("check", [check.key for _, checks in read for check in checks])
    return tuple(sorted(read, key=lambda pair: pair[0].order))


def read_checklist_file(path: Path) -> tuple[Group, tuple[Check, ...]]:
    """One file of the checklist: its group and its checks, each tried against facts and positions."""
    top = read_file(path)
    group = Group(top.text("group"), top.text("title"), top.count("order") or 0)
    checked_on = top.day("source_checked_on")
    checks = tuple(read_check(row, group.key, checked_on) for row in top.rows("check"))
    top.done()
    for check in checks:
        try:
            conditions.check_facts(check.condition, facts())
        except ProfileError as error:
            raise ProfileError(f"{path.name}: check {check.key}: {error}") from error
        if strange := [key for key in check.watches if key not in positions()]:
            raise ProfileError(f"{path.name}: check {check.key}: watches {strange[0]}, which is no position")
    return group, checks


@cache
def checklist() -> Mapping[str, Check]:
    """Every check by key, in the order of groups, retired ones left out."""
    rows = {check.key: check for _, checks in _checklist_files() for check in checks if not check.retired}
    return MappingProxyType(rows)


@cache
def every_check() -> Mapping[str, Check]:
    """Every check by key, retired ones among them: for records that still name one."""
    return MappingProxyType({check.key: check for _, checks in _checklist_files() for check in checks})


@cache
def groups() -> tuple[Group, ...]:
    """The groups of the checklist in their order."""
    return tuple(group for group, _ in _checklist_files())


@cache
def checklist_digest() -> str:
    """SHA-256 over every check's digest: another value means another edition of the checklist."""
    lines = {key: check.digest for key, check in every_check().items()}
    return hashlib.sha256(json.dumps(lines, sort_keys=True).encode()).hexdigest()


@cache
def jurisdictions() -> Mapping[str, Jurisdiction]:
    """The authorities' profiles by key."""
    everywhere = read_demands(read_file(HERE / "demands_everywhere.toml"))
    rows = [read_jurisdiction(read_file(path), everywhere) for path in sorted((HERE / "jurisdictions").glob("*.toml"))]
    once("jurisdiction", [row.key for row in rows])
    return MappingProxyType({row.key: row for row in rows})


def applies(check: Check, stated: Mapping[str, FactValue]) -> Applies:
    """Whether a check applies to a conversion of which `stated` is known; in doubt it does."""
    return conditions.judge(check.condition, stated, facts())
