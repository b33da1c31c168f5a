"""Pages one under the other: which are asked for, where they stand, which are kept."""

from collections.abc import Iterator

import pytest
from PySide6.QtCore import Qt
from PySide6.QtGui import QColor, QImage
from PySide6.QtTest import QTest
from pytestqt.qtbot import QtBot

from workbench.charts.palette import LIGHT, PRINT
from workbench.ui.pages_view import WIDEST, PagesView
from workbench.ui.theme import window_palette

A4 = (595.0, 842.0)


@pytest.fixture
def view(qtbot: QtBot) -> Iterator[PagesView]:
    made = PagesView("Preview")
    made.setPalette(window_palette(LIGHT))
    qtbot.addWidget(made)
    made.resize(400, 500)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    yield made
    made.close()


def asked(view: PagesView) -> list[tuple[int, int]]:
    said: list[tuple[int, int]] = []
    view.wanted.connect(said.append)
    return said


def red(wide: int) -> QImage:
    image = QImage(wide, wide * 842 // 595, QImage.Format.Format_RGB32)
    image.fill(QColor("red"))
    return image


def test_pages_in_sight_are_asked_for_once(view: PagesView) -> None:
    said = asked(view)
    view.show_pages([A4] * 5)
    wide = round(view.page_area(0).width())
    assert 300 < wide < 400
    assert said == [(0, wide)]
    view.ask()
    assert said == [(0, wide)]
    view.setFocus()
    QTest.keyClick(view, Qt.Key.Key_PageDown)
    assert (1, wide) in said and len(said) == len(set(said)) < 5


def test_pages_stand_under_one_another(view: PagesView) -> None:
    view.show_pages([A4, (842.0, 595.0)])
    first, second = view.page_area(0), view.page_area(1)
    assert first.height() == pytest.approx(first.width() * 842 / 595)
    assert second.height() == pytest.approx(second.width() * 595 / 842)
    assert second.top() > first.bottom()
    assert first.left() == pytest.approx(view.viewport().width() - first.right())


def test_an_image_is_painted_in_its_place(view: PagesView) -> None:
    view.show_pages([A4])
    area = view.page_area(0)
    middle = (round(area.center().x()), 200)
    assert view.grab().toImage().pixelColor(*middle) == QColor(PRINT["paper"])
    assert view.grab().toImage().pixelColor(4, 200) == QColor(LIGHT["panel"])
    view.show_image(0, red(300))
    assert view.grab().toImage().pixelColor(*middle) == QColor("red")


def test_another_width_asks_anew_when_it_has_settled(view: PagesView, qtbot: QtBot) -> None:
    view.show_pages([A4] * 2)
    view.show_image(0, red(300))
    said = asked(view)
    for width in (500, 560, 620):
        view.resize(width, 500)
    assert said == []
    qtbot.waitUntil(lambda: bool(said))
    assert said[0] == (0, round(view.page_area(0).width()))
    middle = round(view.page_area(0).center().x())
    assert view.grab().toImage().pixelColor(middle, 200) == QColor("red")
    view.resize(2000, 500)
    assert view.page_area(0).width() == WIDEST


def test_images_far_from_sight_are_let_go_and_asked_for_again(view: PagesView) -> None:
    view.show_pages([A4] * 30)
    for number in range(30):
        view.show_image(number, red(30))
    kept = [number for number in range(30) if view.image(number) is not None]
    assert kept == list(range(12))
    bar = view.verticalScrollBar()
    bar.setValue(bar.maximum())
    for number in range(20, 30):
        view.show_image(number, red(30))
    assert view.image(0) is None and view.image(29) is not None
    said = asked(view)
    bar.setValue(0)
    assert [number for number, _ in said] == [0]


def test_other_pages_keep_the_place(view: PagesView) -> None:
    view.show_pages([A4] * 10)
    bar = view.verticalScrollBar()
    bar.setValue(900)
    view.show_pages([A4] * 8)
    assert bar.value() == 900
    view.show_pages([])
    assert bar.value() == 0
