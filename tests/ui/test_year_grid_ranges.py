"""Ranges of the year grid: clipboard, fills, ramps and many cells at once."""

from collections.abc import Iterator

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from pytestqt.qtbot import QtBot

from tests.ui.hands import GROWTH, INCOME, STATED, VACANCY, Desk, base
from workbench.deal.property import Conventions
from workbench.text.locale import LOCALES
from workbench.ui.grid.clipboard import plain, read_block, write_block
from workbench.ui.grid.edits import ramp, years_in_words


@pytest.fixture
def desk(qtbot: QtBot) -> Iterator[Desk]:
    made = Desk(qtbot, base())
    yield made
    made.grid.close()


def test_copy_carries_every_digit(desk: Desk) -> None:
    desk.at(VACANCY, 2, VACANCY, 4).ctrl(Qt.Key.Key_C)
    assert desk.clip() == "5%\t7%\t7%"
    desk.at(INCOME, 3).ctrl(Qt.Key.Key_C)
    assert float(desk.clip()) == pytest.approx(111.6)


def test_copy_of_no_rectangle_is_refused(desk: Desk) -> None:
    desk.clip("before")
    desk.at(VACANCY, 1)
    flag = Qt.KeyboardModifier.ControlModifier
    for row, column in ((VACANCY, 1), (GROWTH, 0)):
        where = desk.grid.visualRect(desk.grid.model().index(row, column)).center()
        QTest.mouseClick(desk.grid.viewport(), Qt.MouseButton.LeftButton, flag, where)
    desk.ctrl(Qt.Key.Key_C)
    assert desk.clip() == "before"
    assert desk.said == ["Only one rectangle of cells can be copied at a time."]


def test_cut_is_one_step(desk: Desk) -> None:
    start = desk.session.deal
    desk.at(VACANCY, 2, VACANCY, 3).ctrl(Qt.Key.Key_X)
    assert desk.clip() == "5%\t7%"
    assert desk.session.deal.earn.vacancy == {1: 0.05}
    assert desk.undo_name() == "cut vacancy allowance years 2–3"
    desk.session.undo()
    assert desk.session.deal == start


def test_paste_of_a_range_is_one_step(desk: Desk) -> None:
    start = desk.session.deal
    desk.clip("1\t2%\tx\r\n6\t\t8.5%\r\n")
    desk.at(GROWTH, 1).ctrl(Qt.Key.Key_V)
    assert desk.session.deal.earn.growth == {1: 0.01, 2: 0.02}
    assert desk.session.deal.drafts == {"earn.growth.3": "x"}
    assert desk.session.deal.earn.vacancy == {1: 0.06, 3: 0.085}
    assert desk.undo_name() == "paste 2 rows years 1–3"
    desk.session.undo()
    assert desk.session.deal == start
    assert desk.undo_name() is None


def test_paste_of_one_cell_goes_over_all_that_are_chosen(desk: Desk) -> None:
    desk.clip("3")
    desk.at(GROWTH, 2, VACANCY, 3).ctrl(Qt.Key.Key_V)
    assert desk.session.deal.earn.growth == {1: 0.0, 2: 0.03, 3: 0.03}
    assert desk.session.deal.earn.vacancy == {1: 0.05, 2: 0.03, 3: 0.03}


def test_paste_past_the_last_year_says_what_was_left_out(desk: Desk) -> None:
    desk.clip("1\t2\t3")
    desk.at(GROWTH, 4).ctrl(Qt.Key.Key_V)
    assert desk.session.deal.earn.growth == {1: 0.0, 4: 0.01, 5: 0.02}
    assert desk.said == ["1 cell lies outside the grid and was left out."]


def test_paste_over_computed_cells_changes_nothing(desk: Desk) -> None:
    desk.clip("1\n2\n3\n4")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_V)
    assert desk.session.revision == 0
    assert desk.said == ["Nothing was changed. A heading takes no entry."]


def test_pasted_fractions_are_read_in_per_cent_and_said(desk: Desk) -> None:
    desk.clip("0.05\t0.06")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_V)
    assert desk.session.deal.earn.vacancy == {1: 0.0005, 2: 0.0006, 3: 0.07}
    assert desk.said == [
        "Pasted rates without a per cent sign are read in per cent: 0.05 is 0.05 %."
    ]
    desk.clip("5\t0.5%\t0.5")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_V)
    desk.clip("0")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_V)
    assert len(desk.said) == 1


def test_paste_of_nothing(desk: Desk) -> None:
    desk.clip("")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_V)
    assert desk.said == ["There is no text on the clipboard to paste."]


def test_an_empty_cell_pasted_over_year_1_leaves_it(desk: Desk) -> None:
    desk.clip("\t6")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_V)
    assert desk.session.deal.earn.vacancy == {1: 0.05, 2: 0.06, 3: 0.07}


def test_a_range_copied_and_pasted_back_is_the_same(qtbot: QtBot) -> None:
    desk = Desk(qtbot, base(conventions=Conventions(locale="de-DE")))
    third = 1 / 3
    desk.session.set("earn.vacancy.1", third, "vacancy")
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_C)
    assert desk.clip() == "33,33333333333333%"
    desk.at(GROWTH, 1).ctrl(Qt.Key.Key_V)
    assert desk.session.deal.earn.growth == {1: third}


def test_fill_right(desk: Desk) -> None:
    desk.at(VACANCY, 3, VACANCY, 5).ctrl(Qt.Key.Key_R)
    assert desk.session.deal.earn.vacancy == {1: 0.05, 3: 0.07, 4: 0.07, 5: 0.07}
    assert desk.undo_name() == "fill vacancy allowance years 4–5"
    desk.at(VACANCY, 3).ctrl(Qt.Key.Key_R)  # a single cell takes the one at its left
    assert desk.session.deal.earn.vacancy[3] == 0.05
    desk.at(VACANCY, 1).ctrl(Qt.Key.Key_R)
    assert desk.said == ["Choose the cell to fill from and the years to its right."]


def test_fill_down_within_one_unit(desk: Desk) -> None:
    desk.at(GROWTH, 2, VACANCY, 3).ctrl(Qt.Key.Key_D)
    assert desk.session.deal.earn.vacancy == {1: 0.05, 2: 0.0, 3: 0.0}
    assert desk.undo_name() == "fill vacancy allowance years 2–3"
    desk.at(VACANCY, 2, STATED, 2).ctrl(Qt.Key.Key_D)
    assert desk.said == ["These rows have different units; none is filled from another."]


def test_a_single_cell_fills_from_its_neighbour(desk: Desk) -> None:
    desk.at(VACANCY, 2).ctrl(Qt.Key.Key_D)  # takes market rent growth above, which is nil
    assert desk.session.deal.earn.vacancy == {1: 0.05, 2: 0.0, 3: 0.07}
    desk.at(GROWTH, 2).ctrl(Qt.Key.Key_D)
    assert desk.said == ["Choose the row to fill from and the rows under it."]
    desk.at(STATED, 1, STATED, 2).ctrl(Qt.Key.Key_R)
    assert desk.said[1:] == ["There is no value to fill from."]


def test_set_all_opens_the_editor(desk: Desk) -> None:
    command = desk.grid.commands["Set all chosen cells: type, then Ctrl+Enter"]
    desk.at(GROWTH, 1, GROWTH, 2)
    command.trigger()
    desk.type("3").ctrl(Qt.Key.Key_Return)
    assert desk.session.deal.earn.growth == {1: 0.03, 2: 0.03}
    desk.at(INCOME, 1)
    command.trigger()
    assert desk.said == ["Effective gross income is computed; F4 shows how."]


def test_many_over_computed_cells_sets_only_the_inputs(desk: Desk) -> None:
    desk.at(GROWTH, 1, INCOME, 1).type("2").ctrl(Qt.Key.Key_Return)
    assert desk.session.deal.earn.growth == {1: 0.02}
    assert desk.session.deal.stated.rent == {1: 2.0}
    desk.at(INCOME, 1)
    desk.grid.set_many("2")
    assert desk.said == ["None of the chosen cells takes an entry."]


def test_fill_over_computed_cells_is_refused(desk: Desk) -> None:
    desk.at(INCOME, 1, INCOME, 3).ctrl(Qt.Key.Key_R)
    assert desk.session.revision == 0
    assert desk.said == ["Effective gross income is computed; F4 shows how."]


def test_ramp_between_two_ends(desk: Desk) -> None:
    desk.at(VACANCY, 1).type("4").press(Qt.Key.Key_Return)
    desk.at(VACANCY, 5).type("8").press(Qt.Key.Key_Return)
    desk.at(VACANCY, 1, VACANCY, 5).ctrl(Qt.Key.Key_R, shift=True)
    assert desk.session.deal.earn.vacancy == {1: 0.04, 2: 0.05, 3: 0.06, 4: 0.07, 5: 0.08}
    assert desk.undo_name() == "ramp vacancy allowance years 1–5"
    desk.at(VACANCY, 1, VACANCY, 2).ctrl(Qt.Key.Key_R, shift=True)
    assert desk.said == ["A ramp needs two ends with values and a year between them."]


def test_ctrl_enter_sets_all_chosen_cells(desk: Desk) -> None:
    desk.at(GROWTH, 2, VACANCY, 4).type("2.5").ctrl(Qt.Key.Key_Return)
    assert desk.session.deal.earn.growth == {1: 0.0, 2: 0.025, 3: 0.025, 4: 0.025}
    assert desk.session.deal.earn.vacancy == {1: 0.05, 2: 0.025, 3: 0.025, 4: 0.025}
    assert desk.undo_name() == "set 2 rows years 2–4"
    assert len(desk.grid.chosen()) == 6
    assert desk.hand() is desk.grid


def test_delete_over_a_range_is_one_step(desk: Desk) -> None:
    desk.at(VACANCY, 1, VACANCY, 5).press(Qt.Key.Key_Delete)
    assert desk.session.deal.earn.vacancy == {1: 0.05}
    desk.session.undo()
    assert desk.session.deal.earn.vacancy == {1: 0.05, 3: 0.07}
    assert desk.undo_name() is None


def test_the_menu_names_every_command(desk: Desk) -> None:
    assert [action.text() for action in desk.grid.actions()] == [
        "Cut",
        "Copy",
        "Paste",
        "Set all chosen cells: type, then Ctrl+Enter",
        "Fill right",
        "Fill down",
        "Ramp between the two ends",
        "Back to following",
        "Show the working",
    ]


@pytest.mark.parametrize(
    ("text", "block"),
    [
        ("1", (("1",),)),
        ("1\t2\n3\t4\n", (("1", "2"), ("3", "4"))),
        ("1\t\r\n\t4\r\n", (("1", ""), ("", "4"))),
        ('"a\tb"\t"say ""so"""\n', (("a\tb", 'say "so"'),)),
        ('"two\nlines"\tx', (("two\nlines", "x"),)),
        ('5" pipe\t"odd', (('5" pipe', '"odd'),)),
        ("a\n\nb", (("a",), ("",), ("b",))),
        ("a\t", (("a", ""),)),
    ],
)
def test_blocks(text: str, block: tuple[tuple[str, ...], ...]) -> None:
    assert read_block(text) == block
    assert read_block(write_block(block)) == block


def test_plain_numbers() -> None:
    german = LOCALES["de-DE"]
    assert plain(1234567.25, german) == "1234567,25"
    assert plain(-0.0725, german, percent=True) == "-7,25%"
    assert plain(None, german) == ""
    assert plain(1e-7, german) == "0,0000001"
    assert plain(2e22, LOCALES["en-US"]) == "20000000000000000000000"


def test_ramps_keep_their_ends() -> None:
    assert ramp(0.1, 0.3, 3) == (0.1, 0.2, 0.3)
    assert ramp(1 / 3, 2 / 3, 4)[::3] == (1 / 3, 2 / 3)


def test_years_in_words() -> None:
    assert years_in_words([3]) == "year 3"
    assert years_in_words([5, 3, 4, 4]) == "years 3–5"
    assert years_in_words([1, 3, 4]) == "years 1, 3–4"
