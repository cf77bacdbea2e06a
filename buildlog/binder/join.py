"""Chapters joined into one file: outline, page labels, links between chapters, and the ledger attached."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import Any


@dataclass(frozen=True)
class Part:
    """One laid-out chapter: number, title, its file, and where its anchors stand: name -> (page, x, y) [pt]."""

    number: int
    title: str
    path: Path
    pages: int
    anchors: Mapping[str, tuple[int, float, float]]


LINK = b"binder:#"


def join(parts: Sequence[Part], out: Path, *, title: str, attached: Mapping[str, bytes]) -> int:
    """Write all parts as one PDF and return its number of pages.

    A link to `binder:#ID` in a chapter becomes a jump to that anchor, in whichever chapter it stands. Page labels are
    chapter-relative (4-12). `attached` are embedded files by name.
    """
    import pikepdf

    book, starts = pikepdf.new(), []
    for part in parts:
        starts.append(len(book.pages))
        with pikepdf.open(part.path) as source:
            book.pages.extend(source.pages)
    places = _places(book, parts, starts)
    _link(book, places)
    _label(book, parts, starts)
    with book.open_outline() as outline:
        outline.root.extend(
            pikepdf.OutlineItem(f"{part.number} {part.title}", start) for part, start in zip(parts, starts, strict=True)
        )
    for name, content in attached.items():
        book.attachments[name] = content
    book.Root.Lang = pikepdf.String("en")
    book.Root.ViewerPreferences = pikepdf.Dictionary(DisplayDocTitle=True)
    book.docinfo["/Title"] = title
    book.save(out, deterministic_id=True, object_stream_mode=pikepdf.ObjectStreamMode.generate)
    return len(book.pages)


def _places(book: Any, parts: Sequence[Part], starts: Sequence[int]) -> dict[bytes, Any]:
    import pikepdf

    places = {}
    for part, start in zip(parts, starts, strict=True):
        for name, (page, x, y) in part.anchors.items():
            target = book.pages[start + page].obj
            spot = pikepdf.Array([target, pikepdf.Name.XYZ, round(x, 1), round(y, 1), 0])
            places[name.encode()] = book.make_indirect(spot)
    return places


def _link(book: Any, places: Mapping[bytes, Any]) -> None:
    import pikepdf

    for page in book.pages:
        for note in page.obj.get("/Annots", []):
            act = note.get("/A")
            if act is None or act.get("/S") != "/URI" or not bytes(act.URI).startswith(LINK):
                continue
            del note["/A"]
            if (spot := places.get(bytes(act.URI).removeprefix(LINK))) is not None:
                note["/Dest"] = spot
            else:
                note["/F"] = 2  # nothing printed stands there: a dead link is hidden
    names = pikepdf.Array()
    for name in sorted(places):
        names.append(pikepdf.String(name.decode()))
        names.append(places[name])
    book.Root.Names = pikepdf.Dictionary(Dests=book.make_indirect(pikepdf.Dictionary(Names=names)))


def _label(book: Any, parts: Sequence[Part], starts: Sequence[int]) -> None:
    import pikepdf

    labels = pikepdf.Array()
    for part, start in zip(parts, starts, strict=True):
        labels.append(start)
        labels.append(pikepdf.Dictionary(S=pikepdf.Name.D, P=pikepdf.String(f"{part.number}-"), St=1))
    book.Root.PageLabels = book.make_indirect(pikepdf.Dictionary(Nums=labels))
