"""Comparables as entered."""

from tests.fullest import fullest, small
from tests.report.sections import changed, subheadings, tables, voice_of
from workbench.report.comparables import comparable_sections


def test_lettings_and_sales_have_a_table_each() -> None:
    letting = {
        "id": "q30", "kind": "rent", "date": "2026-02-17", "place": "Next door", "area": 88.0,
        "rent": {"amount": 19.5, "per": "month", "of": "area"}, "source": "Lease seen",
    }  # fmt: skip
    sale = {
        "id": "q31", "kind": "sale", "date": "2026-03-10", "place": "Two streets away",
        "area": 480.0, "price": 990_000.0, "noi": 66_000.0, "noi_basis": "Before reserves",
    }  # fmt: skip
    deal = changed(comparables=[sale, letting])
    (section,) = comparable_sections(voice_of(deal))
    assert subheadings(section) == ["Lettings", "Sales"]
    lettings, sales = tables(section)
    assert lettings.rows == (
        ("Feb 17, 2026", "Next door", "88\u00a0m²", "19.50 per m² a month", "Lease seen"),
    )
    assert sales.rows == (
        (
            "Mar 10, 2026", "Two streets away", "480\u00a0m²", "990,000", "66,000", "6.67%",
            "not stated",
        ),
    )  # fmt: skip
    assert sales.notes == ("Before reserves",)


def test_what_is_missing_is_a_dash() -> None:
    deal = changed(comparables=[{"id": "q30", "kind": "sale"}])
    (section,) = comparable_sections(voice_of(deal))
    (table,) = tables(section)
    assert table.rows == (("—", "—", "—", "—", "—", "—", "not stated"),)


def test_without_comparables_there_is_no_such_section() -> None:
    assert comparable_sections(voice_of(small())) == ()
    assert comparable_sections(voice_of(fullest())) != ()
