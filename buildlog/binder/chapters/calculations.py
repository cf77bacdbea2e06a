"""Calculation sheets: every kept run with its inputs, steps, verdict, plot and source; superseded ones as history."""

from collections.abc import Mapping
from typing import Any

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.calcs.queries import snapshot_views
from buildlog.drawing.charts import plot


def context(book: Book) -> Mapping[str, Any]:
    """Return the runs, those that stand first, each with its drawing."""
    views = sorted(snapshot_views(book.aircraft), key=lambda view: view.is_superseded)
    return {"sheets": [(view, plot(view.result.plot) if view.result.plot else "") for view in views]}


CHAPTER = Chapter("calculations", "Calculations", 10, context)
