"""Measures and what they mean."""

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed, line, named, read_of, tables, year_tables, years_of
from workbench.deal.deal import Deal
from workbench.report.definitions import definition_section
from workbench.report.document import Section


def section_of(deal: Deal) -> Section:
    years = years_of(deal)
    return definition_section(years, read_of(years))


def test_each_measure_has_its_value_and_its_own_definition() -> None:
    (table,) = tables(section_of(fullest()))
    assert named(table, "IRR, unlevered") == (
        "IRR, unlevered",
        "9.04%",
        "The yearly rate at which all flows, at their dates, are together worth nothing today.",
    )
    assert named(table, "Equity multiple, levered")[1] == "2.41×"
    assert named(table, "Payback, years")[1] == "10.0"
    assert named(table, "Margin")[1] == "42,492"
    labels = [row[0] for row in table.rows]
    assert len(labels) == len(set(labels))


def test_the_share_of_the_exit_has_its_hold_and_reference_beside_it() -> None:
    (table,) = tables(section_of(fullest()))
    assert named(table, "Exit-value share")[2] == (
        "Present value of the net exit ÷ value. Hold 10 years; reference share 55.3%."
    )


def test_measures_by_year_are_given_at_their_lowest() -> None:
    (table,) = tables(section_of(fullest()))
    found = named(table, "Debt service cover on net cash flow, lowest")
    assert found[1] == "1.52×"
    assert found[2].endswith("Lowest in year 4.")


def test_cash_on_cash_by_year() -> None:
    (table,) = year_tables(section_of(fullest()))
    assert line(table, "Cash on cash").cells[0] == "8.1%", "48,971 ÷ 601,500"


def test_measures_of_debt_need_a_loan() -> None:
    (table,) = tables(section_of(small()))
    labels = " ".join(row[0] for row in table.rows)
    assert "Debt" not in labels
    assert "levered" not in labels.replace("unlevered", "")


def test_what_cannot_be_given_is_a_dash() -> None:
    section = section_of(changed(small_raw(), leave={"hold": None}))
    (table,) = tables(section)
    assert named(table, "Cash on cash, lowest")[1:] == (
        "—",
        "Cash flow after debt of the year ÷ cash to close.",
    )
    assert year_tables(section) == []
