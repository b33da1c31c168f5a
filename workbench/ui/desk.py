"""The desk: the pages over one session, each made anew when what it holds has changed."""

from PySide6.QtCore import Qt, Signal
from PySide6.QtWidgets import QFrame, QScrollArea, QStackedWidget, QWidget

from workbench.session.session import Session
from workbench.ui.chart_view import INCOME, LOAN, TIERS, ChartView
from workbench.ui.contents import Contents, pages
from workbench.ui.fields import AnyField
from workbench.ui.hand_on import HandOnPage
from workbench.ui.page import Page
from workbench.ui.roll import RollGrid

CHARTS = {
    "Borrow": (("Income and debt service", INCOME), ("Loan under price", LOAN)),
    "Leave": (("Tiers by year", TIERS),),
}
"""Pictures that are views of a page."""


class Desk(QStackedWidget):
    """All pages; one is shown."""

    asked = Signal(object)
    refused = Signal(object)

    def __init__(self, session: Session, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self._contents: tuple[Contents, ...] = ()
        self._roll = RollGrid(session, self)
        """Outlives the page it stands on, so that typing in it goes on when the page is remade."""
        self._roll.refused.connect(self.refused)
        self.names = tuple(one.name for one in pages(session.deal))
        self.pages: list[QWidget] = []
        self.areas: list[QScrollArea] = []
        for contents in pages(session.deal):
            self.pages.append(self._make(contents))
            self.areas.append(_scrolled(self.pages[-1], self))
            self.addWidget(self.areas[-1])
        self._contents = pages(session.deal)
        session.result_changed.connect(self._on_result_changed)

    def _make(self, contents: Contents) -> QWidget:
        if contents.name == "Hand on":
            return HandOnPage(self._session, self)
        others: list[tuple[str, QWidget]] = []
        if contents.name == "Earn":
            others.append(("Rent roll", self._roll))
        for title, chart in CHARTS.get(contents.name, ()):
            view = ChartView(self._session, chart)
            view.asked.connect(self.asked)
            others.append((title, view))
        page = Page(self._session, contents, others, self)
        page.asked.connect(self.asked)
        page.refused.connect(self.refused)
        return page

    def _on_result_changed(self, result: object) -> None:
        """Make those pages anew whose contents are other ones now."""
        contents = pages(self._session.deal)
        for place, (old, new) in enumerate(zip(self._contents, contents, strict=True)):
            if old != new:
                self._replace(place, new)
        self._contents = contents

    def _replace(self, place: int, contents: Contents) -> None:
        shown = self.currentIndex()
        old, page = self.areas[place], self.pages[place]
        view = page.view if isinstance(page, Page) else 0
        made = self._make(contents)
        self.pages[place] = made
        if isinstance(made, Page):
            made.show_view(view)
        self.areas[place] = _scrolled(self.pages[place], self)
        self.insertWidget(place, self.areas[place])
        self.removeWidget(old)
        old.deleteLater()
        self.setCurrentIndex(shown)

    def close_down(self) -> None:
        """End what runs beside the window."""
        for page in self.pages:
            if isinstance(page, HandOnPage):
                page.close_down()

    def find_field(self, path: str) -> tuple[int, AnyField] | None:
        """The page and the field that show an input."""
        for place, page in enumerate(self.pages):
            field = page.field_of(path) if isinstance(page, Page) else None
            if field is not None:
                return place, field
        return None

    def go_to_cell(self, path: str) -> int | None:
        """The page whose grid shows an input by year, with the cell in sight; None if none does."""
        if self._roll.go_to(path):
            return self._show_roll()
        row, _, year = path.rpartition(".")
        row, at = (row, int(year)) if year.isdigit() else (path, 1)
        for place, page in enumerate(self.pages):
            if isinstance(page, Page) and page.grid is not None and page.grid.go_to(row, at):
                page.show_view(0)
                return place
        return None

    def _show_roll(self) -> int:
        for place, page in enumerate(self.pages):
            if isinstance(page, Page) and page.isAncestorOf(self._roll):
                page.show_view(1)
                return place
        return 0


def _scrolled(page: QWidget, parent: QWidget) -> QScrollArea:
    """A page that scrolls when the window is too small for it."""
    area = QScrollArea(parent)
    area.setWidgetResizable(True)
    area.setFrameShape(QFrame.Shape.NoFrame)
    area.setFocusPolicy(Qt.FocusPolicy.NoFocus)
    area.setWidget(page)
    return area
