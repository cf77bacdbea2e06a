"""Words of the printed binder: pages of other chapters, digests in groups, codes of records, photos by digest."""

from typing import Any

from django import template
from django.db.models import Model
from django.utils.html import format_html
from django.utils.safestring import SafeString

from buildlog.binder.codes import code_of
from buildlog.files.models import Photo

register = template.Library()


@register.filter
def groups(digest: str, signs: int = 64) -> str:
    """Return the first signs of a digest in groups of four, as people compare them."""
    return " ".join(digest[at : at + 4] for at in range(0, min(signs, len(digest)), 4))


@register.filter
def code(row: Model) -> str:
    """Return the short code of a record, as the binder names it and the search finds it."""
    return code_of(row)


@register.simple_tag(takes_context=True)
def page(context: dict[str, Any], anchor: str) -> SafeString:
    """Return the page on which an anchor of another chapter stands, as a link; empty when it is not in this print."""
    number = context["where"].get(anchor)
    return format_html('<a href="binder:#{}">{}</a>', anchor, number) if number else SafeString("")


@register.simple_tag(takes_context=True)
def photo(context: dict[str, Any], row: Photo) -> SafeString:
    """Return the picture of a photo; its derivative is handed to the print under the digest of the original."""
    digest = row.blob.sha256
    path = context["book"].picture(row)
    if path is None:
        return format_html("<p><b>Original does not match its digest.</b> {}</p>", digest[:12])
    return format_html('<img src="photo:{}" alt="{}">', digest, row.caption or "Photo")
