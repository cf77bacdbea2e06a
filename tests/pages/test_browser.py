"""The whole way in a real browser, with a phone's screen: log work with a photo, and look at every page with axe."""

import datetime as dt

import pytest
from axe_playwright_python.sync_playwright import Axe
from django.urls import reverse
from playwright.sync_api import sync_playwright

from buildlog.parts.actions import install_part
from buildlog.setup.system import browser as installed
from buildlog.shop.models import Entry
from tests import make
from tests.makers.calcs import snapshot
from tests.makers.files import jpeg, photo
from tests.makers.parts import batch, part
from tests.makers.readings import characteristic, reading
from tests.makers.shop import entry, task

pytestmark = [pytest.mark.browser, pytest.mark.django_db(transaction=True)]
PAGES = (
    *("bench", "entry-add", "entries", "tasks", "task-add", "photos", "parts", "part-add", "batches", "documents"),
    *("readings", "characteristic-add", "instruments", "instrument-add", "calculations", "conversion"),
    *("binders", "binder-print", "aircraft-page", "find", "recent-changes", "people"),
)


@pytest.fixture
def chromium():
    with sync_playwright() as playwright:
        path = installed()
        assert path, "Chromium is missing: apt-get install chromium"
        browser = playwright.chromium.launch(executable_path=path, args=["--no-sandbox", "--disable-gpu"])
        yield browser
        browser.close()


@pytest.fixture
def aircraft(transactional_db):
    row = make.aircraft(builder=make.user(sign_in="ada"), designation="Sandpiper", serial="0107")
    work = task(aircraft=row, title="Fit the carburettor")
    entry(aircraft=row, task=work, photos=[photo(aircraft=row, caption="Jet well")])
    entry(aircraft=row, closed=False, minutes=10)
    batch(aircraft=row)
    where = {"position": "carburettor", "installed_on": dt.date(2026, 5, 9)}
    install_part(aircraft=row, by=make.builder_of(row), part=part(aircraft=row), **where)
    snapshot(aircraft=row)
    reading(characteristic=characteristic(aircraft=row))
    return row


def sign_in(page, live_server) -> None:
    page.goto(live_server.url)
    page.fill("[name=sign_in]", "ada")
    page.fill("[name=password]", make.PASSWORD)
    page.locator("main").get_by_role("button", name="Sign in").click()


def test_work_is_logged_from_a_phone_with_a_real_photo(live_server, chromium, aircraft, tmp_path):
    picture = tmp_path / "IMG_0001.jpg"
    picture.write_bytes(jpeg(size=(4000, 3000), orientation=6))
    page = chromium.new_context(viewport={"width": 390, "height": 844}).new_page()
    sign_in(page, live_server)
    page.goto(f"{live_server.url}/a/{aircraft.id}/log/")
    page.get_by_text("1 h", exact=True).click()
    page.set_input_files("#gallery", picture)
    page.fill("[name=note]", "Glued rib 5 to the rear spar")
    page.get_by_role("button", name="Save entry").click()
    page.wait_for_url("**/entries/*/")
    page.get_by_role("button", name="Put on the record").click()
    page.get_by_text("On the record").first.wait_for()
    assert page.locator(".thumbs img").evaluate("image => image.naturalHeight > image.naturalWidth")
    row = Entry.objects.get(note="Glued rib 5 to the rear spar")
    assert row.closed_at and row.photo_links.get().photo.height == 4000


@pytest.mark.parametrize("light", ["day", "night", "sun"])
def test_no_page_fails_axe_or_scrolls_sideways(live_server, chromium, aircraft, light):
    context = chromium.new_context()
    page = context.new_page()
    sign_in(page, live_server)
    context.add_cookies([{"name": "light", "value": light, "url": live_server.url}])
    faults = []
    for name in PAGES:
        for width in (320, 390, 1280):
            page.set_viewport_size({"width": width, "height": 800})
            page.goto(live_server.url + reverse(name, args=[aircraft.id]))
            found = Axe().run(page).response["violations"]
            faults += [(name, width, one["id"], one["nodes"][0]["html"][:120]) for one in found]
            if page.evaluate("document.documentElement.scrollWidth") > width:
                faults.append((name, width, "scrolls sideways", ""))
    assert faults == []
