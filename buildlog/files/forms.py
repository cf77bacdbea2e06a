"""Fields for photos and documents."""

from collections.abc import Sequence
from typing import Any
from uuid import UUID, uuid4

from django import forms
from django.core.files.uploadedfile import UploadedFile
from django.http import HttpRequest

from buildlog.aircraft.models import Aircraft, User
from buildlog.errors import Refused
from buildlog.files.actions import store_photo
from buildlog.files.models import Document, Photo
from buildlog.web.forms import Day, PlainText

MOST_PHOTOS = 30


class CaptionForm(forms.Form):
    """What a photo shows."""

    caption = PlainText(label="What it shows", max_length=300, required=False)
    shows_builder = forms.BooleanField(label="A builder is seen at work", required=False)


class PhotosForm(forms.Form):
    """Photos by themselves, without an entry."""

    caption = PlainText(label="What they show", max_length=300, required=False)
    taken_on = Day(label="Day they were taken", required=False, help_text="Used where the camera wrote none.")


class DocumentForm(forms.Form):
    """A paper as a PDF file."""

    client_id = forms.UUIDField(widget=forms.HiddenInput, initial=uuid4)
    kind = forms.ChoiceField(label="What it is", choices=[row for row in Document.Kind.choices if row[0] != "binder"])
    title = PlainText(label="Title", max_length=200)
    number = PlainText(label="Number on it", max_length=80, required=False)
    dated_on = Day(label="Dated", required=False)
    upload = forms.FileField(label="File", allow_empty_file=True, widget=forms.FileInput(attrs={"accept": ".pdf"}))


def take_photos(
    request: HttpRequest, form: forms.Form, *, aircraft: Aircraft, by: User, **about: Any
) -> Sequence[Photo]:
    """Keep the photos sent with a form, from camera and gallery, and those kept by an earlier try of the same form.

    A photo that is refused puts its sentence on the form; the good ones are kept all the same and come back with the
    page as hidden `kept_photos`, so that nothing has to be chosen twice.
    """
    kept = list(_kept_before(request, aircraft))
    files = [*request.FILES.getlist("camera"), *request.FILES.getlist("gallery")]
    if len(files) > MOST_PHOTOS:
        form.add_error(None, f"At most {MOST_PHOTOS} photos at a time; these were not kept. Send them in two lots.")
        return kept
    for file in files:
        assert isinstance(file, UploadedFile)
        try:
            kept.append(store_photo(aircraft=aircraft, by=by, upload=file, **about))
        except Refused as refusal:
            form.add_error(None, f"{(file.name or 'A photo')[:60]}: {refusal.text}")
    return list({photo.id: photo for photo in kept}.values())


def _kept_before(request: HttpRequest, aircraft: Aircraft) -> list[Photo]:
    wanted = []
    for text in request.POST.getlist("kept_photos"):
        try:
            wanted.append(UUID(text))
        except ValueError:
            continue
    return list(aircraft.photos.select_related("blob").filter(id__in=wanted))
