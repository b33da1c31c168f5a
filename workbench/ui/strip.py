"""The reading strip: the figures that every edit is judged by, always in sight."""

from PySide6.QtCore import Qt, Signal
from PySide6.QtGui import QMouseEvent
from PySide6.QtWidgets import QHBoxLayout, QLabel, QPushButton, QVBoxLayout, QWidget

from workbench.engine.result import Result
from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.text.numbers import MISSING, compact, multiple, percent
from workbench.ui.fields import NEEDED

FIGURES = (
    ("price", "Price", False),
    ("value", "Value", True),
    ("margin", "Margin", True),
    ("exit_value_share", "Exit-value share", True),
    ("irr", "IRR", False),
    ("dscr", "Lowest DSCR", False),
)
"""Key, label and whether the figure stands out."""


class Reading(QWidget):
    """One figure with its label; a click asks for its working."""

    asked = Signal(object)

    def __init__(self, label: str, large: bool, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.key: tuple[str, int | None] | None = None
        column = QVBoxLayout(self)
        column.setContentsMargins(8, 2, 8, 2)
        column.setSpacing(0)
        self.label = QLabel(label, self)
        self.label.setProperty("role", "muted")
        self.figure = QLabel(MISSING, self)
        self.figure.setProperty("role", "figure-strong" if large else "figure")
        self.note = QLabel("", self)
        self.note.setProperty("role", "muted")
        for part in (self.label, self.figure, self.note):
            column.addWidget(part)
        self.setFocusPolicy(Qt.FocusPolicy.TabFocus)
        self.setCursor(Qt.CursorShape.PointingHandCursor)

    def tell(self, label: str, text: str, note: str, key: tuple[str, int | None] | None) -> None:
        """Show a figure, with what it hangs on in the note."""
        self.key = key
        self.label.setText(label)
        self.figure.setText(text)
        self.note.setText(note)
        self.setAccessibleName(f"{label} {text} {note}".strip())

    def mouseReleaseEvent(self, event: QMouseEvent) -> None:
        if self.key is not None:
            self.asked.emit(self.key)
        event.accept()


class Strip(QWidget):
    """Price, value, margin, exit-value share, IRR and lowest cover."""

    asked = Signal(object)
    """A figure's working is wanted: carries (line or path, year or None)."""

    def __init__(self, session: Session, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self.setAccessibleName("Reading strip")
        row = QHBoxLayout(self)
        row.setContentsMargins(4, 2, 4, 2)
        row.setSpacing(0)
        self.readings: dict[str, Reading] = {}
        for key, label, large in FIGURES:
            reading = Reading(label, large, self)
            reading.asked.connect(self.asked)
            self.readings[key] = reading
            row.addWidget(reading, 1)
        self._faults = QPushButton("", self)
        self._faults.setFlat(True)
        row.addWidget(self._faults)
        session.result_changed.connect(self.show_result)
        self.show_result(session.result)

    @property
    def faults(self) -> QPushButton:
        """How many entries are not taken in or out of range; pressed to go through them."""
        return self._faults

    def show_result(self, result: Result) -> None:
        deal = self._session.deal
        locale = locale_of(deal)
        hold = result.given("leave.hold")
        share = result.figure("reference_share")
        note = f"hold {hold:.0f} · ref. {percent(share, locale)}" if hold else ""
        tell = self._tell
        price = result.given("purchase.price")
        tell("price", "Price", compact(price, locale), deal.conventions.currency, "purchase.price")
        tell("value", "Value", compact(result.figure("value"), locale), "", "value")
        tell("margin", "Margin", compact(result.figure("margin"), locale), "", "margin")
        part = percent(result.figure("exit_value_share"), locale)
        tell("exit_value_share", "Exit-value share", part, note, "exit_value_share")
        side = "levered" if deal.loans else "unlevered"
        rate = percent(result.figure(f"irr_{side}"), locale, 2)
        tell("irr", f"IRR, {side}", rate, "", f"irr_{side}")
        self._tell_cover(result)
        self._tell_faults(result)

    def _tell(self, key: str, label: str, text: str, note: str, line: str) -> None:
        self.readings[key].tell(label, text, note, (line, None))

    def _tell_cover(self, result: Result) -> None:
        hold = int(result.given("leave.hold") or 0)
        found = [(result.figure("dscr_noi", year), year) for year in range(1, hold + 1)]
        covers = [(cover, year) for cover, year in found if cover is not None]
        reading = self.readings["dscr"]
        reading.setVisible(bool(self._session.deal.loans))
        if covers:
            cover, year = min(covers)
            text = multiple(cover, locale_of(self._session.deal))
            reading.tell("Lowest DSCR", text, f"year {year}", ("dscr_noi", year))
        else:
            reading.tell("Lowest DSCR", MISSING, "", None)

    def _tell_faults(self, result: Result) -> None:
        count = len(result.plan.issues)
        untyped = all(issue.code in NEEDED for issue in result.plan.issues)
        text = f"{count} {'still needed' if untyped else 'to mend'}" if count else ""
        self._faults.setText(text)
        self._faults.setVisible(bool(count))
        self._faults.setAccessibleName(text or "nothing to mend")
