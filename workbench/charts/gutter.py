"""Labels beside a picture, moved apart so that none covers another."""

from collections.abc import Sequence
from dataclasses import dataclass

from workbench.charts.lettering import CAP_HEIGHT, LEADING, Weight, width
from workbench.charts.shapes import Anchor, Role, Text


@dataclass(frozen=True)
class Label:
    """Lines of text that belong to one height of the picture."""

    key: str
    at: float
    lines: tuple[str, ...]
    colour: Role = "ink"
    weight: Weight = "regular"

    def tall(self, size: float) -> float:
        return LEADING * size * len(self.lines)

    def wide(self, size: float) -> float:
        return max(width(line, size, self.weight) for line in self.lines)


@dataclass(frozen=True)
class Span:
    """What lies between two heights, the upper one first."""

    top: float
    bottom: float

    @property
    def length(self) -> float:
        return self.bottom - self.top


def spread(wanted: Sequence[tuple[float, float]], room: Span) -> tuple[float, ...]:
    """Middles as near as possible to those wanted, in the same order, without overlap.

    Each of `wanted` is a middle and a height, sorted by middle; together they fit the room.
    """
    clusters: list[tuple[float, int, float]] = []  # mean of wanted tops, members, height
    for middle, tall in wanted:
        top, members, height = middle - tall / 2, 1, tall
        while clusters and clusters[-1][0] + clusters[-1][2] > top:
            above_top, above_members, above_height = clusters.pop()
            total = above_members + members
            top = (above_top * above_members + (top - above_height) * members) / total
            members, height = total, above_height + height
        clusters.append((top, members, height))
    return _stacked(clusters, wanted, room)


def _stacked(
    clusters: list[tuple[float, int, float]], wanted: Sequence[tuple[float, float]], room: Span
) -> tuple[float, ...]:
    """The middles of the members, clusters pushed into the room from above, then from below."""
    tops: list[float] = []
    free = room.top
    for top, _, height in clusters:
        tops.append(max(top, free))
        free = tops[-1] + height
    free = room.bottom
    for place in reversed(range(len(tops))):
        tops[place] = min(tops[place], free - clusters[place][2])
        free = tops[place]
    middles: list[float] = []
    members = iter(wanted)
    for top, (_, count, _) in zip(tops, clusters, strict=True):
        for _ in range(count):
            tall = next(members)[1]
            middles.append(top + tall / 2)
            top += tall
    return tuple(middles)


def lettered(label: Label, x: float, middle: float, size: float, anchor: Anchor) -> list[Text]:
    """The lines of a label around a middle height."""
    first = middle + size * (CAP_HEIGHT / 2 - LEADING * (len(label.lines) - 1) / 2)
    return [
        Text(x, first + LEADING * size * place, line, size, anchor, label.weight, label.colour)
        for place, line in enumerate(label.lines)
    ]
