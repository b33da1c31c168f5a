"""The frame of a picture by year: a scale of money upwards, a place for each year to the right."""

from collections.abc import Callable, Iterable
from dataclasses import dataclass
from itertools import pairwise
from math import ceil, floor, isfinite, log10

from workbench.charts.lettering import CAP_HEIGHT, width
from workbench.charts.masonry import Box
from workbench.charts.shapes import Line, Region, Shape, Text

_LEAST_REACH = 1e-9
"""Below it all amounts are taken for nothing; the least part of any currency is larger."""
_MANY_YEARS = 15
_WIDEST = 8.0
"""Width of a year's bars at most, as a multiple of the letter size."""
_LEAST_REGION = 6.0
"""A lower bar is still found by pointing at it."""


@dataclass(frozen=True)
class Room:
    """The size of a picture and of its letters."""

    width: float
    height: float
    size: float

    @property
    def lettered(self) -> bool:
        """Whether there is room for words at all."""
        return self.width >= 16 * self.size and self.height >= 10 * self.size


@dataclass(frozen=True)
class Plot:
    """The edges of the area, the money at its lower and upper one, and the years within it."""

    left: float
    right: float
    top: float
    bottom: float
    low: float
    high: float
    first: int
    """The number of the first place: 1, or 0 where closing has a place of its own."""
    count: int
    widest: float
    """No bar group is wider, however few years there are."""

    def y(self, amount: float) -> float:
        """How far down an amount lies."""
        share = (amount - self.low) / (self.high - self.low)
        return self.bottom - share * (self.bottom - self.top)

    def place(self, number: int) -> tuple[float, float]:
        """Left edge and width of the place of a year."""
        wide = (self.right - self.left) / max(self.count, 1)
        return self.left + (number - self.first) * wide, wide

    def bar(self, number: int, start: float, end: float, part: tuple[float, float]) -> Box:
        """A bar from one amount to another, over a part of the place given by its ends, 0 to 1."""
        left, whole = self.place(number)
        wide = min(whole, self.widest)
        left += (whole - wide) / 2
        upper, lower = sorted((self.y(start), self.y(end)))
        return Box(left + part[0] * wide, upper, (part[1] - part[0]) * wide, lower - upper)


def region(key: str, box: Box) -> Region:
    """Where a bar is found by pointing."""
    spare = max(0.0, _LEAST_REGION - box.height) / 2
    return Region(key, box.x, box.y - spare, box.width, box.height + 2 * spare)


def known(row: Iterable[float | None]) -> list[tuple[int, float]]:
    """The amounts that there are, each with its place in the row from 0."""
    return [
        (place, amount)
        for place, amount in enumerate(row)
        if amount is not None and isfinite(amount)
    ]


def plot_of(
    room: Room,
    amounts: Iterable[float],
    years: range,
    money: Callable[[float], str],
    above: float,
) -> tuple[Plot, list[Shape]]:
    """The frame for amounts of some years, `above` kept free at the top, and its scale drawn."""
    every = [0.0, *amounts]
    bottom = room.height - (1.6 * room.size if room.lettered else 2.0)
    top = above + (0.7 * room.size if room.lettered else 2.0)
    marks = ticks(min(every), max(every), max(1, min(5, int((bottom - top) / (2.4 * room.size)))))
    names = [money(mark) for mark in marks]
    left = max(width(name, room.size) for name in names) + 7.0 if room.lettered else 2.0
    low, high = marks[0], marks[-1] if len(marks) > 1 else marks[0] + 1.0
    edges = (left, room.width - 2.0, top, bottom)
    plot = Plot(*edges, low, high, years.start, len(years), _WIDEST * room.size)
    shapes: list[Shape] = []
    for mark, name in zip(marks, names, strict=True):
        y = plot.y(mark)
        if mark:
            shapes.append(Line(plot.left, y, plot.right, y, "rule", 0.5))
        if room.lettered:
            down = y + room.size * CAP_HEIGHT / 2
            shapes.append(Text(plot.left - 5.0, down, name, room.size, "end", colour="muted"))
    return plot, [*shapes, *_year_names(plot, room, years)]


def ground(plot: Plot) -> Line:
    """The line of nothing, drawn over the bars that stand on it."""
    return Line(plot.left, plot.y(0.0), plot.right, plot.y(0.0), "ink", 1.0)


def ticks(low: float, high: float, most: int) -> tuple[float, ...]:
    """Round amounts from the lowest to the highest or beyond, with zero among them."""
    if high - low <= _LEAST_REACH:
        return (0.0,)
    rough = (high - low) / most
    power = 10.0 ** floor(log10(rough))
    step = next(times * power for times in (1, 2, 5, 10) if times * power >= rough * (1 - 1e-9))
    step = max(step, 1.0)
    return tuple(number * step for number in range(floor(low / step), ceil(high / step) + 1))


def _year_names(plot: Plot, room: Room, years: range) -> list[Shape]:
    """The numbers of the years under their places: all, or as many as stand clear."""
    if not room.lettered:
        return []
    steps = (5, 10, 20, 40) if len(years) > _MANY_YEARS + 1 else (1, 2, 5, 10, 20)
    choices = (
        [_year_name(plot, room, year) for year in years if year % step == 0] for step in steps
    )
    return [*next((names for names in choices if _are_clear(names, room)), [])]


def _year_name(plot: Plot, room: Room, year: int) -> Text:
    left, wide = plot.place(year)
    name = str(year) if year else "closing"
    return Text(left + wide / 2, room.height - 0.35 * room.size, name, room.size, "middle")


def _are_clear(names: list[Text], room: Room) -> bool:
    ends = [(name.x, width(name.text, room.size) / 2) for name in names]
    apart = 0.6 * room.size
    inside = all(x - half >= 0 and x + half <= room.width for x, half in ends)
    return inside and all(a + half + apart <= b - more for (a, half), (b, more) in pairwise(ends))
