"""Texts of the rent roll read into values, and headings of pasted tables."""

from datetime import date

import pytest

from tests.engine.deals import deal
from workbench.deal.deal import Deal
from workbench.deal.earn import Rent
from workbench.deal.property import Conventions
from workbench.text.entry import NotTaken
from workbench.text.locale import LOCALES
from workbench.ui.roll.columns import COLUMNS, columns_named
from workbench.ui.roll.dates import read_day
from workbench.ui.roll.values import choices, edited, read_cell, shown

BY_FIELD = {column.field: column for column in COLUMNS}
SQFT = deal(conventions=Conventions(area_unit="sqft"))
EURO = deal(conventions=Conventions(currency="EUR", locale="de-DE"))


@pytest.mark.parametrize(
    ("text", "code", "day"),
    [
        ("2027-03-04", "en-US", date(2027, 3, 4)),
        ("3/4/2027", "en-US", date(2027, 3, 4)),
        ("3/4/2027", "en-GB", date(2027, 4, 3)),
        ("4.3.2027", "de-DE", date(2027, 3, 4)),
        ("2027/3/4", "ja-JP", date(2027, 3, 4)),
        ("2027/3/4", "en-GB", date(2027, 3, 4)),
        ("4 Mar 2027", "de-DE", date(2027, 3, 4)),
        ("March 4, 2027", "en-US", date(2027, 3, 4)),
        ("2027 Sept 4", "sv-SE", date(2027, 9, 4)),
    ],
)
def test_days(text: str, code: str, day: date) -> None:
    assert read_day(text, LOCALES[code]) == day


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("31.2.2027", "There is no such day."),
        ("1.2.27", "The year of a date is written with four digits."),
        ("tomorrow", "A date is written like 2027-01-31 or 31.01.2027."),
        ("1 Ja 2027", "A date is written like 2027-01-31 or 31.01.2027."),
        ("Mar May 2027", "A date is written like 2027-01-31 or 31.01.2027."),
        ("0.0.0000", "There is no such day."),
        ("", "A date is written like 2027-01-31 or 31.01.2027."),
    ],
)
def test_no_days(text: str, words: str) -> None:
    assert read_day(text, LOCALES["de-DE"]) == NotTaken(words)


@pytest.mark.parametrize(
    ("text", "base", "rent"),
    [
        ("month", deal(), Rent(5.0, "month", "unit")),
        ("m2/month", deal(), Rent(5.0, "month", "area")),
        ("per m² a year", deal(), Rent(5.0, "year", "area")),
        ("unit", deal(), Rent(5.0, "year", "unit")),
        ("sq ft/year", SQFT, Rent(5.0, "year", "area")),
        ("psf", SQFT, Rent(5.0, "year", "area")),
        ("", deal(), Rent(5.0, "year", "unit")),
    ],
)
def test_how_rents_are_counted(text: str, base: Deal, rent: Rent) -> None:
    assert read_cell(BY_FIELD["rent"], text, Rent(5.0), base) == rent


@pytest.mark.parametrize("text", ["week", "sq ft/year", "month/year", "unit m²", "12"])
def test_how_rents_are_not_counted(text: str) -> None:
    words = "A rent is counted by one of unit/month, unit/year, m²/month, m²/year."
    assert read_cell(BY_FIELD["rent"], text, Rent(5.0), deal()) == NotTaken(words)


def test_every_choice_reads_back() -> None:
    for base in (deal(), SQFT):
        for text in choices(base):
            rent = read_cell(BY_FIELD["rent"], text, Rent(5.0), base)
            assert shown(BY_FIELD["rent"], rent, base) == text


@pytest.mark.parametrize(
    ("field", "text", "base", "value"),
    [
        ("rent.amount", "$1,200", deal(), 1200.0),
        ("rent.amount", "USD 1,200.50", deal(), 1200.5),
        ("rent.amount", "1.200,50 €", EURO, 1200.5),
        ("rent.amount", "12*950", deal(), 11400.0),
        ("rent.amount", "-$5", deal(), -5.0),
        ("area", "85 m²", deal(), 85.0),
        ("area", "1,200 sq ft", SQFT, 1200.0),
        ("count", "12", deal(), 12),
        ("free_months", "", deal(), 0),
        ("count", "", deal(), None),
        ("start", "", deal(), None),
        ("tenant", "  Two \n words ", deal(), "Two words"),
    ],
)
def test_cells(field: str, text: str, base: Deal, value: object) -> None:
    read = read_cell(BY_FIELD[field], text, None, base)
    assert read == value
    assert type(read) is type(value)


def test_a_currency_that_is_not_the_deals_is_not_taken() -> None:
    assert isinstance(read_cell(BY_FIELD["rent.amount"], "€5", None, deal()), NotTaken)


def test_what_is_edited_reads_back() -> None:
    for base in (deal(), EURO):
        for field, value in (
            ("rent.amount", 1234567.891),
            ("area", 0.1),
            ("start", date(2027, 3, 4)),
            ("count", 12000),
        ):
            column = BY_FIELD[field]
            assert read_cell(column, edited(column, value, base), None, base) == value


def test_headings_of_pasted_tables() -> None:
    assert columns_named(("Tenant", "Area (m²)", "Deposit")) == [6, 3, None]
    assert columns_named(("Flat 1", "retail", "2", "")) is None
    assert columns_named(("Rent", "a", "b", "Tenant")) is None
