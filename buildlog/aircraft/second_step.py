"""The picture a phone app reads to set up the second step."""

from buildlog.aircraft.models import User
from buildlog.drawing.qr import qr_svg


def new_secret() -> str:
    """Return a random secret of 160 bits in base 32 (RFC 4226, section 4: the length recommended)."""
    import pyotp

    return str(pyotp.random_base32(32))


def picture(user: User, secret: str, host: str) -> str:
    """Return the set-up address as a QR code in SVG."""
    import pyotp

    address = pyotp.TOTP(secret).provisioning_uri(name=user.sign_in, issuer_name=f"Buildlog {host}")
    return qr_svg(address, title="Picture to scan with the app on your phone")
