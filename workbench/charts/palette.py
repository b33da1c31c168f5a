"""The house palette: stone and ink. Every colour that a picture or a page may use is here."""

from collections.abc import Mapping
from typing import TypeAlias

from workbench.charts.shapes import Role

Palette: TypeAlias = Mapping[Role, str]

LIGHT: Palette = {
    "paper": "#F7F5F0",  # limestone
    "panel": "#ECE8DF",
    "rule": "#CDC6B8",
    "ink": "#1E2328",
    "muted": "#5A5750",
    "in_hand": "#574439",  # basalt
    "expected": "#D2BF9F",  # sandstone
    "exit": "#98A6AF",  # slate
    "on_exit": "#171B1F",
    "price": "#9C2B1B",  # iron oxide
    "hatch": "#8A776B",
    "income": "#84916F",  # lichen
    "debt": "#2E4355",  # deep slate
}

DARK: Palette = {
    "paper": "#1B1E21",
    "panel": "#262A2E",
    "rule": "#474B4F",
    "ink": "#ECE8E0",
    "muted": "#ABA69C",
    "in_hand": "#7D5F4B",
    "expected": "#DCC9A8",
    "exit": "#566672",
    "on_exit": "#F4F1EA",
    "price": "#F0907F",
    "hatch": "#9A877B",
    "income": "#6D795F",
    "debt": "#BFD4E6",
}

PRINT: Palette = {**LIGHT, "paper": "#FFFFFF", "panel": "#F2EFE8"}
"""For documents: the light tones on white paper."""


def channels(colour: str) -> tuple[float, float, float]:
    """Red, green and blue of `#RRGGBB`, each from 0 to 1."""
    red, green, blue = (int(colour[place : place + 2], 16) / 255 for place in (1, 3, 5))
    return red, green, blue


def contrast(one: str, other: str) -> float:
    """The contrast ratio of two colours, 1 to 21, as the WCAG 2 defines it."""
    light, dark = sorted((_luminance(one), _luminance(other)), reverse=True)
    return (light + 0.05) / (dark + 0.05)


def _luminance(colour: str) -> float:
    red, green, blue = (
        part / 12.92 if part <= 0.04045 else ((part + 0.055) / 1.055) ** 2.4
        for part in channels(colour)
    )
    return 0.2126 * red + 0.7152 * green + 0.0722 * blue
