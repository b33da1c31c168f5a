"""Rents as entered."""

import pytest

from tests.fullest import fullest, small
from tests.report.sections import changed, voice_of
from workbench.deal.earn import Rent
from workbench.report.rents import comparable, one_unit, rent_text, rent_unit, yearly

AREA = Rent(12.0, "month", "area")
UNIT = Rent(1150.0, "month", "unit")


def test_rents_in_words() -> None:
    voice = voice_of(fullest())
    assert rent_text(voice, Rent(19.5, "month", "area")) == "19.50 per m² a month"
    assert rent_text(voice, Rent(24_000.0, "year", "unit")) == "24,000 per unit a year"
    assert rent_text(voice, Rent()) == "—"
    feet = changed(conventions={"area_unit": "sqft"})
    assert rent_unit(voice_of(feet), AREA) == "per sq ft a month"


def test_one_unit_where_all_have_the_same() -> None:
    assert one_unit([AREA, Rent(9.0, "month", "area"), Rent(None, "year", "unit")]) == AREA
    assert one_unit([AREA, UNIT]) is None
    assert one_unit([]) is None


def test_rent_of_a_whole_space_a_year() -> None:
    assert yearly(small().spaces[0], small().spaces[0].market_rent) == 8 * 1150 * 12
    shop = fullest().spaces[0]
    assert yearly(shop, shop.market_rent) == pytest.approx(120 * 240)
    assert yearly(shop, Rent()) is None


def test_rents_are_made_comparable() -> None:
    assert comparable(Rent(12.0, "month", "area"), None, Rent(None, "year", "area")) == 144
    assert comparable(Rent(1200.0, "month", "unit"), 60.0, Rent(None, "month", "area")) == 20
    assert comparable(Rent(20.0, "month", "area"), 60.0, Rent(None, "month", "unit")) == 1200
    assert comparable(Rent(1200.0, "month", "unit"), None, Rent(None, "month", "area")) is None
    assert comparable(Rent(), 60.0, AREA) is None
