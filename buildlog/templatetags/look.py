"""The look in templates: states as word and shape, hours, digests, rivet lines, and small helpers for pages."""

from collections.abc import Iterable
from typing import Any

from django import template
from django.utils.html import format_html, format_html_join
from django.utils.safestring import SafeString, mark_safe

from buildlog.methods import units
from buildlog.profiles import load

register = template.Library()

# state: (word, shape, colour role). One word for each state, everywhere the same.
STATES = {
    "to-do": ("To do", "todo", "todo"),
    "in-work": ("In work", "work", "work"),
    "waiting": ("Waiting", "wait", "wait"),
    "done": ("Done", "done", "done"),
    "signed-off": ("Signed off", "signed", "signed"),
    "not-needed": ("Not needed", "na", "na"),
    "open": ("Open", "todo", "open"),
    "missing": ("Evidence missing", "missing", "missing"),
    "ready": ("Ready", "ready", "ready"),
    "signed": ("Signed", "signed", "signed"),
    "stale": ("Stale", "stale", "stale"),
    "met-otherwise": ("Met otherwise", "other", "other"),
    "accepted-risk": ("Accepted risk", "risk", "risk"),
    "not-applicable": ("Not applicable", "na", "na"),
    "holds": ("Holds", "ready", "ready"),
    "changed": ("Changed", "stale", "stale"),
    "withdrawn": ("No longer leaned on", "na", "na"),
    "history": ("Stays as history", "na", "na"),
    "within": ("Within limits", "ready", "within"),
    "outside": ("Out of limits", "squawk", "outside"),
    "undecided": ("Undecided: measured too coarsely", "missing", "missing"),
    "no-verdict": ("No verdict: limit unverified", "missing", "missing"),
    "no-limits": ("No limits given", "na", "na"),
    "not-measured": ("Not measured", "todo", "open"),
    "does-not-count": ("Does not count", "na", "na"),
    "squawk": ("Open squawk", "squawk", "squawk"),
    "cleared": ("Cleared", "done", "done"),
    "deviation": ("Not decided", "dev", "dev"),
    "decided": ("Decided", "done", "done"),
    "draft": ("Draft", "wait", "wait"),
    "on-record": ("On the record", "done", "done"),
    "current": ("Current", "signed", "signed"),
    "lapsed": ("Lapsed", "stale", "stale"),
    "taken-back": ("Withdrawn", "na", "na"),
    "printed": ("Printed", "done", "done"),
    "printing": ("Printing", "work", "work"),
    "not-printed": ("Not printed", "squawk", "squawk"),
    "accepted": ("Accepted", "done", "done"),
    "rejected": ("Rejected", "squawk", "squawk"),
}


def _shape(shape: str) -> SafeString:
    return format_html('<svg aria-hidden="true"><use href="#{}"/></svg>', shape)


@register.simple_tag
def state(key: str, word: str = "") -> SafeString:
    """Return a state as shape and word."""
    known, shape, role = STATES[key]
    return format_html('<span class="mark c-{}">{}{}</span>', role, _shape(shape), word or known)


@register.simple_tag
def rivets(keys: Iterable[str]) -> SafeString:
    """Return a rivet line: one shape for each state; the sentence beside it carries the words."""
    shapes = format_html_join(
        "", '<svg class="c-{}"><use href="#{}"/></svg>', ((STATES[key][2], STATES[key][1]) for key in keys)
    )
    return format_html('<span class="rivets" aria-hidden="true">{}</span>', shapes)


@register.filter
def hours(minutes: int | None) -> str:
    """Return minutes as a person says them: 1 h 30, 45 min."""
    whole, rest = divmod(int(minutes or 0), 60)
    if not whole:
        return f"{rest} min"
    return f"{whole:,} h {rest:02}" if rest else f"{whole:,} h"


@register.filter
def short(digest: str) -> SafeString:
    """Return the first signs of a digest with the whole one on touch."""
    return format_html('<span class="mono" title="{}">{} {} {}</span>', digest, digest[:4], digest[4:8], digest[8:12])


@register.filter
def unit(spelled: str) -> str:
    """Return a unit as it is printed."""
    return units.shown(spelled)


@register.filter
def figures(recorded: str) -> str:
    """Return a recorded number with five significant figures; the record itself keeps twelve."""
    return units.decimal(float(f"{float(recorded):.5g}")) if recorded else ""


@register.filter
def position(key: str) -> str:
    """Return a position in words: a declared one's title, or the builder's own words."""
    declared = load.positions().get(key)
    return declared.title if declared else key


@register.filter
def words(text: str) -> list[str]:
    """Return the words of a text."""
    return text.split()


@register.filter
def spaced(name: str) -> str:
    """Return a field name as words."""
    return name.replace("_", " ").replace("-", " ").capitalize()


@register.filter
def at(mapping: Any, key: Any) -> Any:
    """Return what a mapping holds at a key, or nothing."""
    return mapping.get(key)


@register.simple_tag(takes_context=True)
def querystring_of(context: dict[str, Any], **changes: Any) -> str:
    """Return the present query with some values changed."""
    query = context["request"].GET.copy()
    for name, value in changes.items():
        query[name] = str(value)
    return str(query.urlencode())


@register.simple_tag
def drawn(svg: str) -> SafeString:
    """Return a drawing of our own drawing room, which escapes every text it is given."""
    return mark_safe(svg)
