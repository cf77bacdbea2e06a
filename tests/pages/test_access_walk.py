"""Every page × every role × looking and sending: nobody gets in by a page that was forgotten."""

from collections import Counter
from dataclasses import dataclass
from uuid import UUID

import pytest
from django.db import transaction
from django.test import Client
from django.urls import reverse

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import CHAPTERS, RIGHTS, Act, Role, may
from tests import make
from tests.makers.aircraft import review_link
from tests.pages.walk import Page, argument, pages, unknown_id

PAGES = pages()
by_name = pytest.mark.parametrize("page", PAGES, ids=lambda page: page.name or page.route)
of_aircraft = pytest.mark.parametrize("page", [p for p in PAGES if p.of_aircraft], ids=lambda page: page.name)
with_rows = pytest.mark.parametrize("page", [p for p in PAGES if p.of_aircraft and p.rows], ids=lambda page: page.name)
# Whoever makes another page public has to say so here.
PUBLIC = {
    "first-run",
    "healthz",
    "invitation-take",
    "light-set",
    "review-enter",
    "sign-in",
    "sign-in-code",
    "sign-out",
}
MEMBERS = ("builder", "helper", "assist", "inspector", "viewer")
EVERYBODY = (*MEMBERS, "link", "stranger", "anonymous", "site-admin")
# The table of rights once more, by hand: a slip in the one that the pages use is found here.
RIGHTS_BY_HAND = {
    "read": {"builder", "helper", "assist", "inspector", "viewer", "link"},
    "original": {"builder", "helper", "assist", "inspector"},
    "log": {"builder", "helper", "assist", "inspector"},
    "amend": {"builder", "helper", "assist", "inspector"},
    "plan": {"builder"},
    "sign": {"builder", "helper", "assist"},
    "inspect": {"inspector"},
    "comment": {"builder", "helper", "assist", "inspector", "viewer"},
    "fetch": {"builder", "inspector"},
    "manage": {"builder"},
}


# Pages that give rights or decide what is looked at, with the acts they must ask for, by hand.
ACTS_BY_HAND = {
    "binder-print": (Act.MANAGE, Act.MANAGE),
    "binder-download": (Act.FETCH, None),
    "people": (Act.MANAGE, None),
    "member-edit": (Act.MANAGE, Act.MANAGE),
    "member-end": (Act.MANAGE, Act.MANAGE),
    "invitation-add": (Act.MANAGE, Act.MANAGE),
    "invitation-revoke": (Act.MANAGE, Act.MANAGE),
    "review-link-add": (Act.MANAGE, Act.MANAGE),
    "review-link-revoke": (Act.MANAGE, Act.MANAGE),
    "aircraft-edit": (Act.MANAGE, Act.MANAGE),
    "conversion": (Act.READ, Act.PLAN),
    "sections": (Act.READ, Act.PLAN),
    "zones": (Act.READ, Act.PLAN),
    "section-edit": (Act.PLAN, Act.PLAN),
    "zone-edit": (Act.PLAN, Act.PLAN),
    "photo-original": (Act.ORIGINAL, None),
}


# Pages whose address names a word that is the same for every aircraft.
NAMES_NO_ROW = {"calculation-run"}
# Pages that a role may call, but on rows of its own only; the rows of the walk are the builder's.
ON_OWN_ROWS = {"entry-edit": {"helper", "assist", "inspector"}, "photo-original": {"helper", "assist"}}


@dataclass(frozen=True)
class Site:
    """One aircraft with somebody in every role."""

    aircraft: Aircraft
    clients: dict[str, Client]


@pytest.fixture
def site(db) -> Site:
    aircraft = make.aircraft()
    clients = {role: Client() for role in EVERYBODY}
    clients["builder"].force_login(make.builder_of(aircraft))
    for role in MEMBERS[1:]:
        person = make.user(name=f"The {role}")
        make.member(aircraft=aircraft, user=person, role=role)
        clients[role].force_login(person)
    clients["stranger"].force_login(make.builder_of(make.aircraft()))
    admin = make.user(name="The host")
    type(admin).objects.filter(id=admin.id).update(is_site_admin=True)
    clients["site-admin"].force_login(admin)
    _enter_by_link(clients["link"], aircraft, tuple(CHAPTERS))
    return Site(aircraft, clients)


def _enter_by_link(client: Client, aircraft: Aircraft, chapters: tuple[str, ...]) -> None:
    offer = review_link(aircraft=aircraft, chapters=chapters)
    assert client.post(reverse("review-enter"), {"token": offer.secret}).status_code == 303


def _answer(client: Client, method: str, url: str) -> int:
    """Return the status of one request, with everything it changed taken back."""
    before = transaction.savepoint()
    answer = client.get(url) if method == "GET" else client.post(url)
    transaction.savepoint_rollback(before)
    return answer.status_code


def _expected(page: Page, role: str, method: str) -> set[int]:
    done = set(range(200, 400)) if method == "GET" else {*range(200, 400), 409, 422}
    rule = page.rule
    assert rule is not None
    if rule.audience == "public":
        return done | {405}
    if role == "anonymous" or (role == "link" and not page.of_aircraft):
        return {302} if method == "GET" else {401}
    if rule.audience == "signed-in":
        return done | {405}
    if rule.audience == "admin":
        return done | {405} if role == "site-admin" else {403}
    if role in {"stranger", "site-admin"}:
        return {404}
    act = rule.read if method == "GET" else rule.write
    if act is None:
        return {405}
    if role in ON_OWN_ROWS.get(page.name, set()):
        return {403}
    return done if may(role, act) else {403}


def test_every_page_has_a_name_of_its_own_and_a_rule():
    assert [page.route for page in PAGES if not page.name] == []
    assert [name for name, times in Counter(page.name for page in PAGES).items() if times > 1] == []
    assert [page.name for page in PAGES if page.rule is None] == []


def test_public_pages_are_the_ones_listed_by_hand():
    assert {page.name for page in PAGES if page.rule and page.rule.audience == "public"} == PUBLIC


def test_pages_of_an_aircraft_are_guarded_as_such():
    assert [page.name for page in PAGES if page.of_aircraft != (page.rule and page.rule.audience == "aircraft")] == []


def test_chapters_named_by_pages_are_chapters_of_links():
    assert {page.rule.chapter for page in PAGES if page.rule} - set(CHAPTERS) == {""}


def test_rights_are_as_written_by_hand():
    assert {act.value: {role.value for role in roles} for act, roles in RIGHTS.items()} == RIGHTS_BY_HAND
    assert set(RIGHTS) == set(Act)
    assert not any(Role.LINK in roles for act, roles in RIGHTS.items() if act is not Act.READ)


def test_pages_of_weight_ask_for_the_acts_written_by_hand():
    found = {page.name: (page.rule.read, page.rule.write) for page in PAGES if page.name in ACTS_BY_HAND and page.rule}
    assert found == {name: ACTS_BY_HAND[name] for name in found}
    assert "people" in found


def test_nobody_writes_who_only_may_read():
    assert [page.name for page in PAGES if page.rule and page.rule.write in {Act.READ, Act.ORIGINAL}] == []


@by_name
@pytest.mark.parametrize("method", ["GET", "POST"])
def test_each_role_gets_what_the_rule_says(site, page, method):
    url, wrong = page.url(site.aircraft), {}
    for role in EVERYBODY:
        if (status := _answer(site.clients[role], method, url)) not in _expected(page, role, method):
            wrong[role] = status
    assert wrong == {}, f"{method} {page.name}"


@of_aircraft
def test_a_link_without_the_chapter_opens_nothing(site, page):
    chapter = page.rule.chapter
    other = Client()
    _enter_by_link(other, site.aircraft, tuple(key for key in CHAPTERS if key != chapter))
    status = _answer(other, "GET", page.url(site.aircraft))
    if chapter:
        assert status == 404
    else:
        assert status in _expected(page, "link", "GET")


@with_rows
def test_rows_of_another_aircraft_are_not_found(site, page):
    theirs = make.aircraft()
    ids = {word: value for word, value in _rows(page, theirs).items() if isinstance(value, UUID)}
    if not ids:
        assert page.name in NAMES_NO_ROW
        return
    values = _rows(page, site.aircraft) | ids
    url = reverse(page.name, kwargs=values | {"aircraft_id": site.aircraft.id})
    for role in MEMBERS:
        for method in ("GET", "POST"):
            expected = _expected(page, role, method)
            own_rows = role in ON_OWN_ROWS.get(page.name, set())
            wanted = expected if expected == {405} or (expected == {403} and not own_rows) else {404}
            assert _answer(site.clients[role], method, url) in wanted, f"{role} {method}"


def _rows(page: Page, aircraft: Aircraft) -> dict[str, object]:
    return {word: argument(page, word, aircraft) for word in page.rows}


@of_aircraft
@pytest.mark.parametrize("wrong", ["nonsense", "0", "%00", str(unknown_id())], ids=["word", "digit", "nul", "unknown"])
def test_wrong_ids_are_not_found(site, page, wrong):
    url = page.url(site.aircraft)
    assert _answer(site.clients["builder"], "GET", url.replace(str(site.aircraft.id), wrong)) == 404
    for word, value in _rows(page, site.aircraft).items():
        if isinstance(value, UUID):
            address = reverse(
                page.name, kwargs=_rows(page, site.aircraft) | {"aircraft_id": site.aircraft.id, word: value}
            )
            status = _answer(site.clients["builder"], "GET", address.replace(str(value), wrong))
            assert status == 404 or (page.rule.read is None and status == 405)
