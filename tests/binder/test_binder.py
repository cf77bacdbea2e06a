"""The binder: printed in a process of its own, read back with readers that are not ours."""

import subprocess
import sys
from uuid import uuid4

import pikepdf
import pytest
from django.core.management import call_command
from django.urls import reverse

from buildlog.binder import actions
from buildlog.binder.models import BinderIssue
from buildlog.binder.queries import view
from buildlog.files import queries as files
from buildlog.files.store import path_of
from buildlog.ledger import verify
from buildlog.ledger.queries import head
from buildlog.shop import actions as shop
from tests import make
from tests.makers.binder import issue
from tests.makers.calcs import snapshot
from tests.makers.files import photo
from tests.makers.parts import part
from tests.makers.readings import characteristic, reading
from tests.makers.shop import draft, entry, task


@pytest.fixture
def aircraft(transactional_db):
    row = make.aircraft(designation="Sandpiper", serial="0107")
    work = task(aircraft=row, title="Fit the carburettor")
    picture = photo(aircraft=row, caption="Jet well seen from the left")
    first = entry(aircraft=row, task=work, note="Fitted <b>carburettor</b> & lines", photos=[picture])
    corrected = draft(minutes=30, note="Half an hour only", task=work)
    more = {"client_id": uuid4(), "draft": corrected, "amend_reason": "clock ran on"}
    shop.amend_entry(aircraft=row, by=make.builder_of(row), entry=first, **more)
    part(aircraft=row, name="Carburettor", serial="C-118", origin="unknown")
    snapshot(aircraft=row, label="static run")
    reading(characteristic=characteristic(aircraft=row, title="Hub seat diameter"), entered="25.31")
    return row


def text_of(path) -> str:
    """Return the text of a PDF with its lines joined."""
    done = subprocess.run(["pdftotext", "-layout", str(path), "-"], capture_output=True, text=True, check=True)
    return " ".join(done.stdout.split())


@pytest.mark.print
@pytest.mark.parametrize("paper", ["a4", "letter"])
def test_a_printed_binder_holds_what_the_record_says(aircraft, paper):
    anchor = head(aircraft)
    made = actions.make_binder(issue(aircraft=aircraft, paper=paper))
    path = path_of(made.document.blob.sha256)
    with pikepdf.open(path) as book:
        assert len(book.pages) == made.pages
        size = [round(float(side)) for side in book.pages[0].mediabox[2:]]
        assert size == ([595, 842] if paper == "a4" else [612, 792])
        labels = [page.label for page in book.pages]
        assert "0-1" in labels and "4-1" in labels and labels[-1].startswith("25-")
        lines = book.attachments["ledger.jsonl"].get_file().read_bytes().decode().splitlines()
        assert len(lines) == anchor.seq + 2  # the events so far, and the one that asked for this issue
    words = text_of(path)
    digest = aircraft.photos.get().blob.sha256
    for wanted in (
        "Sandpiper, serial 0107",
        "working copy",
        "Fitted <b>carburettor</b> & lines",
        "Half an hour only",
        "Log digest",
        "14 Mar 2026 to 14 Mar 2026",
        "clock ran on",
        "Jet well seen",
        digest[:4],
        "C-118",
        "Parts of unknown origin",
        "47.65",
        "static run",
        "Hub seat diameter",
        "25.31",
        "Readings out of limits",
    ):
        assert wanted in words, wanted
    assert " safe" not in words and "airworthy" not in words
    assert verify.check([f"BL1:{aircraft.id}:{made.head_seq}:{made.head_hash}"])[1] == []
    assert files.file_faults(read=True) == []


@pytest.mark.print
def test_the_command_prints_the_one_aircraft_there_is(aircraft, tmp_path, capsys):
    out = tmp_path / "binder.pdf"
    call_command("binder", out=out)
    assert out.read_bytes().startswith(b"%PDF-") and "Issue 1" in capsys.readouterr().out


def test_serving_never_loads_the_layout_engine():
    script = (
        "import os, sys; os.environ['DJANGO_SETTINGS_MODULE'] = 'buildlog.settings'\n"
        "import buildlog.wsgi\nfrom django.urls import get_resolver\nget_resolver().url_patterns\n"
        "heavy = {'weasyprint', 'pikepdf', 'shapely', 'numpy', 'pint'} & set(sys.modules)\nprint(sorted(heavy))"
    )
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, check=True)
    assert done.stdout.strip() == "[]"


def test_a_page_may_name_only_its_own_files(tmp_path):
    script = (
        "from pathlib import Path\nfrom buildlog.binder.pdf import Sheet, lay_out\n"
        f"lay_out(Sheet('<img src=\"file:///etc/passwd\">', (), {{}}, Path({str(tmp_path)!r})), Path('/dev/null'))"
    )
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, check=False)
    assert done.returncode != 0 and "not one of its own" in done.stderr


def test_a_print_that_fell_silent_says_so(aircraft):
    row = issue(aircraft=aircraft)
    assert view(row).state == "printing"
    later = row.heartbeat_at.replace(year=row.heartbeat_at.year + 1)
    assert view(row, now=later).state == "not-printed"


@pytest.mark.django_db(transaction=True)
def test_printing_asks_for_the_password_and_begins_once(client):
    aircraft = make.aircraft()
    url = reverse("binder-print", args=[aircraft.id])
    client.force_login(make.builder_of(aircraft))
    post = {"client_id": str(uuid4()), "paper": "a4", "password": "wrong"}
    assert client.post(url, post).status_code == 422 and not BinderIssue.objects.exists()
    for _ in range(2):
        assert client.post(url, post | {"password": make.PASSWORD}).status_code in {303, 422}
    row = BinderIssue.objects.get()
    page = client.get(reverse("binder-page", args=[aircraft.id, row.id])).content.decode()
    assert "Waiting for the printer process" in page
