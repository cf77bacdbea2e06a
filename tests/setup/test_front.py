"""The commands before Django is there: environment, lock file, data folder, and start-up checks."""

import os
import re
import socket
import subprocess
import sys
import time
import urllib.request
from pathlib import Path

import pytest

from buildlog.management.commands.check_start import file_system_faults, pragma_faults
from buildlog.setup import environment, front, system

ROOT = Path(__file__).resolve().parents[2]
LOCK = (ROOT / "requirements.lock").read_text()


def manage(*arguments: str, data: Path) -> subprocess.CompletedProcess[str]:
    command = [sys.executable, "manage.py", *arguments, "--data", str(data)]
    environ = {key: value for key, value in os.environ.items() if not key.startswith("BUILDLOG")}
    return subprocess.run(command, cwd=ROOT, env=environ, capture_output=True, text=True, check=False)


def test_the_lock_names_exact_packages_with_digests_and_no_address():
    run, tests = environment.parts(LOCK)
    assert "http" not in LOCK and "django==" in run and "pytest==" in tests and "pytest==" not in run
    for text in (run, tests):
        heads = [line for line in text.splitlines() if re.match(r"[a-z]", line)]
        assert heads and all("==" in line and line.endswith("\\") for line in heads)


def test_another_lock_is_another_environment():
    assert environment.stamp_of("a==1") != environment.stamp_of("a==2")


def test_a_lock_without_parts_is_refused_in_a_sentence():
    with pytest.raises(environment.NotSet, match="no part for tests"):
        environment.parts("django==5.2")


@pytest.mark.parametrize("arguments", [["verify", "--data", "d"], ["--data=d", "verify"]])
def test_the_data_folder_stands_anywhere_in_the_command(arguments, monkeypatch):
    monkeypatch.delenv("BUILDLOG_DATA", raising=False)
    assert front._with_data(arguments) == ["verify"]
    assert os.environ["BUILDLOG_DATA"].endswith("/d")


def test_libraries_this_machine_has_are_not_asked_for(monkeypatch):
    monkeypatch.setattr(system, "LIBRARIES", {"libc.so.6": "libc6", "libno-such.so.9": "libno-such"})
    assert system.missing_libraries() == ["libno-such"]


def test_a_record_on_a_network_file_system_is_refused():
    mounts = "/dev/sda1 / ext4 rw 0 0\nshop:/x /srv/shop nfs4 rw 0 0\n"
    assert file_system_faults(mounts, "/srv/shop/data")[0].endswith("what it acknowledged.")
    assert file_system_faults(mounts, "/srv/other") == []


@pytest.mark.django_db
def test_a_pragma_that_is_not_as_written_is_found(settings):
    # A database in memory has no journal file, and says so.
    assert [fault for fault in pragma_faults() if "journal_mode" not in fault] == []
    assert any("journal_mode is memory" in fault for fault in pragma_faults())


def test_a_folder_that_others_may_read_stops_the_start(tmp_path):
    tmp_path.chmod(0o755)
    done = manage("start", "--prepare", data=tmp_path)
    assert done.returncode == 2 and "chmod 700" in done.stderr and "Traceback" not in done.stderr


def test_start_serves_and_a_second_start_changes_nothing(tmp_path):
    data = tmp_path / "data"
    first = manage("start", "--prepare", data=data)
    assert first.returncode == 0 and "use this code within the hour" in first.stdout, first.stderr
    before = (data / "buildlog.sqlite3").stat().st_size
    with socket.socket() as probe:
        probe.bind(("127.0.0.1", 0))
        port = probe.getsockname()[1]
    command = [sys.executable, "manage.py", "start", "--port", str(port), "--data", str(data)]
    environ = {key: value for key, value in os.environ.items() if not key.startswith("BUILDLOG")}
    with subprocess.Popen(command, cwd=ROOT, env=environ, stdout=subprocess.PIPE, text=True) as server:
        try:
            assert _answers(f"http://127.0.0.1:{port}/healthz")
            taken = manage("start", "--port", str(port), data=data)
            assert taken.returncode == 2 and f"Port {port} is taken" in taken.stderr
        finally:
            server.terminate()
    assert (data / "buildlog.sqlite3").stat().st_size == before
    assert manage("verify", "--files", data=data).returncode == 0


def _answers(url: str) -> bool:
    for _ in range(100):
        try:
            with urllib.request.urlopen(url, timeout=2) as answer:
                return bool(answer.status == 200)
        except OSError:
            time.sleep(0.3)
    return False
