"""All settings, read from the environment; a wrong value stops the start.

The data directory holds the database, the originals and the secrets; nothing of it lives in the source tree's git.
"""

import os
import sys
from pathlib import Path

from buildlog.setup.secrets import read_secret

ROOT = Path(__file__).resolve().parent.parent
DATA_DIR = Path(os.environ.get("BUILDLOG_DATA", ROOT / ".var")).resolve()


def _switch(name: str, default: bool) -> bool:
    """Return an on/off setting; anything but 0 or 1 stops the start."""
    value = os.environ.get(name, "1" if default else "0")
    if value not in {"0", "1"}:
        sys.exit(f"{name} must be 0 or 1, not {value!r}.")
    return value == "1"


def _names(name: str, default: str) -> list[str]:
    return [part.strip() for part in os.environ.get(name, default).split(",") if part.strip()]


def _days(name: str, default: int) -> int:
    value = os.environ.get(name, str(default))
    if not value.isdigit():
        sys.exit(f"{name} must be a whole number of days, not {value!r}.")
    return int(value)


# Hosts: names this server answers to. A wildcard would let any name through the CSRF and link checks.
ALLOWED_HOSTS = _names("BUILDLOG_HOSTS", "localhost,127.0.0.1,[::1]")
if "*" in ALLOWED_HOSTS:
    sys.exit("BUILDLOG_HOSTS must name hosts; a wildcard is refused.")
CSRF_TRUSTED_ORIGINS = _names("BUILDLOG_ORIGINS", "")
HTTPS = _switch("BUILDLOG_HTTPS", default=False)
PRINTING = _switch("BUILDLOG_PRINTING", default=True)
AUTO_CLOSE_DAYS = _days("BUILDLOG_AUTO_CLOSE_DAYS", 7)

DEBUG = False
SECRET_KEY = read_secret(DATA_DIR / "secrets" / "secret_key")

INSTALLED_APPS = [
    "django.contrib.auth",
    "django.contrib.contenttypes",
    "django.contrib.sessions",
    "django.contrib.staticfiles",
    "django_htmx",
    "django_tasks",
    "django_tasks_db",
    "template_partials",
    "buildlog",
]
MIDDLEWARE = [
    "django.middleware.security.SecurityMiddleware",
    "whitenoise.middleware.WhiteNoiseMiddleware",
    "buildlog.web.headers.SecurityHeaders",
    "django.contrib.sessions.middleware.SessionMiddleware",
    "django.middleware.common.CommonMiddleware",
    "django.middleware.csrf.CsrfViewMiddleware",
    "django.contrib.auth.middleware.AuthenticationMiddleware",
    "django_htmx.middleware.HtmxMiddleware",
    "buildlog.web.access.AccessGate",
]
ROOT_URLCONF = "buildlog.urls"
WSGI_APPLICATION = "buildlog.wsgi.application"
TEMPLATES = [
    {
        "BACKEND": "django.template.backends.django.DjangoTemplates",
        "DIRS": [ROOT / "templates"],
        "APP_DIRS": True,
        "OPTIONS": {
            "context_processors": [
                "django.template.context_processors.request",
                "django.contrib.auth.context_processors.auth",
                "buildlog.web.pages.frame",
            ],
            "builtins": ["buildlog.templatetags.look", "template_partials.templatetags.partials"],
        },
    }
]

# DELETE + EXTRA: WAL with NORMAL lost acknowledged commits in a replay of power cuts. Durable comes before fast.
SQLITE_PRAGMAS = {
    "journal_mode": "DELETE",
    "synchronous": "EXTRA",
    "foreign_keys": "ON",
    "recursive_triggers": "ON",
    "trusted_schema": "OFF",
    "cell_size_check": "ON",
}
DATABASES = {
    "default": {
        "ENGINE": "buildlog.sqlite",
        # A long print reads a copy of the record, named here, and never the live file.
        "NAME": os.environ.get("BUILDLOG_DATABASE", DATA_DIR / "buildlog.sqlite3"),
        "OPTIONS": {
            "transaction_mode": "IMMEDIATE",
            "timeout": 30,
            "init_command": " ".join(f"PRAGMA {name}={value};" for name, value in SQLITE_PRAGMAS.items()),
        },
    }
}
DEFAULT_AUTO_FIELD = "django.db.models.BigAutoField"

AUTH_USER_MODEL = "buildlog.User"
PASSWORD_HASHERS = ["django.contrib.auth.hashers.Argon2PasswordHasher"]
AUTH_PASSWORD_VALIDATORS = [
    {"NAME": "django.contrib.auth.password_validation.MinimumLengthValidator", "OPTIONS": {"min_length": 12}},
    {"NAME": "django.contrib.auth.password_validation.CommonPasswordValidator"},
    {
        "NAME": "django.contrib.auth.password_validation.UserAttributeSimilarityValidator",
        "OPTIONS": {"user_attributes": ["name", "sign_in"]},
    },
]
LOGIN_URL = "sign-in"
LOGIN_REDIRECT_URL = "aircraft-list"

SESSION_COOKIE_AGE = 14 * 24 * 3600
SESSION_SAVE_EVERY_REQUEST = False
SESSION_COOKIE_SAMESITE = CSRF_COOKIE_SAMESITE = "Lax"
SESSION_COOKIE_SECURE = CSRF_COOKIE_SECURE = HTTPS
# The __Host- prefix needs https; over plain http on a home network the browser would drop such a cookie.
SESSION_COOKIE_NAME = "__Host-session" if HTTPS else "session"
CSRF_COOKIE_NAME = "__Host-csrf" if HTTPS else "csrf"
CSRF_COOKIE_HTTPONLY = True
CSRF_FAILURE_VIEW = "buildlog.web.pages.stale_form"
SECURE_HSTS_SECONDS = 31_536_000 if HTTPS else 0
SECURE_SSL_REDIRECT = False
SECURE_PROXY_SSL_HEADER = ("HTTP_X_FORWARDED_PROTO", "https") if HTTPS else None
SECURE_CONTENT_TYPE_NOSNIFF = True
SECURE_REFERRER_POLICY = "same-origin"
SECURE_CROSS_ORIGIN_OPENER_POLICY = "same-origin"
X_FRAME_OPTIONS = "DENY"

FILE_UPLOAD_MAX_MEMORY_SIZE = 1_048_576
DATA_UPLOAD_MAX_MEMORY_SIZE = 2_097_152
DATA_UPLOAD_MAX_NUMBER_FIELDS = 2_000
DATA_UPLOAD_MAX_NUMBER_FILES = 60
FILE_UPLOAD_HANDLERS = ["django.core.files.uploadhandler.TemporaryFileUploadHandler"]
FILE_UPLOAD_TEMP_DIR = None

STATIC_URL = "/static/"
STATICFILES_DIRS = [ROOT / "static"]
STATIC_ROOT = DATA_DIR / "static"
STORAGES = {
    "default": {"BACKEND": "django.core.files.storage.FileSystemStorage"},
    "staticfiles": {"BACKEND": "django.contrib.staticfiles.storage.StaticFilesStorage"},
}
WHITENOISE_USE_FINDERS = True

LANGUAGE_CODE = "en"
USE_I18N = False
USE_TZ = True
TIME_ZONE = os.environ.get("BUILDLOG_TIME_ZONE", "UTC")
FORMAT_MODULE_PATH = "buildlog.formats"

TASKS = {"default": {"BACKEND": "django_tasks_db.DatabaseBackend"}}

LOGGING = {
    "version": 1,
    "disable_existing_loggers": False,
    "formatters": {"line": {"format": "%(asctime)s %(levelname)s %(name)s %(message)s"}},
    "handlers": {"console": {"class": "logging.StreamHandler", "formatter": "line"}},
    "root": {"handlers": ["console"], "level": "WARNING"},
    "loggers": {"buildlog": {"handlers": ["console"], "level": "INFO", "propagate": False}},
}
