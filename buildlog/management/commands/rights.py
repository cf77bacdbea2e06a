"""Print who may do what: the roles and their acts, and every page with its rule."""

from collections.abc import Iterator
from typing import Any

from django.core.management.base import BaseCommand
from django.urls import URLPattern, URLResolver, get_resolver

from buildlog.aircraft.roles import RIGHTS, Act, Role, may
from buildlog.web.access import Rule


class Command(BaseCommand):
    """`manage.py rights`: the table of rights as the pages apply it."""

    help = "Print the rights of each role, and for every page who may look at it and who may send to it."

    def handle(self, *args: Any, **options: Any) -> None:
        """Print both tables as Markdown."""
        roles = [role.value for role in Role]
        acts = [[act.value, *("yes" if may(role, act) else "" for role in roles)] for act in RIGHTS]
        self._table(["act", *roles], acts)
        self.stdout.write("")
        rows = sorted(_pages(get_resolver(), ""), key=lambda row: row[1])
        self._table(["page", "address", "looks", "sends", "chapter of a link"], rows)

    def _table(self, head: list[str], rows: list[list[str]]) -> None:
        lines = [head, ["---"] * len(head), *rows]
        for line in lines:
            self.stdout.write(f"| {' | '.join(line)} |")


def _pages(resolver: URLResolver, route: str) -> Iterator[list[str]]:
    for pattern in resolver.url_patterns:
        here = route + str(pattern.pattern)
        if isinstance(pattern, URLPattern):
            rule: Rule | None = getattr(pattern.callback, "rule", None)
            yield [pattern.name or "NO NAME", f"/{here}", *_who(rule)]
        else:
            yield from _pages(pattern, here)


def _who(rule: Rule | None) -> tuple[str, str, str]:
    if rule is None:
        return "nobody: no rule", "nobody: no rule", ""
    if rule.audience != "aircraft":
        return rule.audience, rule.audience, ""
    return _roles(rule.read), _roles(rule.write), rule.chapter or ("any" if rule.read is Act.READ else "")


def _roles(act: Act | None) -> str:
    return ", ".join(role.value for role in Role if may(role, act)) if act else ""
