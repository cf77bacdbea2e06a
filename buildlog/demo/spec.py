"""What one demo photo shows: the plain description that a scene is drawn from."""

from dataclasses import dataclass
from datetime import datetime

Colour = tuple[int, int, int]


@dataclass(frozen=True)
class PhotoSpec:
    """One demo photo.

    key seeds the drawing, so that the same key always gives the same bytes. colour is the main colour of the subject,
    angle [degrees] swings the camera round it, zoom [1 = as designed] moves it closer, clutter [0 to 3] is how many
    odd things lie about, lines are texts written on labels, cards and displays. taken carries its UTC offset.
    """

    key: str
    scene: str
    caption: str
    taken: datetime
    colour: Colour = (150, 60, 48)
    light: str = "left"
    angle: float = 0.0
    zoom: float = 1.0
    clutter: int = 1
    lines: tuple[str, ...] = ()
    camera: str = ""
    orientation: int = 1
    shows_builder: bool = False
    loose: bool = False
