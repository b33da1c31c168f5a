"""The rent roll driven by real keys, reading the texts it shows."""

from collections.abc import Iterator
from dataclasses import replace
from datetime import date

import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QSignalSpy, QTest
from PySide6.QtWidgets import QComboBox
from pytestqt.qtbot import QtBot

from tests.engine.deals import day, deal, lease, space
from tests.ui.hands import Hands
from workbench.deal.checks import check
from workbench.deal.deal import Deal
from workbench.deal.earn import Rent, Step
from workbench.deal.property import Conventions
from workbench.session.session import Session
from workbench.ui.roll import RollGrid
from workbench.ui.roll.columns import COLUMNS

SPACE, USE, UNITS, AREA, MARKET, MARKET_PER = range(6)
TENANT, START, END, RENT, RENT_PER, FREE, BREAK = range(6, 13)


def two_leases() -> Deal:
    """A shop let twice in a row, and an empty flat."""
    first = lease("2026-01-01", "2027-12-31", 20.0, tenant="Ann")
    second = lease("2028-01-01", "2030-12-31", 22.0, identity="e2", tenant="Bob", free_months=2)
    shop = space(25.0, first, second, name="Shop", use="retail", area=80.0)
    return deal(shop, space(10.0, identity="s2", name="Flat"))


class RollDesk(Hands):
    """A rent roll in the hands of a user."""

    def __init__(self, qtbot: QtBot, start: Deal) -> None:
        session = Session(start)
        self.roll = RollGrid(session)
        super().__init__(qtbot, session, self.roll)

    def at(self, row: int, column: int, to_row: int = -1, to_column: int = -1) -> "RollDesk":
        last = max(row, to_row), max(column, to_column)
        self.roll.choose((row, column), last)
        return self

    def row(self, row: int) -> list[str]:
        self.session.catch_up()
        model = self.roll.model()
        return [str(model.index(row, place).data()) for place in range(model.columnCount())]

    def column(self, column: int) -> list[str]:
        self.session.catch_up()
        model = self.roll.model()
        return [str(model.index(place, column).data()) for place in range(model.rowCount())]

    def read(self, row: int, column: int, role: Qt.ItemDataRole) -> str:
        self.session.catch_up()
        return str(self.roll.model().index(row, column).data(role) or "")


@pytest.fixture
def desk(qtbot: QtBot) -> Iterator[RollDesk]:
    made = RollDesk(qtbot, two_leases())
    yield made
    made.roll.close()


def test_one_row_a_lease_and_an_empty_one_at_the_end(desk: RollDesk) -> None:
    assert desk.row(0) == [
        "Shop", "retail", "1", "80", "25", "unit/month",
        "Ann", "Jan 1, 2026", "Dec 31, 2027", "20", "unit/month", "0", "",
    ]  # fmt: skip
    assert desk.column(SPACE) == ["Shop", "·\u00a0Shop", "Flat", ""]
    assert desk.column(TENANT) == ["Ann", "Bob", "", ""]
    assert desk.column(FREE) == ["0", "2", "", ""]


def test_typing_in_cells(desk: RollDesk) -> None:
    desk.at(0, TENANT).type("Cid").press(Qt.Key.Key_Tab)
    desk.type("2/1/2026").press(Qt.Key.Key_Tab).type("2027-11-30").press(Qt.Key.Key_Return)
    shop = desk.session.deal.spaces[0]
    assert shop.leases[0].tenant == "Cid"
    assert shop.leases[0].start == date(2026, 2, 1)
    assert shop.leases[0].end == date(2027, 11, 30)
    assert desk.undo_name() == "end of Shop"
    assert desk.roll.place() == (1, END)


def test_a_further_row_of_a_space_edits_the_space(desk: RollDesk) -> None:
    desk.at(1, AREA).type("90.5").press(Qt.Key.Key_Return)
    assert desk.session.deal.spaces[0].area == 90.5
    assert desk.column(AREA)[:2] == ["90.5", "·\u00a090.5"]


def test_how_a_rent_is_counted_is_chosen(desk: RollDesk) -> None:
    desk.at(0, MARKET_PER).press(Qt.Key.Key_F2)
    box = desk.hand()
    assert isinstance(box, QComboBox)
    assert box.accessibleName() == "Market rent per of Shop"
    texts = [box.itemText(place) for place in range(box.count())]
    assert texts == ["unit/month", "unit/year", "m²/month", "m²/year"]
    QTest.keyClick(box, Qt.Key.Key_End)
    QTest.keyClick(box, Qt.Key.Key_Return)
    assert desk.session.deal.spaces[0].market_rent == Rent(25.0, "year", "area")
    assert desk.row(0)[MARKET_PER] == "m²/year"


def test_a_tenant_typed_beside_an_empty_space_makes_a_lease(desk: RollDesk) -> None:
    desk.at(2, TENANT).type("Dot").press(Qt.Key.Key_Return)
    made = desk.session.deal.spaces[1].leases
    assert [(one.id, one.tenant) for one in made] == [("e100", "Dot")]
    assert desk.session.deal.next_id == 101
    desk.session.undo()
    assert desk.session.deal == two_leases()
    assert desk.column(TENANT) == ["Ann", "Bob", "", ""]


def test_typing_in_the_new_row_makes_a_space(desk: RollDesk) -> None:
    desk.at(3, SPACE).type("Attic").press(Qt.Key.Key_Return)
    made = desk.session.deal.spaces[-1]
    assert (made.id, made.name, made.count) == ("s100", "Attic", 1)
    assert desk.column(SPACE) == ["Shop", "·\u00a0Shop", "Flat", "Attic", ""]
    assert desk.undo_name() == "space of a new row"


@pytest.mark.parametrize(
    ("column", "typed", "path", "reason"),
    [
        (START, "1/2/27", "leases@e1.start", "The year of a date is written with four digits."),
        (END, "soon", "leases@e1.end", "A date is written like 2027-01-31 or 01/31/2027."),
        (UNITS, "1.5", "spaces@s1.count", "A whole number is needed here."),
        (RENT, "x", "leases@e1.rent.amount", "“x” is not part of a number"),
    ],
)
def test_a_bad_entry_stays_with_its_reason(
    desk: RollDesk, column: int, typed: str, path: str, reason: str
) -> None:
    before = desk.session.deal.spaces
    desk.at(0, column).type(typed).press(Qt.Key.Key_Return)
    assert desk.session.deal.drafts == {path: typed}
    assert desk.session.deal.spaces == before
    assert desk.row(0)[column] == typed
    assert reason in desk.read(0, column, Qt.ItemDataRole.ToolTipRole)
    desk.at(0, column).press(Qt.Key.Key_Delete)
    assert desk.session.deal.drafts == {}


def test_what_is_wrong_is_marked(desk: RollDesk) -> None:
    desk.at(0, MARKET).press(Qt.Key.Key_Delete)
    assert desk.undo_name() == "clear market rent of Shop"
    text = desk.read(0, MARKET, Qt.ItemDataRole.AccessibleTextRole)
    assert text.startswith("Market rent of Shop: empty. Market rent of space s1 “Shop”: ")


def sheet_of(count: int) -> str:
    """A rent roll as a spreadsheet puts it on the clipboard."""
    lines = [
        f"Flat {place}\tflat\t1\t{40 + place % 60}\t$1,{place % 900:03d}.50\tmonth\tTenant {place}"
        f"\t1/1/2026\t12/31/{2027 + place % 5}\t$900\tunit/month\t\t"
        for place in range(1, count + 1)
    ]
    return "\r\n".join(lines) + "\r\n"


def test_paste_of_500_rows_is_one_step_and_one_recompute(desk: RollDesk) -> None:
    start = desk.session.deal
    desk.session.catch_up()
    computed = QSignalSpy(desk.session.result_changed)
    desk.clip(sheet_of(500))
    desk.at(3, SPACE).ctrl(Qt.Key.Key_V)
    after = desk.session.deal
    assert len(after.spaces) == 502
    assert desk.undo_name() == "paste 500 rows"
    assert desk.session.revision == 1
    desk.bot.waitUntil(lambda: computed.count() > 0)
    assert computed.count() == 1
    last = after.spaces[-1]
    assert (last.name, last.count, last.area) == ("Flat 500", 1, 60.0)
    assert last.market_rent == Rent(1500.5, "month", "unit")
    assert last.leases[0].end == date(2027, 12, 31)
    assert last.leases[0].rent == Rent(900.0, "month", "unit")
    assert after.next_id == 1100
    assert check(after) == []
    assert len(desk.column(SPACE)) == 504
    desk.session.undo()
    assert desk.session.deal == start
    assert desk.undo_name() is None
    assert desk.column(SPACE) == ["Shop", "·\u00a0Shop", "Flat", ""]
    desk.session.redo()
    assert desk.session.deal == after


def test_paste_over_rows_changes_them(desk: RollDesk) -> None:
    desk.clip("Eve\t2026-03-01\nFay")
    desk.at(1, TENANT).ctrl(Qt.Key.Key_V)
    shop, flat = desk.session.deal.spaces
    assert (shop.leases[1].tenant, shop.leases[1].start) == ("Eve", date(2026, 3, 1))
    assert [one.tenant for one in flat.leases] == ["Fay"]


def test_paste_under_headings_goes_by_name(desk: RollDesk) -> None:
    titles = "Tenant\tPremises\tLease end\tLease start\tDeposit"
    desk.clip(f"{titles}\nGus\tYard\t2030-06-30\t2026-07-01\t9")
    desk.at(3, SPACE).ctrl(Qt.Key.Key_V)
    made = desk.session.deal.spaces[-1]
    assert (made.name, made.leases[0].tenant) == ("Yard", "Gus")
    assert (made.leases[0].start, made.leases[0].end) == (day("2026-07-01"), day("2030-06-30"))
    assert desk.said == ["Columns without a place here were left out: Deposit."]


def test_copy_and_paste_back_changes_nothing(desk: RollDesk) -> None:
    desk.at(0, SPACE, 2, BREAK).ctrl(Qt.Key.Key_C)
    assert desk.clip().splitlines()[0] == (
        "Shop\tretail\t1\t80\t25\tunit/month\tAnn\t2026-01-01\t2027-12-31\t20\tunit/month\t0\t"
    )
    desk.ctrl(Qt.Key.Key_V)
    assert desk.session.revision == 0


def test_fill_down_and_many_at_once(desk: RollDesk) -> None:
    desk.at(0, USE, 2, USE).ctrl(Qt.Key.Key_D)
    assert [one.use for one in desk.session.deal.spaces] == ["retail", "retail"]
    desk.at(0, RENT, 1, RENT).type("30").ctrl(Qt.Key.Key_Return)
    assert [one.rent.amount for one in desk.session.deal.spaces[0].leases] == [30.0, 30.0]
    assert desk.undo_name() == "set rent in 2 rows"


def test_insert_duplicate_move_and_delete(desk: RollDesk) -> None:
    plus = Qt.Key.Key_Plus
    desk.at(2, SPACE).ctrl(plus)
    assert [one.id for one in desk.session.deal.spaces] == ["s1", "s100", "s2"]
    assert desk.roll.place() == (2, SPACE)
    desk.at(0, SPACE).ctrl(Qt.Key.Key_D, shift=True)
    copy = desk.session.deal.spaces[1]
    assert (copy.id, copy.name) == ("s101", "Shop")
    assert [one.id for one in copy.leases] == ["e102", "e103"]
    assert desk.undo_name() == "duplicate a space"
    assert {row for row, _ in desk.roll.chosen()} == {2, 3}
    desk.at(0, SPACE).press(Qt.Key.Key_Down, Qt.KeyboardModifier.AltModifier)
    assert [one.id for one in desk.session.deal.spaces] == ["s101", "s1", "s100", "s2"]
    assert desk.roll.place() == (2, SPACE)
    desk.press(Qt.Key.Key_Up, Qt.KeyboardModifier.AltModifier)
    assert [one.id for one in desk.session.deal.spaces] == ["s1", "s101", "s100", "s2"]
    desk.at(1, SPACE).ctrl(Qt.Key.Key_Minus)
    assert [one.id for one in desk.session.deal.spaces[0].leases] == ["e1"]
    assert desk.undo_name() == "delete Shop"
    desk.at(1, SPACE, 3, SPACE).ctrl(Qt.Key.Key_Minus)
    assert [one.id for one in desk.session.deal.spaces] == ["s1", "s2"]
    for _ in range(6):
        desk.session.undo()
    assert desk.session.deal == two_leases()
    assert desk.undo_name() is None


def test_moving_past_the_ends_says_so(desk: RollDesk) -> None:
    desk.at(0, SPACE).press(Qt.Key.Key_Up, Qt.KeyboardModifier.AltModifier)
    assert desk.said == ["This is already the first place."]
    assert desk.session.revision == 0


def test_the_new_row_is_not_deleted(desk: RollDesk) -> None:
    desk.at(3, SPACE).ctrl(Qt.Key.Key_Minus)
    assert desk.said == ["The new row holds nothing yet; choose other rows."]


def test_a_lease_is_added_and_taken_out(desk: RollDesk) -> None:
    desk.at(2, SPACE).ctrl(Qt.Key.Key_L, shift=True)
    assert [one.id for one in desk.session.deal.spaces[1].leases] == ["e100"]
    assert desk.roll.place() == (2, TENANT)
    desk.roll.commands["Take leases out, keep the spaces"].trigger()
    assert desk.session.deal.spaces[1].leases == ()


def test_drafts_go_with_their_row(desk: RollDesk) -> None:
    desk.at(1, START).type("x").press(Qt.Key.Key_Return)
    assert desk.session.deal.drafts == {"leases@e2.start": "x"}
    desk.at(1, START).ctrl(Qt.Key.Key_Minus)
    assert desk.session.deal.drafts == {}
    desk.session.undo()
    assert desk.session.deal.drafts == {"leases@e2.start": "x"}


def test_steps_of_a_lease_stay_when_its_row_is_edited(qtbot: QtBot) -> None:
    let = lease(
        "2026-01-01", "2029-12-31", 10.0, steps=(Step("p1", day("2028-01-01"), change=0.1),)
    )
    desk = RollDesk(qtbot, deal(space(10.0, let)))
    desk.at(0, RENT).type("11").press(Qt.Key.Key_Return)
    assert desk.session.deal.spaces[0].leases[0] == replace(let, rent=Rent(11.0, "month"))


def test_german_marks_and_dates(qtbot: QtBot) -> None:
    start = replace(two_leases(), conventions=Conventions(currency="EUR", locale="de-DE"))
    desk = RollDesk(qtbot, start)
    desk.at(0, START).type("1.2.2026").press(Qt.Key.Key_Return)
    assert desk.session.deal.spaces[0].leases[0].start == date(2026, 2, 1)
    desk.clip("Laden\tHandel\t1\t120,5 m²\t1.250,50 €\tm²/Jahr")
    desk.at(3, SPACE).ctrl(Qt.Key.Key_V)
    made = desk.session.deal.spaces[-1]
    assert (made.area, made.market_rent) == (120.5, Rent(1250.5))
    assert desk.session.deal.drafts == {"spaces@s100.market_rent.per": "m²/Jahr"}
    assert desk.row(3)[MARKET] == "1.250,50"


def test_the_first_column_stays_in_sight(desk: RollDesk) -> None:
    assert not desk.roll.frozen.isVisible()
    desk.at(0, SPACE).press(Qt.Key.Key_End)
    assert desk.roll.place() == (0, BREAK)
    assert desk.roll.frozen.isVisible()
    desk.at(0, USE)
    index = desk.roll.model().index(0, USE)
    assert desk.roll.visualRect(index).left() >= desk.roll.frozen.width() or (
        not desk.roll.frozen.isVisible()
    )
    desk.at(0, SPACE)
    assert not desk.roll.frozen.isVisible()


def test_names_and_headings(desk: RollDesk) -> None:
    model, top = desk.roll.model(), Qt.Orientation.Horizontal
    assert desk.roll.accessibleName() == "Rent roll"
    assert model.headerData(AREA, top) == "Area\nm²"
    assert model.headerData(MARKET, top) == "Market rent\nUSD"
    role = Qt.ItemDataRole.AccessibleTextRole
    assert desk.read(1, TENANT, role) == "Tenant of Shop: Bob"
    assert desk.read(3, SPACE, role) == "Space of new row: empty"
    assert len(COLUMNS) == 13


def test_go_to_a_path(desk: RollDesk) -> None:
    assert desk.roll.go_to("leases@e2.rent.amount")
    assert desk.roll.place() == (1, RENT)
    assert desk.roll.go_to("leases@e1.rent.of")
    assert desk.roll.place() == (0, RENT_PER)
    assert not desk.roll.go_to("leases@e9.rent.amount")


def test_the_choice_stays_when_rows_come_in_before_it(desk: RollDesk) -> None:
    desk.at(2, USE)
    desk.session.set("spaces", (space(1.0, identity="s50"), *desk.session.deal.spaces), "more")
    assert desk.roll.place() == (3, USE)


def test_what_cannot_be_done_is_said(desk: RollDesk) -> None:
    desk.at(0, BREAK).press(Qt.Key.Key_F4)
    desk.at(0, BREAK).press(Qt.Key.Key_Delete)
    desk.at(0, USE).ctrl(Qt.Key.Key_D)
    desk.at(3, SPACE).ctrl(Qt.Key.Key_L, shift=True)
    desk.at(3, SPACE).ctrl(Qt.Key.Key_D, shift=True)
    desk.at(3, SPACE).press(Qt.Key.Key_Down, Qt.KeyboardModifier.AltModifier)
    desk.at(2, SPACE)
    desk.roll.commands["Take leases out, keep the spaces"].trigger()
    assert desk.session.revision == 0
    assert desk.said == [
        "The rent roll holds what was typed; nothing in it is computed.",
        "There is nothing in these cells to take out.",
        "Choose the cell to fill from and the rows under it.",
        "A lease needs a space; name one in the new row first.",
        "The new row holds nothing yet; choose other rows.",
        "The new row holds nothing yet; choose other rows.",
        "There is no lease in the chosen rows.",
    ]


def test_columns_past_the_last_are_left_out(desk: RollDesk) -> None:
    desk.clip("3\t2027-06-30\tx")
    desk.at(0, FREE).ctrl(Qt.Key.Key_V)
    let = desk.session.deal.spaces[0].leases[0]
    assert (let.free_months, let.break_date) == (3, date(2027, 6, 30))
    assert desk.said == ["Columns past the last one of the grid were left out."]


def test_one_cell_pasted_over_many(desk: RollDesk) -> None:
    desk.clip("office")
    desk.at(0, USE, 2, USE).ctrl(Qt.Key.Key_V)
    assert [one.use for one in desk.session.deal.spaces] == ["office", "office"]
    assert desk.undo_name() == "paste use in 3 rows"


def test_a_single_cell_takes_the_one_above(desk: RollDesk) -> None:
    desk.at(2, USE).ctrl(Qt.Key.Key_D)
    assert desk.session.deal.spaces[1].use == "retail"
    assert desk.undo_name() == "fill use of Flat"


def test_a_row_inserted_at_the_end(desk: RollDesk) -> None:
    desk.at(3, SPACE).ctrl(Qt.Key.Key_Plus)
    assert [one.id for one in desk.session.deal.spaces] == ["s1", "s2", "s100"]
    desk.type("Yard").press(Qt.Key.Key_Return)
    assert desk.session.deal.spaces[2].name == "Yard"


def test_an_edit_elsewhere_leaves_the_roll_as_it_is(desk: RollDesk) -> None:
    desk.row(0)
    seen = QSignalSpy(desk.roll.model().dataChanged)
    desk.session.set("earn.vacancy.1", 0.2, "vacancy")
    desk.session.catch_up()
    assert seen.count() == 0
    desk.session.set("conventions.locale", "de-DE", "locale")
    assert desk.row(0)[START] == "1 Jan 2026"


def test_paste_with_empty_cells_keeps_a_new_space_at_one_unit(desk: RollDesk) -> None:
    desk.clip("A\t\t\t50\n\nB\t\t3\t60")
    desk.at(3, SPACE).ctrl(Qt.Key.Key_V)
    made = desk.session.deal.spaces[2:]
    assert [(one.name, one.count, one.area) for one in made] == [("A", 1, 50.0), ("B", 3, 60.0)]


def test_headings_alone_paste_nothing(desk: RollDesk) -> None:
    desk.clip("Tenant\tRent\tUnits")
    desk.at(0, SPACE).ctrl(Qt.Key.Key_V)
    assert desk.session.revision == 0


def test_a_draft_kept_elsewhere_is_shown(desk: RollDesk) -> None:
    assert desk.row(0)[UNITS] == "1"
    desk.session.keep_draft("spaces@s1.count", "many", "units")
    assert desk.row(0)[UNITS] == "many"
    assert desk.row(1)[UNITS] == "many"
