"""The window: reading strip, rail, desk and wall over one deal."""

from pathlib import Path

from PySide6.QtCore import QSettings, Qt
from PySide6.QtGui import QCloseEvent, QDragEnterEvent, QDropEvent
from PySide6.QtWidgets import (
    QApplication,
    QFileDialog,
    QFrame,
    QHBoxLayout,
    QLabel,
    QMainWindow,
    QMessageBox,
    QVBoxLayout,
    QWidget,
)

from workbench.session.desk_file import DeskFile
from workbench.session.session import Effect, Session
from workbench.session.typed import locale_of
from workbench.text.numbers import MINUS, money
from workbench.ui.desk import Desk
from workbench.ui.menus import Menus
from workbench.ui.rail import Rail
from workbench.ui.strip import Strip
from workbench.ui.theme import apply_theme
from workbench.ui.wall_view import WallView
from workbench.ui.working_panel import WorkingPanel

FILTER = "Deals (*.deal);;All files (*)"
RECENT = 8


class Window(QMainWindow):
    """One window, one deal. What is edited is in the centre; what it does to value is in sight."""

    def __init__(self, session: Session, file: DeskFile, settings: QSettings) -> None:
        super().__init__()
        self.session = session
        self.file = file
        self.settings = settings
        self.setAcceptDrops(True)
        self.setMinimumSize(960, 540)
        self.strip = Strip(session, self)
        self.desk = Desk(session, self)
        self.rail = Rail(self.desk.names, self)
        self.wall = WallView(session, self)
        self.working = WorkingPanel(session, self)
        self.working.hide()
        self.setCentralWidget(self._body())
        self._effect = QLabel("", self)
        self._saved = QLabel("", self)
        self.statusBar().addWidget(self._saved)
        self.statusBar().addWidget(self._effect, 1)
        self.menus = Menus(self)
        self._connect()
        self._restore()
        self.show_page(0)
        self._show_state(0)

    def _body(self) -> QWidget:
        body = QWidget(self)
        column = QVBoxLayout(body)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        column.addWidget(self.strip)
        column.addWidget(_rule(QFrame.Shape.HLine, body))
        row = QHBoxLayout()
        row.setSpacing(0)
        centre = QVBoxLayout()
        centre.addWidget(self.desk, 3)
        centre.addWidget(self.working, 2)
        row.addWidget(self.rail)
        row.addWidget(_rule(QFrame.Shape.VLine, body))
        row.addLayout(centre, 1)
        row.addWidget(_rule(QFrame.Shape.VLine, body))
        row.addWidget(self.wall)
        column.addLayout(row, 1)
        return body

    def _connect(self) -> None:
        self.rail.chosen.connect(self.show_page)
        for source in (self.strip, self.desk, self.wall):
            source.asked.connect(self.show_working)
        self.desk.refused.connect(self.say)
        self.working.jumped.connect(self.jump)
        self.working.closed.connect(self._on_working_closed)
        self.strip.faults.clicked.connect(self.show_faults)
        self.session.deal_changed.connect(self._show_state)
        self.session.effect_seen.connect(self._on_effect_seen)
        self.file.moved.connect(self._on_file_moved)
        self.file.troubled.connect(self.say_trouble)

    def _restore(self) -> None:
        geometry = self.settings.value("window/geometry")
        if geometry is None or not self.restoreGeometry(geometry):
            self.resize(1280, 800)

    def show_page(self, place: int) -> None:
        self.desk.setCurrentIndex(place)
        self.rail.show_page(place)

    def show_working(self, what: object) -> None:
        """Open the working of a figure, or jump to an input's field."""
        key, year = what if isinstance(what, tuple) else (str(what), None)
        if key not in self.session.result.declared:
            self.jump(key if year is None else f"{key}.{year}")
            return
        if self.session.result.declared[key].per == "once":
            year = None
        self.working.show()
        self.working.show_working(key, year)

    def jump(self, path: str) -> None:
        """Bring the field or the cell of an input into sight and put the cursor there."""
        found = self.desk.find_field(path)
        if found is not None:
            self.show_page(found[0])
            found[1].setFocus(Qt.FocusReason.ShortcutFocusReason)
            return
        place = self.desk.go_to_cell(path)
        if place is not None:
            self.show_page(place)
            return
        self.say(f"{path} is edited in the rent roll, or is not shown in this window yet")

    def show_faults(self) -> None:
        """Go to the first input with an issue and say what is wrong with it."""
        issues = self.session.result.plan.issues
        if issues:
            self.jump(issues[0].path)
            from workbench.text.messages import word_issue

            self.say(word_issue(self.session.deal, issues[0]))

    def _on_working_closed(self, _: object) -> None:
        self.working.hide()
        self.desk.setFocus()

    def say(self, sentence: str) -> None:
        self._effect.setText(sentence)

    def say_trouble(self, sentence: str) -> None:
        self.say(sentence)
        QMessageBox.warning(self, "Groundcourse", sentence)

    def _on_effect_seen(self, effect: Effect) -> None:
        self._effect.setText(effect_text(self.session, effect))

    def _show_state(self, revision: int) -> None:
        name = self.session.deal.property.name or "New deal"
        place = self.file.path.name if self.file.path is not None else "not saved yet"
        self.setWindowTitle(f"{name} ({place})[*] — Groundcourse")
        self.setWindowModified(self.session.modified)
        self._saved.setText("Not saved" if self.session.modified else "Saved")
        self.menus.show_state()

    def _on_file_moved(self, path: Path | None) -> None:
        if path is not None:
            recent = [str(path), *(one for one in self.recent() if one != str(path))]
            self.settings.setValue("files/recent", recent[:RECENT])
        self._show_state(0)

    def recent(self) -> list[str]:
        """The files opened or saved last, the newest first."""
        held = self.settings.value("files/recent", [])
        if isinstance(held, list):
            return [str(one) for one in held]
        return [held] if isinstance(held, str) else []

    def new_deal(self) -> None:
        if self.may_leave():
            self.file.new()
            self.show_page(0)

    def open_dialog(self) -> None:
        if not self.may_leave():
            return
        name, _ = QFileDialog.getOpenFileName(self, "Open a deal", "", FILTER)
        if name:
            self.file.open(Path(name))

    def open_file(self, path: Path) -> None:
        if self.may_leave():
            self.file.open(path)

    def save(self) -> bool:
        if self.file.path is None:
            return self.save_as()
        if self.file.changed_by_others() and not self._overwrite():
            return False
        return self.file.save()

    def _overwrite(self) -> bool:
        asked = QMessageBox.question(
            self,
            "Groundcourse",
            "The file has been changed by somebody else since it was opened. "
            "Write over what is there?",
        )
        return asked == QMessageBox.StandardButton.Yes

    def save_as(self) -> bool:
        name, _ = QFileDialog.getSaveFileName(self, "Save the deal", "", FILTER)
        if not name:
            return False
        path = Path(name)
        return self.file.save(path if path.suffix else path.with_suffix(".deal"))

    def may_leave(self) -> bool:
        """Whether the open deal may go: it is saved, gets saved, or is given up."""
        if not self.session.modified:
            return True
        buttons = QMessageBox.StandardButton
        asked = QMessageBox.question(
            self,
            "Groundcourse",
            "The deal has changes that are not saved. Save them first?",
            buttons.Save | buttons.Discard | buttons.Cancel,
            buttons.Save,
        )
        if asked == buttons.Save:
            return self.save()
        return asked == buttons.Discard

    def set_dark(self, dark: bool) -> None:
        self.settings.setValue("looks/dark", dark)
        app = QApplication.instance()
        if isinstance(app, QApplication):
            apply_theme(app, dark)

    def dragEnterEvent(self, event: QDragEnterEvent) -> None:
        if any(url.isLocalFile() for url in event.mimeData().urls()):
            event.acceptProposedAction()

    def dropEvent(self, event: QDropEvent) -> None:
        files = [url.toLocalFile() for url in event.mimeData().urls() if url.isLocalFile()]
        if files:
            self.open_file(Path(files[0]))

    def closeEvent(self, event: QCloseEvent) -> None:
        if not self.may_leave():
            event.ignore()
            return
        self.settings.setValue("window/geometry", self.saveGeometry())
        self.desk.close_down()
        self.file.forget()
        event.accept()


def effect_text(session: Session, effect: Effect) -> str:
    """What the last change did to the value: `exit yield: value −412,000`."""
    if effect.before is None or effect.after is None:
        return f"{effect.label[0].upper()}{effect.label[1:]}" if effect.label else ""
    change = effect.after - effect.before
    text = money(change, locale_of(session.deal))
    sign = "" if text.startswith(MINUS) or text == "0" else "+"
    return f"{effect.label[0].upper()}{effect.label[1:]}: value {sign}{text}"


def _rule(shape: QFrame.Shape, parent: QWidget) -> QFrame:
    rule = QFrame(parent)
    rule.setFrameShape(shape)
    rule.setProperty("role", "rule")
    return rule
