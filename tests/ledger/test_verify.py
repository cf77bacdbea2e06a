"""What verify finds: every change by hand, and nothing in a record that only actions wrote."""

import pytest
from django.db import connection, transaction
from django.db.utils import DatabaseError

from buildlog.aircraft.models import Member
from buildlog.ledger import actions, guards, queries, verify
from buildlog.ledger.models import Event
from tests import make

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    row = make.aircraft()
    for number in range(5):
        make.section(aircraft=row, title=f"Section {number}")
    return row


def by_hand(sql: str, *values: object) -> None:
    """Change the database behind the guards' back, as a person with the file could."""
    guards.drop()
    with connection.cursor() as cursor:
        cursor.execute(sql, values)
    guards.make()


def texts() -> list[str]:
    return [finding.text for finding in verify.check()[1]]


def test_a_record_written_by_actions_has_no_findings(aircraft):
    assert texts() == []


@pytest.mark.parametrize("column", ["kind", "at", "body", "prev", "hash", "actor", "subject"])
def test_a_changed_cell_of_an_event_is_found(aircraft, column):
    other = "2020-01-01T00:00:00.000000Z" if column == "at" else "ab" * 16
    by_hand(f"UPDATE ledger_event SET {column} = %s WHERE chain = %s AND seq = 2", other, aircraft.id.hex)
    assert texts()


def test_a_changed_body_is_found(aircraft):
    by_hand("UPDATE ledger_body SET body = replace(body, 'Section 3', 'Section 9')")
    assert "What this event says was changed." in texts()


def test_a_removed_event_is_found(aircraft):
    event = Event.objects.get(chain=aircraft.id, seq=3)
    by_hand("DELETE FROM ledger_body WHERE event_id = %s", event.pk)
    by_hand("DELETE FROM ledger_event WHERE id = %s", event.pk)
    assert "Event 3 is missing before this one." in texts()


def test_a_row_changed_by_hand_is_found(aircraft):
    by_hand("UPDATE buildlog_section SET title = 'Other' WHERE title = 'Section 2'")
    assert any("is not as its last event says" in text for text in texts())


def test_a_row_removed_by_hand_is_found(aircraft):
    by_hand("DELETE FROM buildlog_section WHERE title = 'Section 2'")
    assert any("its row is gone" in text for text in texts())


def test_a_row_without_an_event_is_found(aircraft):
    Member.objects.create(aircraft=aircraft, user=make.user(), role="viewer", started_on=aircraft.started_on)
    assert any("has no event" in text for text in texts())


def test_a_missing_guard_is_found(aircraft):
    with connection.cursor() as cursor:
        cursor.execute("DROP TRIGGER g_event_no_update")
    assert "Guard g_event_no_update is missing." in texts()


def test_an_anchor_kept_elsewhere_shows_a_rewritten_chain(aircraft):
    anchor = queries.head(aircraft).anchor
    assert verify.check([anchor])[1] == []
    wrong = anchor[:-4] + "0000"
    assert [finding.text for finding in verify.check([wrong])[1]] == [
        "The record does not hold the event that this anchor names."
    ]


@pytest.mark.parametrize(
    "attack",
    [
        "UPDATE ledger_event SET kind = 'x'",
        "DELETE FROM ledger_event",
        "UPDATE ledger_body SET body = '{}'",
        "DELETE FROM ledger_body",
        "INSERT OR REPLACE INTO ledger_event SELECT id, chain, seq, v, 'x', subject, ref_seq, actor, at, body, prev,"
        " hash FROM ledger_event WHERE seq = 1",
        "INSERT INTO ledger_event (chain, seq, v, kind, at, body, prev, hash)"
        " SELECT chain, 99, 1, 'x', at, body, prev, 'f' FROM ledger_event WHERE seq = 1",
        "UPDATE ledger_event SET seq = seq + 100",
        "DELETE FROM buildlog_section",
        "DELETE FROM buildlog_user",
    ],
)
def test_the_database_refuses_what_no_action_does(aircraft, attack):
    with pytest.raises(DatabaseError), transaction.atomic(), connection.cursor() as cursor:
        cursor.execute(attack)


@pytest.mark.django_db(transaction=True)
def test_an_event_outside_a_transaction_is_refused():
    with pytest.raises(RuntimeError):
        actions.write(aircraft=None, by=None, kind="x.done", about=None, text="x")
