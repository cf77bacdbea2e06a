"""Pages of the find room, below the aircraft."""

from django.urls import path

from buildlog.find import views

urlpatterns = [
    path("find/", views.find, name="find"),
    path("trail/<uuid:subject_id>/", views.trail, name="trail"),
    path("changes/", views.recent_changes, name="recent-changes"),
]
