"""The first column of a table, kept in sight while the others move under it."""

from PySide6.QtCore import QEvent, Qt
from PySide6.QtGui import QColor, QPainter, QPaintEvent
from PySide6.QtWidgets import QAbstractItemView, QFrame, QTableView

from workbench.ui.grid.cells import CellsModel
from workbench.ui.grid.delegate import CellDelegate
from workbench.ui.grid.header import ColumnHeader
from workbench.ui.grid.tones import tones_of


class FrozenColumn(QTableView):
    """A second view of a table's first column, shown where the table has moved sideways.

    It shares model and selection and takes no entry: the table moves back to the first column as
    soon as that is the current one.
    """

    def __init__(self, table: QTableView, cells: CellsModel) -> None:
        super().__init__(table)
        self._table = table
        self.setModel(table.model())
        self.setSelectionModel(table.selectionModel())
        self._painting = CellDelegate(cells, self)
        self.setItemDelegate(self._painting)
        self.setAccessibleName(f"{table.accessibleName()}, first column")
        self.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self.setEditTriggers(QAbstractItemView.EditTrigger.NoEditTriggers)
        self.setFrameShape(QFrame.Shape.NoFrame)
        self.setShowGrid(False)
        self.setWordWrap(False)
        self.setHorizontalHeader(ColumnHeader(self))
        self.verticalHeader().hide()
        self.verticalHeader().setDefaultSectionSize(table.verticalHeader().defaultSectionSize())
        off = Qt.ScrollBarPolicy.ScrollBarAlwaysOff
        self.setVerticalScrollBarPolicy(off)
        self.setHorizontalScrollBarPolicy(off)
        self.setVerticalScrollMode(table.verticalScrollMode())
        for column in range(1, table.model().columnCount()):
            self.setColumnHidden(column, True)
        table.horizontalScrollBar().valueChanged.connect(self._on_moved_sideways)
        table.verticalScrollBar().valueChanged.connect(self.verticalScrollBar().setValue)
        self.verticalScrollBar().valueChanged.connect(table.verticalScrollBar().setValue)
        self.hide()

    def paintEvent(self, event: QPaintEvent) -> None:
        super().paintEvent(event)
        with QPainter(self.viewport()) as painter:
            painter.setPen(QColor(tones_of(self.palette()).rule))
            edge = self.viewport().rect()
            painter.drawLine(edge.topRight(), edge.bottomRight())

    def changeEvent(self, event: QEvent) -> None:
        super().changeEvent(event)
        if hasattr(self, "_painting"):
            self._painting.prepare(self)

    def place(self) -> None:
        """Lie over the first column of the table as large as it is now."""
        table = self._table
        width = table.columnWidth(0)
        self.setColumnWidth(0, width)
        self.horizontalHeader().setFixedHeight(table.horizontalHeader().height())
        self.setGeometry(
            table.verticalHeader().width() + table.frameWidth(),
            table.frameWidth(),
            width,
            table.viewport().height() + table.horizontalHeader().height(),
        )

    def _on_moved_sideways(self, value: int) -> None:
        self.setVisible(value > 0)
        if value > 0:
            self.place()
            self.verticalScrollBar().setValue(self._table.verticalScrollBar().value())
            self.raise_()
