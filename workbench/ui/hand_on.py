"""The page Hand on: the memo as it will be, the choice of its paper, and writing it."""

from PySide6.QtCore import QCoreApplication, QTimer
from PySide6.QtGui import QCloseEvent, QImage, QShowEvent
from PySide6.QtWidgets import (
    QComboBox,
    QHBoxLayout,
    QLabel,
    QMessageBox,
    QPushButton,
    QVBoxLayout,
    QWidget,
)

from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.text.locale import Paper
from workbench.ui.memo_maker import MemoMaker
from workbench.ui.memo_work import Made
from workbench.ui.pages_view import PagesView
from workbench.ui.saving import ask_path
from workbench.ui.theme import SPACE

PAPERS: tuple[Paper | None, ...] = (None, "a4", "letter")
PAPER_NAMES: dict[Paper, str] = {"a4": "A4", "letter": "Letter"}
SLOW = 200
"""Milliseconds after which it is said that something is being done."""
_CALM = 300
"""Milliseconds without a further change after which a preview in sight follows."""


class HandOnPage(QWidget):
    """The preview follows when the page is shown and the deal is another one than before.

    Whoever holds the page calls `close_down` before the program ends; it is also called at the
    end of the application.
    """

    def __init__(self, session: Session, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self._memo = MemoMaker(session, self)
        self._doing = ""
        self._slow, self._calm = _timer(SLOW, self), _timer(_CALM, self)
        self.setAccessibleName("Hand on")
        self.headline = _label("headline", self)
        self.progress = _label("muted", self)
        self.note = _label("muted", self)
        self.paper = QComboBox(self)
        self.write = QPushButton("&Write PDF…", self)
        self.pages = PagesView("Preview of the memo", self)
        self._arrange()
        self._connect()

    def _arrange(self) -> None:
        heading = _label("heading", self)
        heading.setText("Hand on")
        self.note.setWordWrap(True)
        self.note.hide()
        self.paper.setAccessibleName("Paper")
        self.paper.addItems(["", *PAPER_NAMES.values()])
        self._name_own_paper()
        self.write.setAccessibleName("Write the memo as a PDF file")
        row = QHBoxLayout()
        row.setSpacing(SPACE)
        row.addWidget(heading)
        row.addWidget(self.headline)
        row.addStretch(1)
        for part in (self.progress, self.paper, self.write):
            row.addWidget(part)
        column = QVBoxLayout(self)
        column.setContentsMargins(SPACE, SPACE, SPACE, SPACE)
        column.setSpacing(SPACE)
        column.addLayout(row)
        column.addWidget(self.note)
        column.addWidget(self.pages, 1)

    def _connect(self) -> None:
        self._slow.timeout.connect(self._on_slow)
        self._calm.timeout.connect(self.refresh)
        self.paper.activated.connect(self._on_paper_chosen)
        self.write.clicked.connect(self._on_write_clicked)
        self.pages.wanted.connect(self._on_page_wanted)
        self._memo.begun.connect(self._on_begun)
        self._memo.ended.connect(self._on_ended)
        self._memo.made.connect(self._on_made)
        self._memo.rendered.connect(self._on_rendered)
        self._memo.failed.connect(self._on_failed)
        self._session.result_changed.connect(self._on_result_changed)
        application = QCoreApplication.instance()
        if application is not None:
            application.aboutToQuit.connect(self.close_down)

    def refresh(self) -> None:
        """Let the preview follow the deal and the paper chosen."""
        self._name_own_paper()
        self._memo.make(self._paper())

    def close_down(self) -> None:
        """Leave off what is being done, and wait until nothing is."""
        self._memo.close_down()

    def _paper(self) -> Paper | None:
        return PAPERS[self.paper.currentIndex()]

    def _name_own_paper(self) -> None:
        own = PAPER_NAMES[locale_of(self._session.deal).paper]
        self.paper.setItemText(0, f"Paper of the locale: {own}")

    def _on_begun(self, words: str) -> None:
        """Say so at once where something is said already, else when it takes long."""
        self._doing = words
        if self._slow.isActive() or not self.progress.text():
            self._slow.start()
        else:
            self._on_slow()

    def _on_slow(self) -> None:
        self.progress.setText(self._doing)

    def _on_ended(self, words: str) -> None:
        self._slow.stop()
        self.progress.setText(words)

    def _on_result_changed(self, result: object) -> None:
        if self.isVisible():
            self._calm.start()

    def _on_paper_chosen(self, place: int) -> None:
        self.refresh()

    def _on_page_wanted(self, what: tuple[int, int]) -> None:
        self._memo.render(*what)

    def _on_rendered(self, what: tuple[int, QImage]) -> None:
        self.pages.show_image(*what)

    def _on_made(self, memo: Made) -> None:
        count = len(memo.sizes)
        self.headline.setText(f"purchase memo   {count} {'page' if count == 1 else 'pages'}")
        self.pages.setAccessibleDescription(f"{count} pages. Page Up and Page Down turn them.")
        marks = " ".join(memo.lacking)
        self.note.setText(f"Printed as a mark, since the letters lack them: {marks}")
        self.note.setVisible(bool(marks))
        self.pages.show_pages(memo.sizes)

    def _on_write_clicked(self) -> None:
        name = file_name(self._session.deal.property.name)
        path = ask_path(self, "Write the memo", name, "PDF document", ".pdf")
        if path is not None:
            self._memo.write(path, self._paper())

    def _on_failed(self, sentence: str) -> None:
        QMessageBox.warning(self, "Not written", sentence)

    def showEvent(self, event: QShowEvent) -> None:
        super().showEvent(event)
        self.refresh()

    def closeEvent(self, event: QCloseEvent) -> None:
        self.close_down()
        super().closeEvent(event)


def file_name(name: str) -> str:
    """A name for the memo's file that every system takes."""
    plain = "".join(c if c.isalnum() or c == "-" else " " for c in name)
    return f"{' '.join(plain.split())[:60]} memo".strip()


def _timer(wait: int, parent: QWidget) -> QTimer:
    timer = QTimer(parent)
    timer.setSingleShot(True)
    timer.setInterval(wait)
    return timer


def _label(role: str, parent: QWidget) -> QLabel:
    label = QLabel(parent)
    label.setProperty("role", role)
    return label
