"""Assumptions by year."""

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed, line, years_of
from workbench.deal.deal import Deal
from workbench.report.assumed_rows import row_table
from workbench.report.document import YearTable


def table_of(deal: Deal) -> YearTable:
    (table,) = (block for block in row_table(years_of(deal)) if isinstance(block, YearTable))
    return table


def test_typed_values_are_told_from_those_that_follow() -> None:
    growth = line(table_of(fullest()), "Market rent growth")
    assert growth.cells == ("2.0%",) * 3 + ("2.5%",) * 7
    assert growth.following == frozenset(range(10)) - {0, 3}


def test_rows_of_items_are_named_after_them() -> None:
    labels = [found.label for found in table_of(fullest()).lines]
    assert "Growth, Repairs" in labels
    assert "Interest rate, Bank" in labels
    assert "Stated amounts, Insurance, USD" in labels


def test_decimals_of_a_row_line_up() -> None:
    deal = changed(earn={"growth": {"1": 0.02, "4": 0.0175}})
    assert line(table_of(deal), "Market rent growth").cells[2:4] == ("2.00%", "1.75%")


def test_rows_at_their_default_are_left_out_unless_they_are_needed() -> None:
    assert [found.label for found in table_of(small()).lines] == [
        "Vacancy allowance",
        "Required return",
    ]


def test_years_before_the_first_typed_one_are_dashes() -> None:
    deal = changed(small_raw(), earn={"vacancy": {"3": 0.05}})
    assert line(table_of(deal), "Vacancy allowance").cells[:3] == ("—", "—", "5.0%")


def test_the_corner_says_whether_years_have_dates() -> None:
    assert table_of(fullest()).corner == "year to"
    assert table_of(small()).corner == "year"


def test_nothing_where_there_are_no_years_or_no_rows() -> None:
    assert list(row_table(years_of(changed(leave={"hold": None})))) == []
    bare = changed({"schema": 1, "leave": {"hold": 3}})
    assert list(row_table(years_of(bare))) == []
