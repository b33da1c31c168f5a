"""Comparables beside assumptions."""

from typing import Any

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed, read_of, tables, voice_of, years_of
from workbench.deal.deal import Deal
from workbench.deal.records import Comparable
from workbench.report.evidence import evidence_section, sale_yield


def rows(deal: Deal) -> tuple[tuple[str, ...], ...]:
    (table,) = tables(evidence_section(read_of(years_of(deal)), voice_of(deal)))
    return table.rows


def letting(identity: str, amount: float, area: float | None = None, **more: Any) -> dict[str, Any]:
    rent = {"amount": amount, "per": "month", "of": "unit"}
    return {"id": identity, "kind": "rent", "rent": rent, "area": area, **more}


def test_number_range_and_sources_stand_beside_the_assumption() -> None:
    sales = [
        {"id": "q24", "kind": "sale", "income_yield": 0.0667, "source": "Deed record"},
        {"id": "q25", "kind": "sale", "noi": 50_000.0, "price": 1e6, "source": "Deed record"},
        {"id": "q26", "kind": "sale", "income_yield": 0.07},
    ]
    assert rows(changed(comparables=sales))[1] == (
        "Exit yield", "7.0%", "3", "5.00% to 7.00%", "Deed record; no source",
    )  # fmt: skip


def test_rents_are_compared_by_area_where_areas_are_known() -> None:
    found = rows(changed(comparables=[letting("q24", 1200.0, 60.0, source="Letter")]))[0]
    assert found == (
        "Market rent per m² a year", "220.80 to 240.00", "1", "240", "Letter",
    )  # fmt: skip


def test_rents_are_compared_by_unit_where_no_area_is_known() -> None:
    deal = changed(small_raw(), comparables=[letting("q9", 1100.0), letting("q8", 1200.0)])
    assert rows(deal)[0] == (
        "Market rent per unit a month", "1,150", "2", "1,100 to 1,200", "no source",
    )  # fmt: skip


def test_those_that_cannot_be_compared_are_counted_apart() -> None:
    found = rows(changed(comparables=[letting("q24", 1200.0), letting("q25", 1200.0, 60.0)]))[0]
    assert found[2:4] == ("1 of 2 that can be compared", "240")
    none = rows(changed(comparables=[letting("q24", 1200.0)]))[0]
    assert none[2:] == ("0 of 1 that can be compared", "—", "")


def test_no_evidence_is_said_to_be_none() -> None:
    assert [row[2] for row in rows(small())] == ["none entered", "none entered"]
    assert rows(Deal())[0][:2] == ("Market rent per unit a month", "—")


def test_an_exit_without_a_yield_names_the_one_it_comes_to() -> None:
    deal = changed(small_raw(), leave={"method": "amount", "amount": 1e6})
    assert rows(deal)[1][:2] == ("Yield that the exit price comes to", "6.69%")


def test_the_yield_of_a_sale() -> None:
    assert sale_yield(Comparable("q1", "sale", income_yield=0.05, noi=9.0, price=100.0)) == 0.05
    assert sale_yield(Comparable("q1", "sale", noi=9.0, price=100.0)) == 0.09
    assert sale_yield(Comparable("q1", "sale", noi=9.0)) is None
    assert sale_yield(Comparable("q1", "sale", price=9.0)) is None
    assert fullest().comparables[0].income_yield == 0.0667
