"""The plain shapes that every picture is made of; painters only read them.

Coordinates run right and down from the top left corner, in pixels on a screen and in points on
paper. Colours are roles, which a palette turns into tones.
"""

from dataclasses import dataclass, replace
from typing import Literal, TypeAlias

from workbench.charts.lettering import Weight

Role: TypeAlias = Literal[
    "paper", "panel", "rule", "ink", "muted",
    "in_hand", "expected", "exit", "on_exit", "price", "hatch", "income", "debt",
]  # fmt: skip
Anchor: TypeAlias = Literal["start", "middle", "end"]


@dataclass(frozen=True)
class Rect:
    """A rectangle, filled, hatched with slanting lines or outlined."""

    x: float
    y: float
    width: float
    height: float
    fill: Role | None = None
    hatch: Role | None = None
    stroke: Role | None = None
    stroke_width: float = 0.75


@dataclass(frozen=True)
class Line:
    """A straight line with flat ends; `dashes` are lengths of line and gap in turn."""

    x1: float
    y1: float
    x2: float
    y2: float
    colour: Role
    width: float = 1.0
    dashes: tuple[float, ...] = ()


@dataclass(frozen=True)
class Text:
    """One line of text; `y` is its baseline and `x` the point that the anchor holds."""

    x: float
    y: float
    text: str
    size: float
    anchor: Anchor = "start"
    weight: Weight = "regular"
    colour: Role = "ink"


@dataclass(frozen=True)
class Polyline:
    """Joined straight lines, closed and filled where a fill is given."""

    points: tuple[tuple[float, float], ...]
    colour: Role
    width: float = 1.0
    fill: Role | None = None


Shape: TypeAlias = Rect | Line | Text | Polyline


@dataclass(frozen=True)
class Region:
    """A rectangle that stands for one figure when pointed at; the last one drawn is on top."""

    key: str
    x: float
    y: float
    width: float
    height: float


@dataclass(frozen=True)
class Picture:
    """A finished picture; shapes are painted in order. `words` says the same without looking."""

    width: float
    height: float
    shapes: tuple[Shape, ...]
    regions: tuple[Region, ...] = ()
    words: str = ""


def moved(shape: Shape, right: float, down: float) -> Shape:
    """The same shape somewhere else."""
    if isinstance(shape, Line):
        return replace(
            shape,
            x1=shape.x1 + right,
            y1=shape.y1 + down,
            x2=shape.x2 + right,
            y2=shape.y2 + down,
        )
    if isinstance(shape, Polyline):
        return replace(shape, points=tuple((x + right, y + down) for x, y in shape.points))
    return replace(shape, x=shape.x + right, y=shape.y + down)
