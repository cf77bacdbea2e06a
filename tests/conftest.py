"""What every test starts from: a data directory of its own, quick passwords, and no network."""

import os
from pathlib import Path

import pytest

os.environ.setdefault("DJANGO_ALLOW_ASYNC_UNSAFE", "true")  # the browser driver runs an event loop of its own


@pytest.fixture(autouse=True)
def store_dir(settings, tmp_path) -> Path:
    """Give the test a store of originals of its own, and hashing that costs nothing."""
    settings.DATA_DIR = tmp_path
    settings.PASSWORD_HASHERS = ["django.contrib.auth.hashers.MD5PasswordHasher"]
    return tmp_path
