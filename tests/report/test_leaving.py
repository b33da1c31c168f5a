"""How the exit was derived."""

from typing import Any

import pytest

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed, named, tables, words, years_of
from tests.report.wholes import every_method_raw
from workbench.deal.deal import Deal
from workbench.files.deal_file import deal_from_raw
from workbench.report.document import Table
from workbench.report.leaving import exit_section
from workbench.report.leaving_prices import part_prices


def table_of(deal: Deal) -> Table:
    (table,) = tables(exit_section(years_of(deal)))
    return table


def steps(deal: Deal) -> dict[str, str]:
    return {row[0]: row[1] for row in table_of(deal).rows}


def priced(method: str, **leave: Any) -> dict[str, str]:
    return steps(changed(small_raw(), leave={"method": method, **leave}))


def test_from_income_to_present_value() -> None:
    found = steps(small())
    assert found["By the income of the year after the sale ÷ yield"] == ""
    assert found["Effective gross income, year 11"] == "104,880"
    assert found["Operating expenses, year 11"] == "−38,000"
    assert found["Net operating income, reserves below, year 11, as modelled"] == "66,880"
    assert found["Capitalised income"] == "66,880"
    assert found["Exit yield"] == "7.0%"
    assert found["Price"] == "955,429", "66,880 ÷ 0.07"
    assert found["Selling cost, 0.0% of the exit price"] == "0"
    assert found["Net exit"] == "955,429"
    assert found["Discount factor"] == "0.4632", "1.08^−10"
    assert found["Present value of the net exit"] == "442,548", "955,428.57 × 0.46319"


def test_selling_cost_and_reserve_balance_lead_from_price_to_net_exit() -> None:
    found = steps(fullest())
    parts = ("Exit price, blended", "Selling cost, 3.0% of the exit price")
    price, cost = (int(found[label].replace(",", "").replace("−", "-")) for label in parts)
    balance = int(found["Reserve balance, comes back"].replace(",", ""))
    assert found["Net exit"] == f"{price + cost + balance + 1:,}", "each rounded for itself"
    assert cost == round(-0.03 * price)


def test_each_part_of_a_blend_has_its_own_steps_and_price() -> None:
    table = table_of(fullest())
    labels = [row[0] for row in table.rows]
    headings = [label for label in labels if label.startswith("By the ")]
    assert headings == [
        "By the income of the year after the sale ÷ yield, 60.0% of the blend",
        "By the price per unit or area, 20.0% of the blend",
        "By the multiple of gross rent, 10.0% of the blend",
        "By the typed amount, 10.0% of the blend",
    ]
    prices = [row[1] for row in table.rows if row[0] == "Price"]
    assert prices == ["1,590,371", "1,791,922", "1,472,839", "1,500,000"]
    blended = labels.index("Exit price, blended")
    assert table.notes[blended] == (
        "60.0% × 1,590,371 + 20.0% × 1,791,922 + 10.0% × 1,472,839 + 10.0% × 1,500,000"
    )


def test_prices_of_the_parts_come_to_the_exit_price_at_their_weights() -> None:
    for deal in (fullest(), deal_from_raw(every_method_raw())):
        years = years_of(deal)
        prices = part_prices(years.result, years.count)
        weights = [part.weight for part in deal.leave.blend]
        whole = sum((w or 0) * (p or 0) for w, p in zip(weights, prices, strict=True))
        assert whole == pytest.approx(years.result.figure("exit_price"), rel=1e-12)


def test_stabilised_income_stands_beside_that_of_the_model() -> None:
    found = steps(fullest())
    assert found["Net operating income, reserves below, year 11, as modelled"] == "111,542"
    assert found["Net operating income, stabilised, year 11"] == "111,326"
    assert found["Stabilised vacancy"] == "5.0%"
    assert found["Leases above or below market"] == "0"
    table = table_of(fullest())
    place = [row[0] for row in table.rows].index("Net operating income, stabilised, year 11")
    assert table.notes[place].startswith("stabilised effective gross income less expenses")


def test_trailing_income_is_that_of_the_last_year() -> None:
    found = priced("trailing_noi")
    assert found["Effective gross income, year 10"] == "104,880"
    assert "Effective gross income, year 11" not in found


def test_reserves_above_stand_in_the_income() -> None:
    found = steps(changed(small_raw(), spend={"reserves": 900.0, "reserves_place": "above"}))
    assert found["Reserves, year 11"] == "−900"
    assert found["Net operating income, reserves above, year 11, as modelled"] == "65,980"


def test_a_perpetuity_says_its_lasting_growth() -> None:
    found = priced("perpetuity")
    assert found["Lasting growth"] == "0.0%"
    assert found["Required return of year 41 and after"] == "8.0%"
    assert found["Value of all later years"] == found["Price"]
    table = table_of(changed(small_raw(), leave={"method": "perpetuity"}))
    place = [row[0] for row in table.rows].index("Lasting growth")
    assert table.notes[place].startswith("growth of market rent from year 41 to 42")


def test_price_per_unit_and_per_area() -> None:
    found = priced("price_per", price_per=100_000.0)
    assert found["Units"] == "8"
    assert found["Index of price at the sale"] == "1.0000"
    assert found["Price"] == "800,000"
    raw = small_raw()
    raw["spaces"][0]["area"] = 50.0
    raw["leave"] |= {"method": "price_per", "price_per": 2_000.0, "price_per_of": "area"}
    assert steps(deal_from_raw(raw))["Area of all units"] == "400\u00a0m²"


def test_other_methods() -> None:
    assert priced("purchase_price")["Price paid"] == "900,000"
    assert priced("amount", amount=1_000_000.0)["Price"] == "1,000,000"
    multiple = priced("rent_multiple", rent_multiple=9.0)
    assert multiple["Gross rent of the year, year 11"] == "110,400"
    assert multiple["Multiple"] == "9.0×"
    assert multiple["Price"] == "993,600"


def test_without_a_price_the_reason_is_given() -> None:
    section = exit_section(years_of(changed(small_raw(), leave={"exit_yield": None})))
    (said,) = words(section)
    assert said.startswith("The sale has no price. Waits for an input. Exit yield:")
    (table,) = tables(section)
    assert named(table, "Price")[1] == named(table, "Net exit")[1] == "—"
    missing = priced("rent_multiple")
    assert missing["Multiple"] == missing["Selling cost, 0.0% of the exit price"] == "—"


def test_without_a_hold_there_is_no_sale() -> None:
    section = exit_section(years_of(changed(small_raw(), leave={"hold": None})))
    assert words(section) == ["The hold is not known, so there is no sale."]


def test_a_derivation_of_one_method_is_kept_on_one_page() -> None:
    assert table_of(small()).whole
    assert not table_of(deal_from_raw(every_method_raw())).whole
