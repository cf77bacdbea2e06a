"""Papers, photos, batches, parts and where they were installed."""

from collections.abc import Iterator
from datetime import datetime, timedelta
from functools import partial

from django.core.files.uploadedfile import SimpleUploadedFile

from buildlog.demo.cast import Cast, Step
from buildlog.demo.clock import moment
from buildlog.demo.papers import paper
from buildlog.demo.pictures import Drawn
from buildlog.demo.story import Row, Snap, Story
from buildlog.files import actions as files
from buildlog.ledger.ids import uuid7
from buildlog.parts import actions as parts

SENT = timedelta(minutes=4)  # from the shutter to the log page


def steps(story: Story, cast: Cast, drawn: Drawn) -> Iterator[Step]:
    """Yield what came into the shop, each on its day: papers, photos, material, parts."""
    for place, row in enumerate(story.rows("document")):
        at = moment(row["on"], "12:00")
        yield Step(at, place, partial(_document, cast, row, at))
    for place, row in enumerate(story.rows("batch")):
        at = moment(row["received_on"], "12:10")
        yield Step(at, place, partial(_batch, cast, row, at))
    for place, snap in enumerate(story.snaps.values()):
        at = snap.spec.taken + SENT
        yield Step(at, place, partial(_photo, cast, snap, drawn, at))
    for place, row in enumerate(story.rows("part")):
        at = moment(row["on"], "20:00")
        yield Step(at, place, partial(_part, cast, row, at))
        for put in row.get("at", []):
            done = moment(put["on"], "21:50")
            yield Step(done, place, partial(_install, cast, row, put, done))


def _document(cast: Cast, row: Row, at: datetime) -> None:
    page = paper(row["title"], row["lines"], row["dated_on"])
    name = f"scan-{row['dated_on']:%Y%m%d}.pdf"
    cast.documents[row["key"]] = files.store_document(
        aircraft=cast.aircraft,
        by=cast.users[row["by"]],
        upload=SimpleUploadedFile(name, page, "application/pdf"),
        kind=row["kind"],
        title=row["title"],
        number=row["number"],
        dated_on=row["dated_on"],
        at=at,
    )


def _batch(cast: Cast, row: Row, at: datetime) -> None:
    said = {name: value for name, value in row.items() if name != "certificate"}
    said["certificate"] = cast.documents[row["certificate"]] if "certificate" in row else None
    cast.batches[row["code"]] = parts.add_batch(
        aircraft=cast.aircraft, by=cast.builder, client_id=uuid7(), at=at, **said
    )


def _photo(cast: Cast, snap: Snap, drawn: Drawn, at: datetime) -> None:
    spec = snap.spec
    name = f"IMG_{spec.taken:%Y%m%d_%H%M%S}.jpg"
    cast.photos[spec.key] = files.store_photo(
        aircraft=cast.aircraft,
        by=cast.users[snap.by],
        upload=SimpleUploadedFile(name, drawn.pop(spec.key).result(), "image/jpeg"),
        caption=spec.caption,
        shows_builder=spec.shows_builder,
        taken_on=None if spec.camera else spec.taken.date(),
        at=at,
    )


def _part(cast: Cast, row: Row, at: datetime) -> None:
    names = ("serial", "supplier", "inspection_note", "expires_on", "life", "critical", "note")
    cast.parts[row["key"]] = parts.add_part(
        aircraft=cast.aircraft,
        by=cast.users[row["by"]],
        client_id=uuid7(),
        number=row["number"],
        name=row["name"],
        origin=row["origin"],
        received_on=row["on"],
        inspection=row["inspection"],
        batches=[cast.batches[code] for code in row.get("batches", [])],
        documents=[cast.documents[key] for key in row.get("documents", [])],
        at=at,
        **{name: row[name] for name in names if name in row},
    )


def _install(cast: Cast, row: Row, put: Row, at: datetime) -> None:
    parts.install_part(
        aircraft=cast.aircraft,
        by=cast.users[row["by"]],
        part=cast.parts[row["key"]],
        position=put["position"],
        installed_on=put["on"],
        removal_reason=put.get("why", ""),
        at=at,
    )
