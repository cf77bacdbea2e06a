"""The process is killed at every point of a save: nothing acknowledged is lost, and no row is without its file."""

import os
import signal
import sqlite3
import subprocess
import sys
from pathlib import Path

import pytest

from tests.makers.files import jpeg

ROOT = Path(__file__).resolve().parents[2]
PREPARE = """
from tests import make
from buildlog.aircraft.models import Aircraft
aircraft = make.aircraft(serial="KILL")
"""
PHOTO = """
from pathlib import Path
from buildlog.aircraft.models import Aircraft
from buildlog.files.actions import store_photo
from tests import make
from tests.makers.files import upload
aircraft = Aircraft.objects.get(serial="KILL")
by = make.builder_of(aircraft)
store_photo(aircraft=aircraft, by=by, upload=upload(Path(PICTURE).read_bytes()))
print("saved")
"""
ENTRY = """
from uuid import UUID
from buildlog.aircraft.models import Aircraft
from buildlog.shop.actions import close_entry, log_entry
from tests import make
from tests.makers.shop import draft
aircraft = Aircraft.objects.get(serial="KILL")
by = make.builder_of(aircraft)
entry = log_entry(aircraft=aircraft, by=by, client_id=UUID(int=7), draft=draft())
print("kept")
close_entry(aircraft=aircraft, by=by, entry=entry)
print("saved")
"""


class Shop:
    """A real database file and store, worked on by processes that can be killed."""

    def __init__(self, folder: Path) -> None:
        self.folder = folder
        self.picture = folder / "picture.jpg"
        self.picture.write_bytes(jpeg())
        self.django("migrate", "--verbosity=0")
        self.run(PREPARE)

    def _environment(self, die_at: str) -> dict[str, str]:
        more = {"BUILDLOG_DATA": str(self.folder), "DJANGO_SETTINGS_MODULE": "buildlog.settings"}
        return {**os.environ, **more, "BUILDLOG_DIE_AT": die_at, "PYTHONPATH": str(ROOT)}

    def django(self, *arguments: str) -> subprocess.CompletedProcess[str]:
        command = [sys.executable, "-m", "django", *arguments]
        return subprocess.run(command, cwd=ROOT, env=self._environment(""), capture_output=True, text=True, check=False)

    def run(self, script: str, die_at: str = "") -> subprocess.CompletedProcess[str]:
        head = f"import django\ndjango.setup()\nPICTURE = {str(self.picture)!r}\n"
        return subprocess.run(
            [sys.executable, "-c", head + script],
            cwd=ROOT,
            env=self._environment(die_at),
            capture_output=True,
            text=True,
            check=False,
        )

    def count(self, table: str) -> int:
        connection = sqlite3.connect(self.folder / "buildlog.sqlite3")
        found = connection.execute(f"SELECT COUNT(*) FROM {table}").fetchone()[0]
        connection.close()
        return int(found)


@pytest.fixture(scope="module")
def shop(tmp_path_factory) -> Shop:
    return Shop(tmp_path_factory.mktemp("kill"))


@pytest.mark.parametrize("die_at", ["part-written", "part-synced", "linked", "stored", "before-commit", "committed"])
def test_a_photo_killed_on_its_way_is_whole_or_not_there(shop, die_at):
    shop.picture.write_bytes(jpeg())
    before = shop.count("buildlog_photo")
    killed = shop.run(PHOTO, die_at)
    assert killed.returncode == -signal.SIGKILL, killed.stderr
    assert shop.count("buildlog_photo") == before + (die_at == "committed")
    assert shop.django("verify", "--files").returncode == 0
    again = shop.run(PHOTO)
    assert "saved" in again.stdout, again.stderr
    assert shop.count("buildlog_photo") == before + 1
    assert shop.django("verify", "--files").returncode == 0


@pytest.mark.parametrize("die_at", ["entry-row", "before-commit", "entry-event"])
def test_an_entry_killed_on_its_way_is_whole_or_not_there(tmp_path, die_at):
    shop = Shop(tmp_path)
    killed = shop.run(ENTRY, die_at)
    assert killed.returncode == -signal.SIGKILL, killed.stderr
    assert shop.count("buildlog_entry") == ("kept" in killed.stdout)
    assert shop.django("verify").returncode == 0
    assert "saved" in shop.run(ENTRY).stdout
    assert (shop.count("buildlog_entry"), shop.count("buildlog_labourline")) == (1, 1)
    assert shop.django("verify").returncode == 0
