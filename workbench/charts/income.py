"""Income and debt service by year: what is earned before and after works, and what loans take."""

from collections.abc import Callable
from dataclasses import dataclass

from workbench.charts.legend import Entry, legend
from workbench.charts.masonry import Box
from workbench.charts.plot import Plot, Room, ground, known, plot_of, region
from workbench.charts.shapes import Line, Picture, Polyline, Rect, Region, Shape

_NOI_PART = (0.14, 0.5)
_CASH_PART = (0.52, 0.86)
_PEN = 1.8


@dataclass(frozen=True)
class IncomeFigures:
    """Amounts of each year from year 1. `money` puts one into words for the reader."""

    noi: tuple[float | None, ...]
    net_cash: tuple[float | None, ...]
    service: tuple[float | None, ...]
    """What is paid on loans, above nothing; empty where there is no loan."""
    money: Callable[[float], str]
    mark: Callable[[float], str]
    """The same for the scale, whose amounts are put alike."""


def draw_income(figures: IncomeFigures, width: float, height: float, size: float = 11.0) -> Picture:
    """Two bars for each year and the debt service as a stepped line across them."""
    room = Room(width, height, size)
    above, tall = _legend(figures, room)
    series = (figures.noi, figures.net_cash, figures.service)
    amounts = [amount for row in series for _, amount in known(row)]
    plot, frame = plot_of(room, amounts, range(1, len(figures.noi) + 1), figures.mark, tall)
    noi = _bars(plot, figures.noi, "noi", _NOI_PART)
    cash = _bars(plot, figures.net_cash, "net_cash_flow", _CASH_PART)
    lines = _service(plot, figures.service)
    shapes = (
        *above,
        *frame,
        *(_filled(box) for _, box in noi),
        *(_outlined(box) for _, box in cash),
        ground(plot),
        *lines,
    )
    regions = [region(key, box) for key, box in (*noi, *cash)]
    regions += _line_regions(plot, figures.service)
    return Picture(width, height, shapes, tuple(regions), _words(figures))


def _bars(
    plot: Plot, row: tuple[float | None, ...], key: str, part: tuple[float, float]
) -> list[tuple[str, Box]]:
    return [
        (f"{key}.{place + 1}", plot.bar(place + 1, 0.0, amount, part))
        for place, amount in known(row)
    ]


def _filled(box: Box) -> Rect:
    return Rect(box.x, box.y, box.width, box.height, "income")


def _outlined(box: Box) -> Rect:
    return Rect(box.x, box.y, box.width, box.height, "panel", stroke="muted", stroke_width=0.7)


def _service(plot: Plot, row: tuple[float | None, ...]) -> list[Shape]:
    """A stepped line over the years in which anything is paid, broken where nothing is."""
    shapes: list[Shape] = []
    points: list[tuple[float, float]] = []
    for place, amount in enumerate((*row, None), start=1):
        if amount:
            left, wide = plot.place(place)
            points += [(left, plot.y(amount)), (left + wide, plot.y(amount))]
        elif points:
            shapes.append(Polyline(tuple(points), "debt", _PEN))
            points = []
    return shapes


def _line_regions(plot: Plot, row: tuple[float | None, ...]) -> list[Region]:
    boxes = [
        (place, plot.bar(place + 1, amount, amount, (0.0, 1.0)))
        for place, amount in known(row)
        if amount
    ]
    return [region(f"debt_service.{place + 1}", box) for place, box in boxes]


def _legend(figures: IncomeFigures, room: Room) -> tuple[list[Shape], float]:
    if not room.lettered:
        return [], 0.0
    entries = [
        Entry("net operating income", lambda box: [_filled(box)]),
        Entry("net cash flow before debt", lambda box: [_outlined(box)]),
    ]
    if any(amount for _, amount in known(figures.service)):
        entries.append(Entry("debt service", _line_sample))
    return legend(entries, room.size, room.width)


def _line_sample(box: Box) -> list[Shape]:
    middle = box.y + box.height / 2
    return [Line(box.x, middle, box.right, middle, "debt", _PEN)]


def _words(figures: IncomeFigures) -> str:
    """The picture in one line."""
    noi, cash, paid = map(known, (figures.noi, figures.net_cash, figures.service))
    if not noi or not cash:
        return "Net operating income cannot be given."
    money = figures.money
    said = f"Net operating income is {money(noi[0][1])} in year {noi[0][0] + 1}"
    least = min(cash, key=lambda one: one[1])
    if len(noi) > 1:
        said += f" and {money(noi[-1][1])} in year {noi[-1][0] + 1}"
        said += f"; net cash flow before debt is lowest in year {least[0] + 1}, at"
    else:
        said += "; net cash flow before debt is"
    said += f" {money(least[1])}; "
    if not any(amount for _, amount in paid):
        return f"{said}there is no debt service."
    most = money(max(amount for _, amount in paid))
    first = next(place for place, amount in paid if money(amount) == most)
    if len({money(amount) for _, amount in paid}) == 1:
        return f"{said}debt service is {most} a year."
    return f"{said}debt service is highest in year {first + 1}, at {most}."
