"""When a check applies: a small readable condition on the facts of a conversion, read without running it.

Allowed: names of facts, `always`, `not`, `and`, `or`, `==`, `!=`, `<`, `<=`, `>`, `>=`, `in` and `not in` with
numbers, texts and lists of them. An unset fact gives "unknown", and an unknown check counts as applying.
"""

import ast
from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Literal

from buildlog.profiles.shapes import Fact, ProfileError

FactValue = bool | int | str | None
Answer = Literal["yes", "no", "unknown"]
Truth = bool | None

SIGNS = (ast.Eq, ast.NotEq, ast.Lt, ast.LtE, ast.Gt, ast.GtE, ast.In, ast.NotIn)
ORDER = (ast.Lt, ast.LtE, ast.Gt, ast.GtE)


@dataclass(frozen=True)
class Condition:
    """A condition as written, the facts it names, and its tree ("always" has none)."""

    text: str
    facts: tuple[str, ...] = ()
    tree: ast.expr | None = field(default=None, repr=False, compare=False)


@dataclass(frozen=True)
class Applies:
    """Whether a check applies: `answer`, the facts looked at, those still missing, and why in words."""

    answer: Answer
    facts: tuple[str, ...]
    missing: tuple[str, ...]
    reason: str

    @property
    def counts(self) -> bool:
        """True unless the facts say no: in doubt a check applies."""
        return self.answer != "no"


def parse(text: str) -> Condition:
    """Read a condition; ProfileError when it holds anything but the allowed words."""
    text = text.strip()
    if text == "always":
        return Condition(text="always")
    try:
        tree = ast.parse(text, mode="eval").body
    except (SyntaxError, ValueError, RecursionError) as error:
        raise ProfileError(f"the condition '{text}' cannot be read") from error
    _allow(tree, text)
    names = dict.fromkeys(node.id for node in ast.walk(tree) if isinstance(node, ast.Name))
    return Condition(text=text, facts=tuple(names), tree=tree)


def _allow(node: ast.expr, text: str) -> None:
    match node:
        case ast.Name():
            return
        case ast.UnaryOp(op=ast.Not(), operand=inner):
            _allow(inner, text)
        case ast.BoolOp(values=parts):
            for part in parts:
                _allow(part, text)
        case ast.Compare(left=ast.Name(), ops=[sign], comparators=[other]):
            _allow_operand(sign, other, text)
        case _:
            raise ProfileError(f"the condition '{text}' uses '{ast.unparse(node)}', which is not allowed here")


def _allow_operand(sign: ast.cmpop, other: ast.expr, text: str) -> None:
    listed = isinstance(other, ast.Tuple | ast.List)
    if listed != isinstance(sign, ast.In | ast.NotIn) or not isinstance(sign, SIGNS):
        raise ProfileError(f"the condition '{text}' compares with '{ast.unparse(other)}' in a way not allowed here")
    for value in other.elts if isinstance(other, ast.Tuple | ast.List) else [other]:
        # bool is an int in Python; a yes-or-no fact stands alone and is never compared
        if not isinstance(value, ast.Constant) or type(value.value) not in (int, str):
            raise ProfileError(f"the condition '{text}' compares with '{ast.unparse(value)}', not a number or a text")


def _values(other: ast.expr) -> tuple[int | str, ...]:
    """The numbers or texts a fact is compared with; `_allow` has seen that there is nothing else."""
    nodes = other.elts if isinstance(other, ast.Tuple | ast.List) else [other]
    found = [node.value for node in nodes if isinstance(node, ast.Constant)]
    return tuple(value for value in found if isinstance(value, int | str))


def check_facts(condition: Condition, facts: Mapping[str, Fact]) -> None:
    """Raise ProfileError where a condition names an undeclared fact, option or comparison of the wrong kind."""
    if condition.tree is not None:
        _check_node(condition.tree, condition.text, facts)


def _check_node(node: ast.expr, text: str, facts: Mapping[str, Fact]) -> None:
    match node:
        case ast.Name(id=name):
            if _declared(name, text, facts).kind != "yes_no":
                raise ProfileError(f"the condition '{text}' uses {name} as a yes or no, which it is not")
        case ast.UnaryOp(operand=inner):
            _check_node(inner, text, facts)
        case ast.BoolOp(values=parts):
            for part in parts:
                _check_node(part, text, facts)
        case ast.Compare(left=ast.Name(id=name), ops=[sign], comparators=[other]):
            _check_comparison(_declared(name, text, facts), sign, _values(other), text)


def _declared(name: str, text: str, facts: Mapping[str, Fact]) -> Fact:
    if name not in facts:
        raise ProfileError(f"the condition '{text}' names {name}, which is not a declared fact")
    return facts[name]


def _check_comparison(fact: Fact, sign: ast.cmpop, values: tuple[int | str, ...], text: str) -> None:
    wanted: type = int if fact.kind == "count" else str
    if fact.kind == "yes_no" or any(not isinstance(value, wanted) for value in values):
        raise ProfileError(f"the condition '{text}' compares {fact.key} with something of another kind")
    if isinstance(sign, ORDER) and fact.kind != "count":
        raise ProfileError(f"the condition '{text}' orders {fact.key}, which is not a number")
    unknown = [value for value in values if fact.kind == "choice" and value not in fact.option_words]
    if unknown:
        raise ProfileError(f"the condition '{text}' names the option {unknown[0]}, which {fact.key} does not have")


def judge(condition: Condition, stated: Mapping[str, FactValue], facts: Mapping[str, Fact]) -> Applies:
    """Say whether a condition holds for the stated facts of one conversion.

    stated: fact key to value; None, empty text or no key at all is "not stated yet".
    """
    if condition.tree is None:
        return Applies("yes", (), (), "Applies to every conversion.")
    truth = _truth(condition.tree, stated)
    missing = tuple(name for name in condition.facts if _stated(name, stated) is None)
    known = [_say(facts[name], _stated(name, stated)) for name in condition.facts if name not in missing]
    if truth is None:
        labels = ", ".join(facts[name].label.lower() for name in missing)
        reason = f"Counts as applying until this is stated: {labels}."
        return Applies("unknown", condition.facts, missing, reason)
    start = "Applies" if truth else "Does not apply"
    return Applies("yes" if truth else "no", condition.facts, missing, f"{start}: {'; '.join(known)}.")


def _stated(name: str, stated: Mapping[str, FactValue]) -> FactValue:
    value = stated.get(name)
    return None if value == "" else value


def _say(fact: Fact, value: FactValue) -> str:
    if isinstance(value, bool):
        word = "yes" if value else "no"
    else:
        word = fact.option_words.get(str(value), str(value))
    return f"{fact.label.lower()}: {word}"


def _truth(node: ast.expr, stated: Mapping[str, FactValue]) -> Truth:
    """Three-valued truth: None where the answer hangs on a fact that is not stated."""
    match node:
        case ast.Name(id=name):
            value = _stated(name, stated)
            return None if value is None else bool(value)
        case ast.UnaryOp(operand=inner):
            truth = _truth(inner, stated)
            return None if truth is None else not truth
        case ast.BoolOp(op=joint, values=parts):
            return _joined(isinstance(joint, ast.And), [_truth(part, stated) for part in parts])
        case ast.Compare(left=ast.Name(id=name), ops=[sign], comparators=[other]):
            return _compared(_stated(name, stated), sign, _values(other))
    raise ProfileError(f"'{ast.unparse(node)}' is not allowed in a condition")


def _joined(every: bool, truths: list[Truth]) -> Truth:
    # one certain "no" settles an "and", one certain "yes" settles an "or", whatever is still unknown
    if (not every) in truths:
        return not every
    return None if None in truths else every


def _compared(value: FactValue, sign: ast.cmpop, others: tuple[int | str, ...]) -> Truth:
    if value is None:
        return None
    if isinstance(sign, ast.Eq | ast.In):
        return value in others
    if isinstance(sign, ast.NotEq | ast.NotIn):
        return value not in others
    limit = others[0]
    if isinstance(value, str) or isinstance(limit, str):
        return None
    match sign:
        case ast.Lt():
            return value < limit
        case ast.LtE():
            return value <= limit
        case ast.Gt():
            return value > limit
    return value >= limit
