"""The headers of a grid: years above, labels that stay in sight at the left."""

from PySide6.QtCore import QRect, QSize, Qt
from PySide6.QtGui import QColor, QFont, QFontMetrics, QPainter, QPaintEvent
from PySide6.QtWidgets import QHeaderView, QLabel, QWidget

from workbench.ui.grid.roles import KIND, UNIT
from workbench.ui.grid.tones import tones_of

PADDING = 5
"""Left and right of a text in a cell or header."""
GAP = 6
"""Between a label and its unit."""


class ColumnHeader(QHeaderView):
    """Headings of one or two lines over their figures, with a rule under them."""

    def __init__(self, parent: QWidget | None = None) -> None:
        super().__init__(Qt.Orientation.Horizontal, parent)
        self.setSectionsClickable(True)
        self.setHighlightSections(False)
        self.setSectionResizeMode(QHeaderView.ResizeMode.Fixed)

    def paintSection(self, painter: QPainter, rect: QRect, section: int) -> None:
        model = self.model()
        sideways = self.orientation()
        colours = tones_of(self.palette())
        text = str(model.headerData(section, sideways, Qt.ItemDataRole.DisplayRole) or "")
        align = int(model.headerData(section, sideways, Qt.ItemDataRole.TextAlignmentRole) or 0)
        room = rect.adjusted(PADDING, 0, -PADDING, -2)
        lines = [
            self.fontMetrics().elidedText(line, Qt.TextElideMode.ElideRight, room.width())
            for line in text.split("\n")
        ]
        painter.save()
        painter.fillRect(rect, QColor(colours.paper))
        painter.setFont(self.font())
        painter.setPen(QColor(colours.muted))
        flags = (align & int(Qt.AlignmentFlag.AlignHorizontal_Mask)) or int(
            Qt.AlignmentFlag.AlignRight
        )
        painter.drawText(room, flags | int(Qt.AlignmentFlag.AlignBottom), "\n".join(lines))
        painter.setPen(QColor(colours.rule))
        painter.drawLine(rect.bottomLeft(), rect.bottomRight())
        painter.restore()

    def paintEvent(self, event: QPaintEvent) -> None:
        super().paintEvent(event)
        rest = self.viewport().rect()
        rest.setLeft(self.length() - self.offset())
        _fill_rest(self, rest)

    def sizeHint(self) -> QSize:
        """As high as the longest heading: one line or two."""
        model = self.model()
        texts = (
            str(model.headerData(section, self.orientation(), Qt.ItemDataRole.DisplayRole) or "")
            for section in range(self.count())
        )
        lines = max((text.count("\n") + 1 for text in texts), default=1)
        return QSize(0, lines * self.fontMetrics().height() + 8)


class LabelHeader(QHeaderView):
    """Labels of the rows with their units; headings of bands run through."""

    def __init__(self, parent: QWidget | None = None) -> None:
        super().__init__(Qt.Orientation.Vertical, parent)
        self.setSectionsClickable(True)
        self.setHighlightSections(False)
        self.setSectionResizeMode(QHeaderView.ResizeMode.Fixed)

    def paintSection(self, painter: QPainter, rect: QRect, section: int) -> None:
        colours = tones_of(self.palette())
        kind = self._read(section, KIND)
        unit = self._read(section, UNIT)
        painter.save()
        painter.fillRect(rect, QColor(colours.band if kind == "band" else colours.paper))
        font = self._font(kind)
        painter.setFont(font)
        painter.setPen(QColor(colours.muted if kind == "band" else colours.ink))
        room = rect.adjusted(PADDING, 0, -PADDING, 0)
        metrics = QFontMetrics(font)
        unit_width = metrics.horizontalAdvance(unit) + GAP if unit else 0
        text = fitted(self._read(section), metrics, room.width() - unit_width)
        flags = int(Qt.AlignmentFlag.AlignLeft) | int(Qt.AlignmentFlag.AlignVCenter)
        painter.drawText(room, flags, text)
        painter.setPen(QColor(colours.muted))
        beside = room.adjusted(metrics.horizontalAdvance(text) + GAP, 0, 0, 0)
        painter.drawText(beside, flags, unit)
        painter.restore()

    def paintEvent(self, event: QPaintEvent) -> None:
        super().paintEvent(event)
        rest = self.viewport().rect()
        rest.setTop(self.length() - self.offset())
        _fill_rest(self, rest)

    def _read(self, section: int, role: int = Qt.ItemDataRole.DisplayRole) -> str:
        return str(self.model().headerData(section, self.orientation(), role) or "")

    def _font(self, kind: str) -> QFont:
        font = self.font()
        font.setBold(kind in ("band", "strong"))
        return font

    def wanted_width(self) -> int:
        """The width at which no label is shortened."""
        widest = 0
        for section in range(self.count()):
            metrics = QFontMetrics(self._font(self._read(section, KIND)))
            unit = self._read(section, UNIT)
            own = metrics.horizontalAdvance(self._read(section))
            own += metrics.horizontalAdvance(unit) + GAP if unit else 0
            widest = max(widest, own)
        return widest + 2 * PADDING + 1


class Corner(QLabel):
    """What amounts are counted in, over the labels."""

    def paintEvent(self, event: QPaintEvent) -> None:
        colours = tones_of(self.palette())
        with QPainter(self) as painter:
            painter.fillRect(self.rect(), QColor(colours.paper))
            painter.setPen(QColor(colours.rule))
            painter.drawLine(self.rect().bottomLeft(), self.rect().bottomRight())
            painter.setPen(QColor(colours.muted))
            flags = int(Qt.AlignmentFlag.AlignLeft) | int(Qt.AlignmentFlag.AlignBottom)
            painter.drawText(self.rect().adjusted(PADDING, 0, -PADDING, -2), flags, self.text())


def _fill_rest(header: QHeaderView, rest: QRect) -> None:
    """Paint what lies beyond the last section as the grid is painted."""
    if rest.isValid():
        with QPainter(header.viewport()) as painter:
            painter.fillRect(rest, QColor(tones_of(header.palette()).paper))


def fitted(label: str, metrics: QFontMetrics, width: int) -> str:
    """A label that fits: whole, without what follows its last comma, or shortened."""
    if metrics.horizontalAdvance(label) <= width:
        return label
    if ":" in label:
        return metrics.elidedText(label, Qt.TextElideMode.ElideMiddle, width)
    shorter = label.rpartition(",")[0] or label
    return metrics.elidedText(shorter, Qt.TextElideMode.ElideRight, width)
