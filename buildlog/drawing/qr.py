"""Codes to be scanned: QR as SVG, with its quiet zone."""

from buildlog.drawing.svg import drawing, tag

QUIET = 4  # modules; ISO/IEC 18004 asks for four


def qr_svg(content: str, *, title: str) -> str:
    """Return the QR code of a text, error correction Q."""
    import segno

    rows = [list(row) for row in segno.make(content, error="q", micro=False).matrix]
    size = len(rows) + 2 * QUIET
    dark = "".join(
        f"M{x + QUIET} {y + QUIET}h1v1h-1z" for y, row in enumerate(rows) for x, module in enumerate(row) if module
    )
    ground = tag("path", d=f"M0 0h{size}v{size}H0z", fill="#ffffff")
    return drawing(size, size, title, [ground, tag("path", d=dark, fill="#000000")], cls="code")
