"""The rail: the pages in the order of the work."""

from collections.abc import Sequence

from PySide6.QtCore import Signal
from PySide6.QtWidgets import QButtonGroup, QPushButton, QVBoxLayout, QWidget

WIDTH = 108


class Rail(QWidget):
    """A button for each page; the one shown is pressed in."""

    chosen = Signal(int)
    """A page is wanted: carries its place."""

    def __init__(self, names: Sequence[str], parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setFixedWidth(WIDTH)
        self.setAccessibleName("Pages")
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 6, 0, 6)
        column.setSpacing(2)
        self._group = QButtonGroup(self)
        for place, name in enumerate(names):
            button = QPushButton(name, self)
            button.setCheckable(True)
            button.setFlat(True)
            button.setProperty("role", "rail")
            self._group.addButton(button, place)
            column.addWidget(button)
        column.addStretch(1)
        self._group.idClicked.connect(self.chosen)

    def show_page(self, place: int) -> None:
        button = self._group.button(place)
        if button is not None:
            button.setChecked(True)
