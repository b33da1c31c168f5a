"""Forms: a few fields in sight, the rest behind one line; lists of items as rows of fields."""

from collections.abc import Sequence

from PySide6.QtCore import Qt
from PySide6.QtWidgets import (
    QFrame,
    QGridLayout,
    QHBoxLayout,
    QLabel,
    QPushButton,
    QScrollArea,
    QSizePolicy,
    QToolButton,
    QVBoxLayout,
    QWidget,
)

from workbench.deal.deal import Deal
from workbench.deal.fresh import NEW_ITEMS, with_new_item, without_item
from workbench.deal.inputs import declared
from workbench.deal.paths import get, value_at
from workbench.session.session import Change, Session
from workbench.session.typed import declaration, unit_text
from workbench.text.labels import ITEMS
from workbench.ui.fields import AnyField, make_field

ACROSS = 3
"""Fields beside each other in a form."""


class Form(QWidget):
    """Fields for single inputs: the first in sight, the others behind “n more”."""

    def __init__(
        self,
        session: Session,
        first: Sequence[str],
        more: Sequence[str] = (),
        parent: QWidget | None = None,
        across: int = ACROSS,
    ) -> None:
        super().__init__(parent)
        self._session = session
        self._more = tuple(more)
        self.fields: list[AnyField] = []
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(4)
        column.addLayout(self._rows(first, across))
        self._fold = QToolButton(self)
        self._fold.setCheckable(True)
        self._fold.setAutoRaise(True)
        self._fold.clicked.connect(self._on_fold_clicked)
        self._behind = QWidget(self)
        behind = self._rows(more, across)
        behind.setContentsMargins(0, 0, 0, 0)
        self._behind.setLayout(behind)
        self._behind.setVisible(False)
        if more:
            column.addWidget(self._fold, 0, Qt.AlignmentFlag.AlignLeft)
            column.addWidget(self._behind)
        else:
            self._fold.hide()
        self.show_deal()

    def _rows(self, paths: Sequence[str], across: int) -> QGridLayout:
        grid = QGridLayout()
        grid.setHorizontalSpacing(6)
        grid.setVerticalSpacing(4)
        for place, path in enumerate(paths):
            row, column = divmod(place, across)
            _, mark = declaration(self._session.deal, path)
            label = QLabel(_form_label(path, mark.label), self)
            label.setAlignment(Qt.AlignmentFlag.AlignRight | Qt.AlignmentFlag.AlignVCenter)
            field = make_field(self._session, path, self)
            label.setBuddy(field)
            field.setMinimumWidth(76)
            unit = QLabel(unit_text(self._session.deal, path), self)
            unit.setProperty("role", "muted")
            grid.addWidget(label, row, 3 * column)
            grid.addWidget(field, row, 3 * column + 1)
            grid.addWidget(unit, row, 3 * column + 2)
            grid.setColumnStretch(3 * column + 1, 1)
            self.fields.append(field)
        return grid

    def show_deal(self) -> None:
        """Show the deal as it stands."""
        for field in self.fields:
            field.show_deal()
        touched = sum(not self._at_default(path) for path in self._more)
        state = "all at default" if not touched else f"{touched} not at default"
        self._fold.setText(
            f"{'–' if self._fold.isChecked() else '+'} {len(self._more)} more, {state}"
        )
        self._fold.setAccessibleName(f"{len(self._more)} more fields, {state}")

    def _at_default(self, path: str) -> bool:
        return bool(get(self._session.deal, path) == get(Deal(), path))

    def _on_fold_clicked(self, on: bool) -> None:
        self._behind.setVisible(on)
        self.show_deal()

    def open_for(self, path: str) -> AnyField | None:
        """The field of an input, opened if it was folded away; None if it is not here."""
        for field in self.fields:
            if field.path == path:
                if path in self._more and not self._fold.isChecked():
                    self._fold.click()
                return field
        return None


_LABELS = {
    "market_rent.amount": "Market rent",
    "market_rent.per": "Market rent per",
    "market_rent.of": "Market rent of each",
}


def _form_label(path: str, label: str) -> str:
    """A label that says what it belongs to where no item's name stands beside it."""
    head, _, field = path.partition(".")
    if head.startswith("expenses@"):
        return "Expenses a year"
    return _LABELS.get(field, label)


class ItemRows(QWidget):
    """The items of one list, a row of fields each, with buttons to add and to remove."""

    def __init__(
        self,
        session: Session,
        list_name: str,
        names: Sequence[str],
        parent: QWidget | None = None,
        tallest: int = 220,
    ) -> None:
        super().__init__(parent)
        self._session = session
        self._list = list_name
        self._names = tuple(names)
        self._ids: tuple[str, ...] = ()
        self._tallest = tallest
        self.fields: list[AnyField] = []
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(4)
        self._area = QScrollArea(self)
        self._area.setWidgetResizable(True)
        self._area.setFrameShape(QFrame.Shape.NoFrame)
        self._area.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self._area.setSizePolicy(QSizePolicy.Policy.Preferred, QSizePolicy.Policy.Maximum)
        column.addWidget(self._area)
        self._add = QPushButton(f"Add {ITEMS[list_name]}", self)
        self._add.clicked.connect(self._on_add_clicked)
        buttons = QHBoxLayout()
        buttons.addWidget(self._add)
        buttons.addStretch(1)
        column.addLayout(buttons)
        self.show_deal()

    def show_deal(self) -> None:
        """Show the deal; rows are made anew only when items came or went."""
        items = value_at(self._session.deal, NEW_ITEMS[self._list][1])
        ids = tuple(item.id for item in items)
        if ids != self._ids or self._area.widget() is None:
            self._ids = ids
            self._rebuild()
        for field in self.fields:
            field.show_deal()

    def _rebuild(self) -> None:
        self.fields = []
        inside = QWidget(self._area)
        grid = QGridLayout(inside)
        grid.setContentsMargins(0, 0, 0, 0)
        grid.setSpacing(4)
        record = NEW_ITEMS[self._list][0]
        for column, name in enumerate(self._names if self._ids else ()):
            mark = declared(record)[name].input
            heading = QLabel(mark.label if mark is not None else name, inside)
            heading.setProperty("role", "muted")
            grid.addWidget(heading, 0, column)
            grid.setColumnStretch(column, 2 if name == "name" else 1)
        for row, identity in enumerate(self._ids, start=1):
            self._add_row(inside, grid, row, identity)
        self._area.setWidget(inside)
        height = inside.sizeHint().height() + 2
        self._area.setMaximumHeight(min(height, self._tallest))
        self._area.setMinimumHeight(min(height, 120))

    def _add_row(self, inside: QWidget, grid: QGridLayout, row: int, identity: str) -> None:
        for column, name in enumerate(self._names):
            path = f"{self._list}@{identity}.{name}"
            if declaration(self._session.deal, path)[0].is_row:
                path = f"{path}.1"
            field = make_field(self._session, path, inside)
            grid.addWidget(field, row, column)
            self.fields.append(field)
        remove = QToolButton(inside)
        remove.setText("Remove")
        remove.setAutoRaise(True)
        remove.setProperty("item", f"{self._list}@{identity}")
        remove.setAccessibleName(f"Remove {ITEMS[self._list]} {identity}")
        remove.clicked.connect(self._on_remove_clicked)
        grid.addWidget(remove, row, len(self._names))

    def _on_add_clicked(self) -> None:
        def edit(deal: Deal) -> Deal:
            return with_new_item(deal, self._list)

        self._session.apply(Change(f"add {ITEMS[self._list]}", edit))
        if self.fields:
            self.fields[-len(self._names)].setFocus(Qt.FocusReason.TabFocusReason)

    def _on_remove_clicked(self) -> None:
        name = str(self.sender().property("item"))

        def edit(deal: Deal) -> Deal:
            return without_item(deal, name)

        self._session.apply(Change(f"remove {ITEMS[self._list]}", edit))
