"""What the table and its editor need of any grid's model."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import TypeAlias

from PySide6.QtCore import (
    QAbstractTableModel,
    QModelIndex,
    QObject,
    QPersistentModelIndex,
    Qt,
    Signal,
)

from workbench.deal.deal import Deal
from workbench.session.session import Change, Session
from workbench.ui.grid.cell import Cell

Index: TypeAlias = QModelIndex | QPersistentModelIndex
Place: TypeAlias = tuple[int, int]
"""A row and a column."""

RIGHT = int(Qt.AlignmentFlag.AlignRight) | int(Qt.AlignmentFlag.AlignVCenter)
LEFT = int(Qt.AlignmentFlag.AlignLeft) | int(Qt.AlignmentFlag.AlignVCenter)


@dataclass(frozen=True)
class Entered:
    """A text for a cell."""

    row: int
    column: int
    text: str


class CellsModel(QAbstractTableModel):
    """A grid over the session. What is entered goes through the session and comes back from it."""

    said = Signal(object)
    """A sentence about what could not be done."""

    def __init__(self, session: Session, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self.session = session

    def look(self, row: int, column: int) -> Cell:
        """A cell as it is painted; asked directly, since a grid paints hundreds at a time."""
        raise NotImplementedError

    def enter(self, entries: Sequence[Entered], verb: str) -> None:
        """Take texts in, in one step whose name begins with the verb."""
        raise NotImplementedError

    def clear(self, places: Sequence[Place], verb: str = "") -> None:
        """Take typed values out."""
        raise NotImplementedError

    def paste(self, at: Place, block: Sequence[Sequence[str]], over: Sequence[Place]) -> None:
        """Take a block in, from its first cell on; a single cell goes over all that are chosen."""
        raise NotImplementedError

    def asked_of(self, place: Place) -> object | None:
        """What is asked for when the working of a cell is wanted."""
        raise NotImplementedError

    def why_not(self, place: Place) -> str:
        """Why a cell takes no entry; empty where it does."""
        raise NotImplementedError

    def setData(self, index: Index, value: object, role: int = Qt.ItemDataRole.EditRole) -> bool:
        if not index.isValid() or role != Qt.ItemDataRole.EditRole:
            return False
        self.enter([Entered(index.row(), index.column(), str(value))], "")
        return True

    def become(self, label: str, deal: Deal) -> bool:
        """Make one step of a changed deal; False where nothing changes."""
        if deal == self.session.deal:
            return False
        self.session.apply(Change(label, Replaced(deal)))
        return True

    def all_changed(self) -> None:
        """One message for every cell."""
        if self.rowCount() and self.columnCount():
            last = self.index(self.rowCount() - 1, self.columnCount() - 1)
            self.dataChanged.emit(self.index(0, 0), last)


@dataclass(frozen=True)
class Replaced:
    """An edit whose outcome is known."""

    deal: Deal

    def __call__(self, deal: Deal) -> Deal:
        return self.deal


def block_entries(
    at: Place, block: Sequence[Sequence[str]], over: Sequence[Place]
) -> list[Entered]:
    """Where the cells of a block go."""
    if len(block) == 1 and len(block[0]) == 1:
        places = over or (at,)
        return [Entered(row, column, block[0][0]) for row, column in places]
    return [
        Entered(at[0] + down, at[1] + right, text)
        for down, line in enumerate(block)
        for right, text in enumerate(line)
    ]
