"""Currencies of ISO 4217; minor units as the standard's list one gives them."""

import re

import pytest

from workbench.text.currency import CURRENCIES, find_currency


@pytest.mark.parametrize(
    ("code", "digits"),
    [("USD", 2), ("EUR", 2), ("JPY", 0), ("KRW", 0), ("KWD", 3), ("TND", 3), ("CLF", 4)],
)
def test_minor_units(code: str, digits: int) -> None:
    assert CURRENCIES[code].digits == digits


def test_codes_are_three_capitals_each_listed_once() -> None:
    assert all(re.fullmatch("[A-Z]{3}", code) for code in CURRENCIES)
    counts = [sum(c.digits == digits for c in CURRENCIES.values()) for digits in (0, 2, 3, 4)]
    assert counts == [17, 139, 7, 2]


def test_finding_a_currency() -> None:
    found = find_currency("EUR")
    assert found is not None
    assert found.sign == "€"
    assert find_currency("eur") is None
    assert find_currency("XYZ") is None


def test_a_currency_without_a_sign_shows_its_code() -> None:
    assert CURRENCIES["KES"].sign == "KES"
