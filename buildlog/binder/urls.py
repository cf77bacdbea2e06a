"""Pages of this room."""

from django.urls import path

from buildlog.binder import views

urlpatterns = [
    path("binders/", views.binders, name="binders"),
    path("binders/print/", views.binder_print, name="binder-print"),
    path("binders/<uuid:issue_id>/", views.binder_page, name="binder-page"),
    path("binders/<uuid:issue_id>/file/", views.binder_download, name="binder-download"),
]
