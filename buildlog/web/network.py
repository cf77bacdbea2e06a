"""Where a request comes from, as far as the waits after wrong passwords need to know."""

import ipaddress

from django.http import HttpRequest


def network_of(request: HttpRequest) -> str:
    """Return the network of a request: the whole IPv4 address, or the /64 that one IPv6 household holds.

    A header naming another address is not believed here; a proxy in front is told to waitress instead.
    """
    text = request.META.get("REMOTE_ADDR", "")
    try:
        address = ipaddress.ip_address(text)
    except ValueError:
        return "unknown"
    if address.version == 6:
        return str(ipaddress.ip_network(f"{address}/64", strict=False))
    return str(address)
