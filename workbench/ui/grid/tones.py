"""The colours of a grid, mixed from the house palette."""

from dataclasses import dataclass
from functools import cache

from PySide6.QtGui import QColor, QPalette

from workbench.charts.palette import DARK, LIGHT, channels
from workbench.ui.theme import picture_palette


@dataclass(frozen=True)
class Tones:
    """Grounds and inks; each ink has a contrast of 4.5 or better on each ground."""

    paper: str
    band: str
    typed: str
    chosen: str
    rule: str
    ink: str
    muted: str
    fault: str


@cache
def tones(dark: bool) -> Tones:
    """The tones of a grid, light or dark."""
    palette = DARK if dark else LIGHT
    paper = palette["paper"]
    return Tones(
        paper=paper,
        band=palette["panel"],
        typed=mixed(paper, palette["expected"], 0.06 if dark else 0.16),
        chosen=mixed(paper, palette["exit"], 0.32),
        rule=palette["rule"],
        ink=palette["ink"],
        muted=palette["muted"],
        fault=palette["price"],
    )


def tones_of(palette: QPalette) -> Tones:
    """The tones that go with a widget's own colours."""
    return tones(picture_palette(palette) is DARK)


def mixed(one: str, other: str, share: float) -> str:
    """One colour with a share of another in it."""
    pairs = zip(channels(one), channels(other), strict=True)
    return QColor.fromRgbF(*(a + (b - a) * share for a, b in pairs)).name()
