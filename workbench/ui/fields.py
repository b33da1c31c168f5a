"""Form fields made from the declarations of inputs: each shows one input and changes it."""

import datetime
from typing import Any, Literal, get_args, get_origin

from PySide6.QtCore import Qt
from PySide6.QtGui import QFocusEvent
from PySide6.QtWidgets import QCheckBox, QComboBox, QLineEdit, QSizePolicy, QWidget

from workbench.deal.paths import UnknownPathError, get
from workbench.session.session import Session
from workbench.session.typed import declaration, in_range, read_typed, shown, typed_value
from workbench.text.choices import choice
from workbench.text.entry import NotTaken, Taken
from workbench.text.labels import label_of
from workbench.text.messages import word_issue

NEEDED = frozenset({"missing", "method_needs"})
"""Codes of issues that say no more than that something has still to be typed."""


class TextField(QLineEdit):
    """A number, a date or a text. Each keystroke that can be taken in is; the rest waits.

    What is out of range or not understood is taken in or kept as a draft when the field is left.
    """

    def __init__(self, session: Session, path: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self.path = path
        self._label = label_of(session.deal, path)
        _, mark = declaration(session.deal, path)
        self._number = mark.unit not in ("text", "date", "reference")
        if self._number:
            self.setAlignment(Qt.AlignmentFlag.AlignRight)
        self.setAccessibleName(self._label)
        self.setToolTip(mark.help)
        self._help = mark.help
        self.textEdited.connect(self._on_text_edited)
        self.editingFinished.connect(self._on_editing_finished)
        self.show_deal()

    def show_deal(self) -> None:
        """Show the deal's value, or the draft, unless the user is in the middle of typing."""
        deal = self._session.deal
        try:
            text = deal.drafts.get(self.path, shown(deal, self.path, get(deal, self.path)))
        except UnknownPathError:
            return
        if text != self.text() and not (self.hasFocus() and self.isModified()):
            self.setText(text)
        self._show_fault()

    def _on_text_edited(self, text: str) -> None:
        read = read_typed(self._session.deal, self.path, text)
        if isinstance(read, Taken) and not in_range(self._session.deal, self.path, read.value):
            return
        if not isinstance(read, NotTaken):
            self._take(read)

    def _on_editing_finished(self) -> None:
        if self.isModified():
            read = read_typed(self._session.deal, self.path, self.text())
            if isinstance(read, NotTaken):
                label = f"entry for {self._label.lower()}"
                self._session.keep_draft(self.path, self.text(), label, self.path)
            else:
                self._take(read)
        self.setModified(False)
        self._session.end_focus()
        self.show_deal()

    def _take(self, read: Taken | str | datetime.date | None) -> None:
        value: Any = read
        if isinstance(read, Taken):
            value = typed_value(self._session.deal, self.path, read.value)
        self._session.set(self.path, value, self._label.lower(), self.path)

    def _show_fault(self) -> None:
        """Mark the field and say why, where something is wrong with it."""
        deal = self._session.deal
        issues = self._session.issues_at(self.path)
        wanted = bool(issues) and all(issue.code in NEEDED for issue in issues)
        self.setPlaceholderText("needed" if wanted else "")
        fault = "; ".join(word_issue(deal, issue) for issue in issues)
        if self.path in deal.drafts:
            read = read_typed(deal, self.path, deal.drafts[self.path])
            fault = read.reason if isinstance(read, NotTaken) else fault
        marked = bool(fault) and not wanted
        if bool(self.property("fault")) != marked:
            self.setProperty("fault", marked)
            self.style().unpolish(self)
            self.style().polish(self)
        self.setToolTip(fault or self._help)
        self.setAccessibleDescription(fault)

    def focusInEvent(self, event: QFocusEvent) -> None:
        super().focusInEvent(event)
        if event.reason() in (Qt.FocusReason.TabFocusReason, Qt.FocusReason.BacktabFocusReason):
            self.selectAll()


class ChoiceField(QComboBox):
    """One of the values that an input may have."""

    def __init__(self, session: Session, path: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self.path = path
        self._label = label_of(session.deal, path)
        field, mark = declaration(session.deal, path)
        self.setAccessibleName(self._label)
        self.setToolTip(mark.help)
        self.setSizePolicy(QSizePolicy.Policy.Ignored, QSizePolicy.Policy.Fixed)
        name = path.rpartition(".")[2]
        for value in _choices(field.kind):
            words = "as for rent" if value is None else choice(name, value)
            self.addItem(words, value)
        self.activated.connect(self._on_activated)
        self.show_deal()

    def show_deal(self) -> None:
        value = get(self._session.deal, self.path)
        self.setCurrentIndex(self.findData(value))

    def _on_activated(self, position: int) -> None:
        self._session.set(self.path, self.itemData(position), self._label.lower())


def _choices(kind: Any) -> list[str | None]:
    if get_origin(kind) is Literal:
        return list(get_args(kind))
    return [
        value
        for part in get_args(kind)
        for value in ([None] if part is type(None) else _choices(part))
    ]


class SwitchField(QCheckBox):
    """On or off."""

    def __init__(self, session: Session, path: str, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self.path = path
        self._label = label_of(session.deal, path)
        _, mark = declaration(session.deal, path)
        self.setAccessibleName(self._label)
        self.setToolTip(mark.help)
        self.clicked.connect(self._on_clicked)
        self.show_deal()

    def show_deal(self) -> None:
        self.setChecked(bool(get(self._session.deal, self.path)))

    def _on_clicked(self, on: bool) -> None:
        self._session.set(self.path, on, self._label.lower())


AnyField = TextField | ChoiceField | SwitchField


def make_field(session: Session, path: str, parent: QWidget | None = None) -> AnyField:
    """The field that fits the input at a key path."""
    _, mark = declaration(session.deal, path)
    if mark.unit == "choice":
        return ChoiceField(session, path, parent)
    if mark.unit == "switch":
        return SwitchField(session, path, parent)
    return TextField(session, path, parent)
