"""What is typed into a form, and how inputs are shown there."""

import datetime
from dataclasses import replace
from typing import Any

import pytest

from workbench.deal.fresh import list_fields, new_deal, with_new_item, without_item
from workbench.files.deal_file import read_deal
from workbench.places import sample_deals
from workbench.session.typed import in_range, read_typed, shown, typed_value, unit_text
from workbench.text.entry import NotTaken, Taken

FLATS = read_deal(sample_deals() / "quillon-court-flats.deal")
PARADE = read_deal(sample_deals() / "weidenufer-parade.deal")


@pytest.mark.parametrize(
    ("path", "text", "value"),
    [
        ("purchase.price", "1.2m", Taken(1_200_000.0)),
        ("purchase.price", "12*950", Taken(11_400.0)),
        ("earn.vacancy.3", "4.5", Taken(0.045)),
        ("earn.vacancy.3", "4.5%", Taken(0.045)),
        ("leave.hold", "7", Taken(7.0)),
        ("purchase.closing_date", "2027-03-01", datetime.date(2027, 3, 1)),
        ("purchase.closing_date", "", None),
        ("property.name", " Elm ", " Elm "),
        ("leave.exit_yield", " ", None),
    ],
)
def test_what_is_typed(path: str, text: str, value: Any) -> None:
    assert read_typed(FLATS, path, text) == value


@pytest.mark.parametrize(
    ("path", "text", "reason"),
    [
        ("leave.hold", "7.5", "a whole number is needed here"),
        ("purchase.closing_date", "1.3.2027", "a date is written like 2027-01-31"),
        ("leave.selling_cost", "", "a value is needed here"),
    ],
)
def test_what_cannot_be_taken(path: str, text: str, reason: str) -> None:
    assert read_typed(FLATS, path, text) == NotTaken(reason)


def test_the_locale_of_the_deal_is_the_form_s() -> None:
    assert read_typed(PARADE, "purchase.price", "1.200,5") == Taken(1200.5)
    assert shown(PARADE, "purchase.price", 1200.5) == "1.200,5"
    assert shown(PARADE, "leave.exit_yield", 0.0625) == "6,25"


def test_how_inputs_are_shown() -> None:
    assert shown(FLATS, "leave.hold", 10) == "10"
    assert shown(FLATS, "property.year_built", 1987) == "1987"
    assert shown(FLATS, "purchase.closing_date", datetime.date(2027, 1, 2)) == "2027-01-02"
    assert shown(FLATS, "leave.amount", None) == ""
    assert typed_value(FLATS, "leave.hold", 7.0) == 7
    assert isinstance(typed_value(FLATS, "leave.hold", 7.0), int)


def test_ranges_and_units() -> None:
    assert in_range(FLATS, "earn.vacancy.1", 1.0)
    assert not in_range(FLATS, "earn.vacancy.1", 1.01)
    fee = next(one for one in FLATS.expenses if one.basis == "egi")
    assert not in_range(FLATS, f"expenses@{fee.id}.amount", 1.5)
    assert unit_text(FLATS, f"expenses@{fee.id}.amount") == "%"
    assert unit_text(FLATS, "purchase.price") == "USD"
    assert unit_text(FLATS, "spaces@s1.area") == "sq ft"


def test_new_items_get_new_ids() -> None:
    deal = with_new_item(with_new_item(new_deal(), "loans"), "blend")
    assert (deal.loans[0].id, deal.leave.blend[0].id, deal.next_id) == ("l3", "b4", 5)
    gone = without_item(deal, "loans@l3")
    assert (gone.loans, gone.next_id) == ((), 5)
    assert with_new_item(gone, "loans").loans[0].id == "l5"
    assert "amount" in list_fields("loans")
    assert replace(gone, leave=new_deal().leave, next_id=3) == new_deal()
