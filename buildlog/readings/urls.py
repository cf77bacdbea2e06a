"""Pages of this room."""

from django.urls import URLPattern

urlpatterns: list[URLPattern] = []
