"""Published check cases read from a TOML file and put through the methods."""

import tomllib
from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from buildlog.errors import Refused
from buildlog.methods import units
from buildlog.methods.catalogue import methods
from buildlog.methods.declare import Input, Method, Table
from buildlog.methods.result import Result
from buildlog.methods.run import run


@dataclass(frozen=True)
class Fault:
    """One case that did not come out, and why."""

    case: str
    text: str


def read_cases(path: Path) -> list[dict[str, Any]]:
    """Return the cases of a file. Raises Refused when it is not such a file."""
    try:
        cases = tomllib.loads(path.read_text(encoding="utf-8"))["case"]
    except OSError as error:
        raise Refused(f"{path} cannot be read: {error.strerror}.") from None
    except (tomllib.TOMLDecodeError, UnicodeDecodeError, KeyError) as error:
        raise Refused(f"{path} is not a file of check cases: {error}") from None
    rows: list[dict[str, Any]] = cases
    return rows


def faults(case: Mapping[str, Any]) -> list[Fault]:
    """Return what is wrong with one case; an unknown method, input or output counts as wrong."""
    method = methods().get(case["method"])
    if method is None:
        return [Fault(case["id"], f"there is no method {case['method']!r}")]
    try:
        result = run(method, {name: _given(method, name, said) for name, said in case["inputs"].items()}, bounded=False)
        return [
            Fault(case["id"], text) for name, said in case["expected"].items() for text in _compare(result, name, said)
        ]
    except (Refused, KeyError) as error:
        return [Fault(case["id"], f"could not be run: {getattr(error, 'text', error)}")]


def _given(method: Method, name: str, said: Mapping[str, Any]) -> Any:
    declared, value, unit = method.input(name), said["value"], said.get("unit", "")
    if not isinstance(declared, Table):
        return _number(declared, value, unit)
    columns = {column.name: column for column in declared.columns}
    heads = zip(said["columns"], unit, strict=True)
    asked = [(columns[head], one) for head, one in heads]
    return [
        {column.name: _number(column, cell, one) for (column, one), cell in zip(asked, row, strict=True)}
        for row in value
    ]


def _number(declared: Any, value: Any, unit: str) -> Any:
    if isinstance(declared, Input) and unit:
        return repr(units.convert(float(value), unit, declared.unit))
    return repr(float(value)) if isinstance(declared, Input) else value


def _compare(result: Result, name: str, said: Mapping[str, Any]) -> list[str]:
    found, wanted = result.output(name), said["value"]
    if isinstance(wanted, str | bool):
        same = found.value == (wanted if isinstance(wanted, str) else str(int(wanted)))
        return [] if same else [f"{name} is {found.value}, not {wanted}"]
    value = units.convert(float(found.value), found.unit, said.get("unit", "") or found.unit)
    slack = said["abs"] if "abs" in said else abs(wanted) * said.get("rel", 1e-9)
    return [] if abs(value - wanted) <= slack else [f"{name} is {value:.9g}, not {wanted} within {slack:g}"]
