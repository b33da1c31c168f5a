"""Paints plain shapes on a page of a PDF."""

from functools import cache
from math import floor

from reportlab.lib.colors import Color
from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont
from reportlab.pdfgen.canvas import Canvas

from workbench.charts.lettering import Weight, printable
from workbench.charts.palette import PRINT, channels
from workbench.charts.shapes import Line, Picture, Polyline, Rect, Role, Shape, Text
from workbench.places import resources

_HATCH_PITCH = 4.0
_FONTS: dict[Weight, str] = {
    "regular": "Lato-Regular",
    "bold": "Lato-Bold",
    "italic": "Lato-Italic",
}
FIRST_FONT = _FONTS["regular"]
"""What a page begins with; else it would name a font that is not embedded."""


@cache
def register_fonts() -> None:
    """Make the shipped font known to the PDF library, which embeds the letters used."""
    for name in _FONTS.values():
        pdfmetrics.registerFont(TTFont(name, str(resources() / "fonts" / f"{name}.ttf")))


def paint(canvas: Canvas, picture: Picture) -> None:
    """Paint a picture that is as large as the page."""
    register_fonts()
    for shape in picture.shapes:
        _paint_shape(canvas, shape, picture.height)


def _paint_shape(canvas: Canvas, shape: Shape, height: float) -> None:
    if isinstance(shape, Rect):
        _paint_rect(canvas, shape, height)
    elif isinstance(shape, Text):
        _paint_text(canvas, shape, height)
    elif isinstance(shape, Line):
        _pen(canvas, shape.colour, shape.width)
        canvas.setDash(list(shape.dashes))
        canvas.line(shape.x1, height - shape.y1, shape.x2, height - shape.y2)
        canvas.setDash([])
    else:
        _paint_polyline(canvas, shape, height)


def _colour(role: Role) -> Color:
    return Color(*channels(PRINT[role]))


def _pen(canvas: Canvas, role: Role, width: float) -> None:
    canvas.setStrokeColor(_colour(role))
    canvas.setLineWidth(width)


def _paint_rect(canvas: Canvas, rect: Rect, height: float) -> None:
    bottom = height - rect.y - rect.height
    if rect.fill is not None:
        canvas.setFillColor(_colour(rect.fill))
        canvas.rect(rect.x, bottom, rect.width, rect.height, stroke=0, fill=1)
    if rect.hatch is not None:
        _hatch(canvas, rect, bottom)
    if rect.stroke is not None:
        _pen(canvas, rect.stroke, rect.stroke_width)
        canvas.rect(rect.x, bottom, rect.width, rect.height, stroke=1, fill=0)


def _hatch(canvas: Canvas, rect: Rect, bottom: float) -> None:
    """Lines at 45 degrees, on one grid for the whole page so that neighbours join up."""
    assert rect.hatch is not None
    canvas.saveState()
    clip = canvas.beginPath()
    clip.rect(rect.x, bottom, rect.width, rect.height)
    canvas.clipPath(clip, stroke=0, fill=0)
    _pen(canvas, rect.hatch, 0.7)
    first = floor((rect.x - bottom - rect.height) / _HATCH_PITCH)
    last = floor((rect.x + rect.width - bottom) / _HATCH_PITCH) + 1
    for number in range(first, last + 1):
        start = number * _HATCH_PITCH + bottom
        canvas.line(start, bottom, start + rect.height, bottom + rect.height)
    canvas.restoreState()


def _paint_text(canvas: Canvas, text: Text, height: float) -> None:
    canvas.setFillColor(_colour(text.colour))
    canvas.setFont(_FONTS[text.weight], text.size)
    draw = {
        "start": canvas.drawString,
        "middle": canvas.drawCentredString,
        "end": canvas.drawRightString,
    }[text.anchor]
    draw(text.x, height - text.y, printable(text.text).replace("\n", " "))


def _paint_polyline(canvas: Canvas, polyline: Polyline, height: float) -> None:
    _pen(canvas, polyline.colour, polyline.width)
    path = canvas.beginPath()
    (x, y), *others = polyline.points
    path.moveTo(x, height - y)
    for x, y in others:
        path.lineTo(x, height - y)
    if polyline.fill is not None:
        canvas.setFillColor(_colour(polyline.fill))
        path.close()
    canvas.drawPath(path, stroke=1, fill=int(polyline.fill is not None))
