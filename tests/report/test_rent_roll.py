"""The rent roll."""

from tests.fullest import fullest, small
from tests.report.sections import changed, named, tables, voice_of
from workbench.deal.deal import Deal
from workbench.report.document import Table
from workbench.report.rent_roll import roll_section


def roll(deal: Deal) -> Table:
    (section,) = roll_section(voice_of(deal))
    (table,) = tables(section)
    return table


def test_a_row_for_each_lease_and_a_sum() -> None:
    table = roll(fullest())
    assert [row[0] for row in table.rows] == [
        "Corner shop, shop", "Corner shop, shop", "Flats, flat", "All spaces",
    ]  # fmt: skip
    assert [row[3] for row in table.rows] == ["Sailmaker", "Bookbinder", "Six households", ""]
    assert table.strong == frozenset({3})


def test_what_belongs_to_a_space_is_said_once() -> None:
    first, second, *_ = roll(fullest()).rows
    assert first[1:3] == ("1", "120.0")
    assert second[1:3] == ("", "")
    assert second[-2:] == ("", "")


def test_sums_count_the_leases_that_run_at_closing() -> None:
    total = named(roll(fullest()), "All spaces")
    assert total[1] == "7"
    assert total[-3] == "105,360", "27,600 + 77,760, without the lease that begins in 2029"
    assert total[-1] == "111,600"


def test_notes_stand_under_their_leases() -> None:
    table = roll(fullest())
    assert table.notes[1] == "tenant’s break on Aug 31, 2032, with a penalty of 9,000"
    assert table.notes[3] == ""


def test_a_space_without_a_lease_says_so() -> None:
    raw_spaces = [
        {"id": "s1", "name": "Hall", "count": 1, "market_rent": {"amount": 5.0}},
        {
            "id": "s6", "name": "Shed", "count": 1, "market_rent": {"amount": 5.0},
            "leases": [{"id": "e7", "rent": {"amount": 4.0}}],
        },
    ]  # fmt: skip
    deal = changed(spaces=raw_spaces, other_income=[])
    table = roll(deal)
    assert named(table, "Hall")[1:] == ("no lease", "", "", "5", "5")
    assert named(table, "Shed")[1:] == ("—", "4", "4", "5", "5")


def test_without_leases_their_columns_are_left_out() -> None:
    assert [column.title for column in roll(small()).columns] == [
        "Space", "Units", "Market rent per unit a month", "Market rent a year, USD",
    ]  # fmt: skip


def test_without_spaces_there_is_no_such_section() -> None:
    assert roll_section(voice_of(Deal())) == ()
