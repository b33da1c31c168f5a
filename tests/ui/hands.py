"""A year grid shown over a session, with the hands and eyes of a user."""

from collections.abc import Sequence
from functools import partial
from typing import Self

from PySide6.QtCore import Qt
from PySide6.QtGui import QGuiApplication
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QWidget
from pytestqt.qtbot import QtBot

from tests.engine.deals import deal, space
from workbench.deal.deal import Deal
from workbench.deal.earn import Earn
from workbench.session.session import Session
from workbench.ui.grid import Band, GridRow, InputRow, LineRow, YearGrid
from workbench.ui.grid.table import Table

ROWS: tuple[GridRow, ...] = (
    Band("assumed"),
    InputRow("earn.growth"),
    InputRow("earn.vacancy"),
    InputRow("stated.rent"),
    Band("follows"),
    LineRow("rent_expected"),
    LineRow("effective_gross_income", bold=True),
)
GROWTH, VACANCY, STATED, RENT, INCOME = 1, 2, 3, 5, 6


def base(**more: object) -> Deal:
    """120 a year at market rent, held 5 years, 5 % vacant from year 1 and 7 % from year 3."""
    sections = {"earn": Earn(vacancy={1: 0.05, 3: 0.07}), **more}
    return deal(space(10.0), **sections)


def keep(qtbot: QtBot, widget: QWidget) -> None:
    """Close a widget after the test, and hold it until then.

    A widget that only its own circle of references holds could be collected while it is painted.
    """
    qtbot.addWidget(widget, before_close_func=partial(_held, widget))


def _held(held: QWidget, closing: QWidget) -> None:
    assert held is closing


class Hands:
    """A grid shown over a session; keys go to whatever has the keyboard."""

    def __init__(self, qtbot: QtBot, session: Session, grid: Table) -> None:
        self.bot = qtbot
        self.session = session
        self.grid = grid
        self.grid.resize(700, 420)
        keep(qtbot, self.grid)
        with qtbot.waitActive(self.grid):
            self.grid.show()
            self.grid.activateWindow()
        self.grid.setFocus()
        self.said: list[str] = []
        self.asked: list[object] = []
        self.grid.refused.connect(self.said.append)
        self.grid.asked.connect(self.asked.append)

    def hand(self) -> QWidget:
        return QApplication.focusWidget() or self.grid

    def type(self, text: str) -> Self:
        """Letter by letter, each to whatever has the keyboard then."""
        for letter in text:
            QTest.keyClicks(self.hand(), letter)
        return self

    def press(
        self,
        key: Qt.Key,
        keys: Qt.KeyboardModifier = Qt.KeyboardModifier.NoModifier,
    ) -> Self:
        QTest.keyClick(self.hand(), key, keys)
        return self

    def ctrl(self, key: Qt.Key, shift: bool = False) -> Self:
        keys = Qt.KeyboardModifier.ControlModifier
        return self.press(key, keys | Qt.KeyboardModifier.ShiftModifier if shift else keys)

    def undo_name(self) -> str | None:
        return self.session.undo_label

    def clip(self, text: str | None = None) -> str:
        """What is on the clipboard, after putting a text there if one is given."""
        board = QGuiApplication.clipboard()
        if text is not None:
            board.setText(text)
        return board.text()


class Desk(Hands):
    """A year grid."""

    def __init__(self, qtbot: QtBot, start: Deal, rows: Sequence[GridRow] = ROWS) -> None:
        session = Session(start)
        self.years = YearGrid(session, rows)
        super().__init__(qtbot, session, self.years)

    def at(self, row: int, year: int, to_row: int = 0, to_year: int = 0) -> Self:
        """Choose cells by row and year."""
        self.grid.choose((row, year - 1), (to_row or row, (to_year or year) - 1))
        return self

    def texts(self, row: int) -> list[str]:
        """The row as it stands on the screen."""
        self.session.catch_up()
        model = self.grid.model()
        return [str(model.index(row, place).data()) for place in range(model.columnCount())]

    def read(self, row: int, year: int, role: Qt.ItemDataRole) -> str:
        self.session.catch_up()
        return str(self.grid.model().index(row, year - 1).data(role) or "")

    def place(self) -> tuple[int, int]:
        index = self.grid.currentIndex()
        return index.row(), index.column() + 1
