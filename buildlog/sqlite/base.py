"""Django's SQLite without the JSON_VALID checks on columns.

With trusted_schema=OFF, which keeps a doctored database file from running functions out of its schema, Debian 12's
SQLite calls JSON_VALID in a CHECK unsafe and refuses the table. JSON columns are written by Django's encoder alone.
"""

from django.db.backends.sqlite3 import base


class DatabaseWrapper(base.DatabaseWrapper):
    """SQLite with the checks of JSON columns left out."""

    data_type_check_constraints = {
        kind: check for kind, check in base.DatabaseWrapper.data_type_check_constraints.items() if kind != "JSONField"
    }
