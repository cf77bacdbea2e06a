"""What has to hold before anything is served."""

from pathlib import Path
from typing import Any

from django.conf import settings
from django.core.management.base import BaseCommand, CommandError
from django.db import connection

from buildlog.ledger import guards

NETWORK_FILE_SYSTEMS = {"nfs", "nfs4", "cifs", "smb3", "smbfs", "9p", "fuse.sshfs", "afs"}
READ_BACK = {
    "journal_mode": "delete",
    "synchronous": 3,
    "foreign_keys": 1,
    "recursive_triggers": 1,
    "trusted_schema": 0,
}


def pragma_faults() -> list[str]:
    """Return a sentence for each setting of the database that is not as written."""
    faults = []
    with connection.cursor() as cursor:
        for name, wanted in READ_BACK.items():
            cursor.execute(f"PRAGMA {name}")
            if (found := cursor.fetchone()[0]) != wanted:
                faults.append(f"The database says {name} is {found}, not {wanted}.")
    return faults


def file_system_faults(mounts: str, folder: str) -> list[str]:
    """Return a sentence when `folder` lies on a network file system, by the lines of /proc/mounts."""
    best = ("", "")
    for line in mounts.splitlines():
        _, point, kind, *_ = line.split()
        if (folder == point or folder.startswith(point.rstrip("/") + "/")) and len(point) >= len(best[0]):
            best = (point, kind)
    if best[1] in NETWORK_FILE_SYSTEMS:
        return [f"{folder} lies on a network file system ({best[1]}), where a database can lose what it acknowledged."]
    return []


def folder_faults() -> list[str]:
    """Return a sentence when others on this machine may read the data."""
    if settings.DATA_DIR.stat().st_mode & 0o007:
        return [f"Others on this machine may read {settings.DATA_DIR}. Type: chmod 700 {settings.DATA_DIR}"]
    return []


class Command(BaseCommand):
    """Refuse to start when a setting, a guard or a folder is not as it must be."""

    help = "Check database settings, guards and the data folder; `manage.py start` calls it."

    def handle(self, *args: Any, **options: Any) -> None:
        """Print every fault; end with 1 when there is one."""
        mounts = Path("/proc/mounts").read_text(encoding="utf-8")
        found = file_system_faults(mounts, str(settings.DATA_DIR))
        if found := found + pragma_faults() + guards.faults() + folder_faults():
            raise CommandError("\n".join(found))
