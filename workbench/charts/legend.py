"""What marks of a picture mean: a sample and a name each, on one line or one under the other."""

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from workbench.charts.lettering import width
from workbench.charts.masonry import Box
from workbench.charts.shapes import Shape, Text

SAMPLE = 3.2
"""Width of a sample as a multiple of the letter size."""


@dataclass(frozen=True)
class Entry:
    """A name, and what draws a sample of the mark into a box."""

    name: str
    sample: Callable[[Box], Sequence[Shape]]


def legend(entries: Sequence[Entry], size: float, wide: float) -> tuple[list[Shape], float]:
    """The shapes of a legend, from its own top, and its height."""
    small = size * 0.92
    lengths = [size * (SAMPLE + 0.6) + width(entry.name, small) for entry in entries]
    one_line = sum(lengths) + 1.5 * size * len(lengths) <= wide
    shapes: list[Shape] = []
    right, down = 4.0, 0.0
    for entry, length in zip(entries, lengths, strict=True):
        if down == 0.0 or not one_line:
            right, down = 4.0, down + size * 1.5
        shapes += entry.sample(Box(right, down - size * 0.75, size * SAMPLE, size * 0.8))
        name = Text(right + size * (SAMPLE + 0.6), down, entry.name, small, colour="muted")
        shapes.append(name)
        right += length + 1.5 * size
    return shapes, down + size * 0.3 if shapes else 0.0
