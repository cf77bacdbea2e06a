"""Forms of parts and batches: shapes only."""

from typing import Any
from uuid import uuid4

from django import forms

from buildlog.aircraft.models import Aircraft
from buildlog.files.models import Document
from buildlog.parts.models import Batch, Part
from buildlog.profiles import load
from buildlog.web.forms import Day, Lines, PlainText

OWN = "own"


class BatchForm(forms.Form):
    """A lot of material as its label says it."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    code = PlainText(label="Code", max_length=40, help_text="Your own, as you write it on the material.")
    material = PlainText(label="Material", max_length=160)
    specification = PlainText(label="Specification", max_length=160, required=False)
    lot = PlainText(label="Lot or heat number", max_length=80, required=False)
    supplier = PlainText(label="Supplier", max_length=120, required=False)
    quantity = PlainText(label="Quantity", max_length=60, required=False)
    received_on = Day(label="Received", required=False)
    expires_on = Day(label="Expires", required=False)
    certificate = forms.ModelChoiceField(
        label="Certificate", queryset=Document.objects.none(), required=False, empty_label="None on the record"
    )

    def __init__(self, *args: Any, aircraft: Aircraft, **more: Any) -> None:
        super().__init__(*args, **more)
        self.fields["certificate"].queryset = aircraft.documents.order_by("title")  # type: ignore[attr-defined]


class PartForm(forms.Form):
    """A part, where it came from and what its receiving inspection said."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    number = PlainText(label="Drawing or part number", max_length=80)
    name = PlainText(label="Name", max_length=160)
    serial = PlainText(label="Serial", max_length=80, required=False)
    origin = forms.ChoiceField(label="Origin", choices=Part.Origin)
    supplier = PlainText(label="Supplier", max_length=120, required=False)
    received_on = Day(label="Received or made", required=False)
    inspection = forms.ChoiceField(label="Receiving inspection", choices=Part.Inspection, widget=forms.RadioSelect)
    inspection_note = PlainText(label="What was looked at", max_length=300, required=False)
    critical = forms.BooleanField(label="Critical: its failure could end a flight", required=False)
    expires_on = Day(label="Expires", required=False)
    life = PlainText(label="Life, and whose figure it is", max_length=160, required=False)
    batches = forms.ModelMultipleChoiceField(label="Made from batches", queryset=Batch.objects.none(), required=False)
    documents = forms.ModelMultipleChoiceField(label="Papers", queryset=Document.objects.none(), required=False)
    note = Lines(label="Note", required=False)

    def __init__(self, *args: Any, aircraft: Aircraft, **more: Any) -> None:
        super().__init__(*args, **more)
        papers = aircraft.documents.exclude(kind=Document.Kind.BINDER).order_by("title")
        self.fields["batches"].queryset = aircraft.batches.all()  # type: ignore[attr-defined]
        self.fields["documents"].queryset = papers  # type: ignore[attr-defined]

    def clean(self) -> dict[str, Any]:
        """Give the chosen rows as lists."""
        said = dict(super().clean() or {})
        return said | {name: list(said[name]) for name in ("batches", "documents") if name in said}


class InstallForm(forms.Form):
    """Where a part goes, and why the one that sits there comes out."""

    place = forms.ChoiceField(label="Position")
    own_words = PlainText(label="In your own words", max_length=60, required=False)
    installed_on = Day(label="Installed")
    removal_reason = PlainText(label="Why the part that sits there comes out", max_length=200, required=False)

    def __init__(self, *args: Any, **more: Any) -> None:
        super().__init__(*args, **more)
        groups: dict[str, list[tuple[str, str]]] = {}
        for position in load.positions().values():
            groups.setdefault(position.group, []).append((position.key, position.title))
        other = (OWN, "Another position, in my own words")
        self.fields["place"].choices = [*groups.items(), other]  # type: ignore[attr-defined]

    def clean(self) -> dict[str, Any]:
        """Give one position, declared or in the builder's words."""
        said = dict(super().clean() or {})
        place, words = said.pop("place", ""), said.pop("own_words", "").strip()
        if place == OWN and not words:
            self.add_error("own_words", "Name the position.")
        return said | {"position": words if place == OWN else place}
