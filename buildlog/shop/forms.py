"""The log form and the task form: shapes only."""

from typing import Any
from uuid import uuid4

from django import forms

from buildlog.aircraft.models import Aircraft, Section, User, Zone
from buildlog.aircraft.queries import people_of
from buildlog.errors import Refused
from buildlog.parts.models import Batch
from buildlog.readings.models import Instrument
from buildlog.shop.draft import Draft, Labour, Process
from buildlog.shop.models import Entry, LabourLine, ProcessRecord, Task
from buildlog.shop.spans import read_minutes
from buildlog.web.forms import Day, Lines, PlainText

CHIPS = (("30", "½ h"), ("60", "1 h"), ("120", "2 h"), ("other", "Other"))
# What matters later for each joint or coat that cannot be seen any more.
DETAILS = {
    "mix": "Mix, by mass or volume",
    "temperature": "Temperature",
    "humidity": "Humidity",
    "open_time": "Open and clamp time",
    "cure": "Cure",
    "coupon": "Coupon and its result",
    "method": "Welder, process, filler, heat treatment",
    "torque": "Torque, dry or lubricated",
}


class LogForm(forms.Form):
    """One spell of shop work. `client_id` is made with the form, so that sending it twice is one entry."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    base_version = forms.IntegerField(widget=forms.HiddenInput, required=False)
    task = forms.ModelChoiceField(queryset=Task.objects.none(), required=False, empty_label="Loose, not filed yet")
    worked_on = Day(label="Date")
    time = forms.ChoiceField(label="Time", choices=CHIPS, widget=forms.RadioSelect, required=False)
    time_other = PlainText(label="Other time", required=False, max_length=20, help_text="1.5, 1:30 or 90 min")
    capacity = forms.ChoiceField(label="You worked as", choices=LabourLine.Capacity)
    note = Lines(label="Note", required=False)
    second_person = PlainText(label="Second person", required=False, max_length=120)
    second_capacity = forms.ChoiceField(label="They worked as", choices=LabourLine.Capacity, required=False)
    second_time = PlainText(label="Their time", required=False, max_length=20)
    plan_sheet = PlainText(label="Plan sheet", required=False, max_length=40)
    plan_revision = PlainText(label="Revision", required=False, max_length=20)
    place = PlainText(label="Place", required=False, max_length=120)
    process = forms.ChoiceField(label="Process", choices=[("", "None"), *ProcessRecord.Kind.choices], required=False)
    batch = forms.ModelChoiceField(queryset=Batch.objects.none(), required=False, empty_label="No batch")
    instrument = forms.ModelChoiceField(queryset=Instrument.objects.none(), required=False, empty_label="No tool")
    finishes_task = forms.BooleanField(label="This finishes the task", required=False)

    def __init__(self, *args: Any, aircraft: Aircraft, by: User, **more: Any) -> None:
        super().__init__(*args, **more)
        self.aircraft, self.by = aircraft, by
        for name, rows in (("task", aircraft.tasks.all()), ("batch", aircraft.batches.all())):
            self.fields[name].queryset = rows  # type: ignore[attr-defined]
        self.fields["instrument"].queryset = aircraft.instruments.all()  # type: ignore[attr-defined]
        for name, label in DETAILS.items():
            self.fields[name] = PlainText(label=label, required=False, max_length=200)

    @property
    def process_fields(self) -> list[forms.BoundField]:
        """Return the fields of the process record, for the part of the page that folds away."""
        return [self[name] for name in ("process", "batch", "instrument", *DETAILS)]

    def draft(self, photos: list[Any]) -> Draft:
        """Return what was said; Refused at the field that cannot be read."""
        said = self.cleaned_data
        names = ("worked_on", "note", "task", "plan_sheet", "plan_revision", "place", "finishes_task")
        return Draft(
            labour=self._labour(), processes=self._processes(), photos=photos, **{name: said[name] for name in names}
        )

    def _labour(self) -> list[Labour]:
        said = self.cleaned_data
        lines = []
        chip, other = said["time"], said["time_other"]
        if other or chip == "other":
            minutes = read_minutes(other, field="time_other")
            lines.append(Labour(self.by.name, said["capacity"], minutes, self.by))
        elif chip:
            lines.append(Labour(self.by.name, said["capacity"], int(chip), self.by))
        if name := said["second_person"].strip():
            known = {member.user.name.lower(): member.user for member in people_of(self.aircraft)}
            person = known.get(name.lower())
            minutes = read_minutes(said["second_time"], field="second_time")
            lines.append(Labour(person.name if person else name, said["second_capacity"] or "helper", minutes, person))
        return lines

    def _processes(self) -> list[Process]:
        said = self.cleaned_data
        details = {name: said[name] for name in DETAILS if said[name]}
        if not said["process"]:
            if details or said["batch"]:
                raise Refused("Choose which process this was.", field="process")
            return []
        return [Process(said["process"], details, said["batch"], said["instrument"])]


class AmendForm(LogForm):
    """An amendment says everything anew, and why."""

    amend_reason = PlainText(label="Why it is amended", max_length=300)


def said_by(entry: Entry, by: User) -> dict[str, Any]:
    """Return what an entry says, as the form's first values."""
    names = ("task", "worked_on", "note", "plan_sheet", "plan_revision", "place", "finishes_task")
    said: dict[str, Any] = {name: getattr(entry, name) for name in names}
    own, *others = [*entry.labour.all(), None]
    if own is not None:
        said |= {"time": "other", "time_other": f"{own.minutes} min", "capacity": own.capacity}
    if others and others[0] is not None:
        second = others[0]
        said |= {"second_person": second.person_name, "second_capacity": second.capacity}
        said["second_time"] = f"{second.minutes} min"
    if process := next(iter(entry.processes.all()), None):
        said |= {"process": process.kind, "batch": process.batch, "instrument": process.instrument, **process.details}
    return said


class TaskForm(forms.Form):
    """A piece of work in a section."""

    section = forms.ModelChoiceField(queryset=Section.objects.none(), empty_label=None)
    number = PlainText(label="Number", max_length=20)
    title = PlainText(label="Title", max_length=160)
    kind = forms.ChoiceField(label="Kind of work", choices=Task.Kind)
    plan_sheet = PlainText(label="Plan sheet", required=False, max_length=40)
    plan_revision = PlainText(label="Revision", required=False, max_length=20)
    planned = PlainText(label="Planned time", required=False, max_length=20, help_text="In hours: 12 or 1.5")
    zone = forms.ModelChoiceField(queryset=Zone.objects.none(), required=False, empty_label="No zone")
    waiting_for = PlainText(label="Waiting for", required=False, max_length=160)
    not_needed_reason = PlainText(label="Not needed, because", required=False, max_length=200)

    def __init__(self, *args: Any, aircraft: Aircraft, **more: Any) -> None:
        super().__init__(*args, **more)
        self.fields["section"].queryset = aircraft.sections.all()  # type: ignore[attr-defined]
        self.fields["zone"].queryset = aircraft.zones.all()  # type: ignore[attr-defined]

    def clean(self) -> dict[str, Any]:
        """Turn the planned time into minutes."""
        said = dict(super().clean() or {})
        text = said.pop("planned", "").strip().replace(",", ".")
        try:
            said["planned_minutes"] = round(float(text or 0) * 60)
        except (ValueError, OverflowError):
            said["planned_minutes"] = -1
        if not 0 <= said["planned_minutes"] <= 10_000 * 60:
            self.add_error("planned", "Write the planned time in hours, like 12 or 1.5.")
        return said
