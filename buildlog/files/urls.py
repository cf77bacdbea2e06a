"""Pages of this room."""

from django.urls import path

from buildlog.files import views

urlpatterns = [
    path("photos/", views.photos, name="photos"),
    path("photos/<uuid:photo_id>/", views.photo_page, name="photo-page"),
    path("photos/<uuid:photo_id>/<int:size>.jpg", views.photo_image, name="photo-image"),
    path("photos/<uuid:photo_id>/original/", views.photo_original, name="photo-original"),
    path("documents/", views.documents, name="documents"),
    path("documents/<uuid:document_id>/file/", views.document_download, name="document-download"),
]
