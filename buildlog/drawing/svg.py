"""Building SVG with every text escaped; colours come from classes, so that light, print and policy hold."""

from collections.abc import Iterable
from xml.sax.saxutils import escape, quoteattr

INK = {  # what a class means on paper, where no page stylesheet reaches
    "k-ink": 'stroke="#12202b"',
    "k-edge": 'stroke="#78868f"',
    "k-rule": 'stroke="#c3cbd0"',
    "k-blue": 'stroke="#0a4a8c"',
    "k-green": 'stroke="#3f6212"',
    "k-red": 'stroke="#b3201b"',
    "f0": 'fill="none"',
    "fi": 'fill="#12202b"',
    "fs": 'fill="#ffffff"',
    "fb": 'fill="#5b6b78"',
    "fr": 'fill="#b3201b"',
    "fg": 'fill="#3f6212"',
    "fgt": 'fill="#e9eef1"',
}


def tag(name: str, content: str = "", *, cls: str = "", **attributes: object) -> str:
    """Return one element; attribute names write `-` as `_`, `content` is markup already escaped."""
    parts = [f"<{name}"]
    if cls:
        own = " ".join(INK[one] for one in cls.split() if one in INK)
        parts.append(f"class={quoteattr(cls)} {own}".rstrip())
    for key, value in attributes.items():
        shown = f"{value:.2f}".rstrip("0").rstrip(".") if isinstance(value, float) else str(value)
        parts.append(f"{key.replace('_', '-')}={quoteattr(shown)}")
    return " ".join(parts) + (f">{content}</{name}>" if content else "/>")


def text(x: float, y: float, words: str, *, anchor: str = "start", cls: str = "", size: float = 12) -> str:
    """Return a text at a place."""
    return tag("text", escape(words), cls=cls, x=float(x), y=float(y), text_anchor=anchor, font_size=float(size))


def path(
    points: Iterable[tuple[float, float]], *, cls: str, width: float = 1.5, dash: str = "", close: bool = False
) -> str:
    """Return a line through points."""
    d = "M" + "L".join(f"{x:.2f} {y:.2f}" for x, y in points) + ("Z" if close else "")
    more = {"stroke_dasharray": dash} if dash else {}
    return tag("path", cls=cls, d=d, stroke_width=width, **more)


def drawing(width: float, height: float, title: str, body: Iterable[str], *, cls: str = "plot") -> str:
    """Return a whole drawing with its title for those who cannot see it."""
    head = (
        f'<svg xmlns="http://www.w3.org/2000/svg" class="{cls}" viewBox="0 0 {width:g} {height:g}" role="img" '
        f'font-family="Liberation Sans, sans-serif">'
    )
    return f"{head}<title>{escape(title)}</title>{''.join(body)}</svg>"
