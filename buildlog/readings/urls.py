"""Pages of this room."""

from django.urls import path

from buildlog.readings import views

urlpatterns = [
    path("readings/", views.readings, name="readings"),
    path("readings/add/", views.characteristic_add, name="characteristic-add"),
    path("readings/<uuid:characteristic_id>/", views.characteristic_page, name="characteristic-page"),
    path("readings/<uuid:characteristic_id>/edit/", views.characteristic_edit, name="characteristic-edit"),
    path("readings/<uuid:characteristic_id>/measure/", views.reading_add, name="reading-add"),
    path("instruments/", views.instruments, name="instruments"),
    path("instruments/add/", views.instrument_add, name="instrument-add"),
    path("instruments/<uuid:instrument_id>/", views.instrument_edit, name="instrument-edit"),
]
