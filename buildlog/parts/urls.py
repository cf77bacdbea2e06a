"""Pages of this room."""

from django.urls import path

from buildlog.parts import views

urlpatterns = [
    path("parts/", views.parts, name="parts"),
    path("parts/add/", views.part_add, name="part-add"),
    path("parts/<uuid:part_id>/", views.part_page, name="part-page"),
    path("parts/<uuid:part_id>/edit/", views.part_edit, name="part-edit"),
    path("parts/<uuid:part_id>/install/", views.part_install, name="part-install"),
    path("batches/", views.batches, name="batches"),
    path("batches/add/", views.batch_add, name="batch-add"),
    path("batches/<uuid:batch_id>/", views.batch_page, name="batch-page"),
]
