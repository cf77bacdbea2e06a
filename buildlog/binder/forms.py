"""What is asked before a binder is printed."""

from typing import Any
from uuid import uuid4

from django import forms

from buildlog.aircraft.forms import ProofForm
from buildlog.aircraft.models import User
from buildlog.binder.models import BinderIssue

# Open items, failed trials and accepted risks stand in these: they cannot be left out.
ALWAYS = frozenset({"cover", "summary", "calculations", "annex"})


class PrintForm(ProofForm):
    """Paper, chapters to leave out, and the proof of who asks."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    paper = forms.ChoiceField(choices=BinderIssue.Paper, widget=forms.RadioSelect, label="Paper")
    leave_out = forms.MultipleChoiceField(
        required=False,
        widget=forms.CheckboxSelectMultiple,
        label="Chapters to leave out",
        help_text="Chapters with open items, failed trials and accepted risks are always printed.",
    )

    def __init__(self, *args: Any, chapters: list[tuple[str, str]], user: User, **more: Any) -> None:
        super().__init__(*args, user=user, **more)
        self.fields["leave_out"].choices = [(key, title) for key, title in chapters if key not in ALWAYS]  # type: ignore[attr-defined]
