"""What stands on a page besides its body: the title, the running head and the foot."""

from workbench.charts.lettering import CAP_HEIGHT, LEADING, printable, shorten
from workbench.charts.shapes import Line, Shape, Text
from workbench.charts.wrapping import wrap, wrap_short
from workbench.report import sheet
from workbench.report.document import Document
from workbench.report.names import one_line

_FOOT_NUMBER = 60.0
"""Room for the page number at the right of the foot."""


def title_block(document: Document, column: float) -> tuple[list[Shape], float]:
    """What the first page begins with, and its height."""
    small = sheet.LOOKS["body"]
    kind = Text(0, small * CAP_HEIGHT, document.kind, small, "start", "bold", "price")
    dated = Text(
        column, small * CAP_HEIGHT, printable(document.dated), small, "end", colour="muted"
    )
    shapes: list[Shape] = [kind, dated]
    down = small + 4.0
    for line in wrap_short(printable(document.title), sheet.TITLE, column, 2, "bold"):
        down += sheet.TITLE * 1.15
        shapes.append(Text(0, down, line, sheet.TITLE, "start", "bold"))
    down += 4.0
    subtitle = printable(document.subtitle)
    for line in wrap_short(subtitle, sheet.SUBTITLE, column, 2) if subtitle else ():
        down += sheet.SUBTITLE * LEADING
        shapes.append(Text(0, down, line, sheet.SUBTITLE, colour="muted"))
    down += 10.0
    shapes.append(Line(0, down, column, down, "ink", 1.4))
    return shapes, down + 12.0


def running_head(document: Document, column: float) -> list[Shape]:
    size = sheet.NOTE
    text = shorten(f"{document.kind} · {one_line(printable(document.title))}", size, column - 110)
    return [
        Text(0, size * CAP_HEIGHT, text, size, colour="muted"),
        Text(column, size * CAP_HEIGHT, printable(document.dated), size, "end", colour="muted"),
        Line(0, size + 4, column, size + 4, "rule", 0.6),
    ]


def _foot_lines(document: Document, column: float) -> tuple[str, ...]:
    return wrap(printable(document.foot), sheet.FOOT, column - _FOOT_NUMBER)


def foot_height(document: Document, column: float) -> float:
    return len(_foot_lines(document, column)) * sheet.FOOT * LEADING + 6.0


def foot(document: Document, paper: sheet.Sheet, number: str) -> list[Shape]:
    """The caution and the page number over the lower margin."""
    top = paper.height - sheet.BOTTOM - foot_height(document, paper.column)
    left, right = sheet.SIDE, paper.width - sheet.SIDE
    shapes: list[Shape] = [Line(left, top, right, top, "rule", 0.6)]
    down = top + 5.0
    for line in _foot_lines(document, paper.column):
        down += sheet.FOOT * LEADING
        shapes.append(Text(left, down, line, sheet.FOOT, colour="muted"))
    first = top + 5.0 + sheet.FOOT * LEADING
    shapes.append(Text(right, first, number, sheet.FOOT, "end", colour="muted"))
    return shapes
