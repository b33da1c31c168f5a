"""The About dialog: cautions in full, version, licence."""

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QDialogButtonBox, QLabel
from pytestqt.qtbot import QtBot

from workbench import __version__
from workbench.places import resources
from workbench.report.cautions import full_cautions
from workbench.ui.about import AboutDialog


@pytest.fixture
def about(qtbot: QtBot) -> AboutDialog:
    dialog = AboutDialog()
    qtbot.addWidget(dialog)
    with qtbot.waitActive(dialog):
        dialog.show()
        dialog.activateWindow()
    return dialog


def test_cautions_stand_in_full(about: AboutDialog) -> None:
    said = about.text.toPlainText()
    for caution in full_cautions():
        assert "".join(run.text for run in caution.runs) in said
    assert len(full_cautions()) >= 5


def test_version_and_licence(about: AboutDialog) -> None:
    labels = {label.text() for label in about.findChildren(QLabel)}
    assert f"Version {__version__}" in labels
    said = about.text.toPlainText()
    licence = (resources() / "fonts" / "OFL.txt").read_text("utf-8")
    assert "Lato" in said
    assert all(line.strip() in said for line in licence.splitlines())


def test_cautions_come_before_the_licence(about: AboutDialog) -> None:
    said = about.text.toPlainText()
    assert said.index("not market value") < said.index("SIL Open Font Licence")


def test_keys_close_it(about: AboutDialog, qtbot: QtBot) -> None:
    box = about.findChild(QDialogButtonBox)
    assert box is not None
    assert box.button(QDialogButtonBox.StandardButton.Close).isDefault()
    QTest.keyClick(about, Qt.Key.Key_Escape)
    assert not about.isVisible()
    about.show()
    QTest.keyClick(about, Qt.Key.Key_Return)
    assert not about.isVisible()
    about.show()
    QTest.mouseClick(box.button(QDialogButtonBox.StandardButton.Close), Qt.MouseButton.LeftButton)
    assert not about.isVisible()
