"""What every test starts from: a data directory of its own, and no network."""

import os
import tempfile
from pathlib import Path

import pytest

# Settings read the environment once, so the data directory is set before Django is.
os.environ["BUILDLOG_DATA"] = tempfile.mkdtemp(prefix="buildlog-test-")
os.environ.setdefault("DJANGO_ALLOW_ASYNC_UNSAFE", "true")  # the browser driver runs an event loop of its own


@pytest.fixture(autouse=True)
def _quick_passwords(settings):
    settings.PASSWORD_HASHERS = ["django.contrib.auth.hashers.MD5PasswordHasher"]


@pytest.fixture
def store_dir(settings, tmp_path) -> Path:
    """A store of originals for one test."""
    settings.DATA_DIR = tmp_path
    return tmp_path
