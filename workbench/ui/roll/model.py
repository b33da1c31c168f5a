"""The model of the rent roll: texts out of a sheet, entries into the session."""

from collections.abc import Callable, Collection, Sequence

from PySide6.QtCore import QModelIndex, QObject, Qt

from workbench.deal.deal import Deal
from workbench.session.session import Session
from workbench.ui.grid.cell import Cell
from workbench.ui.grid.cells import LEFT, RIGHT, CellsModel, Entered, Index, Place, block_entries
from workbench.ui.grid.roles import CHOICES, COPIED, KIND, MARK
from workbench.ui.roll.columns import COLUMNS, columns_named
from workbench.ui.roll.entries import with_texts
from workbench.ui.roll.rows import Key, RollRow, name_of_row
from workbench.ui.roll.sheet import RollSheet
from workbench.ui.roll.values import choices

Role = Qt.ItemDataRole
NO_PARENT = QModelIndex()
_EDITABLE = Qt.ItemFlag.ItemIsEnabled | Qt.ItemFlag.ItemIsSelectable | Qt.ItemFlag.ItemIsEditable


class RollModel(CellsModel):
    """One row a lease, and an empty one at the end for what is new."""

    def __init__(self, session: Session, parent: QObject | None = None) -> None:
        super().__init__(session, parent)
        self.sheet = RollSheet(session.deal, session.result)

    def rowCount(self, parent: Index = NO_PARENT) -> int:
        return 0 if parent.isValid() else len(self.sheet.rows)

    def columnCount(self, parent: Index = NO_PARENT) -> int:
        return 0 if parent.isValid() else len(COLUMNS)

    def data(self, index: Index, role: int = Role.DisplayRole) -> object:
        row, column = index.row(), index.column()
        if not index.isValid() or row >= len(self.sheet.rows):
            return None
        match role:
            case Role.DisplayRole:
                return self.sheet.cell(row, column).text
            case Role.EditRole:
                return self.sheet.edited(row, column)
            case Role.ToolTipRole:
                return self.sheet.reason(row, column) or self.sheet.cell(row, column).text
            case Role.AccessibleDescriptionRole:
                return self.sheet.reason(row, column)
            case Role.AccessibleTextRole:
                return self.sheet.spoken(row, column)
            case Role.TextAlignmentRole:
                return RIGHT if COLUMNS[column].is_number else LEFT
            case _:
                return self._own_data(row, column, role)

    def look(self, row: int, column: int) -> Cell:
        return self.sheet.cell(row, column)

    def _own_data(self, row: int, column: int, role: int) -> str | list[str] | None:
        if role == KIND:
            return self.sheet.cell(row, column).kind
        if role == MARK:
            return self.sheet.cell(row, column).mark
        if role == COPIED:
            return self.sheet.edited(row, column)
        is_choice = role == CHOICES and COLUMNS[column].content == "basis"
        return choices(self.sheet.deal) if is_choice else None

    def headerData(
        self, section: int, orientation: Qt.Orientation, role: int = Role.DisplayRole
    ) -> object:
        if orientation == Qt.Orientation.Vertical:
            return self._row_header(section, role)
        match role:
            case Role.DisplayRole:
                return self.sheet.headings[section]
            case Role.ToolTipRole | Role.AccessibleTextRole:
                return self.sheet.headings[section].replace("\n", " ")
            case Role.TextAlignmentRole:
                return RIGHT if COLUMNS[section].is_number else LEFT
            case _:
                return None

    def _row_header(self, section: int, role: int) -> object:
        is_new = section == len(self.sheet.rows) - 1
        if role == Role.DisplayRole:
            return "new" if is_new else str(section + 1)
        if role == Role.AccessibleTextRole:
            return "New row" if is_new else name_of_row(self.sheet.rows, section)
        return "label" if role == KIND else None

    def flags(self, index: Index) -> Qt.ItemFlag:
        return _EDITABLE

    def why_not(self, place: Place) -> str:
        return ""

    def asked_of(self, place: Place) -> object | None:
        self.said.emit("The rent roll holds what was typed; nothing in it is computed.")
        return None

    def enter(self, entries: Sequence[Entered], verb: str) -> None:
        texts = {(one.row, one.column): one.text for one in entries}
        self.become(self._name(verb, entries), with_texts(self.session.deal, texts))

    def _name(self, verb: str, entries: Sequence[Entered]) -> str:
        """`tenant of Flat 2`, `fill tenant in 4 rows`, `paste 500 rows`."""
        rows = {one.row for one in entries}
        columns = {one.column for one in entries}
        title = COLUMNS[min(columns)].title.lower() if len(columns) == 1 else ""
        if len(rows) == 1:
            row = min(rows)
            is_new = self.sheet.rows[min(row, len(self.sheet.rows) - 1)].space is None
            name = "a new row" if is_new else name_of_row(self.sheet.rows, row)
            what = f"{title} of {name}" if title else name
        else:
            what = f"{title} in {len(rows)} rows" if title else f"{len(rows)} rows"
        return f"{verb} {what}".strip()

    def clear(self, places: Sequence[Place], verb: str = "clear") -> None:
        before = self.session.deal
        self.enter([Entered(row, column, "") for row, column in places], verb)
        if self.session.deal is before:
            self.said.emit("There is nothing in these cells to take out.")

    def paste(self, at: Place, block: Sequence[Sequence[str]], over: Sequence[Place]) -> None:
        named = columns_named(tuple(block[0]))
        if named is not None:
            self._paste_named(at[0], named, block)
            return
        entries = block_entries(at, block, over)
        fit = [one for one in entries if one.column < len(COLUMNS)]
        self.enter(fit, "paste")
        if len(fit) < len(entries):
            self.said.emit("Columns past the last one of the grid were left out.")

    def _paste_named(
        self, row: int, named: Sequence[int | None], block: Sequence[Sequence[str]]
    ) -> None:
        """A block under a line of headings: each column goes where its heading says."""
        entries = [
            Entered(row + down, place, text)
            for down, line in enumerate(block[1:])
            for place, text in zip(named, line, strict=False)
            if place is not None
        ]
        if entries:
            self.enter(entries, "paste")
        lost = [word for word, place in zip(block[0], named, strict=True) if place is None and word]
        if lost:
            self.said.emit(f"Columns without a place here were left out: {', '.join(lost)}.")

    def change(self, label: str, edit: Callable[[Deal], Deal]) -> bool:
        """One step that is not about single cells."""
        return self.become(label, edit(self.session.deal))

    def rows_with(self, keys: Collection[Key]) -> list[int]:
        """Where rows stand now."""
        return [place for place, row in enumerate(self.sheet.rows) if row.key in keys]

    def follow(self) -> None:
        """Show the deal as it stands now; rows that stay keep selection and place."""
        deal, result = self.session.deal, self.session.result
        if deal is self.sheet.deal and result is self.sheet.result:
            return
        old, new = self.sheet, self.sheet.renewed(deal, result)
        if new.shows_the_same(old):
            self.sheet = new
            return
        before, after = [row.key for row in old.rows], [row.key for row in new.rows]
        if before != after:
            self._splice(new, before, after)
            new = new.renewed(deal, result)
            new.forget()
        self.sheet = new
        self.all_changed()
        if old.headings != new.headings:
            self.headerDataChanged.emit(Qt.Orientation.Horizontal, 0, len(COLUMNS) - 1)

    def _splice(self, new: RollSheet, before: Sequence[Key], after: Sequence[Key]) -> None:
        """Take out the rows that differ and put in those that stand there now."""
        head = _alike(before, after)
        tail = _alike(before[head:][::-1], after[head:][::-1])
        gone, come = len(before) - head - tail, len(after) - head - tail
        rows = new.rows
        kept: list[RollRow] = [*rows[:head], *rows[len(rows) - tail :]]
        self.sheet = new
        if gone:
            self.sheet.rows = [*rows[:head], *[RollRow(None)] * gone, *rows[len(rows) - tail :]]
            self.beginRemoveRows(NO_PARENT, head, head + gone - 1)
            self.sheet.rows = kept
            self.endRemoveRows()
        if come:
            self.sheet.rows = kept
            self.beginInsertRows(NO_PARENT, head, head + come - 1)
            self.sheet.rows = rows
            self.endInsertRows()
        self.sheet.rows = rows


def _alike(one: Sequence[Key], other: Sequence[Key]) -> int:
    """How many keys two lists begin with in common."""
    count = 0
    for first, second in zip(one, other, strict=False):
        if first != second:
            break
        count += 1
    return count
