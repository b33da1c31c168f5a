"""Pages of a document one under the other, as wide as there is room for."""

from collections.abc import Sequence
from itertools import accumulate

from PySide6.QtCore import QRectF, Qt, QTimer, Signal
from PySide6.QtGui import QColor, QImage, QPainter, QPaintEvent, QPen, QResizeEvent
from PySide6.QtWidgets import QFrame, QScrollArea, QWidget

from workbench.charts.palette import PRINT
from workbench.ui.theme import SPACE_WIDE, picture_palette

WIDEST = 880.0
"""A page is not shown wider than that."""
_KEPT = 12
"""Images of pages kept; those farthest from sight are let go."""
_SETTLED = 150
"""Milliseconds after the last change of width at which pages are rendered anew."""


class PagesView(QScrollArea):
    """Asks for the images of the pages that come into sight."""

    wanted = Signal(object)
    """The image of a page is wanted: carries its number from 0 and its width in dots."""

    def __init__(self, name: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setAccessibleName(name)
        self.setFrameShape(QFrame.Shape.NoFrame)
        self.setHorizontalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        self.setVerticalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOn)
        self.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
        self._sheets = _Sheets(self)
        self.setWidget(self._sheets)
        self._asked: dict[int, int] = {}
        self._settle = QTimer(self)
        self._settle.setSingleShot(True)
        self._settle.setInterval(_SETTLED)
        self._settle.timeout.connect(self.ask)
        self.verticalScrollBar().valueChanged.connect(self._on_scrolled)

    def show_pages(self, sizes: Sequence[tuple[float, float]]) -> None:
        """Other pages, of these widths and heights; the place in the document stays."""
        self._asked.clear()
        self._sheets.show_pages(sizes, self.viewport().width())
        self.ask()

    def show_image(self, number: int, image: QImage) -> None:
        """The image of a page, as it was asked for."""
        self._sheets.images[number] = image
        near = sorted(self._sheets.images, key=self._sheets.distance_from(self._in_sight()))
        for far in near[_KEPT:]:
            del self._sheets.images[far]
            self._asked.pop(far, None)
        self._sheets.update()

    def image(self, number: int) -> QImage | None:
        return self._sheets.images.get(number)

    def page_area(self, number: int) -> QRectF:
        """Where a page lies within the whole column of pages."""
        return self._sheets.areas[number]

    def ask(self) -> None:
        """Ask for the pages in sight that have not been asked for at this width."""
        dots = self.devicePixelRatioF()
        sight = self._in_sight()
        for number, area in enumerate(self._sheets.areas):
            wide = round(area.width() * dots)
            if area.intersects(sight) and self._asked.get(number) != wide:
                self._asked[number] = wide
                self.wanted.emit((number, wide))

    def _in_sight(self) -> QRectF:
        top = self.verticalScrollBar().value()
        return QRectF(0, top, self.viewport().width(), self.viewport().height())

    def _on_scrolled(self, value: int) -> None:
        self.ask()

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._sheets.fit(self.viewport().width())
        self._settle.start()


class _Sheets(QWidget):
    """The column of pages."""

    def __init__(self, parent: QWidget) -> None:
        super().__init__(parent)
        self._sizes: tuple[tuple[float, float], ...] = ()
        self.areas: tuple[QRectF, ...] = ()
        self.images: dict[int, QImage] = {}

    def show_pages(self, sizes: Sequence[tuple[float, float]], room: int) -> None:
        self._sizes = tuple(sizes)
        self.images = {n: image for n, image in self.images.items() if n < len(self._sizes)}
        self.fit(room)

    def fit(self, room: int) -> None:
        """Lay the pages out in a column so wide."""
        wide = max(1.0, min(WIDEST, room - 2 * SPACE_WIDE))
        heights = [wide * tall / across for across, tall in self._sizes]
        tops = accumulate((tall + SPACE_WIDE for tall in heights), initial=float(SPACE_WIDE))
        left = (room - wide) / 2
        self.areas = tuple(
            QRectF(left, top, wide, tall) for top, tall in zip(tops, heights, strict=False)
        )
        bottom = self.areas[-1].bottom() + SPACE_WIDE if self.areas else 0
        self.resize(room, round(bottom))
        self.update()

    def distance_from(self, sight: QRectF) -> "_Distance":
        return _Distance(self.areas, sight)

    def paintEvent(self, event: QPaintEvent) -> None:
        edge = QPen(QColor(picture_palette(self.palette())["rule"]), 1.0)
        with QPainter(self) as painter:
            painter.setRenderHint(QPainter.RenderHint.SmoothPixmapTransform)
            painter.setPen(edge)
            for number, area in enumerate(self.areas):
                if area.intersects(QRectF(event.rect())):
                    painter.fillRect(area, QColor(PRINT["paper"]))
                    if number in self.images:
                        painter.drawImage(area, self.images[number])
                    painter.drawRect(area)


class _Distance:
    """How far a page is from what is in sight."""

    def __init__(self, areas: Sequence[QRectF], sight: QRectF) -> None:
        self._areas, self._middle = areas, sight.center().y()

    def __call__(self, number: int) -> float:
        return abs(self._areas[number].center().y() - self._middle)
