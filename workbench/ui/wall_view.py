"""The value wall beside the desk; in a small window it is a bar that opens over the desk."""

from PySide6.QtCore import QEvent, QObject, QPoint, QRect, QSize, Qt
from PySide6.QtGui import QKeyEvent, QMouseEvent, QShowEvent
from PySide6.QtWidgets import QFrame, QToolTip, QVBoxLayout, QWidget

from workbench.charts.shapes import Picture
from workbench.charts.wall import draw_wall
from workbench.charts.wall_stack import WallFigures
from workbench.engine.result import Result
from workbench.report.voice import Voice
from workbench.report.wall_figures import wall_figures, wall_readings
from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.ui.picture_view import PictureView
from workbench.ui.theme import BAR_WIDTH, NARROW_BELOW, WALL_WIDTH

LINES = {
    "in_hand": "value_in_hand_of_year",
    "expected": "value_expected_of_year",
    "exit": "exit_present_value",
}
"""The lines behind the pieces of the wall."""
_NAMES = {"in_hand": "rent in hand", "expected": "rent expected"}


class WallView(PictureView):
    """The wall of the open deal. `asked` carries a line and a year, or None for the year.

    In a window less wide than NARROW_BELOW it is a bar, and a click opens the wall itself.
    """

    def __init__(self, session: Session, parent: QWidget | None = None) -> None:
        super().__init__("Value wall", parent)
        self._session = session
        self._figures: WallFigures | None = None
        self._shown: Result | None = None
        self._opened: Opened | None = None
        self.narrow = False
        self.setFixedWidth(WALL_WIDTH)
        session.result_changed.connect(self._on_result_changed)

    def sentence(self, key: str) -> str:
        figures, (tier, year) = self._figures, _parts(key)
        if figures is None:
            return ""
        if year is None:
            amount, name = figures.exit or 0.0, "The sale at the end"
        else:
            course = figures.courses[year - 1]
            amount = course.in_hand if tier == "in_hand" else course.expected
            name = f"Year {year}, {_NAMES[tier]}"
        share = ""
        if figures.value is not None and figures.value > 0:
            share = f", {figures.share(amount / figures.value)} of the value"
        return f"{name}: {figures.money(amount)} brought to today{share}."

    def meaning(self, key: str) -> object:
        tier, year = _parts(key)
        return LINES[tier], year

    def set_narrow(self, narrow: bool) -> None:
        """Be a bar, or the wall in full."""
        self.narrow = narrow
        self.setFixedWidth(BAR_WIDTH if narrow else WALL_WIDTH)
        self.setAccessibleName("Value wall, opens over the desk" if narrow else "Value wall")
        if not narrow and self._opened is not None:
            self._opened.hide()

    def open_wall(self) -> None:
        """Show the wall in full over the desk, beside its bar."""
        QToolTip.hideText()
        if self._opened is None:
            self._opened = Opened(self._session, self)
            self._opened.wall.asked.connect(self._on_asked_within)
        self._opened.show_beside(self)

    @property
    def opened(self) -> "Opened | None":
        """The wall that a bar has opened, where it stands open."""
        return self._opened if self._opened is not None and self._opened.isVisible() else None

    def mouseReleaseEvent(self, event: QMouseEvent) -> None:
        if self.narrow and event.button() == Qt.MouseButton.LeftButton:
            self.open_wall()
        else:
            super().mouseReleaseEvent(event)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        choosing = event.key() in (Qt.Key.Key_Return, Qt.Key.Key_Enter, Qt.Key.Key_Space)
        if self.narrow and choosing:
            self.open_wall()
        else:
            super().keyPressEvent(event)

    def showEvent(self, event: QShowEvent) -> None:
        super().showEvent(event)
        if self.window() is not self and not isinstance(self.window(), Opened):
            self.window().installEventFilter(self)
            self._fit_window()
        self._catch_up()

    def eventFilter(self, watched: QObject, event: QEvent) -> bool:
        if event.type() == QEvent.Type.Resize and watched is self.window():
            self._fit_window()
        return super().eventFilter(watched, event)

    def _fit_window(self) -> None:
        narrow = self.window().width() < NARROW_BELOW
        if narrow != self.narrow:
            self.set_narrow(narrow)

    def _on_asked_within(self, what: object) -> None:
        if self._opened is not None:
            self._opened.hide()
        self.asked.emit(what)

    def _on_result_changed(self, result: object) -> None:
        if self.isVisible():
            self._catch_up()

    def _catch_up(self) -> None:
        """Show the figures as they stand, unless they are shown already."""
        result = self._session.result
        if result is not self._shown:
            self._shown = result
            voice = Voice(result.plan.deal, locale_of(result.plan.deal))
            self._figures = wall_figures(wall_readings(result), voice)
            self.show_layout(self._draw)

    def _draw(self, width: float, height: float) -> Picture:
        assert self._figures is not None
        return draw_wall(self._figures, width, height)


class Opened(QFrame):
    """The wall over the desk; goes away at a click elsewhere or at Escape."""

    def __init__(self, session: Session, parent: QWidget) -> None:
        super().__init__(parent, Qt.WindowType.Popup)
        self.setFrameShape(QFrame.Shape.StyledPanel)
        self.setAccessibleName("Value wall")
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        self.wall = WallView(session, self)
        column.addWidget(self.wall)

    def show_beside(self, bar: QWidget) -> None:
        """As high as the bar, and with its right edge at that of the bar."""
        wide = WALL_WIDTH + 2 * self.frameWidth()
        corner = bar.mapToGlobal(QPoint(bar.width() - wide, 0))
        self.setGeometry(QRect(corner, QSize(wide, bar.height())))
        self.show()
        self.wall.setFocus(Qt.FocusReason.PopupFocusReason)


def _parts(key: str) -> tuple[str, int | None]:
    """`in_hand.3` as the tier and the year; the exit has no year."""
    tier, dot, year = key.partition(".")
    return tier, int(year) if dot else None
