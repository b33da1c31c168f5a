"""How a cell is painted, and the editor that opens in it."""

from PySide6.QtCore import QAbstractItemModel, QEvent, QObject, QPoint, QRect, Qt, Signal
from PySide6.QtGui import QColor, QKeyEvent, QPainter, QPolygon
from PySide6.QtWidgets import (
    QAbstractItemDelegate,
    QComboBox,
    QLineEdit,
    QStyle,
    QStyledItemDelegate,
    QStyleOptionViewItem,
    QWidget,
)

from workbench.ui.grid.brushes import brushes
from workbench.ui.grid.cells import LEFT, RIGHT, CellsModel, Index
from workbench.ui.grid.header import PADDING
from workbench.ui.grid.roles import CHOICES

CORNER = 8
"""Side of the filled corner that marks a draft."""
BADGE = 3
"""Half the height of the lozenge that marks an issue."""
Hint = QAbstractItemDelegate.EndEditHint
_MOVES = {
    Qt.Key.Key_Return: (1, 0),
    Qt.Key.Key_Enter: (1, 0),
    Qt.Key.Key_Tab: (0, 1),
    Qt.Key.Key_Backtab: (0, -1),
}


class CellDelegate(QStyledItemDelegate):
    """Paints cells in the house tones and edits them as text or by choice."""

    moved = Signal(int, int)
    """An entry is committed; go so many rows down and columns right."""
    entered_in_many = Signal(object)
    """The text is meant for every chosen cell."""

    def __init__(self, cells: CellsModel, parent: QWidget) -> None:
        super().__init__(parent)
        self._cells = cells
        self._brushes = brushes(parent.palette(), parent.font())

    def prepare(self, table: QWidget) -> None:
        """Take over the colours and letters of the table."""
        self._brushes = brushes(table.palette(), table.font())

    def paint(self, painter: QPainter, option: QStyleOptionViewItem, index: Index) -> None:
        cell = self._cells.look(index.row(), index.column())
        rect, state, own = option.rect, option.state, self._brushes
        chosen = QStyle.StateFlag.State_Selected in state
        ground = own.ground(cell, chosen)
        if ground is not None:
            painter.fillRect(rect, ground)
        if cell.text:
            painter.setFont(own.font(cell))
            painter.setPen(own.ink(cell, chosen))
            room = rect.adjusted(PADDING, 0, -PADDING, 0)
            text = cell.text
            if not own.surely_fits(cell, room.width()):
                text = _fitted(painter, text, room.width())
            painter.drawText(room, LEFT if cell.left else RIGHT, text)
        if cell.mark:
            _paint_mark(painter, rect, cell.mark, own.fault)
        if QStyle.StateFlag.State_HasFocus in state:
            painter.setPen(own.frame)
            painter.setBrush(Qt.BrushStyle.NoBrush)
            painter.drawRect(rect.adjusted(0, 0, -1, -1))
            painter.drawRect(rect.adjusted(1, 1, -2, -2))

    def createEditor(self, parent: QWidget, option: QStyleOptionViewItem, index: Index) -> QWidget:
        choices = index.data(CHOICES)
        editor: QWidget
        if choices:
            box = QComboBox(parent)
            box.addItems(choices)
            box.activated.connect(self._on_chosen)
            editor = box
        else:
            line = QLineEdit(parent)
            line.setAlignment(Qt.AlignmentFlag(int(index.data(Qt.ItemDataRole.TextAlignmentRole))))
            line.setTextMargins(PADDING - 4, 0, PADDING - 4, 0)
            editor = line
        spoken = str(index.data(Qt.ItemDataRole.AccessibleTextRole) or "")
        editor.setAccessibleName(spoken.partition(":")[0])
        editor.setAutoFillBackground(True)
        return editor

    def setEditorData(self, editor: QWidget, index: Index) -> None:
        text = str(index.data(Qt.ItemDataRole.EditRole) or "")
        if isinstance(editor, QComboBox):
            editor.setCurrentText(text)
        elif isinstance(editor, QLineEdit) and not editor.isModified():
            editor.setText(text)
            editor.selectAll()

    def setModelData(self, editor: QWidget, model: QAbstractItemModel, index: Index) -> None:
        """Take the entry in, but not where nothing was typed: that would pin a following cell."""
        if isinstance(editor, QComboBox):
            if editor.currentText() != index.data(Qt.ItemDataRole.EditRole):
                model.setData(index, editor.currentText(), Qt.ItemDataRole.EditRole)
        elif isinstance(editor, QLineEdit) and editor.isModified():
            editor.setModified(False)
            model.setData(index, editor.text(), Qt.ItemDataRole.EditRole)

    def updateEditorGeometry(
        self, editor: QWidget, option: QStyleOptionViewItem, index: Index
    ) -> None:
        editor.setGeometry(option.rect)

    def eventFilter(self, editor: QObject, event: QEvent) -> bool:
        if event.type() == QEvent.Type.KeyPress and isinstance(event, QKeyEvent):
            move = _MOVES.get(Qt.Key(event.key()))
            if move is not None and isinstance(editor, QWidget):
                self._finish(editor, move, event.modifiers())
                return True
        return super().eventFilter(editor, event)

    def _finish(self, editor: QWidget, move: tuple[int, int], keys: Qt.KeyboardModifier) -> None:
        into_many = bool(keys & Qt.KeyboardModifier.ControlModifier) and move == (1, 0)
        if into_many and isinstance(editor, QLineEdit | QComboBox):
            text = editor.text() if isinstance(editor, QLineEdit) else editor.currentText()
            if isinstance(editor, QLineEdit):
                editor.setModified(False)
            self.closeEditor.emit(editor, Hint.RevertModelCache)
            self.entered_in_many.emit(text)
            return
        self.commitData.emit(editor)
        self.closeEditor.emit(editor, Hint.NoHint)
        back = bool(keys & Qt.KeyboardModifier.ShiftModifier) and move == (1, 0)
        self.moved.emit(*((-1, 0) if back else move))

    def _on_chosen(self, place: int) -> None:
        box = self.sender()
        if isinstance(box, QComboBox):
            self.commitData.emit(box)
            self.closeEditor.emit(box, Hint.NoHint)


def _fitted(painter: QPainter, text: str, width: int) -> str:
    return painter.fontMetrics().elidedText(text, Qt.TextElideMode.ElideRight, width)


def _paint_mark(painter: QPainter, rect: QRect, mark: str, colour: QColor) -> None:
    """A filled corner for a draft, a lozenge at the left for an issue."""
    painter.setRenderHint(QPainter.RenderHint.Antialiasing)
    painter.setPen(Qt.PenStyle.NoPen)
    painter.setBrush(colour)
    if mark == "draft":
        corner = rect.topRight() + QPoint(1, 0)
        points = [corner, corner - QPoint(CORNER, 0), corner + QPoint(0, CORNER)]
    else:
        middle = QPoint(rect.left() + PADDING + BADGE, rect.center().y() + 1)
        steps = ((0, -BADGE), (BADGE, 0), (0, BADGE), (-BADGE, 0))
        points = [middle + QPoint(x, y) for x, y in steps]
    painter.drawPolygon(QPolygon(points))
    painter.setRenderHint(QPainter.RenderHint.Antialiasing, False)
