"""Pages of this room."""

from django.urls import path

from buildlog.calcs import views

urlpatterns = [
    path("calculations/", views.calculations, name="calculations"),
    path("calculations/<slug:key>/", views.calculation_run, name="calculation-run"),
    path("snapshots/<uuid:snapshot_id>/", views.snapshot_page, name="snapshot-page"),
]
