"""Columns of the rent roll."""

from datetime import date
from typing import Any

import pytest

from tests.fullest import fullest, fullest_raw, rent
from tests.report.sections import changed, voice_of
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease
from workbench.deal.purchase import Purchase
from workbench.report.roll_columns import roll_columns, runs_at_closing


def titles(deal: Deal) -> list[str]:
    return [one.column.title for one in roll_columns(voice_of(deal))]


def with_rents(shop: dict[str, Any], flats: dict[str, Any]) -> Deal:
    raw = fullest_raw()
    first, second = raw["spaces"]
    first["market_rent"] = shop
    second["market_rent"] = second["leases"][0]["rent"] = flats
    for lease in first["leases"]:
        lease["rent"] = shop
    return changed(raw)


def cells(deal: Deal, start: str) -> list[str]:
    """The cells of the first column whose title begins so, of the first lease of each space."""
    found = next(one for one in roll_columns(voice_of(deal)) if one.column.title.startswith(start))
    return [found.cell(space, space.leases[0]) for space in deal.spaces]


def test_one_measure_stands_in_the_title_and_amounts_line_up() -> None:
    deal = with_rents(rent(20.5), rent(1150.0))
    assert "Rent per unit a month" in titles(deal)
    assert cells(deal, "Rent per") == ["20.50", "1,150.00"]


def test_several_measures_stand_in_the_cells() -> None:
    deal = with_rents(rent(240.5, "year", "area"), rent(1150.0))
    assert "Rent" in titles(deal)
    assert cells(deal, "Market rent") == ["240.50\nper m² a year", "1,150\nper unit a month"]


def test_long_amounts_a_year_are_in_thousands() -> None:
    deal = with_rents(rent(9e9), rent(1150.0))
    assert "Rent a year, USD thousand" in titles(deal)
    assert cells(deal, "Rent a year") == ["108,000,000", "83"]


def test_a_missing_rent_is_a_dash_and_its_sum_too() -> None:
    raw = fullest_raw()
    raw["spaces"][1]["market_rent"] = {}
    deal = changed(raw)
    assert cells(deal, "Market rent") == ["240\nper m² a year", "—"]
    assert roll_columns(voice_of(deal))[-1].total == "—"


def test_dates_only_where_a_lease_has_them() -> None:
    raw = fullest_raw()
    raw["spaces"] = raw["spaces"][1:]
    assert {"Start", "End"}.isdisjoint(titles(changed(raw, other_income=[])))
    assert {"Start", "End"} <= set(titles(fullest()))


@pytest.mark.parametrize(
    ("start", "end", "break_date", "runs"),
    [
        (date(2026, 1, 1), date(2028, 1, 1), None, True),
        (date(2027, 1, 1), date(2028, 1, 1), None, True),
        (date(2027, 1, 2), date(2028, 1, 1), None, False),
        (date(2020, 1, 1), date(2026, 12, 31), None, False),
        (date(2020, 1, 1), date(2030, 1, 1), date(2026, 6, 1), False),
        (None, None, None, True),
    ],
)
def test_which_leases_run_at_closing(
    start: date | None, end: date | None, break_date: date | None, runs: bool
) -> None:
    deal = Deal(purchase=Purchase(closing_date=date(2027, 1, 1)))
    assert runs_at_closing(deal, Lease("e1", start=start, end=end, break_date=break_date)) == runs
