"""A picture on the screen: real clicks and keys, the tooltip, copying and saving."""

from collections.abc import Iterator
from pathlib import Path

import pytest
from PySide6.QtCore import QPoint, Qt
from PySide6.QtGui import QColor, QGuiApplication, QHelpEvent, QImage
from PySide6.QtSvg import QSvgRenderer
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QToolTip, QVBoxLayout, QWidget
from pytestqt.qtbot import QtBot

from tests.ui.test_saving import choosing, warned
from workbench.charts.palette import DARK, LIGHT, PRINT
from workbench.charts.shapes import Picture, Rect, Region
from workbench.ui.picture_view import PictureView
from workbench.ui.theme import window_palette


class Halves(PictureView):
    """Two regions, one on the other."""

    def sentence(self, key: str) -> str:
        return f"The {key} half."

    def meaning(self, key: str) -> object:
        return key, 3


def halves(width: float, height: float) -> Picture:
    shapes = (Rect(0, 0, width, height / 2, "exit"), Rect(0, height / 2, width, height / 2, "debt"))
    regions = (
        Region("lower", 0, height / 2, width, height / 2),
        Region("upper", 0, 0, width, height / 2),
    )
    return Picture(width, height, shapes, regions, "Two halves.")


@pytest.fixture
def view(qtbot: QtBot) -> Iterator[Halves]:
    """The view in a window, under a field that has the keyboard."""
    window = QWidget()
    window.setPalette(window_palette(LIGHT))
    column = QVBoxLayout(window)
    column.setContentsMargins(0, 0, 0, 0)
    field, made = QLineEdit(window), Halves("Halves", window)
    column.addWidget(field)
    column.addWidget(made, 1)
    made.show_layout(halves)
    window.resize(200, 220)
    qtbot.addWidget(window)
    with qtbot.waitActive(window):
        window.show()
        window.activateWindow()
    field.setFocus()
    yield made
    window.close()


def asked_for(qtbot: QtBot, view: PictureView) -> list[object]:
    said: list[object] = []
    view.asked.connect(said.append)
    return said


def upper(view: PictureView) -> QPoint:
    return QPoint(view.width() // 2, view.height() // 4)


def lower(view: PictureView) -> QPoint:
    return QPoint(view.width() // 2, 3 * view.height() // 4)


def tip_at(view: PictureView, place: QPoint) -> str:
    QToolTip.hideText()
    event = QHelpEvent(QHelpEvent.Type.ToolTip, place, view.mapToGlobal(place))
    QApplication.sendEvent(view, event)
    return QToolTip.text()


def test_it_is_laid_out_to_its_size(view: Halves, qtbot: QtBot) -> None:
    assert (view.picture.width, view.picture.height) == (view.width(), view.height())
    view.window().resize(260, 300)
    qtbot.waitUntil(lambda: view.width() == 260)
    assert view.picture.width == 260
    assert view.grab().toImage().pixelColor(upper(view)) == QColor(LIGHT["exit"])


def test_a_click_asks_for_what_lies_under_it(view: Halves, qtbot: QtBot) -> None:
    said = asked_for(qtbot, view)
    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=upper(view))
    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=lower(view))
    assert said == [("upper", 3), ("lower", 3)]


def test_a_press_that_is_let_go_elsewhere_asks_for_nothing(view: Halves, qtbot: QtBot) -> None:
    said = asked_for(qtbot, view)
    QTest.mousePress(view, Qt.MouseButton.LeftButton, pos=upper(view))
    QTest.mouseRelease(view, Qt.MouseButton.LeftButton, pos=lower(view))
    QTest.mouseClick(view, Qt.MouseButton.RightButton, pos=upper(view))
    assert said == []


@pytest.mark.parametrize("choosing_key", [Qt.Key.Key_Return, Qt.Key.Key_Enter, Qt.Key.Key_Space])
def test_keys_alone_are_enough(view: Halves, qtbot: QtBot, choosing_key: Qt.Key) -> None:
    said = asked_for(qtbot, view)
    QTest.keyClick(view.window().focusWidget(), Qt.Key.Key_Tab)
    assert view.hasFocus()
    moves = (Qt.Key.Key_Up, Qt.Key.Key_Down, Qt.Key.Key_Right, Qt.Key.Key_Left)
    for key in (choosing_key, *(one for move in moves for one in (move, choosing_key))):
        QTest.keyClick(view, key)
    for key in (Qt.Key.Key_End, choosing_key, Qt.Key.Key_Home, choosing_key):
        QTest.keyClick(view, key)
    names = ["lower", "upper", "lower", "upper", "lower", "upper", "lower"]
    assert said == [(name, 3) for name in names]


def test_tab_leads_out_again(view: Halves) -> None:
    view.setFocus(Qt.FocusReason.TabFocusReason)
    QTest.keyClick(view, Qt.Key.Key_Tab)
    assert not view.hasFocus()


def test_the_region_of_the_keys_is_seen_and_said(view: Halves) -> None:
    before = view.grab().toImage()
    assert view.accessibleName() == "Halves"
    assert view.accessibleDescription() == "Two halves."
    view.setFocus(Qt.FocusReason.TabFocusReason)
    QTest.keyClick(view, Qt.Key.Key_Up)
    assert view.accessibleDescription() == "The upper half. Two halves."
    ringed = view.grab().toImage()
    edge = QPoint(view.width() // 2, view.height() // 2)
    assert ringed.pixelColor(edge) == QColor(LIGHT["ink"])
    assert before.pixelColor(edge) != QColor(LIGHT["ink"])


def test_the_region_stays_when_the_picture_is_another_one(view: Halves) -> None:
    view.setFocus(Qt.FocusReason.TabFocusReason)
    QTest.keyClick(view, Qt.Key.Key_End)
    view.window().resize(300, 300)
    assert view.region is not None and view.region.key == "upper"
    view.show_layout(lambda width, height: Picture(width, height, ()))
    assert view.region is None


def test_hovering_tells_the_figure(view: Halves, qtbot: QtBot) -> None:
    assert tip_at(view, upper(view)) == "The upper half."
    assert tip_at(view, lower(view)) == "The lower half."
    view.show_layout(lambda width, height: Picture(width, height, ()))
    tip_at(view, upper(view))
    qtbot.waitUntil(lambda: not QToolTip.isVisible())


def test_the_pointer_shows_what_can_be_clicked(view: Halves, qtbot: QtBot) -> None:
    QTest.mouseMove(view, upper(view))
    qtbot.waitUntil(lambda: view.cursor().shape() == Qt.CursorShape.PointingHandCursor)
    view.show_layout(lambda width, height: Picture(width, height, ()))
    QTest.mouseMove(view, lower(view))
    qtbot.waitUntil(lambda: view.cursor().shape() == Qt.CursorShape.ArrowCursor)


def test_tones_follow_the_window(view: Halves) -> None:
    view.window().setPalette(window_palette(DARK))
    assert view.grab().toImage().pixelColor(upper(view)) == QColor(DARK["exit"])


def test_ctrl_c_copies_in_the_tones_of_print(view: Halves) -> None:
    view.window().setPalette(window_palette(DARK))
    view.setFocus(Qt.FocusReason.TabFocusReason)
    QTest.keyClick(view, Qt.Key.Key_C, Qt.KeyboardModifier.ControlModifier)
    image = QGuiApplication.clipboard().image()
    assert image.width() == 3 * view.width()
    assert image.pixelColor(30, 30) == QColor(PRINT["exit"])


def test_the_menu_holds_copy_and_both_files(
    view: Halves, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    assert view.contextMenuPolicy() == Qt.ContextMenuPolicy.ActionsContextMenu
    actions = {action.text(): action for action in view.actions()}
    assert list(actions) == ["Copy picture", "Save as PNG…", "Save as SVG…"]
    told = choosing(monkeypatch, str(tmp_path / "one"))
    actions["Save as PNG…"].trigger()
    actions["Save as SVG…"].trigger()
    assert [words[1] for words in told] == ["halves.png", "halves.svg"]
    assert QImage(str(tmp_path / "one.png")).width() == 3 * view.width()
    assert QSvgRenderer(str(tmp_path / "one.svg")).viewBox().width() == view.width()


def test_a_dialog_left_without_a_name_writes_nothing(
    view: Halves, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    choosing(monkeypatch, "")
    monkeypatch.chdir(tmp_path)
    for action in view.actions()[1:]:
        action.trigger()
    assert list(tmp_path.iterdir()) == []


def test_a_place_that_cannot_be_written_is_told(
    view: Halves, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    told = warned(monkeypatch)
    assert not view.save_png(tmp_path / "lost" / "a.png")
    assert not view.save_svg(tmp_path / "lost" / "a.svg")
    assert [sentence.split()[0] for sentence in told] == ["a.png", "a.svg"]


def test_a_view_of_its_own_kind_asks_by_key(qtbot: QtBot) -> None:
    plain = PictureView("Plain")
    qtbot.addWidget(plain)
    plain.resize(100, 100)
    plain.show_layout(halves)
    said = asked_for(qtbot, plain)
    QTest.mouseClick(plain, Qt.MouseButton.LeftButton, pos=upper(plain))
    assert said == ["upper"]
    assert plain.sentence("upper") == ""
