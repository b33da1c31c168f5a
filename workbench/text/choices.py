"""What the choices of an input mean, in words, by the field's name and the value in the file."""

from collections.abc import Mapping

CHOICES: Mapping[str, Mapping[str, str]] = {
    "area_unit": {"m2": "square metres", "sqft": "square feet"},
    "timing": {
        "month_end": "end of each month",
        "month_start": "start of each month",
        "year_end": "end of each year",
        "mid_year": "middle of each year",
        "year_start": "start of each year",
    },
    "basis": {
        "amount": "amount",
        "price": "share of the price",
        "year": "whole property, a year",
        "unit": "each unit, a year",
        "area": "by area, a year",
        "egi": "share of effective gross income",
    },
    "reserves_basis": {
        "year": "whole property",
        "unit": "each unit",
        "area": "by area",
        "egi": "share of effective gross income",
    },
    "reserves_place": {
        "below": "below net operating income",
        "above": "above net operating income",
    },
    "reserves_use": {"spent": "spent", "account": "paid into an account"},
    "series": {"as_new": "buildings as new", "same_buildings": "the same buildings"},
    "price_series": {"as_new": "buildings as new", "same_buildings": "the same buildings"},
    "method": {
        "forward_noi": "income of the year after the sale ÷ yield",
        "trailing_noi": "income of the year before the sale ÷ yield",
        "perpetuity": "value of all later years",
        "price_per": "price per unit or area",
        "rent_multiple": "multiple of gross rent",
        "purchase_price": "purchase price, grown",
        "amount": "typed amount",
    },
    "exit_income": {"modelled": "as modelled", "stabilised": "stabilised"},
    "price_per_of": {"unit": "unit", "area": "area"},
    "kind": {
        "past_year": "past year",
        "trailing_twelve_months": "trailing twelve months",
        "budget": "budget",
        "pro_forma": "pro forma",
        "actual": "actual",
        "rent": "letting",
        "sale": "sale",
    },
    "per": {"month": "a month", "year": "a year"},
    "of": {"unit": "unit", "area": "area"},
}


def choice(field: str, value: str) -> str:
    """A choice in words; the value itself where it needs none, as for a locale's code."""
    return CHOICES.get(field, {}).get(value, value)
