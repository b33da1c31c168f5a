"""Show the working: a panel that takes a figure apart, with links to what it came from."""

from html import escape

from PySide6.QtCore import QUrl, Signal
from PySide6.QtWidgets import QHBoxLayout, QPushButton, QTextBrowser, QVBoxLayout, QWidget

from workbench.engine.operands import Operand, Ref
from workbench.engine.working import Working
from workbench.report.shown import Shower
from workbench.session.session import Session

LONGEST = 60
"""Cells shown of one operand; the rest is counted."""


class WorkingPanel(QWidget):
    """The working of one figure; its operands lead on to theirs, and inputs to their fields."""

    jumped = Signal(object)
    """An input's field is wanted: carries its key path."""
    closed = Signal(object)

    def __init__(self, session: Session, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self._past: list[tuple[str, int | None]] = []
        self._shown: tuple[str, int | None] | None = None
        column = QVBoxLayout(self)
        column.setContentsMargins(8, 4, 8, 4)
        row = QHBoxLayout()
        self._back = QPushButton("Back", self)
        self._back.clicked.connect(self.back)
        self._close = QPushButton("Close", self)
        self._close.clicked.connect(self._on_close_clicked)
        row.addWidget(self._back)
        row.addStretch(1)
        row.addWidget(self._close)
        self.text = QTextBrowser(self)
        self.text.setOpenLinks(False)
        self.text.setAccessibleName("Working of a figure")
        self.text.anchorClicked.connect(self._on_anchor_clicked)
        column.addWidget(self.text)
        column.addLayout(row)
        session.result_changed.connect(self._on_result_changed)

    def show_working(self, key: str, year: int | None) -> None:
        """Show how a line came about."""
        if self._shown is not None and self._shown != (key, year):
            self._past.append(self._shown)
        self._shown = (key, year)
        self._fill()
        self.text.setFocus()

    def back(self) -> None:
        """The figure looked at before."""
        if self._past:
            self._shown = self._past.pop()
            self._fill()

    def _fill(self) -> None:
        if self._shown is None:
            return
        shower = Shower(self._session.result)
        key, year = self._shown
        self._back.setEnabled(bool(self._past))
        if key not in self._session.result.declared:
            self.text.setHtml("<p>This figure is no longer part of the deal.</p>")
            return
        self.text.setHtml(_page(shower, shower.working(key, year)))

    def _on_result_changed(self, result: object) -> None:
        if self.isVisible():
            self._fill()

    def _on_close_clicked(self) -> None:
        self._past.clear()
        self._shown = None
        self.closed.emit(None)

    def _on_anchor_clicked(self, url: QUrl) -> None:
        kind, _, rest = url.toString().partition(":")
        if kind == "input":
            self.jumped.emit(rest)
            return
        key, _, year = rest.partition(",")
        self.show_working(key, int(year) if year else None)


def _page(shower: Shower, shown: Working) -> str:
    parts = [
        f"<h3>{escape(shower.title(shown))} &nbsp; {escape(shower.value(shown))}</h3>",
        f"<p>{escape(shown.declared.definition)}.<br><small>{escape(shown.declared.source)}"
        "</small></p>",
    ]
    if shown.value is None:
        return "".join([*parts, f"<p>Cannot be given: {escape(shower.why(shown))}.</p>"])
    if shown.solved:
        parts.append("<p>At this rate the present values of all flows add up to nothing:</p>")
    elif any(token != Ref(1) for token in shown.tokens) or shown.operands[0].kind != "cells":
        parts.append(f"<p>= {escape(shower.names(shown))}<br>= {escape(shower.numbers(shown))}</p>")
    parts += [_operand(shower, shown, operand) for operand in shown.operands]
    return "".join(parts)


def _operand(shower: Shower, shown: Working, operand: Operand) -> str:
    name = "together" if shown.solved else shower.speller.operand(operand)
    value = shower.amount(operand.value, shower.unit(operand))
    link = _link(operand)
    label = f'<a href="{escape(link)}">{escape(name)}</a>' if link else escape(name)
    sources = "" if operand.of is None else _sources(shower, operand)
    cells = [escape(shower.cell(operand, cell)) for cell in operand.cells[:LONGEST]]
    if len(operand.cells) > LONGEST:
        cells.append(f"and {len(operand.cells) - LONGEST} more")
    below = "".join(f"<br>&nbsp;&nbsp;&nbsp;{cell}" for cell in cells)
    return f"<p>{label}: <b>{escape(value)}</b>{sources}{below}</p>"


def _link(operand: Operand) -> str:
    if operand.kind == "input":
        year = f".{operand.at}" if operand.span == "year" else ""
        return f"input:{operand.key}{year}"
    if operand.kind == "line" and operand.span in ("year", "once"):
        return f"line:{operand.key},{operand.at or ''}"
    return ""


def _sources(shower: Shower, operand: Operand) -> str:
    paths = [key for key in shower.sources(operand) if key in shower.result.inputs]
    links = [
        f'<a href="input:{escape(path)}">{escape(shower.speller.leaf("input", path))}</a>'
        for path in paths
    ]
    return f" (from {', '.join(links)})" if links else ""
