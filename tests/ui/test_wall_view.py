"""The wall beside the desk follows the session; clicks and keys ask for the working."""

from collections.abc import Iterator

import pytest
from PySide6.QtCore import QPoint, Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QHBoxLayout, QWidget
from pytestqt.qtbot import QtBot

from tests.engine.deals import deal, lease, space
from workbench.charts.shapes import Picture, Region, Text
from workbench.deal.leave import Leave
from workbench.session.session import Session
from workbench.ui.picture_view import PictureView
from workbench.ui.theme import BAR_WIDTH, NARROW_BELOW, WALL_WIDTH
from workbench.ui.wall_view import WallView


@pytest.fixture
def session(qtbot: QtBot) -> Iterator[Session]:
    """100 a month, half of it let until the end of year 3, held 5 years, sold for 1,200."""
    held = Session(
        deal(
            space(50.0, lease("2026-01-01", "2028-12-31", 50.0)),
            space(50.0, identity="s9"),
            leave=Leave(hold=5, method="amount", amount=1200.0),
        )
    )
    yield held
    held.deleteLater()


@pytest.fixture
def wall(qtbot: QtBot, session: Session) -> Iterator[WallView]:
    view = WallView(session)
    qtbot.addWidget(view)
    view.resize(WALL_WIDTH, 700)
    with qtbot.waitActive(view):
        view.show()
        view.activateWindow()
    yield view
    view.close()


def texts(picture: Picture) -> list[str]:
    return [shape.text for shape in picture.shapes if isinstance(shape, Text)]


def region(view: PictureView, key: str) -> Region:
    return next(one for one in view.picture.regions if one.key == key)


def click(view: PictureView, key: str) -> None:
    found = region(view, key)
    middle = QPoint(round(found.x + found.width / 2), round(found.y + found.height / 2))
    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=middle)


def test_it_shows_the_value_of_the_session(wall: WallView, session: Session) -> None:
    value = session.result.figure("value")
    assert value is not None
    assert f"{value:,.0f}" in texts(wall.picture)
    assert wall.accessibleName() == "Value wall"
    assert wall.accessibleDescription() == wall.picture.words
    assert f"Value {value:,.0f}." in wall.picture.words


def test_it_follows_an_edit(wall: WallView, session: Session, qtbot: QtBot) -> None:
    before = wall.picture
    session.set("leave.amount", 5000.0, "amount")
    qtbot.waitUntil(lambda: wall.picture is not before)
    assert f"{session.result.figure('value'):,.0f}" in texts(wall.picture)
    session.undo()
    qtbot.waitUntil(lambda: wall.picture == before or texts(wall.picture) == texts(before))


def test_out_of_sight_it_waits_until_it_is_shown(wall: WallView, session: Session) -> None:
    wall.hide()
    before = wall.picture
    session.set("leave.amount", 5000.0, "amount")
    session.catch_up()
    assert wall.picture is before
    wall.show()
    assert f"{session.result.figure('value'):,.0f}" in texts(wall.picture)


def test_a_click_asks_for_the_line_behind(wall: WallView) -> None:
    said: list[object] = []
    wall.asked.connect(said.append)
    for key in ("in_hand.2", "expected.4", "exit"):
        click(wall, key)
    assert said == [
        ("value_in_hand_of_year", 2),
        ("value_expected_of_year", 4),
        ("exit_present_value", None),
    ]


def test_keys_walk_up_the_wall(wall: WallView, session: Session) -> None:
    said: list[tuple[str, int | None]] = []
    wall.asked.connect(said.append)
    wall.clearFocus()
    wall.setFocus(Qt.FocusReason.TabFocusReason)
    for _ in range(5):
        QTest.keyClick(wall, Qt.Key.Key_Return)
        QTest.keyClick(wall, Qt.Key.Key_Up)
    QTest.keyClick(wall, Qt.Key.Key_Return)
    assert [year for _, year in said] == [1, 2, 3, 4, 5, None]
    assert all(line in session.result.declared for line, _ in said)


def test_it_says_the_figures_of_a_course(wall: WallView, session: Session) -> None:
    result = session.result
    in_hand = result.figure("value_in_hand_of_year", 2)
    value = result.figure("value")
    assert in_hand is not None and value is not None
    share = f"{100 * in_hand / value:.1f}% of the value"
    said = f"Year 2, rent in hand: {in_hand:,.0f} brought to today, {share}."
    assert wall.sentence("in_hand.2") == said
    assert wall.sentence("expected.4").startswith("Year 4, rent expected: ")
    sale = result.figure("exit_present_value")
    assert wall.sentence("exit").startswith(f"The sale at the end: {sale:,.0f} brought to today, ")


def test_no_shares_where_the_value_is_not_above_zero(wall: WallView, session: Session) -> None:
    session.set("leave.amount", 0.0, "amount")
    session.set("leave.selling_cost", 0.0, "selling cost")
    session.set("spend.reserves", 100000.0, "reserves")
    session.catch_up()
    value = session.result.figure("value")
    assert value is not None and value < 0
    key = wall.picture.regions[0].key
    assert "of the value" not in wall.sentence(key)


def test_a_deal_without_a_hold_still_has_a_picture(wall: WallView, session: Session) -> None:
    session.set("leave.hold", None, "hold")
    session.catch_up()
    assert wall.picture.regions == ()
    assert "No exit price." in wall.picture.words


@pytest.fixture
def window(qtbot: QtBot, session: Session) -> Iterator[tuple[QWidget, WallView]]:
    """A window with a desk and a wall."""
    made = QWidget()
    row = QHBoxLayout(made)
    row.setContentsMargins(0, 0, 0, 0)
    row.addWidget(QWidget(made), 1)
    view = WallView(session, made)
    row.addWidget(view)
    qtbot.addWidget(made)
    made.resize(NARROW_BELOW - 1, 540)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    yield made, view
    made.close()


def test_in_a_small_window_it_is_a_bar(window: tuple[QWidget, WallView], qtbot: QtBot) -> None:
    whole, view = window
    assert view.width() == BAR_WIDTH
    assert view.accessibleName() == "Value wall, opens over the desk"
    assert {one.key for one in view.picture.regions} >= {"in_hand.1", "exit"}
    whole.resize(NARROW_BELOW, 540)
    qtbot.waitUntil(lambda: view.width() == WALL_WIDTH)
    whole.resize(NARROW_BELOW - 1, 540)
    qtbot.waitUntil(lambda: view.width() == BAR_WIDTH)


def test_a_bar_opens_over_the_desk(window: tuple[QWidget, WallView], qtbot: QtBot) -> None:
    _, view = window
    said: list[object] = []
    view.asked.connect(said.append)
    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=QPoint(20, 200))
    opened = view.opened
    assert opened is not None and said == []
    qtbot.waitUntil(lambda: bool(opened.wall.picture.regions))
    assert opened.wall.width() == WALL_WIDTH
    right = view.mapToGlobal(QPoint(view.width(), 0)).x()
    assert opened.geometry().right() + 1 == right
    click(opened.wall, "exit")
    assert said == [("exit_present_value", None)]
    assert view.opened is None


def test_a_bar_opens_and_closes_by_keys(window: tuple[QWidget, WallView], qtbot: QtBot) -> None:
    _, view = window
    view.setFocus(Qt.FocusReason.TabFocusReason)
    QTest.keyClick(view, Qt.Key.Key_Return)
    opened = view.opened
    assert opened is not None
    QTest.keyClick(opened, Qt.Key.Key_Escape)
    qtbot.waitUntil(lambda: view.opened is None)
