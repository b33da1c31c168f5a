"""The statement by year."""

from tests.fullest import fullest, small
from tests.report.sections import changed, line, words, year_tables, years_of
from workbench.deal.deal import Deal
from workbench.report.document import Figure
from workbench.report.statement import statement_rows, statement_section


def labels(deal: Deal) -> list[str]:
    return [row.label.strip() for row in statement_rows(years_of(deal))]


def test_all_lines_in_order_with_what_they_are_made_of() -> None:
    assert labels(fullest()) == [
        "Rent in hand",
        "Rent expected",
        "Empty time",
        "Concessions",
        "Other income",
        "Sign",
        "Laundry",
        "Vacancy allowance",
        "Credit loss",
        "Effective gross income",
        "Repairs",
        "Management",
        "Insurance",
        "Operating expenses",
        "Net operating income, reserves below",
        "Reserves",
        "Works net of the reserve account",
        "Net cash flow before debt",
        "Debt service",
        "Loans repaid at maturity",
        "Cash flow after debt",
        "Reserve balance at the year’s end",
    ]


def test_reserves_above_are_deducted_before_net_operating_income() -> None:
    found = labels(changed(spend={"reserves_place": "above"}))
    assert found.index("Reserves") < found.index("Net operating income, reserves above")


def test_signs_and_sums() -> None:
    (table,) = year_tables(statement_section(years_of(fullest()), 491))
    assert line(table, "Effective gross income").cells[0] == "102,770"
    assert line(table, "Operating expenses").cells[0] == "−13,199"
    assert line(table, "Net operating income, reserves below").cells[0] == "89,572"
    assert [found.label for found in table.lines if found.strong] == [
        "Effective gross income",
        "Operating expenses",
        "Net operating income, reserves below",
        "Net cash flow before debt",
        "Cash flow after debt",
    ]


def test_one_other_income_is_its_own_sum() -> None:
    one = changed(other_income=[{"id": "i14", "name": "Sign", "amount": 600.0}])
    assert "Sign" not in labels(one)


def test_its_picture_says_itself_in_words() -> None:
    section = statement_section(years_of(small()), 491)
    (figure,) = (block for block in section.blocks if isinstance(block, Figure))
    assert figure.picture.width == 491
    assert figure.caption == figure.picture.words
    assert "there is no debt service" in figure.caption
    assert "Amounts are signed as they add up: what is deducted is negative." in words(section)
