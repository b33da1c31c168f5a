"""Reported statements."""

from typing import Any

from tests.fullest import fullest, small
from tests.report.sections import changed, named, subheadings, tables, words, years_of
from workbench.deal.deal import Deal
from workbench.report.document import Section
from workbench.report.reported import statement_sections


def section_of(deal: Deal) -> Section:
    (section,) = statement_sections(years_of(deal))
    return section


def statement(*lines: dict[str, Any], **more: Any) -> Deal:
    return changed(statements=[{"id": "m22", "lines": list(lines), **more}])


def test_reported_adjusted_normalised_and_assumed_stand_side_by_side() -> None:
    section = section_of(fullest())
    (table,) = tables(section)
    assert [column.title for column in table.columns] == [
        "As the source calls it, USD", "Line here", "Reported", "Adjustment", "Normalised",
        "Year 1 here",
    ]  # fmt: skip
    assert table.rows[0] == ("Upkeep", "Repairs", "−5,200", "−800", "−6,000", "−3,960")
    assert table.notes[0] == "The owner painted."
    assert table.rows[-1] == ("Sum of the lines", "", "−5,200", "−800", "−6,000", "")
    assert subheadings(section) == ["Seller, 2025"]
    assert words(section) == ["Past year; Jan 1, 2025 to Dec 31, 2025; source: Typed page"]


def test_a_pro_forma_stands_beside_the_year_it_is_for() -> None:
    noi = {"id": "a23", "line": "noi", "amount": 90_000.0}
    (table,) = tables(section_of(statement(noi, kind="pro_forma", start="2029-03-01")))
    assert table.columns[-1].title == "Year 3 here"
    assert named(table, "Net operating income, reserves below")[-1] == "95,099"
    for start in ("2019-01-01", "2069-01-01"):
        (table,) = tables(section_of(statement(noi, start=start)))
        assert table.columns[-1].title == "Year 1 here"
    undated = changed(purchase={"closing_date": None}, statements=[{"id": "m22", "lines": [noi]}])
    (table,) = tables(section_of(undated))
    assert table.columns[-1].title == "Year 1 here"


def test_lines_that_this_deal_lacks_are_kept_as_they_are() -> None:
    lines = (
        {"id": "a23", "line": "ground_rent", "label": "Lease of land", "amount": -90.0},
        {"id": "a24", "line": "", "amount": None},
        {"id": "a25", "line": "value", "amount": 5.0},
    )
    (table,) = tables(section_of(statement(*lines)))
    assert named(table, "Lease of land")[1:] == ("ground_rent", "−90", "", "−90", "—")
    assert named(table, "—") == ("—", "—", "—", "", "—", "—")
    assert named(table, "Value on these assumptions")[-1] == "—", "a value has no years"
    assert named(table, "Sum of the lines")[2] == "—"


def test_a_statement_without_lines_source_or_dates() -> None:
    section = section_of(statement(kind="budget"))
    assert tables(section) == []
    assert subheadings(section) == ["Statement m22"]
    assert words(section) == ["Budget; source: not stated"]


def test_without_statements_there_is_no_such_section() -> None:
    assert statement_sections(years_of(small())) == ()
