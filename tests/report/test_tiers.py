"""The tiers by year."""

from tests.fullest import fullest, small_raw
from tests.report.sections import changed, line, read_of, words, year_tables, years_of
from workbench.report.tiers import tier_section


def test_cash_by_tier_adds_up_to_net_cash_flow() -> None:
    years = years_of(fullest())
    (section,) = tier_section(years, read_of(years), 491)
    (table,) = year_tables(section)
    assert line(table, "In hand, as it falls").cells[0] == "22,738"
    assert line(table, "Expected, as it falls").cells[0] == "64,734"
    assert line(table, "Net cash flow before debt").cells[0] == "87,472"
    assert 22_738 + 64_734 == 87_472


def test_present_values_add_up_to_the_tiers_of_the_first_page() -> None:
    years = years_of(fullest())
    read = read_of(years)
    for tier in ("in_hand", "expected"):
        by_year = years.line(f"value_{tier}_of_year")
        total = read.number(f"tiers.{tier}")
        assert total is not None
        assert abs(sum(value or 0.0 for value in by_year) - total) < 1e-6
    (section,) = tier_section(years, read, 491)
    assert words(section)[1] == (
        "Brought back at a required return of 8.0% to 8.5% by year, the years add up to 101,552 in "
        "hand and 551,001 expected; with 679,939 for the exit that is the value, 1,332,492."
    )


def test_without_a_hold_there_is_no_such_section() -> None:
    years = years_of(changed(small_raw(), leave={"hold": None}))
    assert tier_section(years, read_of(years), 491) == ()
