"""What the database itself refuses: triggers over the ledger and every table of the record.

Django rebuilds SQLite tables in many migrations, which drops their triggers without a word. So the migrate command
drops all guards first and makes them again afterwards, and a start compares what stands with what is written here.
Triggers use plain columns only, no functions of SQLite's extensions.
"""

from collections.abc import Iterator

from django.apps import apps
from django.db import connection

from buildlog.ledger.models import Record

LEDGER_GUARDS = {
    "g_event_no_update": """CREATE TRIGGER g_event_no_update BEFORE UPDATE ON ledger_event
BEGIN SELECT RAISE(ABORT, 'ledger: an event is never changed'); END""",
    "g_event_no_removal": """CREATE TRIGGER g_event_no_removal BEFORE DELETE ON ledger_event
BEGIN SELECT RAISE(ABORT, 'ledger: an event is never removed'); END""",
    "g_event_in_order": """CREATE TRIGGER g_event_in_order BEFORE INSERT ON ledger_event
WHEN NEW.seq <> (SELECT COALESCE(MAX(seq) + 1, 0) FROM ledger_event WHERE chain = NEW.chain)
  OR NEW.prev <> COALESCE((SELECT hash FROM ledger_event WHERE chain = NEW.chain ORDER BY seq DESC LIMIT 1),
     '0000000000000000000000000000000000000000000000000000000000000000')
  OR EXISTS (SELECT 1 FROM ledger_event WHERE hash = NEW.hash OR id = NEW.id)
BEGIN SELECT RAISE(ABORT, 'ledger: an event comes after the last one of its chain'); END""",
    "g_body_no_update": """CREATE TRIGGER g_body_no_update BEFORE UPDATE ON ledger_body
BEGIN SELECT RAISE(ABORT, 'ledger: what an event says is never changed'); END""",
    "g_body_once": """CREATE TRIGGER g_body_once BEFORE INSERT ON ledger_body
WHEN EXISTS (SELECT 1 FROM ledger_body WHERE event_id = NEW.event_id)
BEGIN SELECT RAISE(ABORT, 'ledger: an event says one thing once'); END""",
    "g_body_erased_by_event": """CREATE TRIGGER g_body_erased_by_event BEFORE DELETE ON ledger_body
WHEN NOT EXISTS (SELECT 1 FROM ledger_event mine JOIN ledger_event later ON later.chain = mine.chain
  AND later.kind = 'body.erase' AND later.ref_seq = mine.seq AND later.seq > mine.seq WHERE mine.id = OLD.event_id)
BEGIN SELECT RAISE(ABORT, 'ledger: a body goes only after an event that says so'); END""",
}


def expected() -> dict[str, str]:
    """Return the text of every guard by name."""
    found = dict(LEDGER_GUARDS)
    for model in apps.get_models():
        if issubclass(model, Record):
            found.update(_of(model))
    return found


def _of(model: type[Record]) -> Iterator[tuple[str, str]]:
    table = model._meta.db_table
    stem = f"g_{table.removeprefix('buildlog_')}"
    if model.guard == "closable":
        yield from _closable(table, stem)
    elif model.guard == "part-of-entry":
        yield from _part_of_entry(table, stem)
    else:
        yield f"{stem}_no_removal", _refuse(f"{stem}_no_removal", table, "DELETE", "nothing of the record is removed")
        if model.guard == "append":
            yield f"{stem}_no_update", _refuse(f"{stem}_no_update", table, "UPDATE", "a row is followed, not changed")


def _refuse(name: str, table: str, event: str, why: str, when: str = "") -> str:
    condition = f"\nWHEN {when}" if when else ""
    return (
        f"CREATE TRIGGER {name} BEFORE {event} ON {table}{condition}\nBEGIN SELECT RAISE(ABORT, '{table}: {why}'); END"
    )


def _closable(table: str, stem: str) -> Iterator[tuple[str, str]]:
    # Closing needs its event: a row frozen without a ledger line would prove nothing.
    closing = (
        "OLD.closed_at IS NULL AND NEW.closed_at IS NOT NULL AND NOT EXISTS "
        "(SELECT 1 FROM ledger_event WHERE subject = NEW.id AND kind = 'entry.closed')"
    )
    for name, event, why, when in (
        (f"{stem}_born_open", "INSERT", "a row starts as a draft", "NEW.closed_at IS NOT NULL"),
        (f"{stem}_frozen", "UPDATE", "a closed row is amended, not changed", "OLD.closed_at IS NOT NULL"),
        (f"{stem}_closed_by_event", "UPDATE", "closing needs its event", closing),
        (f"{stem}_no_removal", "DELETE", "nothing of the record is removed", ""),
    ):
        yield name, _refuse(name, table, event, why, when)


def _part_of_entry(table: str, stem: str) -> Iterator[tuple[str, str]]:
    for event, row in (("INSERT", "NEW"), ("UPDATE", "OLD"), ("DELETE", "OLD")):
        name = f"{stem}_{event.lower()}_open"
        when = f"EXISTS (SELECT 1 FROM buildlog_entry WHERE id = {row}.entry_id AND closed_at IS NOT NULL)"
        yield name, _refuse(name, table, event, "the entry is closed", when)


def standing() -> dict[str, str]:
    """Return the text of every guard that the database holds."""
    with connection.cursor() as cursor:
        cursor.execute("SELECT name, sql FROM sqlite_master WHERE type = 'trigger' AND name LIKE 'g\\_%' ESCAPE '\\'")
        return dict(cursor.fetchall())


def faults() -> list[str]:
    """Return one sentence for each guard that is missing, changed or unknown."""
    want, have = expected(), standing()
    return (
        [f"Guard {name} is missing." for name in want.keys() - have.keys()]
        + [f"Guard {name} is not one of ours." for name in have.keys() - want.keys()]
        + [f"Guard {name} was changed." for name in want.keys() & have.keys() if want[name] != have[name]]
    )


def drop() -> None:
    """Take all guards down, for a migration or for a test's clean-up."""
    with connection.cursor() as cursor:
        for name in standing():
            cursor.execute(f'DROP TRIGGER "{name}"')


def make() -> None:
    """Put every guard up whose table exists."""
    tables = set(connection.introspection.table_names())
    with connection.cursor() as cursor:
        have = standing()
        for name, text in expected().items():
            if name not in have and text.split(" ON ", 1)[1].split()[0] in tables:
                cursor.execute(text)
