"""One page of the desk: a headline, its forms and lists, and one grid in three bands."""

from collections.abc import Sequence

from PySide6.QtCore import Signal
from PySide6.QtWidgets import QButtonGroup, QHBoxLayout, QLabel, QPushButton, QVBoxLayout, QWidget

from workbench.engine.result import Result
from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.text.numbers import compact
from workbench.ui.contents import Contents, ListPart
from workbench.ui.fields import AnyField
from workbench.ui.forms import Form, ItemRows
from workbench.ui.grid import Band, GridRow, InputRow, LineRow, YearGrid


class Page(QWidget):
    """A page made of its contents; made anew by the window when its contents change."""

    asked = Signal(object)
    refused = Signal(object)

    def __init__(
        self,
        session: Session,
        contents: Contents,
        others: Sequence[tuple[str, QWidget]] = (),
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(parent)
        self._session = session
        self.contents = contents
        self.setAccessibleName(contents.name)
        self._apart = [part for part in contents.lists if part.apart]
        self._others = [*others, *((part.title, QWidget(self)) for part in self._apart)]
        column = QVBoxLayout(self)
        column.setContentsMargins(12, 8, 12, 8)
        column.setSpacing(6)
        column.addLayout(self._head(self._others))
        self._views: list[QWidget] = []
        self.form: Form | None = None
        self.lists: list[ItemRows] = []
        self.grid: YearGrid | None = None
        self.view = 0
        column.addWidget(self._main_view(), 1)
        for _, view in self._others:
            view.setParent(self)
            self._views.append(view)
            view.setVisible(False)
            column.addWidget(view, 1)
        session.result_changed.connect(self._on_result_changed)
        session.deal_changed.connect(self._on_deal_changed)
        self._on_result_changed(session.result)

    def _head(self, others: Sequence[tuple[str, QWidget]]) -> QHBoxLayout:
        row = QHBoxLayout()
        title = QLabel(self.contents.name, self)
        title.setProperty("role", "heading")
        self._headline = QLabel("", self)
        self._headline.setProperty("role", "headline")
        row.addWidget(title)
        row.addWidget(self._headline)
        row.addStretch(1)
        self._switches = QButtonGroup(self)
        names = ["Year by year" if self.contents.bands else "Form", *(name for name, _ in others)]
        for place, name in enumerate(names if others else ()):
            switch = QPushButton(name, self)
            switch.setCheckable(True)
            switch.setProperty("role", "switch")
            switch.setChecked(place == 0)
            self._switches.addButton(switch, place)
            row.addWidget(switch)
        self._switches.idClicked.connect(self.show_view)
        return row

    def _main_view(self) -> QWidget:
        main = QWidget(self)
        column = QVBoxLayout(main)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(6)
        if self.contents.first or self.contents.more:
            self.form = Form(self._session, self.contents.first, self.contents.more, main)
            column.addWidget(self.form)
        for part in self.contents.lists:
            if part.apart:
                self._add_list_view(part)
                continue
            heading = QLabel(part.title, main)
            heading.setProperty("role", "subheading")
            column.addWidget(heading)
            rows = ItemRows(self._session, part.name, part.fields, main)
            self.lists.append(rows)
            column.addWidget(rows)
        if self.contents.bands:
            self.grid = YearGrid(self._session, grid_rows(self.contents), main)
            self.grid.asked.connect(self.asked)
            self.grid.refused.connect(self.refused)
            column.addWidget(self.grid, 1)
        else:
            column.addStretch(1)
        self._views.append(main)
        return main

    def _add_list_view(self, part: ListPart) -> None:
        """A list on a view of its own."""
        view = next(view for title, view in self._others if title == part.title)
        column = QVBoxLayout(view)
        column.setContentsMargins(0, 0, 0, 0)
        rows = ItemRows(self._session, part.name, part.fields, view, tallest=10_000)
        self.lists.append(rows)
        column.addWidget(rows)
        column.addStretch(1)

    def show_view(self, place: int) -> None:
        """Show one of the page's views."""
        self.view = place
        for number, view in enumerate(self._views):
            view.setVisible(number == place)
        button = self._switches.button(place)
        if button is not None:
            button.setChecked(True)

    def field_of(self, path: str) -> AnyField | None:
        """The form field of an input on this page, made visible; None if it is not here."""
        found = self.form.open_for(path) if self.form is not None else None
        if found is None:
            fields = (field for rows in self.lists for field in rows.fields)
            found = next((field for field in fields if field.path == path), None)
        if found is not None:
            holder = (place for place, view in enumerate(self._views) if view.isAncestorOf(found))
            self.show_view(next(holder, 0))
        return found

    def _on_deal_changed(self, revision: int) -> None:
        if self.form is not None:
            self.form.show_deal()
        for rows in self.lists:
            rows.show_deal()

    def _on_result_changed(self, result: Result) -> None:
        if not self.contents.headline:
            return
        year = None if result.declared[self.contents.headline].per == "once" else 1
        value = result.figure(self.contents.headline, year)
        text = compact(abs(value) if value is not None else None, locale_of(self._session.deal))
        self._headline.setText(f"{self.contents.words}   {text}")
        self._on_deal_changed(0)


def grid_rows(contents: Contents) -> list[GridRow]:
    """The rows of the page's grid as the grid wants them."""
    made: list[GridRow] = []
    for title, rows in contents.bands:
        made.append(Band(title))
        for row in rows:
            made.append(InputRow(row.key) if row.is_input else LineRow(row.key, row.bold))
    return made
