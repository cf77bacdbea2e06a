"""The headers of every answer: what a browser may load, and that pages of the record are not kept in caches."""

from collections.abc import Callable

from django.http import HttpRequest, HttpResponse

PAGE_POLICY = (
    "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' blob:; connect-src 'self'; "
    "font-src 'self'; manifest-src 'self'; worker-src 'self'; form-action 'self'; base-uri 'none'; "
    "frame-ancestors 'none'; require-trusted-types-for 'script'"
)
MEDIA_POLICY = "default-src 'none'; sandbox"


class SecurityHeaders:
    """Middleware: the page policy, unless a view of media has set its own."""

    def __init__(self, get_response: Callable[[HttpRequest], HttpResponse]) -> None:
        self.get_response = get_response

    def __call__(self, request: HttpRequest) -> HttpResponse:
        answer = self.get_response(request)
        answer.headers.setdefault("Content-Security-Policy", PAGE_POLICY)
        answer.headers.setdefault("Cross-Origin-Resource-Policy", "same-origin")
        answer.headers.setdefault("Permissions-Policy", "geolocation=(), microphone=(), camera=(self)")
        if answer.get("Content-Type", "").startswith("text/html"):
            answer.headers.setdefault("Cache-Control", "no-store")
        return answer
