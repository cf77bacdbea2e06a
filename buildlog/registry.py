"""Finding what is declared in one place: every module of a package that holds the named attribute."""

import importlib
import pkgutil
from types import ModuleType
from typing import Any


def collect(package: ModuleType, name: str) -> dict[str, Any]:
    """Return the attribute `name` of every module of `package` that has one, by its `.key`; a key twice is a bug."""
    found: dict[str, Any] = {}
    for module in pkgutil.iter_modules(package.__path__):
        loaded = importlib.import_module(f"{package.__name__}.{module.name}")
        held = getattr(loaded, name, None)
        for one in held if isinstance(held, tuple) else (held,) if held is not None else ():
            if one.key in found:
                raise ValueError(f"{package.__name__}: {one.key!r} is declared twice")
            found[one.key] = one
    return found
