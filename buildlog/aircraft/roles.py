"""Who may do what on an aircraft: roles, the acts they are asked for, and the table between them."""

from enum import StrEnum


class Role(StrEnum):
    """What a person is on one aircraft; the same person may be a builder here and a viewer there."""

    BUILDER = "builder"
    HELPER = "helper"
    ASSIST = "assist"
    INSPECTOR = "inspector"
    VIEWER = "viewer"
    LINK = "link"


ROLE_WORDS = {
    Role.BUILDER: "Builder",
    Role.HELPER: "Helper, unpaid",
    Role.ASSIST: "Paid assistance",
    Role.INSPECTOR: "Inspector",
    Role.VIEWER: "Viewer",
    Role.LINK: "Reviewer by link",
}


class Act(StrEnum):
    """An act that a page or a button asks the right for."""

    READ = "read"
    ORIGINAL = "original"  # the photo as the camera wrote it, with its metadata
    LOG = "log"  # entries, photos, readings of one's own
    AMEND = "amend"
    PLAN = "plan"  # tasks, checklist, parts, calculations, conversion
    SIGN = "sign"  # as performer of one's own work
    INSPECT = "inspect"  # as inspector, never of one's own work
    COMMENT = "comment"  # squawks
    FETCH = "fetch"  # an issued binder
    MANAGE = "manage"  # people, links, binder, export


_EVERY = frozenset(Role)
_WORKERS = frozenset({Role.BUILDER, Role.HELPER, Role.ASSIST})

RIGHTS: dict[Act, frozenset[Role]] = {
    Act.READ: _EVERY,
    Act.ORIGINAL: _WORKERS | {Role.INSPECTOR},
    Act.LOG: _WORKERS | {Role.INSPECTOR},
    Act.AMEND: _WORKERS | {Role.INSPECTOR},
    Act.PLAN: frozenset({Role.BUILDER}),
    Act.SIGN: _WORKERS,
    Act.INSPECT: frozenset({Role.INSPECTOR}),
    Act.COMMENT: _EVERY - {Role.LINK},
    Act.FETCH: frozenset({Role.BUILDER, Role.INSPECTOR}),
    Act.MANAGE: frozenset({Role.BUILDER}),
}


def may(role: str, act: Act) -> bool:
    """Return whether a role has the right to an act."""
    return Role(role) in RIGHTS[act]


# Parts of the record that a reviewer's link may open: the word a page's rule names, and the word a person reads.
CHAPTERS = {
    "log": "Log: tasks and entries",
    "photos": "Photos and documents",
    "parts": "Parts and batches",
    "readings": "Readings",
    "calculations": "Calculations and trials",
    "checks": "Checks, conversion and sign-offs",
    "weights": "Weight and balance",
    "findings": "Squawks and deviations",
    "binder": "Binders",
}
