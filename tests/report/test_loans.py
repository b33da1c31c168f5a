"""Loans by year."""

from tests.fullest import fullest, small
from tests.report.sections import (
    changed,
    line,
    subheadings,
    words,
    year_tables,
    years_of,
)
from workbench.deal.deal import Deal
from workbench.report.document import Section
from workbench.report.loans import loan_section

LOAN = {"id": "l21", "name": "Bank", "amount": 600_000.0, "rate": {"1": 0.06}, "term_months": 36}


def section_of(deal: Deal) -> Section:
    (section,) = loan_section(years_of(deal), 491)
    return section


def test_a_balance_is_opened_paid_and_closed_year_by_year() -> None:
    loan, _ = year_tables(section_of(fullest()))
    opening = line(loan, "Owed at the year’s start").cells
    closing = line(loan, "Owed at the year’s end").cells
    assert opening[0] == "700,000"
    assert opening[1:] == closing[:-1]
    assert line(loan, "Interest").cells[0] == "38,500", "5.5 % of 700,000, interest only"
    assert line(loan, "Principal").cells[0] == "0"
    assert line(loan, "Debt service").strong


def test_cover_and_debt_yield_stand_below() -> None:
    *_, cover = year_tables(section_of(fullest()))
    assert line(cover, "DSCR on NOI").cells[0] == "2.33", "89,572 ÷ 38,500"
    assert line(cover, "DSCR on net cash flow").cells[0] == "2.27", "87,472 ÷ 38,500"
    assert line(cover, "Debt yield").cells[0] == "12.8%", "89,572 ÷ 700,000"


def test_tables_end_with_the_year_of_repayment_and_say_so() -> None:
    section = section_of(changed(loans=[LOAN]))
    loan, cover = year_tables(section)
    assert len(loan.years) == len(cover.years) == 3
    assert line(loan, "Repayment at maturity").cells == ("0", "0", "600,000")
    assert words(section).count("Nothing is owed after year 3.") == 2


def test_several_loans_have_a_table_each_and_their_sum() -> None:
    other = LOAN | {"id": "l22", "name": "", "term_months": 600}
    section = section_of(changed(loans=[LOAN, other]))
    assert subheadings(section) == ["Loan under price", "Bank", "Loan l22", "Cover and debt yield"]
    *_, cover = year_tables(section)
    assert line(cover, "All loans, owed at the year’s end").cells[0] == "1,200,000"


def test_without_a_loan_or_a_hold_there_is_no_such_section() -> None:
    for deal in (small(), changed(leave={"hold": None})):
        assert loan_section(years_of(deal), 491) == ()
