"""All methods, found by their declaration."""

from collections.abc import Mapping
from functools import cache
from types import MappingProxyType

from buildlog.methods import formulas
from buildlog.methods.declare import Method
from buildlog.registry import collect


@cache
def methods() -> Mapping[str, Method]:
    """Return every method by key, in the order of theme and title."""
    found = collect(formulas, "METHOD")
    ordered = sorted(found.values(), key=lambda method: (method.theme, method.title))
    return MappingProxyType({method.key: method for method in ordered})
