"""What a person does with accounts, aircraft, rights and the facts of a conversion."""

from buildlog.aircraft.actions.aircraft import (
    add_section,
    add_zone,
    create_aircraft,
    edit_aircraft,
    edit_section,
    edit_zone,
)
from buildlog.aircraft.actions.facts import state_fact, state_facts
from buildlog.aircraft.actions.first_run import make_setup_code, set_up
from buildlog.aircraft.actions.invitations import (
    Offer,
    invite,
    revoke_invitation,
    take_invitation,
    take_invitation_anew,
)
from buildlog.aircraft.actions.links import make_review_link, open_review_link, revoke_review_link
from buildlog.aircraft.actions.members import add_member, change_role, end_membership
from buildlog.aircraft.actions.people import change_password, create_user, let_in, rename_user
from buildlog.aircraft.actions.second_step import add_second_step, remove_second_step, spend_code
from buildlog.aircraft.actions.sessions import end_session
from buildlog.aircraft.actions.tries import begin_try, forget_tries

__all__ = [
    "Offer",
    "add_member",
    "add_second_step",
    "add_section",
    "add_zone",
    "begin_try",
    "change_password",
    "change_role",
    "create_aircraft",
    "create_user",
    "edit_aircraft",
    "edit_section",
    "edit_zone",
    "end_membership",
    "end_session",
    "forget_tries",
    "invite",
    "let_in",
    "make_review_link",
    "make_setup_code",
    "open_review_link",
    "remove_second_step",
    "rename_user",
    "revoke_invitation",
    "revoke_review_link",
    "set_up",
    "spend_code",
    "state_fact",
    "state_facts",
    "take_invitation",
    "take_invitation_anew",
]
