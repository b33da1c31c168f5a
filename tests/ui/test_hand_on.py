"""The page Hand on: preview, paper and writing, driven as a user would."""

from collections.abc import Iterator
from dataclasses import replace
from io import BytesIO
from pathlib import Path
from threading import Event

import pytest
from pypdf import PdfReader
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from pytestqt.qtbot import QtBot

from tests.ui.test_saving import choosing, warned
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.files.deal_file import read_deal
from workbench.places import sample_deals
from workbench.report.memo import build
from workbench.report.pdf import draw
from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.text.locale import Paper
from workbench.ui import memo_work
from workbench.ui.hand_on import HandOnPage, file_name


@pytest.fixture
def session(qtbot: QtBot) -> Iterator[Session]:
    held = Session(read_deal(sample_deals() / "quillon-court-flats.deal"))
    yield held
    held.deleteLater()


@pytest.fixture
def page(qtbot: QtBot, session: Session) -> Iterator[HandOnPage]:
    made = HandOnPage(session)
    qtbot.addWidget(made)
    made.resize(700, 560)
    yield made
    made.close()


def show(page: HandOnPage, qtbot: QtBot) -> None:
    with qtbot.waitActive(page):
        page.show()
        page.activateWindow()
    wait(page, qtbot)


def wait(page: HandOnPage, qtbot: QtBot) -> None:
    qtbot.waitUntil(lambda: page.pages.image(0) is not None, timeout=30000)


def memo_of(session: Session, paper: Paper | None = None) -> bytes:
    """The memo as the command line makes it."""
    deal = session.deal
    return draw(build(evaluate(compile_deal(deal)), locale_of(deal), paper)).pdf


def test_nothing_is_made_before_the_page_is_shown(page: HandOnPage, qtbot: QtBot) -> None:
    qtbot.wait(50)
    assert page.headline.text() == ""
    show(page, qtbot)
    assert page.headline.text().startswith("purchase memo")


def test_the_preview_is_the_memo(page: HandOnPage, session: Session, qtbot: QtBot) -> None:
    show(page, qtbot)
    pages = len(PdfReader(BytesIO(memo_of(session))).pages)
    assert page.headline.text() == f"purchase memo   {pages} pages"
    assert page.paper.currentText() == "Paper of the locale: Letter"
    assert page.pages.accessibleDescription().startswith(f"{pages} pages.")
    image = page.pages.image(0)
    assert image is not None
    area = page.pages.page_area(0)
    assert image.width() == round(area.width())
    assert area.height() / area.width() == pytest.approx(792 / 612)
    dark = sum(
        image.pixelColor(x, y).lightness() < 100
        for x in range(0, image.width(), 3)
        for y in range(0, image.height(), 3)
    )
    assert dark > 100


def test_keys_turn_the_pages(page: HandOnPage, qtbot: QtBot) -> None:
    show(page, qtbot)
    page.pages.setFocus()
    for _ in range(2):
        QTest.keyClick(page.pages, Qt.Key.Key_PageDown)
    qtbot.waitUntil(lambda: page.pages.image(1) is not None, timeout=30000)
    assert page.pages.verticalScrollBar().value() > 300


def test_another_paper(page: HandOnPage, qtbot: QtBot) -> None:
    show(page, qtbot)
    page.paper.setFocus()
    QTest.keyClick(page.paper, Qt.Key.Key_A)
    assert page.paper.currentText() == "A4"

    def is_a4() -> bool:
        area = page.pages.page_area(0)
        return area.height() / area.width() == pytest.approx(841.9 / 595.3, abs=0.001)

    qtbot.waitUntil(is_a4, timeout=30000)


class Counted:
    """Stands for the maker of memos and counts."""

    def __init__(self, monkeypatch: pytest.MonkeyPatch) -> None:
        self.count = 0
        real = memo_work.Memo.__call__

        def counted(memo: memo_work.Memo, cancel: Event) -> object:
            self.count += 1
            return real(memo, cancel)

        monkeypatch.setattr(memo_work.Memo, "__call__", counted)


def test_it_is_made_anew_only_for_another_deal(
    page: HandOnPage, session: Session, qtbot: QtBot, monkeypatch: pytest.MonkeyPatch
) -> None:
    made = Counted(monkeypatch)
    show(page, qtbot)
    page.hide()
    page.show()
    qtbot.wait(20)
    assert made.count == 1
    page.hide()
    for amount in (1.0, 2.0, 3.0):
        session.set("purchase.price", amount, "price", "price")
        session.catch_up()
    qtbot.wait(400)
    assert made.count == 1, "a page out of sight follows nothing"
    page.show()
    qtbot.waitUntil(lambda: made.count == 2, timeout=30000)


def test_in_sight_it_follows_once_for_many_edits(
    page: HandOnPage, session: Session, qtbot: QtBot, monkeypatch: pytest.MonkeyPatch
) -> None:
    made = Counted(monkeypatch)
    show(page, qtbot)
    for amount in (1.0, 2.0, 3.0):
        session.set("purchase.price", amount, "price")
        session.catch_up()
    assert made.count == 1
    qtbot.waitUntil(lambda: made.count == 2, timeout=30000)
    session.undo()
    qtbot.waitUntil(lambda: made.count == 3, timeout=30000)


def test_only_the_last_of_several_papers_is_shown(
    page: HandOnPage, qtbot: QtBot, monkeypatch: pytest.MonkeyPatch
) -> None:
    """Also where the older ones are too far on to be called off."""
    real = memo_work.Memo.__call__

    def heedless(memo: memo_work.Memo, cancel: Event) -> object:
        return real(memo, Event())

    monkeypatch.setattr(memo_work.Memo, "__call__", heedless)
    shown: list[object] = []
    monkeypatch.setattr(page.pages, "show_pages", shown.append)
    page.show()
    for place in (2, 1):
        page.paper.setCurrentIndex(place)
        page.refresh()
    qtbot.waitUntil(lambda: bool(shown), timeout=30000)
    qtbot.wait(100)
    assert len(shown) == 1
    assert str(shown[0]).startswith("((595")


def test_it_is_said_when_it_takes_long(
    page: HandOnPage, qtbot: QtBot, monkeypatch: pytest.MonkeyPatch
) -> None:
    real, go_on = memo_work.Memo.__call__, Event()

    def slow(memo: memo_work.Memo, cancel: Event) -> object:
        go_on.wait(30)
        return real(memo, cancel)

    monkeypatch.setattr(memo_work.Memo, "__call__", slow)
    page.show()
    assert page.progress.text() == ""
    qtbot.waitUntil(lambda: page.progress.text() == "Setting the memo…")
    go_on.set()
    wait(page, qtbot)
    assert page.progress.text() == ""


def press_write(page: HandOnPage) -> None:
    page.write.setFocus()
    QTest.keyClick(page.write, Qt.Key.Key_Space)


def test_the_file_written_is_that_of_the_command(
    page: HandOnPage,
    session: Session,
    qtbot: QtBot,
    tmp_path: Path,
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    show(page, qtbot)
    told = choosing(monkeypatch, str(tmp_path / "memo"))
    press_write(page)
    qtbot.waitUntil(lambda: page.progress.text() == "Written: memo.pdf", timeout=30000)
    assert told[0][1] == "Quillon Court memo.pdf"
    assert (tmp_path / "memo.pdf").read_bytes() == memo_of(session)
    assert [path.name for path in tmp_path.iterdir()] == ["memo.pdf"]


def test_the_deal_as_it_stands_is_written(
    page: HandOnPage,
    session: Session,
    qtbot: QtBot,
    tmp_path: Path,
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    """Also where the preview is behind, or was never made."""
    choosing(monkeypatch, str(tmp_path / "memo.pdf"))
    page.paper.setCurrentIndex(1)
    session.set("property.name", "Harrow Steps", "name")
    press_write(page)
    qtbot.waitUntil(lambda: page.progress.text() == "Written: memo.pdf", timeout=30000)
    assert (tmp_path / "memo.pdf").read_bytes() == memo_of(session, "a4")


@pytest.mark.parametrize(
    ("name", "sentence"),
    [
        ("lost/memo.pdf", "memo.pdf has not been written: no such file or directory."),
        ("one.deal", "one.deal would be a deal file; give the memo another name."),
    ],
)
def test_what_could_not_be_written_is_told(
    page: HandOnPage,
    qtbot: QtBot,
    tmp_path: Path,
    monkeypatch: pytest.MonkeyPatch,
    name: str,
    sentence: str,
) -> None:
    show(page, qtbot)
    choosing(monkeypatch, str(tmp_path / name))
    told = warned(monkeypatch)
    press_write(page)
    qtbot.waitUntil(lambda: bool(told), timeout=30000)
    assert told == [sentence]
    assert page.progress.text() == ""
    assert list(tmp_path.iterdir()) == []


def test_a_dialog_left_without_a_name_writes_nothing(
    page: HandOnPage, qtbot: QtBot, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    show(page, qtbot)
    monkeypatch.chdir(tmp_path)
    choosing(monkeypatch, "")
    press_write(page)
    page.close_down()
    assert list(tmp_path.iterdir()) == []


def test_characters_that_the_letters_lack_are_told(
    page: HandOnPage, session: Session, qtbot: QtBot
) -> None:
    show(page, qtbot)
    assert not page.note.isVisible()
    session.set("property.name", "Quillon 日本 Court", "name")
    qtbot.waitUntil(page.note.isVisible, timeout=30000)
    assert page.note.text().endswith(": 日 本")


def test_closing_in_the_middle_leaves_nothing_running(page: HandOnPage, qtbot: QtBot) -> None:
    page.show()
    page.close()
    qtbot.wait(20)
    assert page.headline.text() == ""


def test_a_defect_is_not_swallowed(
    page: HandOnPage, qtbot: QtBot, monkeypatch: pytest.MonkeyPatch
) -> None:
    def broken(memo: memo_work.Memo, cancel: object) -> object:
        raise RuntimeError("a defect")

    monkeypatch.setattr(memo_work.Memo, "__call__", broken)
    with qtbot.captureExceptions() as caught:
        page.show()
        qtbot.waitUntil(lambda: bool(page.progress.text()))
    assert page.progress.text() == "This could not be done."
    assert [str(error) for _, error, _ in caught] == ["a defect"]


def test_every_control_has_a_name(page: HandOnPage) -> None:
    for control in (page, page.paper, page.write, page.pages):
        assert control.accessibleName()


@pytest.mark.parametrize(
    ("name", "file"),
    [("Quillon Court", "Quillon Court memo"), ("a/b\\c: *?", "a b c memo"), ("", "memo")],
)
def test_names_of_files(name: str, file: str) -> None:
    assert file_name(name) == file


def test_the_preview_names_the_locale_s_own_paper(page: HandOnPage, session: Session) -> None:
    deal = session.deal
    conventions = replace(deal.conventions, locale="de-DE")
    session.start(replace(deal, conventions=conventions))
    page.refresh()
    assert page.paper.itemText(0) == "Paper of the locale: A4"
