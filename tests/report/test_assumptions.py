"""Assumptions one by one."""

from typing import Any

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed, subheadings, tables, years_of
from workbench.deal.deal import Deal
from workbench.report.assumptions import assumption_section


def singles(deal: Deal) -> dict[str, tuple[str, str]]:
    left, right = tables(assumption_section(years_of(deal)))[:2]
    return {row[0]: (row[1], row[2]) for row in (*left.rows, *right.rows)}


def left_by(method: str, **leave: Any) -> dict[str, tuple[str, str]]:
    return singles(changed(small_raw(), leave={"method": method, **leave}))


def test_inputs_stand_under_their_sections_with_value_and_default() -> None:
    found = singles(fullest())
    assert found["Price"] == ("1,250,000", "")
    assert found["Timing of property flows"] == ("end of each month", "default")
    assert found["Reserves stand"] == ("below net operating income", "default")
    assert found["Stabilised vacancy"] == ("5.0%", "")
    left, right = tables(assumption_section(years_of(fullest())))[:2]
    assert [left.rows[place][0] for place in sorted(left.strong)] == [
        "Conventions", "Purchase", "Income",
    ]  # fmt: skip
    assert [right.rows[place][0] for place in sorted(right.strong)] == ["Costs", "Exit", "Returns"]


def test_rows_that_were_left_alone_stand_here_and_typed_ones_by_year() -> None:
    assert singles(small())["Market rent growth"] == ("0.0%", "default")
    assert "Market rent growth" not in singles(fullest())


def test_needed_inputs_are_named_even_where_they_are_missing() -> None:
    found = singles(Deal())
    assert found["Price"] == ("—", "")
    assert found["Vacancy allowance"] == ("—", "")


def test_only_what_has_a_part_in_the_exit_is_named() -> None:
    assert "Exit method" not in singles(fullest()), "there is a blend"
    assert "Multiple of gross rent" in singles(fullest())
    found = left_by("amount", amount=5e5)
    assert found["Exit price"] == ("500,000", "")
    assert {"Exit yield", "Exit income", "Price growth", "Per"}.isdisjoint(found)
    assert "Price growth" in left_by("purchase_price")
    assert {"Price per unit or area today", "Per"} <= set(left_by("price_per", price_per=9.0))


def test_details_of_reserves_need_reserves() -> None:
    assert "Reserves stand" not in singles(small())
    assert "Reserves stand" in singles(changed(small_raw(), spend={"reserves_opening": 5.0}))


def test_year_rows_first_then_single_ones_then_lists() -> None:
    assert subheadings(assumption_section(years_of(fullest()))) == [
        "By year",
        "Single assumptions",
        "Purchase costs",
        "Other income",
        "Expenses",
        "Dated works",
        "Loans",
        "Blend of exit methods",
    ]
