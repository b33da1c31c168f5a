"""The model of the year grid: texts out of a sheet, entries into the session."""

from collections.abc import Sequence

from PySide6.QtCore import QModelIndex, QObject, Qt

from workbench.session.session import Session
from workbench.text.entry import Taken, parse_number
from workbench.ui.grid.calendar import heading, heading_in_words
from workbench.ui.grid.cell import Cell
from workbench.ui.grid.cells import RIGHT, CellsModel, Entered, Index, Place, block_entries
from workbench.ui.grid.digits import copied, edited
from workbench.ui.grid.edits import YearEntry, step_name, with_entries
from workbench.ui.grid.roles import COPIED, KIND, MARK, UNIT
from workbench.ui.grid.rows import (
    Band,
    GridRow,
    InputRow,
    LineRow,
    in_sentence,
    name_of,
    unit_of_row,
)
from workbench.ui.grid.sheet import Sheet
from workbench.ui.grid.spoken import reason, spoken

Role = Qt.ItemDataRole
NO_PARENT = QModelIndex()
_PLAIN = Qt.ItemFlag.ItemIsEnabled | Qt.ItemFlag.ItemIsSelectable
_EDITABLE = _PLAIN | Qt.ItemFlag.ItemIsEditable


class YearModel(CellsModel):
    """Rows of a page over the years of the deal."""

    def __init__(
        self, session: Session, rows: Sequence[GridRow], parent: QObject | None = None
    ) -> None:
        super().__init__(session, parent)
        self.sheet = Sheet(session.deal, session.result, rows)

    def rowCount(self, parent: Index = NO_PARENT) -> int:
        return 0 if parent.isValid() else len(self.sheet.rows)

    def columnCount(self, parent: Index = NO_PARENT) -> int:
        return 0 if parent.isValid() else self.sheet.years

    def data(self, index: Index, role: int = Role.DisplayRole) -> object:
        row, year = index.row(), index.column() + 1
        if not index.isValid() or row >= len(self.sheet.rows):
            return None
        match role:
            case Role.DisplayRole:
                return self.sheet.cell(row, year).text
            case Role.EditRole:
                return edited(self.sheet, row, year)
            case Role.ToolTipRole | Role.AccessibleDescriptionRole:
                return reason(self.sheet, row, year)
            case Role.AccessibleTextRole:
                return spoken(self.sheet, row, year)
            case Role.TextAlignmentRole:
                return RIGHT
            case _:
                return self._own_data(row, year, role)

    def look(self, row: int, column: int) -> Cell:
        return self.sheet.cell(row, column + 1)

    def _own_data(self, row: int, year: int, role: int) -> str | None:
        if role == KIND:
            return self.sheet.cell(row, year).kind
        if role == MARK:
            return self.sheet.cell(row, year).mark
        return copied(self.sheet, row, year) if role == COPIED else None

    def headerData(
        self, section: int, orientation: Qt.Orientation, role: int = Role.DisplayRole
    ) -> object:
        if orientation == Qt.Orientation.Horizontal:
            return self._year_header(section + 1, role)
        return self._label(section, role) if section < len(self.sheet.rows) else None

    def _year_header(self, year: int, role: int) -> object:
        match role:
            case Role.DisplayRole:
                return heading(self.sheet.deal, year)
            case Role.ToolTipRole | Role.AccessibleTextRole:
                return heading_in_words(self.sheet.deal, year)
            case Role.TextAlignmentRole:
                return RIGHT
            case _:
                return None

    def _label(self, section: int, role: int) -> object:
        row = self.sheet.rows[section]
        if role in (Role.DisplayRole, Role.ToolTipRole, Role.AccessibleTextRole):
            return self.sheet.labels[section]
        if role == KIND:
            strong = isinstance(row, LineRow) and row.bold
            return "band" if isinstance(row, Band) else "strong" if strong else "label"
        return unit_of_row(row, self.sheet.deal) if role == UNIT else None

    def flags(self, index: Index) -> Qt.ItemFlag:
        row = index.row()
        is_input = index.isValid() and row < len(self.sheet.rows) and self.sheet.takes_entries[row]
        return _EDITABLE if is_input else _PLAIN

    def why_not(self, place: Place) -> str:
        row = self.sheet.rows[place[0]]
        match row:
            case InputRow():
                return "" if self.sheet.exists(row) else "This row is no longer in the deal."
            case LineRow():
                return f"{self.sheet.labels[place[0]]} is computed; F4 shows how."
            case _:
                return "A heading takes no entry."

    def asked_of(self, place: Place) -> object | None:
        row = self.sheet.rows[place[0]]
        return None if isinstance(row, Band) else (name_of(row), place[1] + 1)

    def enter(self, entries: Sequence[Entered], verb: str) -> None:
        for entry in entries:
            if words := self.why_not((entry.row, entry.column)):
                self.said.emit(f"Nothing was changed. {words}")
                return
        self.put(verb, {(one.row, one.column): one.text for one in entries})

    def put(self, verb: str, values: dict[Place, float | str | None]) -> None:
        """Take values into input rows, in one step."""
        entries = [
            YearEntry(self._path(row), column + 1, value) for (row, column), value in values.items()
        ]
        labels = [in_sentence(self.sheet.labels[row]) for row, _ in values]
        name = step_name(verb, labels, [column + 1 for _, column in values])
        self.become(name, with_entries(self.session.deal, entries))

    def _path(self, row: int) -> str:
        shown = self.sheet.rows[row]
        return shown.path if isinstance(shown, InputRow) else ""

    def clear(self, places: Sequence[Place], verb: str = "back to following:") -> None:
        inputs = {place: None for place in places if not self.why_not(place)}
        before = self.session.deal
        self.put(verb, dict(inputs))
        first = next((row for row, column in inputs if column == 0), None)
        if first is not None and self.sheet.cell(first, 1).kind == "typed":
            label = self.sheet.labels[first]
            self.said.emit(
                f"Year 1 of {in_sentence(label)} has no year before it to follow, so it stays."
            )
        elif self.session.deal is before:
            self.said.emit("Nothing is typed there that could follow again.")

    def paste(self, at: Place, block: Sequence[Sequence[str]], over: Sequence[Place]) -> None:
        entries = block_entries(at, block, over)
        fit = [
            one for one in entries if one.row < self.rowCount() and one.column < self.columnCount()
        ]
        before = self.session.deal
        self.enter(fit, "paste")
        if self.session.deal is not before and self._bare_fractions(fit):
            self.said.emit(
                "Pasted rates without a per cent sign are read in per cent: 0.05 is 0.05 %."
            )
        if len(fit) < len(entries):
            count = len(entries) - len(fit)
            lie = "1 cell lies" if count == 1 else f"{count} cells lie"
            were = "was" if count == 1 else "were"
            self.said.emit(f"{lie} outside the grid and {were} left out.")

    def _bare_fractions(self, entries: Sequence[Entered]) -> bool:
        """Whether rates were pasted that look as if they were meant as fractions of one."""
        texts = [one.text for one in entries if self.sheet.percent(self.sheet.rows[one.row])]
        read = [parse_number(text, self.sheet.locale) for text in texts if "%" not in text]
        values = [one.value for one in read if isinstance(one, Taken) and one.value]
        return bool(values) and all(abs(value) < 1 for value in values)

    def follow(self) -> None:
        """Show the deal and the figures as they stand now."""
        new = Sheet(self.session.deal, self.session.result, self.sheet.rows)
        if new.deal is self.sheet.deal and new.result is self.sheet.result:
            return
        new.take_over(self.sheet)
        self.show_sheet(new)

    def show_sheet(self, new: Sheet) -> None:
        """Show another sheet; rows and columns that stay keep selection and place."""
        old, rows, years = self.sheet, len(self.sheet.rows), self.sheet.years
        if new.years < years:
            self.beginRemoveColumns(NO_PARENT, new.years, years - 1)
            old.years = new.years
            self.endRemoveColumns()
        if len(new.rows) < rows:
            self.beginRemoveRows(NO_PARENT, len(new.rows), rows - 1)
            old.rows = old.rows[: len(new.rows)]
            self.endRemoveRows()
        if new.years > years:
            self.beginInsertColumns(NO_PARENT, years, new.years - 1)
            old.years = new.years
            self.endInsertColumns()
        if len(new.rows) > rows:
            self.beginInsertRows(NO_PARENT, rows, len(new.rows) - 1)
            self.sheet = new
            self.endInsertRows()
        headings = self._headings(self.sheet) != self._headings(new) or rows != len(new.rows)
        self.sheet = new
        self.all_changed()
        if headings or years != new.years:
            self.headerDataChanged.emit(Qt.Orientation.Horizontal, 0, new.years - 1)
            if new.rows:
                self.headerDataChanged.emit(Qt.Orientation.Vertical, 0, len(new.rows) - 1)

    @staticmethod
    def _headings(sheet: Sheet) -> tuple[str, ...]:
        return (*sheet.labels, *(heading(sheet.deal, year + 1) for year in range(sheet.years)))
