"""A picture on the screen: laid out to its size, asked with mouse or keys, copied and saved."""

from collections.abc import Callable
from pathlib import Path
from typing import TypeAlias

from PySide6.QtCore import QEvent, QPointF, QRect, QRectF, QSize, Qt, Signal
from PySide6.QtGui import (
    QAction,
    QColor,
    QFocusEvent,
    QHelpEvent,
    QKeyEvent,
    QKeySequence,
    QMouseEvent,
    QPainter,
    QPaintEvent,
    QPen,
    QResizeEvent,
)
from PySide6.QtWidgets import QToolTip, QWidget

from workbench.charts.shapes import Picture, Region
from workbench.ui.painter import copy_picture, paint_picture, to_png, to_svg
from workbench.ui.regions import above, below, region_at, region_named, step
from workbench.ui.saving import ask_path, write_or_tell
from workbench.ui.theme import load_font, picture_palette

Layout: TypeAlias = Callable[[float, float], Picture]
"""Lays a picture out for a width and a height."""

NOTHING = Picture(0.0, 0.0, ())
_BY_KEYS = (
    Qt.FocusReason.TabFocusReason,
    Qt.FocusReason.BacktabFocusReason,
    Qt.FocusReason.ShortcutFocusReason,
    Qt.FocusReason.PopupFocusReason,
)
_CHOOSING = (Qt.Key.Key_Return, Qt.Key.Key_Enter, Qt.Key.Key_Space)


class PictureView(QWidget):
    """Shows a picture of which each region stands for a figure.

    What leaves the program is in the tones of print, whatever the window looks like.
    """

    asked = Signal(object)
    """The working of a region's figure is wanted: carries what `meaning` says."""

    def __init__(self, name: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        load_font()
        self._name = name
        self._layout: Layout | None = None
        self._pressed: str | None = None
        self._key: str | None = None
        self.picture = NOTHING
        self.setAccessibleName(name)
        self.setFocusPolicy(Qt.FocusPolicy.StrongFocus)
        self.setMouseTracking(True)
        self.setContextMenuPolicy(Qt.ContextMenuPolicy.ActionsContextMenu)
        self._add_action("Copy picture", self.copy).setShortcut(QKeySequence.StandardKey.Copy)
        self._add_action("Save as PNG…", self._on_save_png)
        self._add_action("Save as SVG…", self._on_save_svg)

    def _add_action(self, words: str, slot: Callable[[], None]) -> QAction:
        action = QAction(words, self)
        action.setShortcutContext(Qt.ShortcutContext.WidgetShortcut)
        action.triggered.connect(slot)
        self.addAction(action)
        return action

    def sentence(self, key: str) -> str:
        """What is said about a region; for those who make views of their own."""
        return ""

    def meaning(self, key: str) -> object:
        """What a region asks for; for those who make views of their own."""
        return key

    def show_layout(self, layout: Layout) -> None:
        """Show another picture."""
        self._layout = layout
        self._lay_out()

    @property
    def region(self) -> Region | None:
        """The region that keys act on."""
        return region_named(self.picture.regions, self._key)

    def copy(self) -> None:
        """Put the picture on the clipboard."""
        copy_picture(self.picture)

    def save_png(self, path: Path) -> bool:
        return write_or_tell(self, path, to_png(self.picture))

    def save_svg(self, path: Path) -> bool:
        return write_or_tell(self, path, to_svg(self.picture))

    def _on_save_png(self) -> None:
        path = ask_path(self, "Save the picture", self._name.lower(), "PNG picture", ".png")
        if path is not None:
            self.save_png(path)

    def _on_save_svg(self) -> None:
        path = ask_path(self, "Save the picture", self._name.lower(), "SVG picture", ".svg")
        if path is not None:
            self.save_svg(path)

    def _lay_out(self) -> None:
        if self._layout is not None and self.width() > 0 and self.height() > 0:
            self.picture = self._layout(self.width(), self.height())
            self._describe()
            self.update()

    def _describe(self) -> None:
        """Say the picture in words, the region that keys act on first."""
        said = self.sentence(self.region.key) if self.region is not None else ""
        words = f"{said} {self.picture.words}".strip()
        if words != self.accessibleDescription():
            self.setAccessibleDescription(words)

    def _choose(self, region: Region | None) -> None:
        self._key = None if region is None else region.key
        self._describe()
        self.update()

    def _ask(self) -> None:
        if self.region is not None:
            self.asked.emit(self.meaning(self.region.key))

    def sizeHint(self) -> QSize:
        return QSize(480, 240)

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._lay_out()

    def changeEvent(self, event: QEvent) -> None:
        super().changeEvent(event)
        if event.type() == QEvent.Type.PaletteChange:
            self.update()

    def event(self, event: QEvent) -> bool:
        if isinstance(event, QHelpEvent) and event.type() == QEvent.Type.ToolTip:
            self._show_tip(event)
            return True
        return super().event(event)

    def _show_tip(self, event: QHelpEvent) -> None:
        found = self._under(QPointF(event.pos()))
        if found is None:
            QToolTip.hideText()
            return
        QToolTip.showText(event.globalPos(), self.sentence(found.key), self, _whole(found))

    def _under(self, place: QPointF) -> Region | None:
        return region_at(self.picture.regions, place.x(), place.y())

    def mouseMoveEvent(self, event: QMouseEvent) -> None:
        over = self._under(event.position()) is not None
        self.setCursor(Qt.CursorShape.PointingHandCursor if over else Qt.CursorShape.ArrowCursor)

    def mousePressEvent(self, event: QMouseEvent) -> None:
        if event.button() != Qt.MouseButton.LeftButton:
            super().mousePressEvent(event)
            return
        found = self._under(event.position())
        self._pressed = None if found is None else found.key
        self._choose(found)

    def mouseReleaseEvent(self, event: QMouseEvent) -> None:
        found = self._under(event.position())
        if found is not None and found.key == self._pressed:
            self._ask()
        self._pressed = None

    def keyPressEvent(self, event: QKeyEvent) -> None:
        key, regions, here = event.key(), self.picture.regions, self.region
        if key in _CHOOSING and here is not None:
            self._ask()
        elif key in (Qt.Key.Key_Right, Qt.Key.Key_Left):
            self._choose(step(regions, here, 1 if key == Qt.Key.Key_Right else -1))
        elif key in (Qt.Key.Key_Up, Qt.Key.Key_Down):
            self._choose((above if key == Qt.Key.Key_Up else below)(regions, here))
        elif key in (Qt.Key.Key_Home, Qt.Key.Key_End):
            self._choose(step(regions, None, 1 if key == Qt.Key.Key_Home else -1))
        else:
            super().keyPressEvent(event)

    def focusInEvent(self, event: QFocusEvent) -> None:
        super().focusInEvent(event)
        if self.region is None and event.reason() in _BY_KEYS:
            self._choose(step(self.picture.regions, None, 1))
        self.update()

    def focusOutEvent(self, event: QFocusEvent) -> None:
        super().focusOutEvent(event)
        self.update()

    def paintEvent(self, event: QPaintEvent) -> None:
        tones = picture_palette(self.palette())
        with QPainter(self) as painter:
            painter.fillRect(self.rect(), QColor(tones["paper"]))
            paint_picture(painter, self.picture, tones)
            if self.hasFocus() and self.region is not None:
                _ring(painter, self.region, QColor(tones["paper"]), QColor(tones["ink"]))


def _whole(region: Region) -> QRect:
    return QRectF(region.x, region.y, region.width, region.height).toAlignedRect()


def _ring(painter: QPainter, region: Region, under: QColor, over: QColor) -> None:
    """A ring in two tones, so that it is seen on pale and on dark masonry alike."""
    around = QRectF(region.x, region.y, region.width, region.height)
    painter.setRenderHint(QPainter.RenderHint.Antialiasing)
    for colour, width in ((under, 4.0), (over, 2.0)):
        painter.setPen(QPen(colour, width))
        painter.drawRect(around)
