"""The demo's story as its fixtures tell it: plain rows, and the description of every photo."""

import tomllib
from dataclasses import dataclass, replace
from pathlib import Path
from typing import Any

from buildlog.demo.clock import moment
from buildlog.demo.spec import PhotoSpec

FOLDER = Path(__file__).resolve().parents[2] / "fixtures" / "demo"
Row = dict[str, Any]


@dataclass(frozen=True)
class Snap:
    """A photo of the story: what is drawn, who took it, and how it is filed."""

    spec: PhotoSpec
    by: str


@dataclass(frozen=True)
class Story:
    """Every table of the fixtures by its name, and the photos by their key; entries hold the keys of theirs."""

    tables: dict[str, Any]
    snaps: dict[str, Snap]

    def rows(self, name: str) -> list[Row]:
        """Return the rows of one table."""
        return list(self.tables[name])


def read_story(folder: Path = FOLDER) -> Story:
    """Read the fixtures. Raises tomllib.TOMLDecodeError for a file that is no TOML, KeyError for a missing table."""
    tables: dict[str, Any] = {}
    for path in sorted(folder.glob("*.toml")):
        for name, said in tomllib.loads(path.read_text(encoding="utf-8")).items():
            tables[name] = [*tables.get(name, []), *said] if isinstance(said, list) else said
    cameras = {person["key"]: person.get("camera", "") for person in tables["person"]}
    snaps: dict[str, Snap] = {}
    for number, entry in enumerate(tables["entry"]):
        entry.setdefault("id", f"e-{number:03}")
        shown = [_snap(row, entry, f"{entry['id']}-{place}") for place, row in enumerate(entry.get("photos", []))]
        entry["photos"] = [snap.spec.key for snap in shown]
        snaps |= {snap.spec.key: snap for snap in shown}
    loose = [_snap({**row, "loose": True}, row, f"loose-{place}") for place, row in enumerate(tables["photo"])]
    snaps |= {snap.spec.key: snap for snap in loose}
    return Story(tables, {key: _with_camera(snap, cameras) for key, snap in snaps.items()})


def _snap(row: Row, whole: Row, key: str) -> Snap:
    said = {name: value for name, value in row.items() if name not in {"at", "on", "by"}}
    said |= {name: tuple(said[name]) for name in ("colour", "lines") if name in said}
    said.setdefault("camera", "as its owner")
    return Snap(PhotoSpec(**{"key": key, **said, "taken": moment(whole["on"], row["at"])}), whole["by"])


def _with_camera(snap: Snap, cameras: dict[str, str]) -> Snap:
    camera = cameras[snap.by] if snap.spec.camera == "as its owner" else snap.spec.camera
    return replace(snap, spec=replace(snap.spec, camera=camera))
