"""Photos and documents."""

from uuid import UUID

from django.http import FileResponse, Http404, HttpRequest, HttpResponse
from django.http.response import HttpResponseBase
from django.shortcuts import get_object_or_404

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act, Role
from buildlog.files import actions, queries
from buildlog.files.derived import SIZES, picture
from buildlog.files.forms import CaptionForm, DocumentForm, PhotosForm, take_photos
from buildlog.files.models import Document
from buildlog.files.store import path_of
from buildlog.web.access import AircraftRequest, aircraft_view, forbidden
from buildlog.web.forms import run_posted
from buildlog.web.headers import MEDIA_POLICY
from buildlog.web.pages import see_other, show

YEAR = 365 * 24 * 3600


@aircraft_view(write=Act.LOG, chapter="photos")
def photos(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show all photos by day; take new ones."""
    form = PhotosForm(request.POST or None)
    if request.method == "POST" and form.is_valid():
        kept = take_photos(request, form, aircraft=aircraft, by=request.user, **form.cleaned_data)
        if not kept and not form.errors:
            form.add_error(None, "No photo was chosen.")
        if not form.errors:
            return see_other("photos", aircraft.id)
    words = request.GET.get("q", "").strip()[:100]
    page = queries.photo_page(aircraft, words=words, number=request.GET.get("page", "1"))
    context = {"page": page, "days": queries.by_day(page), "form": form, "q": words}
    return show(request, "files/photos.html", context, status=422 if form.errors else 200)


@aircraft_view(write=Act.LOG, chapter="photos")
def photo_page(request: AircraftRequest, aircraft: Aircraft, photo_id: UUID) -> HttpResponse:
    """Show one photo, what it is used by, and take its caption."""
    rows = aircraft.photos.select_related("blob", "added_by").prefetch_related("entry_links__entry__task")
    photo = get_object_or_404(rows, id=photo_id)
    form = CaptionForm(request.POST or None, initial={"caption": photo.caption, "shows_builder": photo.shows_builder})
    if run_posted(request, form, actions.describe_photo, aircraft=aircraft, by=request.user, photo=photo):
        return see_other("photo-page", aircraft.id, photo.id)
    context = {"photo": photo, "form": form}
    return show(request, "files/photo_page.html", context, status=422 if form.errors else 200)


@aircraft_view(chapter="photos")
def photo_image(request: HttpRequest, aircraft: Aircraft, photo_id: UUID, size: int) -> HttpResponseBase:
    """Give a derivative: upright, without metadata."""
    if size not in SIZES:
        raise Http404("Not one of the sizes.")
    photo = get_object_or_404(aircraft.photos.select_related("blob"), id=photo_id)
    answer = FileResponse(picture(photo, size).open("rb"), content_type="image/jpeg")
    answer["Content-Security-Policy"] = MEDIA_POLICY
    answer["Cache-Control"] = f"private, max-age={YEAR}, immutable"
    return answer


@aircraft_view(read=Act.ORIGINAL)
def photo_original(request: AircraftRequest, aircraft: Aircraft, photo_id: UUID) -> HttpResponseBase:
    """Give the original as the camera wrote it; helpers and paid assistance only their own."""
    photo = get_object_or_404(aircraft.photos.select_related("blob"), id=photo_id)
    if request.member.role in {Role.HELPER, Role.ASSIST} and photo.added_by_id != request.user.id:
        return forbidden(request, "The original of a photo goes to the person who added it, builders and inspectors.")
    return _file(photo.blob.sha256, photo.blob.media_type, photo.name or "photo")


@aircraft_view(write=Act.LOG, chapter="parts")
def documents(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show all documents; take a new one."""
    form = DocumentForm(request.POST or None, request.FILES or None)
    if run_posted(request, form, actions.store_document, aircraft=aircraft, by=request.user):
        return see_other("documents", aircraft.id)
    context = {"documents": queries.documents_of(aircraft), "form": form}
    return show(request, "files/documents.html", context, status=422 if form.errors else 200)


@aircraft_view(chapter="parts")
def document_download(request: HttpRequest, aircraft: Aircraft, document_id: UUID) -> HttpResponseBase:
    """Give a document to be saved; it is never shown inside our pages."""
    rows = aircraft.documents.exclude(kind=Document.Kind.BINDER).select_related("blob")
    document = get_object_or_404(rows, id=document_id)
    return _file(document.blob.sha256, document.blob.media_type, f"{document.title[:80]}.pdf")


def send_document(document: Document, *, name: str) -> FileResponse:
    """Give a document under a name, to be saved."""
    return _file(document.blob.sha256, document.blob.media_type, name)


def _file(sha256: str, media_type: str, name: str) -> FileResponse:
    answer = FileResponse(path_of(sha256).open("rb"), as_attachment=True, filename=name, content_type=media_type)
    answer["Content-Security-Policy"] = MEDIA_POLICY
    answer["Cache-Control"] = "private, no-store"
    return answer
