"""Forms of instruments, characteristics and readings: shapes only."""

from typing import Any
from uuid import uuid4

from django import forms

from buildlog.aircraft.models import Aircraft
from buildlog.files.models import Document
from buildlog.methods import units
from buildlog.readings.limits import UNITS
from buildlog.readings.models import Instrument, Reading
from buildlog.web.forms import Day, PlainText

NUMBER = {"inputmode": "decimal", "autocomplete": "off"}


def _number(label: str, help_text: str = "") -> PlainText:
    widget = forms.TextInput(attrs=NUMBER)
    return PlainText(label=label, max_length=60, required=False, widget=widget, help_text=help_text)


class InstrumentForm(forms.Form):
    """A measuring tool and one calibration of it."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    code = PlainText(label="Code", max_length=40, help_text="As it stands on the tool, one for each calibration.")
    title = PlainText(label="What it is", max_length=160)
    uncertainty = _number("Uncertainty, expanded (k = 2)", "With its unit, like 0.5 kg; or 1 % of the reading.")
    calibrated_on = Day(label="Calibrated", required=False)
    due_on = Day(label="Calibration holds until", required=False)
    certificate = forms.ModelChoiceField(
        label="Certificate", queryset=Document.objects.none(), required=False, empty_label="None on the record"
    )

    def __init__(self, *args: Any, aircraft: Aircraft, **more: Any) -> None:
        super().__init__(*args, **more)
        papers = aircraft.documents.exclude(kind=Document.Kind.BINDER).order_by("title")
        self.fields["certificate"].queryset = papers  # type: ignore[attr-defined]


class CharacteristicForm(forms.Form):
    """Something measurable, with what the plan asks of it."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    code = PlainText(label="Code", max_length=40, help_text="Short, as you will look for it: PROP-TRACK.")
    title = PlainText(label="What is measured, and where", max_length=160)
    unit = forms.ChoiceField(label="Unit", required=False)
    nominal = _number("Nominal", "A comma or a point; another unit may stand behind the number.")
    lower = _number("Lower limit")
    upper = _number("Upper limit")
    plan_sheet = PlainText(label="Plan sheet", max_length=80, required=False)

    def __init__(self, *args: Any, **more: Any) -> None:
        super().__init__(*args, **more)
        groups = [
            (title, [(one, units.shown(one) or "none, a plain number") for one in row]) for title, row in UNITS.items()
        ]
        self.fields["unit"].choices = groups  # type: ignore[attr-defined]


class ReadingForm(forms.Form):
    """A measured value; with a reason when it corrects an earlier one."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    entered = PlainText(label="Value", max_length=60, widget=forms.TextInput(attrs=NUMBER))
    instrument = forms.ModelChoiceField(
        label="Measured with", queryset=Instrument.objects.none(), required=False, empty_label="No instrument named"
    )
    read_on = Day(label="Measured on")
    note = PlainText(label="Note", max_length=300, required=False)

    def __init__(self, *args: Any, aircraft: Aircraft, amends: Reading | None = None, **more: Any) -> None:
        super().__init__(*args, **more)
        self.fields["instrument"].queryset = aircraft.instruments.all()  # type: ignore[attr-defined]
        if amends is not None:
            self.fields["amend_reason"] = PlainText(label="Why it is corrected", max_length=300)
