"""The cover: whose aircraft, which issue, the ledger head with its code, what a binder is; and the contents."""

from collections.abc import Mapping
from typing import Any

from buildlog.aircraft.models import Fact, Member
from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.drawing.qr import qr_svg
from buildlog.profiles import load

# Facts of the conversion that a reviewer asks first.
SHOWN = (
    "engine_designation",
    "cylinders",
    "cooling",
    "ignition_systems",
    "mixture_device",
    "feed",
    "drive",
    "propeller_material",
)


def context(book: Book) -> Mapping[str, Any]:
    """Return what the title block and the contents show."""
    stated = dict(Fact.objects.filter(aircraft=book.aircraft).present().values_list("key", "value"))
    facts = load.facts()
    shown = [
        (facts[key].label, facts[key].option_words.get(stated[key], stated[key]))
        for key in SHOWN
        if key in facts and key in stated
    ]
    builders = book.aircraft.members.filter(role=Member.MemberRole.BUILDER).select_related("user")
    return {
        "code": qr_svg(book.head.anchor, title="The ledger head, to compare with the record"),
        "builders": ", ".join(member.user.name for member in builders),
        "facts": shown,
        "contents": [(chapter, book.pages.get(chapter.order)) for chapter in book.chapters],
        "left_out": sorted({*book.jurisdiction.leave_out, *book.issue.leave_out}),
    }


CHAPTER = Chapter("cover", "Cover and contents", 0, context, late=True)
