"""The year grid driven by real keys, reading the texts it shows."""

from collections.abc import Iterator
from dataclasses import replace
from datetime import date

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QSignalSpy, QTest
from PySide6.QtWidgets import QApplication, QLineEdit, QWidget
from pytestqt.qtbot import QtBot

from tests.engine.deals import deal, lease, space
from tests.ui.hands import GROWTH, INCOME, RENT, ROWS, STATED, VACANCY, Desk, base, keep
from workbench.deal.borrow import Loan
from workbench.deal.earn import Earn
from workbench.deal.property import Conventions
from workbench.deal.spend import Expense
from workbench.session.session import Session
from workbench.ui.grid import GridRow, InputRow, LineRow, YearGrid


@pytest.fixture
def desk(qtbot: QtBot) -> Iterator[Desk]:
    made = Desk(qtbot, base())
    yield made
    made.grid.close()


def test_typed_and_following_cells_and_lines(desk: Desk) -> None:
    assert desk.texts(VACANCY) == ["5.0", "·\u00a05.0", "7.0", "·\u00a07.0", "·\u00a07.0"]
    assert desk.texts(RENT) == ["120"] * 5
    # 120 less 5 % is 114; less 7 % is 111.6
    assert desk.texts(INCOME) == ["114", "114", "112", "112", "112"]
    assert desk.texts(0) == [""] * 5


def test_labels_come_from_the_declarations(desk: Desk) -> None:
    model = desk.grid.model()
    sideways = Qt.Orientation.Vertical
    labels = [str(model.headerData(row, sideways)) for row in range(model.rowCount())]
    assert labels == [
        "ASSUMED",
        "Market rent growth",
        "Vacancy allowance",
        "Stated rent",
        "FOLLOWS",
        "Rent expected",
        "Effective gross income",
    ]


def test_enter_commits_and_goes_down(desk: Desk) -> None:
    desk.at(GROWTH, 2).type("1.5").press(Qt.Key.Key_Return)
    assert desk.session.deal.earn.growth == {1: 0.0, 2: 0.015}
    assert desk.undo_name() == "market rent growth year 2"
    assert desk.place() == (VACANCY, 2)
    assert desk.texts(GROWTH)[1] == "1.5"


def test_tab_commits_and_goes_right(desk: Desk) -> None:
    desk.at(VACANCY, 1).type("6").press(Qt.Key.Key_Tab).type("8%").press(Qt.Key.Key_Tab)
    assert desk.session.deal.earn.vacancy == {1: 0.06, 2: 0.08, 3: 0.07}
    assert desk.place() == (VACANCY, 3)
    assert desk.undo_name() == "vacancy allowance year 2"


def test_escape_cancels(desk: Desk) -> None:
    desk.at(VACANCY, 1).type("9").press(Qt.Key.Key_Escape)
    assert desk.session.revision == 0
    assert desk.texts(VACANCY)[0] == "5.0"


def test_f2_shows_the_value_and_an_untouched_cell_goes_on_following(desk: Desk) -> None:
    desk.at(VACANCY, 2).press(Qt.Key.Key_F2)
    editor = desk.hand()
    assert isinstance(editor, QLineEdit)
    assert editor.text() == "5"
    assert editor.accessibleName() == "Vacancy allowance, year 2"
    desk.press(Qt.Key.Key_Return)
    assert desk.session.revision == 0


@pytest.mark.parametrize(
    ("typed", "value"),
    [("4.5", 0.045), ("4.5%", 0.045), ("2*3", 0.06), ("(1)", -0.01)],
)
def test_entry_forms(desk: Desk, typed: str, value: float) -> None:
    desk.at(GROWTH, 1).type(typed).press(Qt.Key.Key_Return)
    assert desk.session.deal.earn.growth == {1: value}


def test_a_bad_entry_stays_with_its_reason(desk: Desk) -> None:
    desk.at(VACANCY, 2).type("4..5").press(Qt.Key.Key_Return)
    assert desk.session.deal.earn.vacancy == {1: 0.05, 3: 0.07}
    assert desk.session.deal.drafts == {"earn.vacancy.2": "4..5"}
    assert desk.texts(VACANCY)[1] == "4..5"
    tip = desk.read(VACANCY, 2, Qt.ItemDataRole.ToolTipRole)
    assert tip == "“4..5” is not taken in. “4..5” has a mark too many."
    assert tip in desk.read(VACANCY, 2, Qt.ItemDataRole.AccessibleTextRole)
    desk.at(VACANCY, 2).type("4.5").press(Qt.Key.Key_Return)
    assert desk.session.deal.drafts == {}
    assert desk.texts(VACANCY)[1] == "4.5"


def test_out_of_range_is_in_the_deal_and_marked(desk: Desk) -> None:
    desk.at(VACANCY, 2).type("150").press(Qt.Key.Key_Return)
    assert desk.session.deal.earn.vacancy[2] == 1.5
    assert "must be from 0% to 100%" in desk.read(VACANCY, 2, Qt.ItemDataRole.ToolTipRole)
    assert desk.texts(INCOME) == ["114", "—", "112", "112", "112"]
    assert "Vacancy allowance" in desk.read(INCOME, 2, Qt.ItemDataRole.ToolTipRole)


def test_delete_lets_a_year_follow_again_but_not_year_1(desk: Desk) -> None:
    desk.at(VACANCY, 3).press(Qt.Key.Key_Delete)
    assert desk.session.deal.earn.vacancy == {1: 0.05}
    assert desk.undo_name() == "back to following: vacancy allowance year 3"
    assert desk.said == []
    desk.at(VACANCY, 1).press(Qt.Key.Key_Delete)
    assert desk.session.deal.earn.vacancy == {1: 0.05}
    assert desk.said == [
        "Year 1 of vacancy allowance has no year before it to follow, so it stays."
    ]


def test_delete_takes_a_draft_out_of_year_1(desk: Desk) -> None:
    desk.at(VACANCY, 1).type("x").press(Qt.Key.Key_Return)
    assert desk.session.deal.drafts == {"earn.vacancy.1": "x"}
    desk.at(VACANCY, 1).press(Qt.Key.Key_Delete)
    assert desk.session.deal.drafts == {}
    assert desk.texts(VACANCY)[0] == "5.0"


def test_a_row_that_may_be_absent_comes_and_goes(desk: Desk) -> None:
    assert desk.texts(STATED) == [""] * 5
    desk.at(STATED, 1).type("1.2k").press(Qt.Key.Key_Return)
    assert desk.session.deal.stated.rent == {1: 1200.0}
    assert desk.texts(STATED) == ["1,200", *["·\u00a01,200"] * 4]
    assert desk.texts(RENT) == ["1,200"] * 5
    desk.at(STATED, 1).press(Qt.Key.Key_Delete)
    assert desk.session.deal.stated.rent is None


def test_computed_cells_take_no_entry_and_say_so(desk: Desk) -> None:
    desk.at(INCOME, 2).type("5")
    assert desk.said == ["Effective gross income is computed; F4 shows how."]
    assert desk.session.revision == 0
    assert desk.hand() is desk.grid


def test_f4_and_a_double_click_ask_for_the_working(desk: Desk) -> None:
    desk.at(INCOME, 2).press(Qt.Key.Key_F4)
    desk.at(VACANCY, 3).press(Qt.Key.Key_F4)
    desk.at(0, 3).press(Qt.Key.Key_F4)
    where = desk.grid.visualRect(desk.grid.model().index(RENT, 1)).center()
    QTest.mouseClick(desk.grid.viewport(), Qt.MouseButton.LeftButton, pos=where)
    QTest.mouseDClick(desk.grid.viewport(), Qt.MouseButton.LeftButton, pos=where)
    assert desk.asked == [
        ("effective_gross_income", 2),
        ("earn.vacancy", 3),
        ("rent_expected", 2),
    ]


def test_a_double_click_on_an_input_opens_its_editor(desk: Desk) -> None:
    where = desk.grid.visualRect(desk.grid.model().index(VACANCY, 2)).center()
    QTest.mouseClick(desk.grid.viewport(), Qt.MouseButton.LeftButton, pos=where)
    QTest.mouseDClick(desk.grid.viewport(), Qt.MouseButton.LeftButton, pos=where)
    editor = desk.hand()
    assert isinstance(editor, QLineEdit)
    assert editor.text() == "7"
    assert desk.asked == []


def test_undo_and_redo_show_at_once(desk: Desk) -> None:
    start = desk.session.deal
    desk.at(VACANCY, 1).type("6").press(Qt.Key.Key_Return)
    desk.session.undo()
    assert desk.session.deal == start
    assert desk.texts(VACANCY)[0] == "5.0"
    desk.session.redo()
    assert desk.texts(VACANCY)[0] == "6.0"


def test_the_hold_adds_and_takes_columns_and_keeps_the_choice(desk: Desk) -> None:
    desk.at(VACANCY, 2, VACANCY, 3)
    desk.session.set("leave.hold", 12, "hold")
    assert len(desk.texts(INCOME)) == 12
    desk.session.set("leave.hold", 3, "hold")
    assert desk.texts(VACANCY) == ["5.0", "·\u00a05.0", "7.0"]
    assert desk.grid.chosen() == [(VACANCY, 1), (VACANCY, 2)]
    desk.session.set("leave.hold", None, "hold")
    assert len(desk.texts(VACANCY)) == 10


def test_one_message_an_update(desk: Desk) -> None:
    desk.session.set("earn.vacancy.1", 0.1, "vacancy")
    seen = QSignalSpy(desk.grid.model().dataChanged)
    desk.session.catch_up()
    assert seen.count() == 1


def test_other_rows_keep_the_current_cell(desk: Desk) -> None:
    desk.at(VACANCY, 3)
    desk.years.set_rows([InputRow("earn.vacancy"), LineRow("noi")])
    assert desk.place() == (0, 3)
    assert desk.texts(1) == ["114", "114", "112", "112", "112"]
    assert desk.years.go_to("noi", 2)
    assert desk.place() == (1, 2)
    assert not desk.years.go_to("value", 1)


def test_a_row_whose_item_is_gone(qtbot: QtBot) -> None:
    loan = Loan("l1", amount=500.0, rate={1: 0.06}, amortisation_months=360)
    rows: tuple[GridRow, ...] = (InputRow("loans@l1.rate"), LineRow("balance@l1"))
    desk = Desk(qtbot, replace(base(), loans=(loan,)), rows)
    assert desk.texts(0)[0] == "6.0"
    desk.session.set("loans", (), "delete loan")
    assert desk.texts(0) == [""] * 5
    assert desk.texts(1) == ["—"] * 5
    desk.at(0, 1).type("5")
    assert desk.said == ["This row is no longer in the deal."]
    assert desk.read(1, 1, Qt.ItemDataRole.ToolTipRole) == "This deal has no such line."


def test_headings_carry_the_calendar(qtbot: QtBot) -> None:
    desk = Desk(qtbot, base())
    model, top = desk.grid.model(), Qt.Orientation.Horizontal
    assert model.headerData(2, top) == "3\n2029"  # closing on 1 January 2027
    spoken = model.headerData(2, top, Qt.ItemDataRole.AccessibleTextRole)
    assert spoken == "Year 3: January 1, 2029 to December 31, 2029"
    desk.session.set("purchase.closing_date", date(2027, 10, 1), "closing")
    assert model.headerData(2, top) == "3\n2029/30"
    desk.session.set("purchase.closing_date", None, "closing")
    assert model.headerData(2, top) == "3"


def test_amounts_follow_the_largest(qtbot: QtBot) -> None:
    desk = Desk(qtbot, deal(space(1_000_000.0)))
    assert desk.grid.corner.text() == "USD thousand"
    assert desk.texts(RENT) == ["12,000"] * 5
    desk.session.set("spaces@s1.market_rent.amount", 700.5, "rent")
    assert desk.texts(RENT) == ["8,406"] * 5
    assert desk.grid.corner.text() == "USD"


def test_figures_are_put_anew_when_scale_or_locale_change(qtbot: QtBot) -> None:
    costs = (Expense("x1", name="Costs", amount=3456.0),)
    desk = Desk(qtbot, replace(base(), expenses=costs), [LineRow("expense@x1"), *ROWS])
    assert desk.texts(0)[0] == "−3,456"
    desk.session.set("conventions.locale", "de-DE", "locale")
    assert desk.texts(0)[0] == "−3.456"
    desk.session.set("spaces@s1.market_rent.amount", 1e6, "rent")
    assert desk.texts(0)[0] == "−3"


def test_german_marks(qtbot: QtBot) -> None:
    desk = Desk(qtbot, base(conventions=Conventions(currency="EUR", locale="de-DE")))
    desk.at(GROWTH, 1).type("1,25").press(Qt.Key.Key_Return)
    assert desk.session.deal.earn.growth == {1: 0.0125}
    assert desk.texts(GROWTH)[0] == "1,25"
    desk.at(STATED, 1).type("1.200.000").press(Qt.Key.Key_Return)
    assert desk.session.deal.stated.rent == {1: 1_200_000.0}
    desk.at(GROWTH, 2).type("1.5").press(Qt.Key.Key_Return)
    assert desk.session.deal.drafts == {"earn.growth.2": "1.5"}


def test_names_for_a_screen_reader(desk: Desk) -> None:
    role = Qt.ItemDataRole.AccessibleTextRole
    assert desk.grid.accessibleName() == "Year by year"
    assert desk.read(VACANCY, 1, role) == "Vacancy allowance, year 1: 5.0 %, typed"
    assert desk.read(VACANCY, 2, role) == (
        "Vacancy allowance, year 2: 5.0 %, follows the year before"
    )
    assert desk.read(STATED, 1, role) == "Stated rent, year 1: empty, not typed"
    assert desk.read(RENT, 4, role) == "Rent expected, year 4: 120"


def test_a_leased_space_is_in_hand(qtbot: QtBot) -> None:
    let = lease("2026-01-01", "2028-12-31", 20.0)
    desk = Desk(qtbot, deal(space(10.0, let)), [LineRow("rent_in_hand")])
    assert desk.texts(0) == ["240", "240", "0", "0", "0"]


def test_tab_walks_along_the_row_and_out_of_the_grid(qtbot: QtBot) -> None:
    frame = QWidget()
    keep(qtbot, frame)
    grid = YearGrid(Session(base()), ROWS, frame)
    grid.resize(700, 400)
    after = QLineEdit(frame)
    with qtbot.waitActive(frame):
        frame.show()
        frame.activateWindow()
    grid.setFocus()
    grid.choose((VACANCY, 3), (VACANCY, 3))
    QTest.keyClick(grid, Qt.Key.Key_Tab)
    assert grid.place() == (VACANCY, 4)
    QTest.keyClick(grid, Qt.Key.Key_Tab)
    assert QApplication.focusWidget() is after


def test_items_bear_their_own_names(qtbot: QtBot) -> None:
    expenses = (Expense("x1", name="Insurance", amount=12.0), Expense("x2", amount=6.0))
    loan = Loan("l1", name="Senior", amount=500.0, rate={1: 0.06}, amortisation_months=360)
    start = replace(base(), expenses=expenses, loans=(loan,))
    rows: tuple[GridRow, ...] = (
        LineRow("expense@x1"),
        LineRow("expense@x2"),
        InputRow("loans@l1.rate"),
        LineRow("interest@l1"),
        LineRow("noi", label="Net income"),
        InputRow("spend.growth", "Growth of costs", "per cent"),
        LineRow("debt_yield"),
        LineRow("rent_index"),
        LineRow("dscr_noi"),
        LineRow("expense@x9"),
    )
    desk = Desk(qtbot, start, rows)
    model, side = desk.grid.model(), Qt.Orientation.Vertical
    labels = [str(model.headerData(row, side)) for row in range(model.rowCount())]
    assert labels == [
        "Insurance",
        "Expense x2",
        "Senior: interest rate",
        "Senior: interest",
        "Net income",
        "Growth of costs",
        "Debt yield",
        "Index of market rent",
        "Debt service cover on net operating income",
        "expense@x9",
    ]
    assert desk.texts(0)[0] == "−12"
    # 114 − 18 is 96; on a balance of 500 at the year's start that is 19.2 %
    assert desk.texts(6)[0] == "19.2%"
    assert desk.texts(7)[0] == "1.0000"
    assert desk.texts(8)[0] == "2.67"  # 96 ÷ 12 months at 2.99775
    assert desk.texts(9) == ["—"] * 5
    desk.at(6, 1).ctrl(Qt.Key.Key_C)
    assert desk.clip() == "19.2%"


def test_stated_amounts_stay_in_single_units(qtbot: QtBot) -> None:
    desk = Desk(qtbot, base())
    desk.at(STATED, 1).type("12345678").press(Qt.Key.Key_Tab)
    desk.type("12.34").press(Qt.Key.Key_Return)
    assert desk.texts(STATED)[:2] == ["12.35m", "12.34"]
    assert desk.grid.corner.text() == "USD thousand"
    desk.at(STATED, 1).press(Qt.Key.Key_F2)
    editor = desk.hand()
    assert isinstance(editor, QLineEdit)
    assert editor.text() == "12345678"


def test_nothing_to_let_follow(desk: Desk) -> None:
    desk.at(VACANCY, 2).press(Qt.Key.Key_Delete)
    assert desk.said == ["Nothing is typed there that could follow again."]
    assert desk.session.revision == 0


def test_a_needed_year_1_is_marked(qtbot: QtBot) -> None:
    desk = Desk(qtbot, base(earn=Earn()))
    assert desk.texts(VACANCY) == [""] * 5
    spoken = desk.read(VACANCY, 1, Qt.ItemDataRole.AccessibleTextRole)
    assert spoken.startswith("Vacancy allowance, year 1: empty, not typed. Vacancy allowance")
    assert "is needed" in desk.read(VACANCY, 1, Qt.ItemDataRole.ToolTipRole)


def test_shift_enter_goes_up(desk: Desk) -> None:
    shift = Qt.KeyboardModifier.ShiftModifier
    desk.at(VACANCY, 2).type("6").press(Qt.Key.Key_Return, shift)
    assert desk.place() == (GROWTH, 2)
    desk.press(Qt.Key.Key_Return).press(Qt.Key.Key_Return, shift)
    assert desk.place() == (GROWTH, 2)
