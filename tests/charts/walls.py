"""Figures for walls and ways to read a picture, shared by the tests of the wall."""

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Picture, Rect, Region, Text
from workbench.charts.wall_stack import WallCourse, WallFigures

BASE = [
    (226_927.0, 0.0),
    (205_000.0, 8_981.0),
    (190_000.0, 11_834.0),
    (150_000.0, 40_521.0),
    (130_000.0, 49_722.0),
    (0.0, 179_864.0),
]


def money(amount: float) -> str:
    return f"{amount:,.0f}".replace("-", "−")


def share(fraction: float) -> str:
    return f"{100 * fraction:.1f}%"


def wall_figures(
    rows: list[tuple[float, float]],
    leaving: float | None,
    price: float | None = None,
    has_leases: bool = True,
    exit_reason: str = "",
) -> WallFigures:
    courses = tuple(WallCourse(year, a, b) for year, (a, b) in enumerate(rows, start=1))
    value = None if leaving is None else sum(a + b for a, b in rows) + leaving
    part = leaving / value if leaving is not None and value and value > 0 else None
    return WallFigures(courses, leaving, value, price, part, money, share, has_leases, exit_reason)


def said(picture: Picture) -> list[str]:
    return [shape.text for shape in picture.shapes if isinstance(shape, Text)]


def text_named(picture: Picture, text: str) -> Text:
    return next(s for s in picture.shapes if isinstance(s, Text) and s.text == text)


def region(picture: Picture, key: str) -> Region:
    return next(found for found in picture.regions if found.key == key)


def ground_of(picture: Picture) -> float:
    """The height of the one heavy line that is not dashed."""
    lines = [s for s in picture.shapes if isinstance(s, Line) and s.colour == "ink" and s.width > 1]
    assert len(lines) == 1
    return lines[0].y1


def price_line_of(picture: Picture) -> Line | None:
    return next((s for s in picture.shapes if isinstance(s, Line) and s.dashes), None)


def hatched(picture: Picture) -> list[Rect]:
    return [s for s in picture.shapes if isinstance(s, Rect) and s.hatch]


def text_boxes(picture: Picture) -> list[tuple[float, float, float, float]]:
    """Left, top, right and bottom of the capital letters of each text."""
    boxes = []
    for shape in picture.shapes:
        if isinstance(shape, Text):
            wide = width(shape.text, shape.size, shape.weight)
            left = shape.x - {"start": 0.0, "middle": wide / 2, "end": wide}[shape.anchor]
            boxes.append((left, shape.y - 0.72 * shape.size, left + wide, shape.y))
    return boxes


def overlapping(boxes: list[tuple[float, float, float, float]]) -> bool:
    return any(
        one[0] < other[2] - 0.01
        and other[0] < one[2] - 0.01
        and one[1] < other[3] - 0.01
        and other[1] < one[3] - 0.01
        for place, one in enumerate(boxes)
        for other in boxes[place + 1 :]
    )
