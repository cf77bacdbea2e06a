"""Run a method from the command line."""

import json
from argparse import ArgumentParser, RawDescriptionHelpFormatter
from typing import Any

from django.core.management.base import BaseCommand, CommandError

from buildlog.errors import Refused
from buildlog.methods import units
from buildlog.methods.catalogue import methods
from buildlog.methods.declare import Table
from buildlog.methods.result import Result
from buildlog.methods.run import run

HELP = """Run a calculation: compute KEY name=value[unit] ...

  compute shaft-power torque=175N*m speed=500rpm
  compute tip-mach diameter=193cm speed=2700 mach_limit=0.8

A table takes one argument for each row, cells named and parted by commas:

  compute weighing points=name:nose,gross:340lb,tare:0,arm:-78inch points=name:mains,gross:1666lb,tare:0,arm:0

Without a key it lists the methods. A calculation is an aid: it clears nothing for flight."""


class Command(BaseCommand):
    """Compute once, and print what came out; nothing is stored."""

    help = HELP
    requires_system_checks: list[str] = []

    def create_parser(self, *args: Any, **more: Any) -> Any:
        """Keep the lines of the help as they are."""
        return super().create_parser(*args, formatter_class=RawDescriptionHelpFormatter, **more)

    def add_arguments(self, parser: ArgumentParser) -> None:
        """Take the key, the inputs and --json."""
        parser.add_argument("key", nargs="?")
        parser.add_argument("inputs", nargs="*", metavar="name=value[unit]")
        parser.add_argument("--json", action="store_true", help="print the whole run as JSON")

    def handle(self, *args: Any, **options: Any) -> None:
        """Run, and print outputs, steps and verdicts."""
        if not options["key"]:
            for key, method in methods().items():
                self.stdout.write(f"{key:26} {method.title}")
            return
        if options["key"] not in methods():
            raise CommandError(f"There is no method {options['key']!r}. Known: {', '.join(methods())}.")
        method = methods()[options["key"]]
        try:
            result = run(method, _given(method.inputs, options["inputs"]))
        except Refused as refusal:
            raise CommandError(f"{refusal.field}: {refusal.text}" if refusal.field else refusal.text) from None
        if options["json"]:
            self.stdout.write(
                json.dumps(result.as_recorded() | {"digest": result.digest}, indent=2, ensure_ascii=False)
            )
        else:
            self._say(result)

    def _say(self, result: Result) -> None:
        for one in result.outputs:
            spread = f" ± {one.spread} (k = 2)" if one.spread else ""
            self.stdout.write(f"{one.name} = {one.value}{spread} {units.shown(one.unit)}".rstrip())
        for step in result.steps:
            self.stdout.write(f"  {step}")
        for check in result.checks:
            self.stdout.write(f"{check.text}: {check.words}")
        self.stdout.write(f"Source: {result.source}")
        self.stdout.write(f"Not covered: {result.not_covered}")


def _given(inputs: tuple[Any, ...], said: list[str]) -> dict[str, Any]:
    tables = {one.name for one in inputs if isinstance(one, Table)}
    given: dict[str, Any] = {}
    for one in said:
        name, sign, value = one.partition("=")
        if not sign:
            raise Refused(f"{one!r} is not of the form name=value.")
        if name in tables:
            cells = dict(cell.partition(":")[::2] for cell in value.split(","))
            given.setdefault(name, []).append(cells)
        else:
            given[name] = value
    return given
