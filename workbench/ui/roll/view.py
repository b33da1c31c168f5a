"""The rent roll: spaces and leases edited like a spreadsheet."""

from collections.abc import Sequence
from functools import partial

from PySide6.QtCore import QItemSelection, QItemSelectionModel
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QAbstractItemView, QWidget

from workbench.session.session import Session
from workbench.ui.grid.cells import Entered, Index
from workbench.ui.grid.table import Command, Table
from workbench.ui.roll import edits
from workbench.ui.roll.columns import COLUMNS
from workbench.ui.roll.frozen import FrozenColumn
from workbench.ui.roll.model import RollModel
from workbench.ui.roll.rows import RollRow, name_of_row

NUMBERS_WIDTH = 40
WIDEST = 320


class RollGrid(Table):
    """One row a lease; a space without leases is one row; the last row takes what is new."""

    def __init__(self, session: Session, parent: QWidget | None = None) -> None:
        self._roll = RollModel(session)
        super().__init__(self._roll, "Rent roll", parent)
        self._roll.setParent(self)
        self.labels.setFixedWidth(NUMBERS_WIDTH)
        self._fit()
        self.frozen = FrozenColumn(self, self._roll)
        session.deal_changed.connect(self._on_deal_changed)
        session.result_changed.connect(self._on_result_changed)
        flag = QItemSelectionModel.SelectionFlag.NoUpdate
        self.selectionModel().setCurrentIndex(self._roll.index(0, 0), flag)

    def _own_commands(self) -> Sequence[Command]:
        return (
            Command("Fill down", self.fill_down, "Ctrl+D"),
            Command("Clear", self.clear, "Del"),
            Command("Insert a row", self.insert_row, "Ctrl++"),
            Command("Duplicate rows", self.duplicate_rows, "Ctrl+Shift+D"),
            Command("Delete rows", self.delete_rows, "Ctrl+-"),
            Command("Move up", self.move_up, "Alt+Up"),
            Command("Move down", self.move_down, "Alt+Down"),
            Command("Add a lease to the space", self.add_lease, "Ctrl+Shift+L"),
            Command("Take leases out, keep the spaces", self.take_leases_out),
        )

    def chosen_rows(self) -> list[RollRow]:
        """The rows that have a chosen cell, without the empty one at the end."""
        places = sorted({row for row, _ in self.chosen()})
        rows = (self._roll.sheet.rows[place] for place in places)
        return [row for row in rows if row.space is not None]

    def _chosen_spaces(self) -> list[str]:
        spaces = [row.space.id for row in self.chosen_rows() if row.space is not None]
        if not spaces:
            self.refused.emit("The new row holds nothing yet; choose other rows.")
        return list(dict.fromkeys(spaces))

    def fill_down(self) -> None:
        """Put the topmost chosen cell of each column into the chosen ones under it."""
        places = self.chosen()
        top, columns = min(row for row, _ in places), {column for _, column in places}
        if all(row == top for row, _ in places) and top > 0:
            top -= 1
        sheet = self._roll.sheet
        under = sorted({row for row, _ in places if row > top})
        entries = [
            Entered(row, column, sheet.edited(top, column))
            for row in under
            for column in sorted(columns)
            if sheet.rows[row].space is not None
        ]
        if entries:
            self._roll.enter(entries, "fill")
        else:
            self.refused.emit("Choose the cell to fill from and the rows under it.")

    def insert_row(self) -> None:
        """An empty space before the current one."""
        place = self.place()
        space = self._roll.sheet.rows[place[0]].space if place is not None else None
        edit = partial(edits.with_new_row, before=space.id if space is not None else "")
        if self._roll.change("insert a row", edit) and place is not None:
            self.choose((place[0], 0), (place[0], 0))

    def duplicate_rows(self) -> None:
        """Copies of the chosen spaces with their leases, after the last of them."""
        ids = self._chosen_spaces()
        before = {row.key for row in self._roll.sheet.rows}
        if ids and self._roll.change(
            f"duplicate {_spaces(len(ids))}", partial(edits.with_copies, ids=ids)
        ):
            new = {row.key for row in self._roll.sheet.rows} - before
            self._choose_rows(self._roll.rows_with(new))

    def delete_rows(self) -> None:
        """Take the chosen rows out; a space goes with its last row."""
        rows = self.chosen_rows()
        keys = {row.key for row in rows}
        if not self._chosen_spaces():
            return
        place = self.place()
        label = name_of_row(rows, 0) if len(rows) == 1 else f"{len(rows)} rows"
        if self._roll.change(f"delete {label}", partial(edits.without_rows, keys=keys)) and place:
            row = min(place[0], self._roll.rowCount() - 1)
            self.choose((row, place[1]), (row, place[1]))

    def move_up(self) -> None:
        """Move the chosen spaces one place up."""
        self._move(down=False)

    def move_down(self) -> None:
        """Move the chosen spaces one place down."""
        self._move(down=True)

    def _move(self, down: bool) -> None:
        ids = self._chosen_spaces()
        if not ids:
            return
        keys = {row.key for row in self.chosen_rows()}
        column = self.currentIndex().column()
        label = f"move {_spaces(len(ids))} {'down' if down else 'up'}"
        if self._roll.change(label, partial(edits.with_moved, ids=ids, down=down)):
            self._choose_rows(self._roll.rows_with(keys), column)
        else:
            self.refused.emit(f"This is already the {'last' if down else 'first'} place.")

    def add_lease(self) -> None:
        """One more lease of the current space, as a row under its others."""
        place = self.place()
        row = self._roll.sheet.rows[place[0]] if place is not None else RollRow(None)
        if row.space is None:
            self.refused.emit("A lease needs a space; name one in the new row first.")
            return
        before = {one.key for one in self._roll.sheet.rows}
        label = f"add a lease to {row.space.name or 'the space'}"
        self._roll.change(label, partial(edits.with_new_lease, space_id=row.space.id))
        new = {one.key for one in self._roll.sheet.rows} - before
        self._choose_rows(self._roll.rows_with(new), _TENANT)

    def take_leases_out(self) -> None:
        """Take the chosen leases out; the spaces stay, without them."""
        ids = {row.lease.id for row in self.chosen_rows() if row.lease is not None}
        if not ids:
            self.refused.emit("There is no lease in the chosen rows.")
            return
        count = "a lease" if len(ids) == 1 else f"{len(ids)} leases"
        self._roll.change(f"take out {count}", partial(edits.without_leases, ids=ids))

    def go_to(self, path: str) -> bool:
        """Choose the cell of a key path; False where the roll does not show it."""
        for row, known in enumerate(self._roll.sheet.rows):
            for place, column in enumerate(COLUMNS):
                if (known.first or column.of_lease) and known.shows(path, column):
                    self.choose((row, place), (row, place))
                    return True
        return False

    def _choose_rows(self, rows: Sequence[int], column: int = 0) -> None:
        """Choose whole rows, the first one current."""
        if not rows:
            return
        model, flags = self._roll, QItemSelectionModel.SelectionFlag
        selection = QItemSelection()
        for row in rows:
            selection.select(model.index(row, 0), model.index(row, len(COLUMNS) - 1))
        current = model.index(rows[0], column)
        self.selectionModel().setCurrentIndex(current, flags.NoUpdate)
        self.selectionModel().select(selection, flags.ClearAndSelect)
        self.scrollTo(current)

    def scrollTo(
        self,
        index: Index,
        hint: QAbstractItemView.ScrollHint = QAbstractItemView.ScrollHint.EnsureVisible,
    ) -> None:
        """Bring a cell into sight, clear of the frozen column."""
        super().scrollTo(index, hint)
        if index.column() == 0:
            self.horizontalScrollBar().setValue(0)
            return
        hidden = self.columnWidth(0) - self.visualRect(index).left()
        bar = self.horizontalScrollBar()
        if hidden > 0 and bar.value() > 0:
            bar.setValue(bar.value() - hidden)

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._fit()
        self.frozen.place()

    def _fit(self) -> None:
        """Give the names and words what room is left over."""
        words = [column for column in COLUMNS if column.content == "text"]
        over = max(0, self.viewport().width() - sum(column.width for column in COLUMNS))
        for place, column in enumerate(COLUMNS):
            share = over // len(words) if column in words else 0
            self.setColumnWidth(place, min(column.width + share, WIDEST))

    def _on_deal_changed(self, revision: object) -> None:
        self._roll.follow()

    def _on_result_changed(self, result: object) -> None:
        self._roll.follow()


_TENANT = next(place for place, column in enumerate(COLUMNS) if column.field == "tenant")


def _spaces(count: int) -> str:
    return "a space" if count == 1 else f"{count} spaces"
