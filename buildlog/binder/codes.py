"""Short codes of records: a letter for the kind and the last six signs of the identifier, which are random."""

from django.db.models import Model

LETTERS = {
    "Entry": "E",
    "Photo": "P",
    "Document": "D",
    "Part": "PT",
    "Reading": "R",
    "Trial": "TR",
    "Snapshot": "CA",
    "Weighing": "WG",
    "SignOff": "SO",
}


def code_of(row: Model) -> str:
    """Return a code such as E-3f09ac for a row of the record."""
    return f"{LETTERS[type(row).__name__]}-{row.pk.hex[-6:]}"
