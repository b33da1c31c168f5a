"""A first half hour with the window, by real keys: from eight numbers to a saved deal."""

from collections.abc import Iterator
from pathlib import Path

import pytest
from PySide6.QtCore import QMimeData, QPointF, QSettings, Qt, QUrl
from PySide6.QtGui import QDropEvent, QGuiApplication
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QLineEdit, QMessageBox, QWidget
from pytestqt.qtbot import QtBot

from workbench.files.deal_file import read_deal
from workbench.places import sample_deals
from workbench.report.record import record_of
from workbench.ui.contents import EIGHT
from workbench.ui.fields import TextField
from workbench.ui.page import Page
from workbench.ui.start import make_window
from workbench.ui.window import Window

FLATS = sample_deals() / "quillon-court-flats.deal"
NUMBERS = ("1.2m", "10", "12*950", "5", "38000", "10", "7", "8%")


@pytest.fixture
def window(qtbot: QtBot, tmp_path: Path) -> Iterator[Window]:
    settings = QSettings(str(tmp_path / "settings.ini"), QSettings.Format.IniFormat)
    window = make_window(settings, tmp_path / "kept")
    qtbot.addWidget(window, before_close_func=let_go)
    window.resize(1280, 800)
    window.show()
    window.activateWindow()
    yield window


def let_go(window: QWidget) -> None:
    assert isinstance(window, Window)
    window.session.mark_clean()
    window.close()


def field(window: Window, path: str) -> QLineEdit:
    found = window.desk.find_field(path)
    assert found is not None and isinstance(found[1], TextField), path
    window.show_page(found[0])
    return found[1]


def type_into(window: Window, path: str, text: str) -> None:
    box = field(window, path)
    box.setFocus()
    box.selectAll()
    QTest.keyClicks(box, text)
    QTest.keyClick(box, Qt.Key.Key_Tab)
    window.session.catch_up()


def test_eight_numbers_make_a_wall(window: Window) -> None:
    assert window.strip.readings["value"].figure.text() == "—"
    for path, text in zip(EIGHT, NUMBERS, strict=True):
        type_into(window, path, text)
    deal = window.session.deal
    assert deal.purchase.price == 1_200_000
    assert deal.spaces[0].market_rent.amount == 11_400
    assert deal.returns.required == {1: 0.08}
    assert window.session.result.plan.issues == ()
    value = record_of(deal)["value"]
    assert window.session.result.figure("value") == value
    assert window.strip.readings["value"].figure.text() == f"{value:,.0f}"
    assert "value" in window.wall.accessibleDescription().lower()
    for _ in EIGHT:
        window.session.undo()
    assert window.session.undo_label is None
    assert not window.session.modified
    for _ in EIGHT:
        window.session.redo()
    assert window.session.deal == deal


def test_each_keystroke_that_parses_moves_the_value(window: Window) -> None:
    window.file.open(FLATS)
    window.session.catch_up()
    box = field(window, "leave.exit_yield")
    box.setFocus()
    box.selectAll()
    seen = []
    for letter in "6.25":
        QTest.keyClicks(box, letter)
        window.session.catch_up()
        seen.append(window.session.deal.leave.exit_yield)
    assert seen == [0.06, 0.06, 0.062, 0.0625]
    assert "xit yield: value −" in window._effect.text()  # 6.2 → 6.25
    window.session.undo()
    assert window.session.deal.leave.exit_yield == read_deal(FLATS).leave.exit_yield


def test_mistakes_are_kept_and_told(window: Window) -> None:
    window.file.open(FLATS)
    type_into(window, "leave.selling_cost", "abc")
    assert window.session.deal.drafts == {"leave.selling_cost": "abc"}
    assert window.strip.faults.text() == "1 to mend"
    box = field(window, "leave.selling_cost")
    assert box.text() == "abc" and box.property("fault") is True
    type_into(window, "leave.selling_cost", "150")
    assert window.session.deal.leave.selling_cost == 1.5
    assert window.strip.readings["value"].figure.text() == "—"
    window.show_faults()
    assert "Selling cost: 150%" in window._effect.text()
    assert "0% to 100%" in window._effect.text()
    type_into(window, "leave.selling_cost", "3")
    assert window.strip.faults.text() == ""
    type_into(window, "leave.hold", "7.5")
    assert window.session.deal.leave.hold == 7  # the last keystroke that was a whole number
    assert window.session.deal.drafts == {"leave.hold": "7.5"}


def test_a_loan_is_added_and_removed(window: Window) -> None:
    window.file.open(sample_deals() / "weidenufer-parade.deal")
    window.session.catch_up()
    borrow = window.desk.pages[3]
    assert isinstance(borrow, Page)
    before = window.session.result.figure("equity")
    QTest.mouseClick(borrow.lists[0]._add, Qt.MouseButton.LeftButton)
    window.session.catch_up()
    loan = window.session.deal.loans[-1]
    type_into(window, f"loans@{loan.id}.amount", "100000")
    type_into(window, f"loans@{loan.id}.rate.1", "5")
    after = window.session.result.figure("equity")
    assert before is not None and after == before - 100_000
    assert window.session.deal.loans[-1].rate == {1: 0.05}
    for _ in range(3):
        window.session.undo()
    window.session.catch_up()
    assert window.session.result.figure("equity") == before


def test_the_working_opens_leads_on_and_jumps_to_the_input(window: Window) -> None:
    window.file.open(FLATS)
    window.session.catch_up()
    QTest.mouseClick(window.strip.readings["exit_value_share"], Qt.MouseButton.LeftButton)
    assert window.working.isVisible()
    text = window.working.text.toPlainText()
    assert text.startswith("Exit-value share") and "Present value of the net exit" in text
    window.working._on_anchor_clicked(QUrl("line:net_exit_of_year,10"))
    assert "Net exit, by year of sale, year 10" in window.working.text.toPlainText()
    window.working.back()
    assert window.working.text.toPlainText().startswith("Exit-value share")
    window.working._on_anchor_clicked(QUrl("input:leave.selling_cost"))
    assert window.desk.currentIndex() == 4
    window.working._on_anchor_clicked(QUrl("input:earn.vacancy.3"))
    assert window.desk.currentIndex() == 1
    window.working._close.click()
    assert not window.working.isVisible()


def test_a_roll_pasted_into_a_new_deal_stays_in_sight(window: Window) -> None:
    window.show_page(1)
    earn = window.desk.pages[1]
    assert isinstance(earn, Page)
    earn.show_view(1)
    roll = window.desk._roll
    QGuiApplication.clipboard().setText("\n".join(f"Flat {n}\tflat\t1\t60\t900" for n in range(40)))
    roll.choose((0, 0), (0, 0))
    roll.paste()
    window.session.catch_up()
    assert len(window.session.deal.spaces) == 40
    assert window.session.undo_label is not None
    now = window.desk.pages[1]
    assert isinstance(now, Page) and now is not earn
    assert now.view == 1 and roll.isVisible()
    window.jump(f"spaces@{window.session.deal.spaces[7].id}.count")
    assert window.desk.currentIndex() == 1
    window.session.undo()
    window.session.catch_up()
    assert len(window.session.deal.spaces) == 1
    assert roll.isVisible()


def test_every_page_opens_for_every_sample(window: Window) -> None:
    for path in sorted(sample_deals().glob("*.deal")):
        assert window.file.open(path)
        window.session.catch_up()
        for place in range(len(window.desk.names) - 1):
            window.show_page(place)
            assert window.desk.currentIndex() == place
        assert window.strip.faults.text() == ""


def test_save_drop_and_refuse(
    window: Window, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    said: list[str] = []
    monkeypatch.setattr(QMessageBox, "warning", lambda *words: said.append(words[2]))
    target = tmp_path / "mine.deal"
    data = QMimeData()
    data.setUrls([QUrl.fromLocalFile(str(FLATS))])
    window.dropEvent(
        QDropEvent(
            QPointF(5, 5),
            Qt.DropAction.CopyAction,
            data,
            Qt.MouseButton.LeftButton,
            Qt.KeyboardModifier.NoModifier,
        )
    )
    assert window.session.deal == read_deal(FLATS)
    type_into(window, "property.name", "Mine")
    assert window.isWindowModified()
    assert window.file.save(target)
    assert not window.isWindowModified()
    assert "mine.deal" in window.windowTitle()
    assert window.recent()[0] == str(target)
    bad = tmp_path / "bad.deal"
    bad.write_text("not a deal", "utf-8")
    window.open_file(bad)
    assert "bad.deal was not opened" in said[0]
    assert window.session.deal.property.name == "Mine"


def test_work_is_not_lost_without_asking(window: Window, monkeypatch: pytest.MonkeyPatch) -> None:
    window.file.open(FLATS)
    type_into(window, "property.name", "Mine")
    answers = [QMessageBox.StandardButton.Cancel, QMessageBox.StandardButton.Discard]
    monkeypatch.setattr(QMessageBox, "question", lambda *_: answers.pop(0))
    window.new_deal()
    assert window.session.deal.property.name == "Mine"
    window.new_deal()
    assert window.session.deal.property.name == ""


def test_every_control_has_a_name(window: Window) -> None:
    window.file.open(FLATS)
    window.session.catch_up()
    kinds = (QLineEdit,)
    nameless = [
        box
        for kind in kinds
        for box in window.findChildren(kind)
        if not box.accessibleName() and box.isVisibleTo(window)
    ]
    assert nameless == []
