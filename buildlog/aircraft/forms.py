"""Shapes of what is typed about people, rights and the aircraft."""

from typing import Any

from django import forms

from buildlog.aircraft.actions.links import DAYS, MOST_DAYS
from buildlog.aircraft.models import Aircraft, Member, Section, User
from buildlog.aircraft.roles import CHAPTERS
from buildlog.ledger.ids import uuid7
from buildlog.profiles import load
from buildlog.web.forms import Day, PlainText

TWELVE = "12 characters or more. Three or four words that do not belong together are good."
NO_DETOURS = {"autocapitalize": "none", "spellcheck": "false", "autocomplete": "off"}
CHOOSE = {"required": "Choose one."}
NEEDED_PASSWORD = {"required": "Write your password."}


def client_id() -> forms.UUIDField:
    """Return the hidden field that makes a form sent twice one row."""
    return forms.UUIDField(initial=uuid7, widget=forms.HiddenInput)


def new_password() -> forms.CharField:
    """Return the field of a password to be set."""
    return forms.CharField(
        label="Password",
        max_length=400,
        strip=False,
        help_text=TWELVE,
        error_messages={"required": "Choose a password."},
        widget=forms.PasswordInput(attrs={"autocomplete": "new-password"}),
    )


class ProofForm(forms.Form):
    """Password, and the code where the person has a second step: asked for at the foot of every act of weight."""

    password = forms.CharField(
        label="Your password, to show that it is you",
        max_length=400,
        strip=False,
        error_messages=NEEDED_PASSWORD,
        widget=forms.PasswordInput(attrs={"autocomplete": "current-password"}),
    )
    one_time_code = forms.CharField(
        label="Code from your phone",
        max_length=20,
        error_messages={"required": "Write the six digits that your phone shows."},
        widget=forms.TextInput(attrs={"autocomplete": "one-time-code", "inputmode": "numeric"}),
    )

    def __init__(self, *args: Any, user: User, **more: Any) -> None:
        super().__init__(*args, **more)
        for field in self.fields.values():  # what stands before a password is taken for a sign-in by browsers
            field.widget.attrs.setdefault("autocomplete", "off")
        for name in ("password", "one_time_code"):
            self.fields[name] = self.fields.pop(name)
        if not user.totp_secret:
            del self.fields["one_time_code"]


class FirstAircraftForm(forms.Form):
    """What the record of an aircraft cannot begin without; the rest of the title block can be said later."""

    designation = PlainText(max_length=120, label="Designation", help_text="What the aircraft is called.")
    serial = PlainText(max_length=40, label="Serial", help_text="Yours to give; it stands on every binder page.")
    basis = forms.ChoiceField(
        choices=[("", "Choose"), *Aircraft.Basis.choices], label="Built from", error_messages=CHOOSE
    )
    seats = forms.IntegerField(
        label="Seats",
        initial=2,
        widget=forms.TextInput(attrs={"inputmode": "numeric"}),
        error_messages={"invalid": "Seats: a whole number from 1 to 20."},
    )
    jurisdiction = forms.ChoiceField(
        label="Authority",
        error_messages=CHOOSE,
        help_text="Decides words, papers and who must sign. It is a start, to be checked against current papers.",
    )
    units = forms.ChoiceField(choices=Aircraft.Units.choices, label="Units")
    started_on = Day(label="Work began on", error_messages={"required": "Give the day the work began."})

    def __init__(self, *args: Any, **more: Any) -> None:
        super().__init__(*args, **more)
        field = self.fields["jurisdiction"]
        assert isinstance(field, forms.ChoiceField)
        field.choices = [("", "Choose")] + [(one.key, one.title) for one in load.jurisdictions().values()]


class AircraftForm(FirstAircraftForm):
    """The title block."""

    registration = PlainText(max_length=20, required=False, label="Registration")
    plan_set = PlainText(max_length=120, required=False, label="Plan set", help_text="Its name, number and revision.")
    built_at = PlainText(max_length=160, required=False, label="Where it is built")

    field_order = ("designation", "serial", "registration", "basis", "plan_set", "seats")


class NewAircraftForm(AircraftForm):
    """The title block of an aircraft not on record yet."""

    client_id = client_id()


class PersonForm(forms.Form):
    """Somebody who gets an account."""

    name = PlainText(max_length=120, label="Your name", help_text="As it shall stand under what you sign.")
    sign_in = PlainText(
        max_length=120,
        label="Sign-in",
        help_text="A short name or your mail address; capitals make no difference.",
        widget=forms.TextInput(attrs=NO_DETOURS | {"autocomplete": "username"}),
    )
    password = new_password()


class SetUpForm(PersonForm, FirstAircraftForm):
    """The first account and the first aircraft of a site."""

    set_up_code = PlainText(
        max_length=40,
        label="Set-up code",
        help_text="Printed on the console where the server was started. It works once, within an hour.",
        widget=forms.TextInput(attrs=NO_DETOURS),
    )
    keep_signed_in = forms.BooleanField(
        required=False, initial=True, label="Keep this phone signed in", help_text="Leave empty on a shared device."
    )
    WHO = ("set_up_code", "name", "sign_in", "password")

    def who(self) -> list[forms.BoundField]:
        """Return the fields about the person."""
        return [self[name] for name in self.WHO]

    def what(self) -> list[forms.BoundField]:
        """Return the fields about the aircraft."""
        return [field for field in self if field.name not in (*self.WHO, "keep_signed_in")]


class SectionForm(forms.Form):
    """A chapter of the work breakdown."""

    number = PlainText(max_length=12, label="Number", help_text="Like 40 or 40.2; sections stand in this order.")
    title = PlainText(max_length=120, label="Title")
    parent: forms.ModelChoiceField[Section] = forms.ModelChoiceField(
        queryset=None, required=False, label="Under", empty_label="No other section"
    )

    def __init__(self, *args: Any, aircraft: Aircraft, **more: Any) -> None:
        super().__init__(*args, **more)
        field = self.fields["parent"]
        assert isinstance(field, forms.ModelChoiceField)
        field.queryset = aircraft.sections.all()


class NewSectionForm(SectionForm):
    """A section to be added."""

    client_id = client_id()


class ZoneForm(forms.Form):
    """A space that will be covered."""

    code = PlainText(max_length=20, label="Code", help_text="Short, as written on the part: LW-3.")
    title = PlainText(max_length=120, label="Space")


class NewZoneForm(ZoneForm):
    """A zone to be added."""

    client_id = client_id()


class RoleForm(ProofForm):
    """Another role or capacity for a member."""

    role = forms.ChoiceField(choices=Member.MemberRole.choices, label="Role", widget=forms.RadioSelect)
    authority = PlainText(
        max_length=120, required=False, label="On whose behalf", help_text="The authority or body of an inspector."
    )
    number = PlainText(max_length=60, required=False, label="Licence or delegation number")


class InvitationForm(ProofForm):
    """An offer to join."""

    client_id = client_id()
    name = PlainText(max_length=120, label="Whom you invite")
    role = forms.ChoiceField(
        choices=Member.MemberRole.choices, label="As", initial=Member.MemberRole.HELPER, widget=forms.RadioSelect
    )


class ReviewLinkForm(ProofForm):
    """A reviewer's link."""

    client_id = client_id()
    name = PlainText(max_length=120, label="For whom")
    days = forms.IntegerField(
        label="Days it lasts",
        initial=DAYS,
        help_text=f"{MOST_DAYS} at most.",
        error_messages={"invalid": f"A link lasts from 1 to {MOST_DAYS} days."},
        widget=forms.TextInput(attrs={"inputmode": "numeric"}),
    )
    chapters = forms.MultipleChoiceField(
        label="What may be read",
        choices=list(CHAPTERS.items()),
        widget=forms.CheckboxSelectMultiple,
        error_messages={"required": "Choose the chapters this reviewer may read."},
    )


class InvitationCodeForm(forms.Form):
    """Taking up an invitation with an account one has."""

    invitation_code = PlainText(
        max_length=40,
        label="One-time code",
        help_text="From the person who invited you. It works once.",
        widget=forms.TextInput(attrs=NO_DETOURS | {"data-from-address": ""}),
    )
    authority = PlainText(max_length=120, required=False, label="On whose behalf", help_text="For inspectors.")
    number = PlainText(max_length=60, required=False, label="Licence or delegation number")


class NewcomerForm(PersonForm, InvitationCodeForm):
    """Taking up an invitation and making the account for it."""

    field_order = ("invitation_code", "name", "sign_in", "password", "authority", "number")


class TokenForm(forms.Form):
    """A reviewer's link, pasted where the page could not read it from the address."""

    token = PlainText(
        max_length=400,
        label="The link, or the signs after #",
        widget=forms.TextInput(attrs=NO_DETOURS | {"data-from-address": "send"}),
    )

    def clean_token(self) -> str:
        """Return the token alone from a whole link."""
        text: str = self.cleaned_data["token"]
        return text.strip().rpartition("#")[2]


class NameForm(forms.Form):
    """A person's name."""

    name = PlainText(max_length=120, label="Your name", help_text="What is signed already keeps the name of its day.")


class PasswordForm(ProofForm):
    """Another password."""

    new_password = new_password()


PasswordForm.base_fields["new_password"].label = "New password"


class SecondStepForm(ProofForm):
    """The first code of a phone app."""

    first_code = forms.CharField(
        max_length=20,
        label="The six digits the app shows now",
        error_messages={"required": "Write the six digits that the app shows."},
        widget=forms.TextInput(attrs={"autocomplete": "one-time-code", "inputmode": "numeric"}),
    )
