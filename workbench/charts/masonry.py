"""Bricks: an area of one tone with joints drawn over it in running bond.

Joints are lines over one filled area and not gaps between rectangles, which some painters close
by widening each rectangle to whole dots.
"""

from dataclasses import dataclass
from itertools import pairwise
from math import ceil, floor

from workbench.charts.shapes import Line, Rect, Role, Shape

_LOWEST_BED = 3.0
"""Rows lower than this have no joints between them, or only joints would be seen."""
_LOWEST_UPRIGHT = 1.5


@dataclass(frozen=True)
class Bond:
    """How one kind of masonry is laid: its tone, the length of its bricks, the joint."""

    colour: Role
    length: float
    joint: float = 1.0


@dataclass(frozen=True)
class Box:
    """An area to fill."""

    x: float
    y: float
    width: float
    height: float

    @property
    def right(self) -> float:
        return self.x + self.width

    @property
    def bottom(self) -> float:
        return self.y + self.height


def lay(box: Box, rows: int, bond: Bond, origin: float) -> tuple[Shape, ...]:
    """The bricks of an area; `origin` is where the bond is measured from, so that areas line up."""
    tall = box.height / rows
    shapes: list[Shape] = [Rect(box.x, box.y, box.width, box.height, bond.colour)]
    levels = [box.y + row * tall for row in range(rows)] + [box.bottom]
    if tall >= _LOWEST_BED:
        shapes += [Line(box.x, y, box.right, y, "paper", bond.joint) for y in levels[1:-1]]
    if tall >= _LOWEST_UPRIGHT:
        for from_below, (top, bottom) in enumerate(pairwise(levels)):
            row = rows - 1 - from_below
            joints = _joints(box, bond, origin, row)
            shapes += [Line(x, top, x, bottom, "paper", bond.joint) for x in joints]
    return tuple(shapes)


def _joints(box: Box, bond: Bond, origin: float, row: int) -> list[float]:
    """Where the upright joints of a row fall; none so near an end that it would leave a sliver."""
    start = origin + (bond.length / 2 if row % 2 else 0.0)
    near = bond.length / 4
    first = ceil((box.x + near - start) / bond.length)
    last = floor((box.right - near - start) / bond.length)
    return [start + number * bond.length for number in range(first, last + 1)]
