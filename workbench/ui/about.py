"""What the program is and is not: the cautions in full, the version, the licence of the letters."""

from html import escape

from PySide6.QtCore import Qt
from PySide6.QtWidgets import QDialog, QDialogButtonBox, QLabel, QTextBrowser, QVBoxLayout, QWidget

from workbench import __version__
from workbench.charts.wrapping import Run
from workbench.places import resources
from workbench.report.cautions import full_cautions
from workbench.ui.theme import SPACE_WIDE

_WHAT = "An underwriting workbench for one income property at a time."
_WHERE = "These cautions hold for every figure in this window and stand in every document."
_LETTERS = (
    "Its letters are Lato by Łukasz Dziedzic, under the SIL Open Font Licence, Version 1.1, "
    "which stands below."
)


class AboutDialog(QDialog):
    """Shown at the first start and from the menu."""

    def __init__(self, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self.setWindowTitle("About Groundcourse")
        self.resize(560, 520)
        heading = QLabel("Groundcourse", self)
        heading.setProperty("role", "heading")
        version = QLabel(f"Version {__version__}", self)
        version.setProperty("role", "muted")
        self.text = QTextBrowser(self)
        self.text.setAccessibleName("Cautions and licence")
        self.text.setTabChangesFocus(True)
        self.text.setHtml(about_text())
        buttons = QDialogButtonBox(QDialogButtonBox.StandardButton.Close, Qt.Orientation.Horizontal)
        buttons.rejected.connect(self.reject)
        buttons.button(QDialogButtonBox.StandardButton.Close).setDefault(True)
        column = QVBoxLayout(self)
        column.setContentsMargins(SPACE_WIDE, SPACE_WIDE, SPACE_WIDE, SPACE_WIDE)
        for part in (heading, version, self.text, buttons):
            column.addWidget(part)


def about_text() -> str:
    """The text in the form that Qt's text widgets read."""
    cautions = "".join(f"<p>{_marked(one.runs)}</p>" for one in full_cautions())
    licence = (resources() / "fonts" / "OFL.txt").read_text(encoding="utf-8")
    return (
        f"<p>{escape(_WHAT)} {escape(_WHERE)}</p>{cautions}<p>{escape(_LETTERS)}</p>"
        f"<p style='white-space: pre-wrap'><small>{escape(licence)}</small></p>"
    )


def _marked(runs: tuple[Run, ...]) -> str:
    return "".join(
        f"<b>{escape(run.text)}</b>" if run.weight == "bold" else escape(run.text) for run in runs
    )
