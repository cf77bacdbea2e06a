"""Pages of one aircraft: what it is, who may see it, what its conversion is."""

from django.urls import path

from buildlog.aircraft.views import aircraft, conversion, people

urlpatterns = [
    path("aircraft/edit", aircraft.aircraft_edit, name="aircraft-edit"),
    path("sections/", aircraft.sections, name="sections"),
    path("sections/<uuid:section_id>/edit", aircraft.section_edit, name="section-edit"),
    path("zones/", aircraft.zones, name="zones"),
    path("zones/<uuid:zone_id>/edit", aircraft.zone_edit, name="zone-edit"),
    path("conversion/", conversion.conversion, name="conversion"),
    path("review/", people.review, name="review"),
    path("people/", people.people, name="people"),
    path("people/invite", people.invitation_add, name="invitation-add"),
    path("people/links/add", people.review_link_add, name="review-link-add"),
    path("people/links/<uuid:link_id>/revoke", people.review_link_revoke, name="review-link-revoke"),
    path("people/invitations/<uuid:invitation_id>/revoke", people.invitation_revoke, name="invitation-revoke"),
    path("people/<uuid:member_id>/edit", people.member_edit, name="member-edit"),
    path("people/<uuid:member_id>/end", people.member_end, name="member-end"),
]
