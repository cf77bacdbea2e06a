"""From a record to one PDF: every chapter's page is filled, laid out, and joined in its place."""

import shutil
from collections.abc import Callable, Iterator
from concurrent.futures import Future, ProcessPoolExecutor
from dataclasses import dataclass
from pathlib import Path

from django.conf import settings
from django.template.loader import render_to_string

from buildlog.binder import chapters
from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.binder.join import Part, join
from buildlog.binder.pdf import Laid, Sheet, lay_out
from buildlog.profiles import load
from buildlog.registry import collect

PROCESSES = 2
Tell = Callable[[str], None]


@dataclass(frozen=True)
class Waiting:
    """A chapter handed to a layout process."""

    chapter: Chapter
    path: Path
    laid: Future[Laid]


def every_chapter() -> list[Chapter]:
    """Return all chapters by order."""
    return sorted(collect(chapters, "CHAPTER").values(), key=lambda chapter: chapter.order)


def chosen(book: Book) -> list[Chapter]:
    """Return the chapters of this issue: all, less what its jurisdiction or the person printing left out."""
    left_out = {*load.jurisdictions()[book.aircraft.jurisdiction].leave_out, *book.issue.leave_out}
    return [chapter for chapter in every_chapter() if chapter.key not in left_out]


def assemble(book: Book, out: Path, folder: Path, tell: Tell) -> int:
    """Write the binder to `out` and return its number of pages; `folder` takes the chapters, `tell` the progress.

    Chapters that name pages of others (contents, summary, annex) are laid out when those pages are known.
    """
    wanted = chosen(book)
    book.chapters = wanted
    early, late = [c for c in wanted if not c.late], [c for c in wanted if c.late]
    folder.mkdir(parents=True, exist_ok=True)
    with ProcessPoolExecutor(PROCESSES) as pool:
        parts = list(_lay(book, early, folder, pool, tell))
        for part in parts:
            book.pages[part.number] = part.pages
            book.where |= {name: f"{part.number}-{page + 1}" for name, (page, _, _) in part.anchors.items()}
        parts += _lay(book, late, folder, pool, tell)
    tell("Joining the chapters")
    parts.sort(key=lambda part: part.number)
    attached = {"ledger.jsonl": book.ledger_lines}
    pages = join(parts, out, title=f"Inspection binder, {book.aircraft}, issue {book.issue.number}", attached=attached)
    shutil.rmtree(folder)
    return pages


def _lay(book: Book, wanted: list[Chapter], folder: Path, pool: ProcessPoolExecutor, tell: Tell) -> Iterator[Part]:
    waiting = []
    for chapter in wanted:
        tell(f"Chapter {chapter.order}, {chapter.title}")
        path = folder / f"{chapter.order:02}-{chapter.key}.pdf"
        waiting.append(Waiting(chapter, path, pool.submit(lay_out, _sheet(book, chapter), path)))
    for one in waiting:
        laid = one.laid.result()
        yield Part(one.chapter.order, one.chapter.title, one.path, laid.pages, laid.anchors)


def _sheet(book: Book, chapter: Chapter) -> Sheet:
    book.photo_files.clear()
    context = {"book": book, "aircraft": book.aircraft, "chapter": chapter, "where": book.where}
    html = render_to_string(f"binder/chapters/{chapter.key}.html", {**context, **chapter.context(book)})
    return Sheet(html, _styles(book), dict(book.photo_files), settings.ROOT / "static")


def _styles(book: Book) -> tuple[Path, ...]:
    names = ["binder", "binder_marks", "binder_log", f"paper_{book.issue.paper}"]
    if book.is_working_copy:
        names.append("working_copy")
    return tuple(settings.ROOT / "static" / "css" / f"{name}.css" for name in names)
