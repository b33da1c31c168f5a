"""Loan under price: what is owed at closing and at each year's end, and what stands over it."""

from collections.abc import Callable
from dataclasses import dataclass
from itertools import pairwise

from workbench.charts.legend import Entry, legend
from workbench.charts.masonry import Box
from workbench.charts.plot import Plot, Room, ground, known, plot_of, region
from workbench.charts.shapes import Line, Picture, Rect, Region, Shape

_PART = (0.2, 0.8)
_DOT = 3.4
_DASHES = (0.55, 0.3)
"""Of the price line, as multiples of the letter size; as on the value wall."""


@dataclass(frozen=True)
class LoanFigures:
    """Amounts at closing and at the end of each year; `sale` is None at closing."""

    balance: tuple[float | None, ...]
    price: float | None
    sale: tuple[float | None, ...]
    """What the exit method makes of a sale at the end of each year."""
    money: Callable[[float], str]
    mark: Callable[[float], str]
    """The same for the scale, whose amounts are put alike."""
    share: Callable[[float], str]


def draw_loan(figures: LoanFigures, width: float, height: float, size: float = 11.0) -> Picture:
    """A bar for each balance under the line of the price and the prices of a sale."""
    room = Room(width, height, size)
    above, tall = _legend(figures, room)
    amounts = [amount for row in (figures.balance, figures.sale) for _, amount in known(row)]
    amounts += [] if figures.price is None else [figures.price]
    plot, frame = plot_of(room, amounts, range(len(figures.balance)), figures.mark, tall)
    bars = [
        (f"loan_balance.{year}", plot.bar(year, 0.0, amount, _PART))
        for year, amount in known(figures.balance)
    ]
    shapes: list[Shape] = [*above, *frame, *(_owed(box) for _, box in bars), ground(plot)]
    shapes += _sale_line(plot, figures.sale)
    regions = [region(key, box) for key, box in bars]
    if figures.price is not None:
        y = plot.y(figures.price)
        shapes.append(_price_line(Box(plot.left, y, plot.right - plot.left, 0.0), size))
        regions.append(region("price", Box(plot.left, y, plot.right - plot.left, 0.0)))
    regions += _dot_regions(plot, figures.sale)
    return Picture(width, height, tuple(shapes), tuple(regions), _words(figures))


def _owed(box: Box) -> Rect:
    return Rect(box.x, box.y, box.width, box.height, "debt")


def _price_line(box: Box, size: float) -> Line:
    middle = box.y + box.height / 2
    dashes = (_DASHES[0] * size, _DASHES[1] * size)
    return Line(box.x, middle, box.right, middle, "price", 1.6, dashes)


def _sale_line(plot: Plot, row: tuple[float | None, ...]) -> list[Shape]:
    """Dots joined where years follow one another."""
    prices = known(row)
    shapes: list[Shape] = []
    for (year, amount), (following, other) in pairwise(prices):
        if following == year + 1:
            (x1, wide), (x2, _) = plot.place(year), plot.place(following)
            ends = (x1 + wide / 2, plot.y(amount), x2 + wide / 2, plot.y(other))
            shapes.append(Line(*ends, "muted", 0.8))
    return [*shapes, *(_dot(box) for _, box in _dots(plot, row))]


def _dots(plot: Plot, row: tuple[float | None, ...]) -> list[tuple[int, Box]]:
    found = []
    for year, amount in known(row):
        left, wide = plot.place(year)
        corner = (left + wide / 2 - _DOT / 2, plot.y(amount) - _DOT / 2)
        found.append((year, Box(*corner, _DOT, _DOT)))
    return found


def _dot(box: Box) -> Rect:
    return Rect(box.x, box.y, box.width, box.height, "exit", stroke="ink", stroke_width=0.6)


def _dot_regions(plot: Plot, row: tuple[float | None, ...]) -> list[Region]:
    return [region(f"exit_price_of_year.{year}", box) for year, box in _dots(plot, row)]


def _legend(figures: LoanFigures, room: Room) -> tuple[list[Shape], float]:
    if not room.lettered:
        return [], 0.0
    entries = []
    if any(amount for _, amount in known(figures.balance)):
        entries.append(Entry("loans owed", lambda box: [_owed(box)]))
    if figures.price is not None:
        name = f"price {figures.money(figures.price)}"
        entries.append(Entry(name, lambda box: [_price_line(box, room.size)]))
    if known(figures.sale):
        entries.append(Entry("price of a sale at the year’s end", _sale_sample))
    return legend(entries, room.size, room.width)


def _sale_sample(box: Box) -> list[Shape]:
    middle = box.y + box.height / 2
    dot = Box(box.x + box.width / 2 - _DOT / 2, middle - _DOT / 2, _DOT, _DOT)
    return [Line(box.x, middle, box.right, middle, "muted", 0.8), _dot(dot)]


def _words(figures: LoanFigures) -> str:
    """The picture in one line."""
    owed = known(figures.balance)
    if not any(amount for _, amount in owed):
        return "No loan is owed."
    money = figures.money
    opening, (last, left) = owed[0][1], owed[-1]
    said = f"Loans of {money(opening)} at closing"
    if figures.price is not None and figures.price > 0:
        said += f" are {figures.share(opening / figures.price)} of the price"
    if not left:
        return f"{said}; nothing is owed after year {_last_owed(owed) + 1}."
    said += f"; {money(left)} is owed at the end of year {last}"
    sale = dict(known(figures.sale)).get(last)
    if sale is not None and sale > 0:
        said += f", {figures.share(left / sale)} of the price of a sale then"
    return f"{said}."


def _last_owed(owed: list[tuple[int, float]]) -> int:
    """The last year at whose end anything is owed; 0 is closing."""
    return max(year for year, amount in owed if amount)
