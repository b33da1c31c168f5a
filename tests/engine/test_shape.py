"""The shape of a deal: what changes it, and what leaves it as it is."""

from dataclasses import fields, replace
from typing import Any

import pytest

from tests.engine.deals import changed, day, deal, lease, space, with_loan
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, OtherIncome
from workbench.deal.leave import ExitPart
from workbench.deal.purchase import PurchaseCost
from workbench.deal.spend import Expense, Works
from workbench.engine.shape import Part, shape_of

BASE = replace(
    with_loan(deal(space(10.0, lease("2027-01-01", "2028-01-01", 9.0)))),
    other_income=(OtherIncome("i1", amount=1.0),),
    expenses=(Expense("x1", amount=1.0),),
    purchase=replace(deal().purchase, costs=(PurchaseCost("c1", amount=1.0),)),
    leave=replace(deal().leave, price_series="as_new"),
)


@pytest.mark.parametrize(
    ("path", "value"),
    [
        ("purchase.price", 5.0),
        ("purchase.closing_date", None),
        ("earn.growth", {1: 0.02, 7: 0.03}),
        ("earn.vacancy.3", 0.1),
        ("spaces@s1.market_rent.amount", 99.0),
        ("spaces@s1.count", 12),
        ("leases@e1.end", day("2040-01-01")),
        ("expenses@x1.amount", 77.0),
        ("other_income@i1.growth", {1: 0.1}),
        ("leave.hold", 40),
        ("leave.exit_yield", None),
        ("returns.required", {}),
        ("returns.extra_on_exit", 0.01),
        ("loans@l1.amount", 1.0),
        ("loans@l1.amortisation_months", 12),
        ("loans@l1.interest_only_months", 12),
        ("spend.reserves", 9.0),
        ("property.name", "Another"),
        ("expenses@x1.name", "Another"),
    ],
)
def test_numbers_leave_the_shape(path: str, value: Any) -> None:
    other = changed(BASE, {path: value})
    assert other != BASE
    assert shape_of(other) == shape_of(BASE)
    assert hash(shape_of(other)) == hash(shape_of(BASE))


@pytest.mark.parametrize(
    ("path", "value", "field"),
    [
        ("conventions.timing", "mid_year", "timing"),
        ("earn.series", "same_buildings", "rent_as_new"),
        ("leave.price_series", "same_buildings", "price_as_new"),
        ("earn.count_empty_time_once", False, "count_once"),
        ("stated.concessions", {1: 1.0}, "stated"),
        ("other_income@i1.basis", "area", "income"),
        ("other_income@i1.in_allowance", True, "income"),
        ("other_income@i1.lease", "e1", "income"),
        ("other_income@i1.stated", {1: 1.0}, "income"),
        ("expenses@x1.basis", "egi", "expenses"),
        ("expenses@x1.growth", {1: 0.0}, "expenses"),
        ("expenses@x1.stated", {1: 0.0}, "expenses"),
        ("spend.reserves_basis", "unit", "reserves_basis"),
        ("spend.reserves_place", "above", "reserves_above"),
        ("spend.reserves_use", "account", "account"),
        ("costs@c1.basis", "price", "costs"),
        ("loans@l1.amortisation_months", None, "loans"),
        ("loans@l1.term_months", 120, "loans"),
        ("leave.method", "amount", "exits"),
        ("leave.exit_income", "stabilised", "stabilised"),
        ("leave.price_per_of", "area", "price_per_of"),
        ("returns.equity", {1: 0.12}, "own_equity_return"),
        ("returns.finance", 0.05, "own_finance_rate"),
        ("returns.reinvest", 0.05, "own_reinvest_rate"),
    ],
)
def test_choices_change_their_part_of_the_shape(path: str, value: Any, field: str) -> None:
    was, now = shape_of(BASE), shape_of(changed(BASE, {path: value}))
    moved = [
        spec.name for spec in fields(was) if getattr(was, spec.name) != getattr(now, spec.name)
    ]
    assert moved == [field]


def test_rent_of_the_same_buildings_carries_the_price_along() -> None:
    other = changed(BASE, {"earn.series": "same_buildings"})
    assert not shape_of(replace(other, leave=replace(other.leave, price_series=None))).price_as_new
    assert shape_of(changed(other, {"leave.price_series": "as_new"})).price_as_new


def test_works_and_spaces_are_no_part_of_it() -> None:
    other = replace(BASE, works=(Works("w1", amount=1.0, year=2),), spaces=(space(3.0),) * 3)
    assert shape_of(other) == shape_of(BASE)


def blended(use: str, *methods: Any) -> Deal:
    parts = tuple(ExitPart(f"b{n}", method, 0.5) for n, method in enumerate(methods))
    made = changed(BASE, {"spend.reserves_use": use})
    return replace(made, leave=replace(made.leave, blend=parts))


def test_a_perpetuity_alone_has_no_account() -> None:
    assert shape_of(changed(BASE, {"spend.reserves_use": "account"})).account == "account"
    for use, account in (("spent", "spent"), ("account", "nil")):
        alone = changed(BASE, {"spend.reserves_use": use, "leave.method": "perpetuity"})
        assert shape_of(alone).account == account
        assert shape_of(blended(use, "perpetuity", "perpetuity")).account == account
    assert shape_of(blended("account", "perpetuity", "amount")).account == "account"


def test_a_blend_stands_in_place_of_the_method() -> None:
    shape = shape_of(blended("spent", "amount", "trailing_noi"))
    assert shape.exits == (
        Part("amount", "blend@b0.weight"),
        Part("trailing_noi", "blend@b1.weight"),
    )
    assert shape_of(BASE).exits == (Part("forward_noi", None),)


def test_a_tie_to_an_undated_lease_is_still_a_tie() -> None:
    tied = replace(
        deal(space(1.0, Lease("e1"))), other_income=(OtherIncome("i1", amount=1.0, lease="e1"),)
    )
    assert shape_of(tied).income[0].tied
