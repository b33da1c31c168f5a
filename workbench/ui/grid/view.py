"""The year grid: year rows edited and lines shown, one column a deal year."""

from collections.abc import Sequence

from PySide6.QtCore import QItemSelectionModel
from PySide6.QtGui import QFontMetrics, QResizeEvent
from PySide6.QtWidgets import QWidget

from workbench.session.session import Session
from workbench.ui.grid.fills import Filled, filled_down, filled_right, ramped
from workbench.ui.grid.header import PADDING
from workbench.ui.grid.model import YearModel
from workbench.ui.grid.rows import GridRow, InputRow, name_of, unit_of_row
from workbench.ui.grid.sheet import Sheet
from workbench.ui.grid.table import Command, Table
from workbench.ui.theme import YEAR_WIDTH

WIDEST_YEAR = 96
USUAL_LABELS = 166
WIDEST_LABELS = 260
WIDEST_AMOUNT = "8,888,888"


class YearGrid(Table):
    """Rows of a page by deal year."""

    def __init__(
        self, session: Session, rows: Sequence[GridRow], parent: QWidget | None = None
    ) -> None:
        self._years = YearModel(session, rows)
        super().__init__(self._years, "Year by year", parent)
        self._years.setParent(self)
        session.deal_changed.connect(self._on_deal_changed)
        session.result_changed.connect(self._on_result_changed)
        self.verticalScrollBar().rangeChanged.connect(self._on_range_changed)
        self._fit()
        self._start()

    def _start(self) -> None:
        """Make the first cell that takes an entry the current one, without choosing it."""
        first = next((row for row in range(len(self.rows)) if not self.cells.why_not((row, 0))), 0)
        index = self._years.index(first, 0)
        self.selectionModel().setCurrentIndex(index, QItemSelectionModel.SelectionFlag.NoUpdate)

    @property
    def rows(self) -> tuple[GridRow, ...]:
        return self._years.sheet.rows

    def set_rows(self, rows: Sequence[GridRow]) -> None:
        """Show other rows; the current cell stays with its row where that is still there."""
        place = self.place()
        name = name_of(self.rows[place[0]]) if place is not None else ""
        self._years.show_sheet(Sheet(self._years.session.deal, self._years.session.result, rows))
        self._fit()
        if place is not None:
            self.go_to(name, place[1] + 1)

    def go_to(self, name: str, year: int) -> bool:
        """Choose the cell of a key or path in a year; False where it is not shown."""
        names = [name_of(row) for row in self.rows]
        if name not in names or not 1 <= year <= self._years.sheet.years:
            return False
        place = names.index(name), year - 1
        self.choose(place, place)
        return True

    def _own_commands(self) -> Sequence[Command]:
        return (
            Command("Fill right", self.fill_right, "Ctrl+R"),
            Command("Fill down", self.fill_down, "Ctrl+D"),
            Command("Ramp between the two ends", self.ramp, "Ctrl+Shift+R"),
            Command("Back to following", self.back_to_following, "Del"),
        )

    def back_to_following(self) -> None:
        """Let typed years follow the year before again."""
        self.clear()

    def fill_right(self) -> None:
        """Put the first chosen year of each row into the other chosen ones."""
        chosen = self._inputs_by_row()
        if chosen:
            self._put("fill", filled_right(chosen, self._value))

    def fill_down(self) -> None:
        """Put the topmost chosen row into the other chosen ones; they must have one unit."""
        chosen, deal = self._inputs_by_row(), self._years.session.deal
        units = [unit_of_row(row, deal) if isinstance(row, InputRow) else None for row in self.rows]
        if chosen:
            self._put("fill", filled_down(chosen, self._value, units))

    def ramp(self) -> None:
        """Equal steps between the first and the last chosen year of each row."""
        chosen = self._inputs_by_row()
        if chosen:
            self._put("ramp", ramped(chosen, self._value))

    def _put(self, verb: str, values: Filled | str) -> None:
        if isinstance(values, str):
            self.refused.emit(values)
        else:
            self._years.put(verb, dict(values))

    def _inputs_by_row(self) -> dict[int, list[int]]:
        """The chosen columns of each input row; says so where a chosen row is none."""
        by_row: dict[int, list[int]] = {}
        for row, column in self.chosen():
            if words := self.cells.why_not((row, column)):
                self.refused.emit(words)
                return {}
            by_row.setdefault(row, []).append(column)
        return by_row

    def _value(self, row: int, column: int) -> float | None:
        return self._years.sheet.value(self.rows[row], column + 1)

    def _on_deal_changed(self, revision: object) -> None:
        self._follow()

    def _on_result_changed(self, result: object) -> None:
        self._follow()

    def _follow(self) -> None:
        years, corner = self._years.sheet.years, self.corner.text()
        self._years.follow()
        if years != self._years.sheet.years or corner != self._years.sheet.corner:
            self._fit()

    def _on_range_changed(self, least: int, most: int) -> None:
        """The scroll bar has come or gone, and with it some room."""
        self._fit()

    def resizeEvent(self, event: QResizeEvent) -> None:
        super().resizeEvent(event)
        self._fit()

    def _fit(self) -> None:
        """Give labels and years the room there is; years are never narrower than their figures."""
        self.corner.setText(self._years.sheet.corner)
        self.corner.setAccessibleName(f"Amounts in {self._years.sheet.corner}")
        font = self.font()
        font.setBold(True)
        needed = QFontMetrics(font).horizontalAdvance(WIDEST_AMOUNT) + 2 * PADDING + 1
        least, count = max(YEAR_WIDTH, needed), self._years.sheet.years
        bar = self.verticalScrollBar()
        room = self.width() - (bar.sizeHint().width() if bar.maximum() > 0 else 0)
        wanted = min(self.labels.wanted_width(), WIDEST_LABELS)
        wide = min(wanted, max(USUAL_LABELS, room - count * least))
        self.labels.setFixedWidth(wide)
        share = (room - wide) // count
        self.columns.setDefaultSectionSize(max(least, min(share, max(WIDEST_YEAR, least))))
