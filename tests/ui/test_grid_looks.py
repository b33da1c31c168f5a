"""How both grids look: contrast, no figure cut short, marks told apart without colour."""

from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path

import pytest
import shiboken6
from PySide6.QtCore import QEvent, Qt
from PySide6.QtGui import QColor, QFont, QFontMetrics
from PySide6.QtWidgets import QApplication, QWidget
from pytestqt.qtbot import QtBot

from tests.ui.hands import VACANCY, Desk, base, keep
from workbench.charts.palette import DARK, LIGHT, Palette, contrast
from workbench.deal.deal import Deal
from workbench.files.deal_file import read_deal
from workbench.places import sample_deals
from workbench.session.session import Session
from workbench.ui.contents import pages
from workbench.ui.grid import YearGrid
from workbench.ui.grid.header import PADDING
from workbench.ui.grid.table import Table
from workbench.ui.grid.tones import tones
from workbench.ui.page import grid_rows
from workbench.ui.roll import RollGrid
from workbench.ui.theme import TYPE_TEXT, YEAR_WIDTH, load_font, window_palette

SAMPLES = sorted(sample_deals().glob("*.deal"))
ENOUGH = 4.5


def house_font() -> QFont:
    font = QFont(load_font())
    font.setPixelSize(TYPE_TEXT)
    return font


@pytest.mark.parametrize("dark", [False, True], ids=["light", "dark"])
def test_every_ink_reads_on_every_ground(dark: bool) -> None:
    own = tones(dark)
    for ground in (own.paper, own.band, own.typed, own.chosen):
        assert contrast(own.ink, ground) >= ENOUGH
        assert contrast(own.fault, ground) >= ENOUGH
    for ground in (own.paper, own.band, own.typed):
        assert contrast(own.muted, ground) >= ENOUGH


def shown_in(qtbot: QtBot, grid: Table, width: int) -> None:
    keep(qtbot, grid)
    grid.setFont(house_font())
    grid.resize(width, 540)
    grid.show()


def cut(grid: Table, column: int, row: int) -> bool:
    """Whether a figure is wider than its column."""
    model = grid.model()
    font = house_font()
    font.setBold(True)
    text = str(model.index(row, column).data() or "")
    room = grid.columnWidth(column) - 2 * PADDING
    return QFontMetrics(font).horizontalAdvance(text) > room


def variants(path: Path) -> Iterator[Deal]:
    deal = read_deal(path)
    yield deal
    yield replace(deal, leave=replace(deal.leave, hold=40))
    for locale in ("en-IN", "fr-FR"):
        yield replace(deal, conventions=replace(deal.conventions, locale=locale))


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_no_figure_is_cut(qtbot: QtBot, path: Path) -> None:
    for deal in variants(path):
        for page in pages(deal):
            if not page.bands:
                continue
            grid = YearGrid(Session(deal), grid_rows(page))
            shown_in(qtbot, grid, 880)
            assert grid.columnWidth(0) >= YEAR_WIDTH
            model = grid.model()
            places = [
                (row, column)
                for row in range(model.rowCount())
                for column in range(model.columnCount())
                if cut(grid, column, row)
            ]
            assert places == []
            grid.close()


def test_ten_years_fit_the_desk(qtbot: QtBot) -> None:
    deal = read_deal(sample_deals() / "weidenufer-parade.deal")
    grid = YearGrid(Session(deal), grid_rows(pages(deal)[1]))
    shown_in(qtbot, grid, 880)
    assert grid.columns.count() == 10
    assert not grid.horizontalScrollBar().isVisible()
    wide = grid.verticalHeader().width()
    assert wide + grid.columns.length() <= grid.width()


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_no_figure_or_date_of_the_roll_is_cut(qtbot: QtBot, path: Path) -> None:
    grid = RollGrid(Session(read_deal(path)))
    shown_in(qtbot, grid, 1280)
    model = grid.model()
    for row in range(model.rowCount()):
        for column in (2, 3, 4, 5, 7, 8, 9, 10, 11, 12):
            assert not cut(grid, column, row)
    grid.close()


def dark_dots(desk: Desk, year: int) -> set[tuple[int, int]]:
    """Where a cell of the vacancy row is dark, whatever the colour."""
    desk.session.catch_up()
    QApplication.processEvents()
    rect = desk.grid.visualRect(desk.grid.model().index(VACANCY, year - 1))
    image = desk.grid.viewport().grab(rect).toImage()
    return {
        (x, y)
        for x in range(image.width())
        for y in range(image.height())
        if image.pixelColor(x, y).lightness() < 150
    }


def test_marks_have_shapes(qtbot: QtBot) -> None:
    desk = Desk(qtbot, base())
    desk.at(VACANCY, 1)
    middle, corner = (8, 12), (desk.grid.columnWidth(1) - 2, 1)
    desk.session.set("earn.vacancy.2", 0.15, "vacancy")
    assert not {middle, corner} & dark_dots(desk, 2)
    desk.session.set("earn.vacancy.2", 1.5, "vacancy")
    assert {middle, corner} & dark_dots(desk, 2) == {middle}
    desk.session.keep_draft("earn.vacancy.2", "15.0", "vacancy")
    assert {middle, corner} & dark_dots(desk, 2) == {corner}


@pytest.mark.parametrize("palette", [LIGHT, DARK], ids=["light", "dark"])
def test_a_grid_follows_the_colours_of_its_window(qtbot: QtBot, palette: Palette) -> None:
    desk = Desk(qtbot, base())
    desk.grid.setPalette(window_palette(LIGHT))
    QApplication.processEvents()
    desk.grid.setPalette(window_palette(palette))
    QApplication.processEvents()
    rect = desk.grid.visualRect(desk.grid.model().index(VACANCY, 3))
    ground = desk.grid.viewport().grab(rect).toImage().pixelColor(3, 3)
    assert ground == QColor(tones(palette is DARK).typed)


@pytest.mark.parametrize("kind", ["year", "roll"])
def test_a_grid_goes_with_its_parent_and_leaves_the_session_alone(qtbot: QtBot, kind: str) -> None:
    session = Session(base())
    frame = QWidget()
    grid = YearGrid(session, (), frame) if kind == "year" else RollGrid(session, frame)
    parts = [grid, grid.model(), *grid.findChildren(QWidget)]
    frame.deleteLater()
    QApplication.sendPostedEvents(frame, QEvent.Type.DeferredDelete)
    assert not any(shiboken6.isValid(part) for part in parts)
    session.set("earn.vacancy.1", 0.1, "vacancy")
    session.catch_up()
    assert session.result.figure("value") is not None


def test_the_roll_has_no_sideways_scroll_on_a_wide_desk(qtbot: QtBot) -> None:
    grid = RollGrid(Session(read_deal(sample_deals() / "weidenufer-parade.deal")))
    shown_in(qtbot, grid, 1280)
    assert not grid.horizontalScrollBar().isVisible()
    grid.resize(1900, 540)
    assert grid.columnWidth(0) > 300
    assert not grid.horizontalScrollBar().isVisible()
    assert grid.model().headerData(0, Qt.Orientation.Horizontal) == "Space"
