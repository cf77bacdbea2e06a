"""The page of the desk room, below the aircraft."""

from django.urls import path

from buildlog.desk import views

urlpatterns = [path("aircraft/", views.aircraft_page, name="aircraft-page")]
