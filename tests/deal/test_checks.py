"""Every declared range, kind by kind, and what counts as missing."""

import datetime
import math
from dataclasses import replace
from typing import Any

import pytest

from tests.fullest import fullest, small
from workbench.deal.borrow import Loan
from workbench.deal.changes import set_value
from workbench.deal.checks import check, check_parts, faulty, is_fraction
from workbench.deal.deal import Deal
from workbench.deal.earn import OtherIncome, Stated
from workbench.deal.inputs import Leaf, leaves
from workbench.deal.issues import Issue
from workbench.deal.purchase import PurchaseCost
from workbench.deal.spend import Expense, Spend

FULLEST = fullest()
NUMBERS = [leaf for leaf in leaves(FULLEST) if leaf.input.low is not None]
TEXTS = [leaf for leaf in leaves(FULLEST) if leaf.input.unit == "text" and leaf.input.high]
DATES = [leaf for leaf in leaves(FULLEST) if leaf.input.unit == "date"]
NEEDED = [leaf for leaf in leaves(FULLEST) if leaf.input.needed]


def bounds(leaf: Leaf) -> tuple[float, float]:
    """The range as it is meant: a share of income or price is from 0 to 1."""
    if leaf.path in ("costs@c13.amount", "expenses@x17.amount"):
        return 0, 1
    assert leaf.input.low is not None and leaf.input.high is not None
    return leaf.input.low, leaf.input.high


def about(deal: Deal, path: str) -> list[Issue]:
    return [issue for issue in check(deal) if issue.path == path and issue.code == "out_of_range"]


def place(leaf: Leaf, year: int) -> str:
    return f"{leaf.path}.{year}" if leaf.field.is_row else leaf.path


def named(leaf: Leaf) -> str:
    return leaf.path


def test_the_deals_of_the_tests_are_sound() -> None:
    assert check(FULLEST) == []
    assert check(small()) == []


@pytest.mark.parametrize("leaf", NUMBERS, ids=named)
@pytest.mark.parametrize("year", [1, 41])
def test_a_number_at_its_bounds_is_allowed(leaf: Leaf, year: int) -> None:
    for bound in bounds(leaf):
        assert about(set_value(FULLEST, place(leaf, year), bound), place(leaf, year)) == []


@pytest.mark.parametrize("leaf", NUMBERS, ids=named)
@pytest.mark.parametrize("year", [1, 41])
def test_a_number_beyond_its_bounds_is_an_issue(leaf: Leaf, year: int) -> None:
    low, high = bounds(leaf)
    path = place(leaf, year)
    for value in (math.nextafter(low, -math.inf), math.nextafter(high, math.inf), math.nan):
        found = about(set_value(FULLEST, path, value), path)
        assert len(found) == 1
        assert found[0].value is value
        assert (found[0].low, found[0].high) == (low, high)


@pytest.mark.parametrize("leaf", TEXTS, ids=named)
def test_a_text_may_be_so_long_and_no_longer(leaf: Leaf) -> None:
    assert check(set_value(FULLEST, leaf.path, "x" * 5000)) == []
    found = check(set_value(FULLEST, leaf.path, "x" * 5001))
    assert found == [Issue(leaf.path, "too_long", 5001, None, 5000)]


@pytest.mark.parametrize("leaf", DATES, ids=named)
def test_a_day_lies_in_a_thousand_years_back_and_ahead(leaf: Leaf) -> None:
    first, last = datetime.date(1000, 1, 1), datetime.date(2999, 12, 31)
    a_day = datetime.timedelta(days=1)
    for day in (first - a_day, last + a_day, datetime.date.min, datetime.date.max):
        found = check(set_value(FULLEST, leaf.path, day))
        other = {"first": first, "last": last}
        assert found[0] == Issue(leaf.path, "no_such_day", day, other=other)
    for day in (first, last):
        codes = {one.code for one in check(set_value(FULLEST, leaf.path, day))}
        assert "no_such_day" not in codes


@pytest.mark.parametrize("leaf", NEEDED, ids=named)
def test_a_needed_input_without_a_value_is_an_issue(leaf: Leaf) -> None:
    empty: Any = {} if leaf.field.is_row else None
    path = place(leaf, 1)
    found = [one for one in check(set_value(FULLEST, leaf.path, empty)) if one.path == path]
    if leaf.path in ("other_income@i15.amount", "expenses@x18.amount"):
        assert found == []  # stated amounts stand in its place
        return
    assert found[0].code == "missing"
    if leaf.input.unit != "date":
        assert (found[0].low, found[0].high) == bounds(leaf)


def test_an_input_that_may_be_absent_is_none() -> None:
    for path in ("property.year_built", "returns.finance", "returns.equity", "expenses@x16.growth"):
        assert check(set_value(FULLEST, path, None)) == []


@pytest.mark.parametrize("leaf", [leaf for leaf in leaves(FULLEST) if leaf.field.is_row], ids=named)
def test_year_1_is_always_there(leaf: Leaf) -> None:
    for row in ({}, {3: 0.0}):
        found = [one for one in check(set_value(FULLEST, leaf.path, row)) if one.code == "missing"]
        assert [one.path for one in found] == [f"{leaf.path}.1"]
        assert (found[0].low, found[0].high) == bounds(leaf)


@pytest.mark.parametrize("year", [0, -3, 42, 10**20])
def test_there_is_no_such_year(year: int) -> None:
    row = {1: 0.05, year: 2.0}
    found = check(set_value(FULLEST, "earn.vacancy", row))
    assert found == [
        Issue(f"earn.vacancy.{year}", "no_such_year", year, 1, 41),
        Issue(f"earn.vacancy.{year}", "out_of_range", 2.0, 0, 1),
    ]


def test_the_last_year_of_a_row() -> None:
    assert check(set_value(FULLEST, "earn.vacancy.41", 0.1)) == []


def test_an_empty_deal_says_what_it_waits_for() -> None:
    assert [(one.path, one.code) for one in check(Deal())] == [
        ("purchase.price", "missing"),
        ("earn.vacancy.1", "missing"),
        ("leave.hold", "missing"),
        ("returns.required.1", "missing"),
        ("spaces", "no_spaces"),
        ("leave.exit_yield", "method_needs"),
    ]


def test_the_sections_come_before_what_does_not_fit_together() -> None:
    deal = set_value(set_value(FULLEST, "leave.exit_yield", None), "returns.required.1", 9.0)
    assert [one.code for one in check(deal)] == ["out_of_range", "method_needs"]


def test_all_issues_of_a_deal_are_found_at_once() -> None:
    deal = FULLEST
    paths = ["leave.hold", "spaces@s6.count", "steps@p3.change", "loans@l21.fee", "about.purpose"]
    for path in paths:
        deal = set_value(deal, path, "x" * 6000 if path == "about.purpose" else -9)
    assert {one.path for one in check(deal)} == set(paths)


@pytest.mark.parametrize(
    ("owner", "name", "expected"),
    [
        (PurchaseCost("c1", basis="price"), "amount", True),
        (PurchaseCost("c1", basis="amount"), "amount", False),
        (Expense("x1", basis="egi"), "amount", True),
        (Expense("x1", basis="year"), "amount", False),
        (Expense("x1", basis="egi"), "stated", False),
        (Spend(reserves_basis="egi"), "reserves", True),
        (Spend(reserves_basis="egi"), "reserves_opening", False),
        (Spend(reserves_basis="unit"), "reserves", False),
        (OtherIncome("i1"), "amount", False),
        (Loan("l1"), "amount", False),
        (Stated(), "rent", False),
    ],
)
def test_an_amount_is_a_share_by_its_basis(owner: Any, name: str, expected: bool) -> None:
    assert is_fraction(owner, name) is expected


@pytest.mark.parametrize("path", ["expenses@x17.amount", "costs@c13.amount"])
def test_a_share_above_one_is_an_issue(path: str) -> None:
    assert check(set_value(FULLEST, path, 5.0)) == [Issue(path, "out_of_range", 5.0, 0.0, 1.0)]


def test_reserves_are_a_share_where_their_basis_is_income() -> None:
    deal = set_value(FULLEST, "spend.reserves_basis", "egi")
    assert check(set_value(deal, "spend.reserves", 0.03)) == []
    assert [one.path for one in check(set_value(deal, "spend.reserves", 3.0))] == ["spend.reserves"]


def test_a_missing_share_has_the_range_of_a_share() -> None:
    found = check(set_value(FULLEST, "expenses@x17.amount", None))
    assert found == [Issue("expenses@x17.amount", "missing", None, 0.0, 1.0)]


def test_the_first_issue_of_a_path_is_the_one_that_counts() -> None:
    first, second = Issue("leave.hold", "missing"), Issue("leave.hold", "draft")
    other = Issue("purchase.price", "missing")
    assert faulty([first, second, other]) == {"leave.hold": first, "purchase.price": other}


def test_checking_changes_nothing() -> None:
    deal = replace(FULLEST)
    check(deal)
    assert deal == fullest()


def test_a_second_check_looks_at_what_changed_alone() -> None:
    """And finds the same as a check from nothing."""
    first = set_value(FULLEST, "spaces@s6.count", 0)
    earlier = check_parts(first)
    deal = set_value(first, "spaces@s1.count", -1)
    again = check_parts(deal, earlier)
    assert list(again.issues) == check(deal)
    assert {one.path for one in again.issues} == {"spaces@s1.count", "spaces@s6.count"}
    assert again.spaces[1] is earlier.spaces[1]
    assert again.picture_issues is earlier.picture_issues


@pytest.mark.parametrize(
    ("path", "value"),
    [
        ("property.pictures", ("f" * 64,)),
        ("pictures", {"f" * 64: "AAAA"}),
        ("next_id", 3),
        ("spaces", ()),
    ],
)
def test_a_second_check_misses_nothing(path: str, value: Any) -> None:
    deal = set_value(FULLEST, path, value)
    assert check(deal)
    assert list(check_parts(deal, check_parts(FULLEST)).issues) == check(deal)
