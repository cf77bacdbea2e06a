"""From a form to an action: shape is the form's, rules are the action's, both speak at the field."""

from collections.abc import Callable
from typing import Any, TypeVar

from django import forms
from django.http import HttpRequest

from buildlog.errors import Refused

T = TypeVar("T")
NOT_EMPTY = "This cannot stay empty."


def run(form: forms.Form, action: Callable[..., T], **more: Any) -> T | None:
    """Call `action` with the form's cleaned values and `more`; None when the form or the action refuses.

    A refusal is put beside its field, or on top of the form when it names none.
    """
    if not form.is_valid():
        return None
    try:
        return action(**form.cleaned_data, **more)
    except Refused as refusal:
        form.add_error(refusal.field if refusal.field in form.fields else None, refusal.text)
        return None


def run_posted(request: HttpRequest, form: forms.Form, action: Callable[..., T], **more: Any) -> T | None:
    """Do the same for a posted form; None for a page that is only looked at."""
    return run(form, action, **more) if request.method == "POST" else None


class PlainText(forms.CharField):
    """Text as typed: not stripped of meaning, no U+0000, no half surrogate pairs (the ledger could not spell them)."""

    default_error_messages = {"required": NOT_EMPTY}

    def to_python(self, value: Any) -> str:
        """Return the text; raise a sentence for signs that cannot be kept."""
        text: str = super().to_python(value) or ""
        if "\x00" in text or any(0xD800 <= ord(sign) <= 0xDFFF for sign in text):
            raise forms.ValidationError("This text holds a sign that cannot be kept. Type it again without it.")
        return text


class Lines(PlainText):
    """A longer text."""

    widget = forms.Textarea

    def __init__(self, *, max_length: int = 8000, **more: Any) -> None:
        super().__init__(max_length=max_length, **more)
        self.widget.attrs.setdefault("rows", 4)


class Day(forms.DateField):
    """A civil date, with the phone's own picker."""

    def __init__(self, **more: Any) -> None:
        more.setdefault("error_messages", {})
        more["error_messages"].setdefault("required", NOT_EMPTY)
        more["error_messages"].setdefault("invalid", "Write the date as year-month-day, like 2026-03-14.")
        super().__init__(widget=forms.DateInput(attrs={"type": "date"}, format="%Y-%m-%d"), **more)
