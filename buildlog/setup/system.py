"""Libraries and programs that come from the system: installed where that is ours to do, named otherwise."""

import ctypes
import os
import shutil
import subprocess
from collections.abc import Sequence

LIBRARIES = {
    "libpango-1.0.so.0": "libpango-1.0-0",
    "libpangoft2-1.0.so.0": "libpangoft2-1.0-0",
    "libharfbuzz-subset.so.0": "libharfbuzz-subset0",
}


def missing_libraries() -> list[str]:
    """Return the Debian packages of the libraries that printing needs and this machine lacks."""
    return [package for name, package in LIBRARIES.items() if not _loads(name)]


def _loads(name: str) -> bool:
    try:
        ctypes.CDLL(name)
    except OSError:
        return False
    return True


def browser() -> str | None:
    """Return the path of the browser that the tests drive."""
    return shutil.which("chromium")


def install(packages: Sequence[str]) -> bool:
    """Install Debian packages when this is Debian and we are root; otherwise print the one command. True when done."""
    command = f"apt-get install -y --no-install-recommends {' '.join(packages)}"
    if shutil.which("apt-get") is None or os.geteuid() != 0:
        print(f"Missing on this machine: {', '.join(packages)}. Type: sudo {command}", flush=True)
        return False
    print(f"Installing from Debian: {', '.join(packages)}", flush=True)
    quiet = {**os.environ, "DEBIAN_FRONTEND": "noninteractive"}
    for one in ("apt-get update -q", command):
        if subprocess.run(one.split(), env=quiet, stdout=subprocess.DEVNULL, check=False).returncode:
            print(f"That did not work; type it yourself: {command}", flush=True)
            return False
    return True
