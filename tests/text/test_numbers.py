"""The one rounding and formatting policy."""

from datetime import date
from math import inf, nan

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.text import numbers
from workbench.text.currency import CURRENCIES
from workbench.text.entry import Taken, parse_number
from workbench.text.locale import LOCALES

US, DE, IN, JP = (LOCALES[code] for code in ("en-US", "de-DE", "en-IN", "ja-JP"))


@pytest.mark.parametrize("missing", [None, nan, inf, -inf])
def test_what_is_missing_is_an_em_dash(missing: float | None) -> None:
    shown = [
        numbers.number(missing, US),
        numbers.trimmed(missing, US),
        numbers.money(missing, US),
        numbers.priced(missing, US, CURRENCIES["USD"]),
        numbers.compact(missing, US),
        numbers.percent(missing, US),
        numbers.rate(missing, US),
        numbers.multiple(missing, US),
    ]
    assert set(shown) == {"—"}
    assert numbers.area(None, US, "m²") == "—"
    assert numbers.day(None, US) == "—"


@pytest.mark.parametrize(
    ("value", "digits", "expected"),
    [
        (0.5, 0, "1"),
        (-0.5, 0, "−1"),
        (2.5, 0, "3"),
        (2.675, 2, "2.68"),
        (1.005, 2, "1.01"),
        (-0.4, 0, "0"),
        (-0.0, 0, "0"),
        (999.5, 0, "1,000"),
        (-3200000, 0, "−3,200,000"),
    ],
)
def test_rounding_is_half_away_from_zero_and_minus_is_the_sign(
    value: float, digits: int, expected: str
) -> None:
    assert numbers.number(value, US, digits) == expected


def test_indian_grouping() -> None:
    assert [numbers.number(10.0**power, IN) for power in (2, 3, 5, 7)] == [
        "100",
        "1,000",
        "1,00,000",
        "1,00,00,000",
    ]


def test_money_counts_in_its_scale() -> None:
    assert numbers.money(3807783, US) == "3,807,783"
    assert numbers.money(3807783, US, numbers.THOUSAND) == "3,808"
    assert numbers.money(3807783, US, numbers.MILLION, 2) == "3.81"


def test_money_with_its_currency() -> None:
    dollar, euro, krona = CURRENCIES["USD"], CURRENCIES["EUR"], CURRENCIES["KES"]
    assert numbers.priced(-1200, US, dollar) == "USD\u00a0−1,200"
    assert numbers.priced(-1200, US, dollar, by_sign=True) == "−$1,200"
    assert numbers.priced(1200, LOCALES["nl-NL"], euro, by_sign=True) == "€\u00a01.200"
    assert numbers.priced(-1200, DE, euro, by_sign=True) == "−1.200\u00a0€"
    assert numbers.priced(1200, DE, krona, by_sign=True) == "KES\u00a01.200"
    assert numbers.priced(12.345, US, dollar, by_sign=True, digits=dollar.digits) == "$12.35"


@pytest.mark.parametrize(
    ("value", "expected"),
    [
        (3807783.0, "3,807,783"),
        (380778300.0, "380,778,300"),
        (-380778300.0, "−380.78m"),
        (123456789012.0, "123,456.79m"),
        (1.23456789012e13, "12,345.68bn"),
        (1.2e18, "1,200,000tn"),
        (1.2e30, "1.2E30"),
        (-1.2e300, "−1.2E300"),
    ],
)
def test_compact_never_exceeds_its_room(value: float, expected: str) -> None:
    assert numbers.compact(value, US) == expected
    assert len(expected) <= 11


def test_compact_changes_scale_before_it_drops_decimals() -> None:
    assert numbers.compact(123456789012.0, US, 9) == "123.46bn"
    assert numbers.compact(123456789012.0, US, 7) == "123.5bn"


def test_the_scale_follows_the_largest_figure() -> None:
    assert numbers.scale_for((1e6, None, -2e3), US) is numbers.ONE
    assert numbers.scale_for((1e9, 1.0), US) is numbers.THOUSAND
    assert numbers.scale_for((1e12,), US) is numbers.MILLION
    assert numbers.scale_for((1e17,), US) is numbers.BILLION


@pytest.mark.parametrize(
    ("value", "expected"),
    [(0.0706, "7.06%"), (0.06, "6.0%"), (0.0625, "6.25%"), (0.0715, "7.15%"), (0.06255, "6.26%")],
)
def test_a_rate_keeps_the_decimals_it_was_given(value: float, expected: str) -> None:
    assert numbers.rate(value, US) == expected


def test_percent_has_one_decimal() -> None:
    assert numbers.percent(0.53449, US) == "53.4%"
    assert numbers.percent(-0.02, DE) == "−2,0\u00a0%"


def test_multiples_and_areas() -> None:
    assert numbers.multiple(1.846, US) == "1.85×"
    assert numbers.area(88, US, "m²") == "88\u00a0m²"
    assert numbers.area(88.25, DE, "m²") == "88,3\u00a0m²"
    assert numbers.area(12500.4, US, "sq ft") == "12,500\u00a0sq ft"


def test_dates_have_their_month_in_words() -> None:
    first = date(2026, 3, 4)
    assert numbers.day(first, US) == "March 4, 2026"
    assert numbers.day(first, DE) == "4 March 2026"
    assert numbers.day(first, JP) == "2026 March 4"
    assert numbers.day(first, DE, short=True) == "4 Mar 2026"


@settings(deadline=None)
@given(st.floats(-1e14, 1e14), st.sampled_from(sorted(LOCALES)))
def test_what_is_shown_reads_back(value: float, code: str) -> None:
    locale = LOCALES[code]
    read = parse_number(numbers.number(value, locale, 2), locale)
    assert isinstance(read, Taken)
    assert abs(read.value - value) <= 0.005 + abs(value) * 1e-15


@settings(deadline=None)
@given(st.floats(allow_nan=False, allow_infinity=False))
def test_any_float_can_be_shown(value: float) -> None:
    assert numbers.number(value, US)
    assert len(numbers.compact(value, US)) <= 11
