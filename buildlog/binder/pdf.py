"""One chapter laid out: HTML in, PDF out, with where its anchors stand.

WeasyPrint is imported here alone, inside functions, and only in the printing process: importing it makes Pillow accept
truncated photos, which the process that takes photos in must never do.
"""

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from pathlib import Path
from typing import Any

POINTS = 0.75  # points in a CSS pixel


@dataclass(frozen=True)
class Sheet:
    """What a chapter needs to be laid out: its page, its styles, and the files it may name."""

    html: str
    styles: tuple[Path, ...]
    photos: Mapping[str, Path]  # digest of the original -> upright derivative
    assets: Path  # the folder that `asset:` names are looked up in


@dataclass(frozen=True)
class Laid:
    """A laid-out chapter: number of pages, and its anchors: name -> (page from 0, x, y from the page's foot) [pt]."""

    pages: int
    anchors: dict[str, tuple[int, float, float]]


def lay_out(sheet: Sheet, out: Path) -> Laid:
    """Write one chapter to `out`. A page may name `photo:<digest>` and `asset:<name>` only; else it stops."""
    from weasyprint import HTML

    fetch = _fetcher(sheet)
    drawn = HTML(string=sheet.html, base_url="asset:", url_fetcher=fetch).render(
        font_config=_fonts(), stylesheets=[_style(path, sheet.assets) for path in sheet.styles]
    )
    drawn.write_pdf(out, pdf_identifier=b"chapter")
    anchors: dict[str, tuple[int, float, float]] = {}
    for index, page in enumerate(drawn.pages):
        for name, (x, y, *_) in page.anchors.items():
            anchors.setdefault(name, (index, x * POINTS, (page.height - y) * POINTS))
    return Laid(len(drawn.pages), anchors)


def _fetcher(sheet: Sheet) -> Any:
    from weasyprint.urls import FatalURLFetchingError, URLFetcher, URLFetcherResponse

    class Fetcher(URLFetcher):
        def fetch(self, url: str, headers: Any = None) -> Any:
            kind, _, name = url.partition(":")
            if kind == "data":  # the marks in our own stylesheets: bytes in the address, nothing is fetched
                return super().fetch(url, headers)
            path = (
                sheet.photos.get(name) if kind == "photo" else _asset(sheet.assets, name) if kind == "asset" else None
            )
            if path is None:
                raise FatalURLFetchingError(f"A page of the binder asked for {url!r}, which is not one of its own.")
            return URLFetcherResponse(url, path.open("rb"))

    return Fetcher()


def _asset(folder: Path, name: str) -> Path | None:
    path = (folder / name).resolve()
    return path if path.is_relative_to(folder.resolve()) and path.is_file() else None


@cache
def _fonts() -> Any:
    from weasyprint.text.fonts import FontConfiguration

    return FontConfiguration()


@cache
def _style(path: Path, assets: Path) -> Any:
    # Parsed once for each process: parsing it for every chapter costs a quarter of the print.
    from weasyprint import CSS

    nothing = Sheet("", (), {}, assets)
    return CSS(filename=str(path), font_config=_fonts(), url_fetcher=_fetcher(nothing))
