"""Inputs in words."""

import datetime
from typing import Any

import pytest

from tests.fullest import fullest, small
from tests.report.sections import voice_of
from workbench.deal.inputs import Input, declared
from workbench.report.typed import (
    amount_text,
    decimals_of,
    is_default,
    is_given,
    row_text,
    value_text,
)
from workbench.report.voice import Voice
from workbench.text.locale import LOCALES

VOICE = voice_of(fullest())


def said(owner: Any, name: str) -> str:
    return value_text(VOICE, owner, declared(type(owner))[name], getattr(owner, name))


def test_every_kind_of_value() -> None:
    deal = fullest()
    assert said(deal.purchase, "price") == "1,250,000"
    assert said(deal.purchase, "closing_date") == "Jan 1, 2027"
    assert said(deal.purchase.costs[1], "amount") == "2.0%", "a share of the price"
    assert said(deal.expenses[1], "amount") == "5.0%", "a share of income"
    assert said(deal.expenses[0], "amount") == "8"
    assert said(deal.spaces[0], "area") == "120\u00a0m²"
    assert said(deal.spaces[1], "count") == "6"
    assert said(deal.loans[0], "term_months") == "240 months"
    assert said(deal.spaces[0].leases[0], "free_months") == "1 month"
    assert said(deal.leave, "hold") == "10 years"
    assert said(deal.leave, "rent_multiple") == "11.0×"
    assert said(deal.leave, "exit_income") == "stabilised"
    assert said(deal.earn, "count_empty_time_once") == "yes"
    assert said(deal.other_income[1], "in_allowance") == "no"
    assert said(deal.other_income[0], "lease") == "Sailmaker"
    assert said(deal.works[1], "year") == "6"
    assert said(deal.works[1], "month") == "3", "a month of the year, not a length of time"
    assert said(deal.property, "name") == "Sailmaker's corner"
    assert said(deal.returns, "required") == "8.0%; from year 6: 8.5%"


def test_what_is_not_given_is_a_dash() -> None:
    deal = small()
    assert said(deal.purchase, "closing_date") == "—"
    assert said(deal.property, "name") == "—"
    assert said(deal.spaces[0], "leases") == "—"


def test_a_lease_without_a_tenant_goes_by_its_id() -> None:
    field = declared(type(fullest().other_income[0]))["lease"]
    assert value_text(VOICE, fullest().other_income[0], field, "e99") == "lease e99"


def test_amounts_have_the_decimals_of_the_currency_or_none() -> None:
    assert amount_text(VOICE, "money", 10.4) == "10.40"
    assert amount_text(VOICE, "money", 10.0) == "10"
    assert amount_text(VOICE, "money", 10.4567) == "10.46"
    assert amount_text(VOICE, "fraction", 0.06125) == "6.125%"
    assert amount_text(VOICE, "fraction", 0.06, 2) == "6.00%"


@pytest.mark.parametrize(
    ("row", "text"),
    [
        ({1: 0.02}, "2.0%"),
        ({1: 0.02, 4: 0.025}, "2.0%; from year 4: 2.5%"),
        ({1: 0.03, 2: 0.01, 4: 0.05}, "1.0% to 5.0% by year"),
    ],
)
def test_year_rows_in_short(row: dict[int, float], text: str) -> None:
    assert row_text(VOICE, Input("", "fraction"), row) == text


def test_decimals_line_up() -> None:
    assert decimals_of(VOICE, "fraction", [0.02, 0.0175]) == 2
    assert decimals_of(VOICE, "fraction", [0.02]) == 1
    assert decimals_of(VOICE, "fraction", []) == 1
    assert decimals_of(VOICE, "money", [10.0, 12.5]) == 2
    assert decimals_of(VOICE, "money", [10.0, 12.0]) == 0
    assert decimals_of(VOICE, "area", [10.0, 12.25]) == 2
    assert decimals_of(VOICE, "fraction", [float("nan")]) == 1


def test_a_currency_without_decimals_still_says_parts_of_a_unit() -> None:
    yen = Voice(small(), LOCALES["ja-JP"])
    assert decimals_of(yen, "money", [1_200.5]) == 2


def test_what_was_left_as_it_comes() -> None:
    deal = fullest()
    assert is_default(deal.conventions, "currency")
    assert is_default(small().earn, "growth")
    assert not is_default(deal.earn, "growth")


def test_what_there_is_to_show() -> None:
    assert not any(map(is_given, (None, "", {})))
    assert all(map(is_given, (0.0, False, datetime.date.min)))
