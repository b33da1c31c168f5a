"""Paints plain shapes with Qt: on a screen, into an image, a file or the clipboard."""

from itertools import groupby
from math import floor

from PySide6.QtCore import (
    QBuffer,
    QByteArray,
    QIODevice,
    QLineF,
    QPointF,
    QRectF,
    QSize,
    Qt,
)
from PySide6.QtGui import (
    QColor,
    QGuiApplication,
    QImage,
    QImageWriter,
    QPainter,
    QPainterPath,
    QPen,
    QPolygonF,
)
from PySide6.QtSvg import QSvgGenerator

from workbench.charts.lettering import printable, width
from workbench.charts.palette import PRINT, Palette
from workbench.charts.shapes import Anchor, Line, Picture, Polyline, Rect, Role, Shape, Text
from workbench.ui.theme import CHART_LETTERS, chart_font, load_font

_HATCH_PITCH = 4.0
_HATCH_WIDTH = 0.7
_SHARP = 3.0
"""Dots for each unit of a picture that leaves the program."""
_PARTS: dict[Anchor, float] = {"start": 0.0, "middle": 0.5, "end": 1.0}


def paint_picture(
    painter: QPainter, picture: Picture, palette: Palette, outlined: bool = False
) -> None:
    """Paint a picture from the painter's origin; `outlined` draws letters as shapes.

    Letters as shapes look the same where the font is not at hand.
    """
    painter.save()
    painter.setRenderHint(QPainter.RenderHint.Antialiasing)
    painter.setRenderHint(QPainter.RenderHint.TextAntialiasing)
    for pen, shapes in groupby(picture.shapes, _pen_of):
        if pen is not None:
            painter.setPen(_pen(palette, *pen))
            painter.drawLines([_line(shape) for shape in shapes if isinstance(shape, Line)])
            continue
        for shape in shapes:
            _paint_shape(painter, shape, palette, outlined)
    painter.restore()


def to_image(picture: Picture, palette: Palette = PRINT, scale: float = _SHARP) -> QImage:
    """The picture on its paper, with so many dots for each unit."""
    load_font()
    image = QImage(
        max(1, round(picture.width * scale)),
        max(1, round(picture.height * scale)),
        QImage.Format.Format_RGB32,
    )
    image.fill(QColor(palette["paper"]))
    image.setText("Description", picture.words)
    with QPainter(image) as painter:
        painter.scale(scale, scale)
        paint_picture(painter, picture, palette)
    return image


def to_png(picture: Picture, palette: Palette = PRINT, scale: float = _SHARP) -> bytes:
    """The bytes of a PNG file; its description is the picture in words."""
    device = _Kept()
    QImageWriter(device.buffer, QByteArray(b"PNG")).write(to_image(picture, palette, scale))
    return device.bytes()


def to_svg(picture: Picture, palette: Palette = PRINT) -> bytes:
    """The bytes of an SVG file; letters are shapes, the description is the picture in words."""
    load_font()
    device = _Kept()
    generator = QSvgGenerator()
    generator.setOutputDevice(device.buffer)
    generator.setViewBox(QRectF(0, 0, picture.width, picture.height))
    generator.setResolution(96)
    generator.setSize(QSize(round(picture.width), round(picture.height)))
    generator.setTitle(picture.words.partition(".")[0])
    generator.setDescription(picture.words)
    with QPainter(generator) as painter:
        whole = QRectF(0, 0, picture.width, picture.height)
        painter.fillRect(whole, QColor(palette["paper"]))
        paint_picture(painter, picture, palette, outlined=True)
    return device.bytes()


def copy_picture(picture: Picture, palette: Palette = PRINT) -> None:
    """Put the picture on the clipboard.

    As an image alone: data of several kinds would be an object of Python's, which Qt destroys
    after Python has ended, and the process would break off.
    """
    QGuiApplication.clipboard().setImage(to_image(picture, palette))


class _Kept:
    """A file that is kept in memory."""

    def __init__(self) -> None:
        self._data = QByteArray()
        self.buffer = QBuffer(self._data)
        self.buffer.open(QIODevice.OpenModeFlag.WriteOnly)

    def bytes(self) -> bytes:
        self.buffer.close()
        return bytes(self._data.data())


def _paint_shape(painter: QPainter, shape: Shape, palette: Palette, outlined: bool) -> None:
    if isinstance(shape, Rect):
        _paint_rect(painter, shape, palette)
    elif isinstance(shape, Text):
        _paint_text(painter, shape, palette, outlined)
    elif isinstance(shape, Polyline):
        _paint_polyline(painter, shape, palette)


def _pen_of(shape: Shape) -> tuple[Role, float, tuple[float, ...]] | None:
    """What a line is drawn with; lines of one pen that follow each other are drawn as one."""
    return (shape.colour, shape.width, shape.dashes) if isinstance(shape, Line) else None


def _line(line: Line) -> QLineF:
    return QLineF(line.x1, line.y1, line.x2, line.y2)


def _pen(palette: Palette, role: Role, width: float, dashes: tuple[float, ...] = ()) -> QPen:
    """A pen with flat ends; Qt counts dashes in widths of the pen."""
    pen = QPen(QColor(palette[role]), width)
    pen.setCapStyle(Qt.PenCapStyle.FlatCap)
    pen.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
    if dashes and width > 0:
        even = dashes if len(dashes) % 2 == 0 else 2 * dashes
        pen.setDashPattern([length / width for length in even])
    return pen


def _paint_rect(painter: QPainter, rect: Rect, palette: Palette) -> None:
    area = QRectF(rect.x, rect.y, rect.width, rect.height)
    if rect.fill is not None:
        painter.fillRect(area, QColor(palette[rect.fill]))
    if rect.hatch is not None:
        _hatch(painter, area, _pen(palette, rect.hatch, _HATCH_WIDTH))
    if rect.stroke is not None:
        painter.setPen(_pen(palette, rect.stroke, rect.stroke_width))
        painter.setBrush(Qt.BrushStyle.NoBrush)
        painter.drawRect(area)


def _hatch(painter: QPainter, area: QRectF, pen: QPen) -> None:
    """Lines that rise to the right, on one grid for the whole picture so that neighbours join."""
    painter.setPen(pen)
    first = floor((area.left() + area.top()) / _HATCH_PITCH) + 1
    last = floor((area.right() + area.bottom()) / _HATCH_PITCH)
    lines = []
    for number in range(first, last + 1):
        reach = number * _HATCH_PITCH
        left, right = max(area.left(), reach - area.bottom()), min(area.right(), reach - area.top())
        lines.append(QLineF(left, reach - left, right, reach - right))
    painter.drawLines(lines)


def _paint_text(painter: QPainter, text: Text, palette: Palette, outlined: bool) -> None:
    shown = printable(text.text).replace("\n", " ")
    left = text.x - _PARTS[text.anchor] * width(shown, text.size, text.weight)
    font = chart_font(text.weight)
    painter.save()
    painter.translate(left, text.y)
    painter.scale(text.size / CHART_LETTERS, text.size / CHART_LETTERS)
    if outlined:
        path = QPainterPath()
        path.addText(0, 0, font, shown)
        painter.fillPath(path, QColor(palette[text.colour]))
    else:
        painter.setPen(QColor(palette[text.colour]))
        painter.setFont(font)
        painter.drawText(0, 0, shown)
    painter.restore()


def _paint_polyline(painter: QPainter, polyline: Polyline, palette: Palette) -> None:
    points = QPolygonF([QPointF(x, y) for x, y in polyline.points])
    painter.setPen(_pen(palette, polyline.colour, polyline.width))
    if polyline.fill is None:
        painter.drawPolyline(points)
    else:
        painter.setBrush(QColor(palette[polyline.fill]))
        painter.drawPolygon(points)
