"""The table that both grids are: selection, keys, clipboard, menu of commands."""

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from PySide6.QtCore import QEvent, QItemSelectionModel, QModelIndex, Qt, Signal
from PySide6.QtGui import QAction, QGuiApplication, QKeyEvent, QKeySequence
from PySide6.QtWidgets import (
    QAbstractButton,
    QAbstractItemView,
    QFrame,
    QTableView,
    QVBoxLayout,
    QWidget,
)

from workbench.ui.grid.cells import CellsModel, Entered, Place
from workbench.ui.grid.clipboard import read_block, write_block
from workbench.ui.grid.delegate import CellDelegate
from workbench.ui.grid.header import ColumnHeader, Corner, LabelHeader
from workbench.ui.grid.roles import COPIED

ROW_HEIGHT = 23
_NEW_LOOKS = (QEvent.Type.PaletteChange, QEvent.Type.FontChange, QEvent.Type.StyleChange)
Keys = QKeySequence.StandardKey


@dataclass(frozen=True)
class Command:
    """An entry of the grid's menu."""

    text: str
    do: Callable[[], object]
    keys: QKeySequence.StandardKey | str | None = None


class Table(QTableView):
    """A grid over a model of cells."""

    asked = Signal(object)
    """The working of a cell is wanted: carries its key or path and its year."""
    refused = Signal(object)
    """A sentence about what could not be done."""

    def __init__(self, model: CellsModel, name: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.cells = model
        self.setAccessibleName(name)
        self.setModel(model)
        self._look()
        self.painting = delegate = CellDelegate(model, self)
        delegate.moved.connect(self.move_by)
        delegate.entered_in_many.connect(self.set_many)
        self.setItemDelegate(delegate)
        self.doubleClicked.connect(self._on_double_clicked)
        model.said.connect(self.refused)
        self.commands: dict[str, QAction] = {}
        for command in self._commands():
            self._add(command)

    def _look(self) -> None:
        self.columns = ColumnHeader(self)
        self.labels = LabelHeader(self)
        self.setHorizontalHeader(self.columns)
        self.setVerticalHeader(self.labels)
        self.labels.setDefaultSectionSize(ROW_HEIGHT)
        self.labels.setMinimumSectionSize(ROW_HEIGHT)
        self.setShowGrid(False)
        self.setFrameShape(QFrame.Shape.NoFrame)
        self.setWordWrap(False)
        self.setTabKeyNavigation(False)
        self.setHorizontalScrollMode(QAbstractItemView.ScrollMode.ScrollPerPixel)
        self.setSelectionMode(QAbstractItemView.SelectionMode.ExtendedSelection)
        self.setContextMenuPolicy(Qt.ContextMenuPolicy.ActionsContextMenu)
        triggers = QAbstractItemView.EditTrigger
        self.setEditTriggers(
            triggers.DoubleClicked | triggers.EditKeyPressed | triggers.AnyKeyPressed
        )
        self.corner = Corner("", self)
        button = self.findChild(QAbstractButton)
        if button is not None:
            button.setAccessibleName("Choose all cells")
            box = QVBoxLayout(button)
            box.setContentsMargins(0, 0, 0, 0)
            box.addWidget(self.corner)

    def _commands(self) -> Sequence[Command]:
        return (
            Command("Cut", self.cut, Keys.Cut),
            Command("Copy", self.copy, Keys.Copy),
            Command("Paste", self.paste, Keys.Paste),
            Command("Set all chosen cells: type, then Ctrl+Enter", self.edit_chosen),
            *self._own_commands(),
            Command("Show the working", self.ask, "F4"),
        )

    def _own_commands(self) -> Sequence[Command]:
        return ()

    def _add(self, command: Command) -> None:
        action = QAction(command.text, self)
        if command.keys is not None:
            action.setShortcut(QKeySequence(command.keys))
        action.setShortcutContext(Qt.ShortcutContext.WidgetShortcut)
        action.triggered.connect(command.do)
        self.addAction(action)
        self.commands[command.text] = action

    def place(self) -> Place | None:
        """The current cell."""
        index = self.currentIndex()
        return (index.row(), index.column()) if index.isValid() else None

    def chosen(self) -> list[Place]:
        """The chosen cells, row by row; the current one where none is."""
        places = sorted((one.row(), one.column()) for one in self.selectedIndexes())
        current = self.place()
        return places or ([current] if current is not None else [])

    def choose(self, first: Place, last: Place) -> None:
        """Choose a rectangle; its first cell becomes the current one."""
        selection = self.selectionModel()
        flags = QItemSelectionModel.SelectionFlag
        corner = self.model().index(*first)
        selection.setCurrentIndex(corner, flags.ClearAndSelect)
        for row in range(first[0], last[0] + 1):
            for column in range(first[1], last[1] + 1):
                selection.select(self.model().index(row, column), flags.Select)
        self.scrollTo(corner)

    def move_by(self, down: int, right: int) -> bool:
        """Go to another cell; False where there is none."""
        current = self.currentIndex()
        index = self.model().index(current.row() + down, current.column() + right)
        if not current.isValid() or not index.isValid():
            return False
        self.setCurrentIndex(index)
        return True

    def copy(self) -> bool:
        """Put the chosen rectangle on the clipboard; False where it is none."""
        places = self.chosen()
        rows = sorted({row for row, _ in places})
        columns = sorted({column for _, column in places})
        if not places:
            return False
        if len(places) != len(rows) * len(columns):
            self.refused.emit("Only one rectangle of cells can be copied at a time.")
            return False
        lines = [
            [str(self.model().index(row, column).data(COPIED) or "") for column in columns]
            for row in rows
        ]
        QGuiApplication.clipboard().setText(write_block(lines))
        return True

    def cut(self) -> None:
        """Copy, then take the typed values out."""
        if self.copy():
            self.cells.clear(self.chosen(), "cut")

    def paste(self) -> None:
        """Take the clipboard in from the first chosen cell on, in one step."""
        places = self.chosen()
        block = read_block(QGuiApplication.clipboard().text())
        if not block:
            self.refused.emit("There is no text on the clipboard to paste.")
        elif places:
            at = min(row for row, _ in places), min(column for _, column in places)
            self.cells.paste(at, block, places)

    def edit_chosen(self) -> None:
        """Open the editor of the current cell; Ctrl+Enter there sets all chosen cells."""
        place = self.place()
        if place is None:
            return
        if words := self.cells.why_not(place):
            self.refused.emit(words)
        else:
            self.edit(self.currentIndex())

    def set_many(self, text: str) -> None:
        """Set every chosen cell that takes an entry, in one step."""
        entries = [Entered(*one, text) for one in self.chosen() if not self.cells.why_not(one)]
        if entries:
            self.cells.enter(entries, "set" if len(entries) > 1 else "")
        else:
            self.refused.emit("None of the chosen cells takes an entry.")

    def clear(self) -> None:
        """Take what is typed in the chosen cells out."""
        self.cells.clear(self.chosen())

    def ask(self) -> None:
        """Ask for the working of the current cell."""
        place = self.place()
        wanted = self.cells.asked_of(place) if place is not None else None
        if wanted is not None:
            self.asked.emit(wanted)

    def _on_double_clicked(self, index: QModelIndex) -> None:
        if self.cells.why_not((index.row(), index.column())):
            self.ask()

    def keyPressEvent(self, event: QKeyEvent) -> None:
        plain = not event.modifiers() & Qt.KeyboardModifier.ControlModifier
        place = self.place()
        if event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter) and plain:
            back = bool(event.modifiers() & Qt.KeyboardModifier.ShiftModifier)
            self.move_by(-1 if back else 1, 0)
            return
        if plain and place is not None and event.text().strip().isprintable():
            words = self.cells.why_not(place) if event.text().strip() else ""
            if words:
                self.refused.emit(words)
                return
        super().keyPressEvent(event)

    def focusNextPrevChild(self, forward: bool) -> bool:
        """Tab goes along the row, and out of the grid at its end."""
        if self.hasFocus() and self.move_by(0, 1 if forward else -1):
            return True
        return super().focusNextPrevChild(forward)

    def changeEvent(self, event: QEvent) -> None:
        super().changeEvent(event)
        if event.type() in _NEW_LOOKS and hasattr(self, "painting"):
            self.painting.prepare(self)

    def keyboardSearch(self, search: str) -> None:
        """Letters start an entry and never jump to a row."""
