"""Looking at a picture in a process of its own: what it is, when it was taken, and its derivatives.

A decoder is the likeliest thing to be broken by a hostile file, so it runs with bounded memory and time, and never in
the process that serves.
"""

import json
import subprocess
import sys
from dataclasses import dataclass
from pathlib import Path

from django.conf import settings

from buildlog.errors import Refused

SECONDS = 10
NOT_READABLE = "This picture could not be read whole. Take it again, or choose the original from the camera."


@dataclass(frozen=True)
class Seen:
    """What the decoder said of a picture: kind, upright size, and what its metadata claim (text, not proof)."""

    media_type: str
    width: int
    height: int
    taken: str  # "YYYY:MM:DD HH:MM:SS" as the camera wrote it, or ""
    camera: str


def inspect(path: Path, derived: Path, *, field: str) -> Seen:
    """Decode a picture whole and write its derivatives `320.jpg`, `1000.jpg`, `1600.jpg` into `derived`.

    Raises Refused with a sentence at `field` when it is no picture we take, damaged, or too large.
    """
    derived.mkdir(mode=0o700, parents=True, exist_ok=True)
    command = [sys.executable, "-I", str(Path(__file__).with_name("decode.py")), str(path), str(derived)]
    try:
        done = subprocess.run(command, cwd=settings.ROOT, capture_output=True, timeout=SECONDS, check=False)
    except subprocess.TimeoutExpired:
        raise Refused("This picture takes too long to read.", field=field) from None
    try:
        said = json.loads(done.stdout)
    except ValueError:
        raise Refused(NOT_READABLE, field=field) from None
    if "refused" in said:
        raise Refused(said["refused"], field=field)
    return Seen(**said)
