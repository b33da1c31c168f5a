"""What a deal assumes where nothing is typed, and the ids of its lists."""

from dataclasses import FrozenInstanceError, fields, is_dataclass
from typing import Any, get_args

import pytest

from tests.fullest import fullest
from workbench.deal.borrow import Loan
from workbench.deal.checks_records import items
from workbench.deal.deal import ID_LETTERS, SCHEMA, Deal
from workbench.deal.earn import Lease, OtherIncome, Space
from workbench.deal.inputs import declared
from workbench.deal.paths import get
from workbench.deal.purchase import PurchaseCost
from workbench.deal.records import Comparable, Statement
from workbench.deal.spend import Expense, Works
from workbench.files.adapter import record_classes

DEFAULTS = {
    "earn.growth": {1: 0.0},
    "earn.depreciation": {1: 0.0},
    "earn.credit_loss": {1: 0.0},
    "earn.series": "as_new",
    "earn.count_empty_time_once": True,
    "earn.vacancy": {},
    "spend.growth": {1: 0.0},
    "spend.works_growth": {1: 0.0},
    "spend.reserves_growth": {1: 0.0},
    "spend.reserves": 0.0,
    "spend.reserves_place": "below",
    "spend.reserves_use": "spent",
    "purchase.price": None,
    "purchase.closing_date": None,
    "purchase.initial_works": 0.0,
    "purchase.escrows": 0.0,
    "purchase.working_capital": 0.0,
    "purchase.deposits": 0.0,
    "leave.hold": None,
    "leave.method": "forward_noi",
    "leave.exit_income": "modelled",
    "leave.exit_yield": None,
    "leave.selling_cost": 0.0,
    "leave.price_growth": {1: 0.0},
    "leave.price_series": None,
    "returns.required": {},
    "returns.extra_on_exit": 0.0,
    "returns.equity": None,
    "returns.finance": None,
    "returns.reinvest": None,
    "conventions.currency": "USD",
    "conventions.area_unit": "m2",
    "conventions.timing": "month_end",
}


@pytest.mark.parametrize(("path", "value"), DEFAULTS.items())
def test_default(path: str, value: Any) -> None:
    assert get(Deal(), path) == value


def test_items_begin_plain() -> None:
    """What a list item has beside its id: nothing in money, nothing that moves a figure."""
    assert PurchaseCost("c1").basis == "amount"
    assert Space("s1").leases == ()
    assert (Lease("e1").free_months, Lease("e1").break_penalty) == (0, 0.0)
    assert not OtherIncome("i1").in_allowance
    assert (Expense("x1").basis, Expense("x1").growth) == ("year", None)
    assert not Works("w1").todays_money
    assert (Loan("l1").fee, Loan("l1").interest_only_months) == (0.0, 0)
    assert Statement("m1").kind == "past_year"
    assert Comparable("q1").kind == "rent"


def test_defaults_are_not_shared() -> None:
    assert Deal().earn.growth is not Deal().earn.growth


@pytest.mark.parametrize("record", record_classes().values(), ids=lambda one: one.__name__)
def test_records_are_frozen(record: type) -> None:
    assert vars(record)["__dataclass_params__"].frozen


def test_a_deal_cannot_be_changed() -> None:
    for name in ("schema", "spaces"):
        with pytest.raises(FrozenInstanceError):
            setattr(Deal(), name, 2)


def test_every_list_has_a_letter_of_its_own() -> None:
    lists = {
        one.name
        for record in record_classes().values()
        for one in declared(record).values()
        for kind in get_args(one.kind)
        if is_dataclass(kind) and any(spec.name == "id" for spec in fields(kind))
    }
    assert set(ID_LETTERS) == lists
    assert len(set(ID_LETTERS.values())) == len(ID_LETTERS)
    assert all(len(letter) == 1 and letter.islower() for letter in ID_LETTERS.values())


def test_no_two_lists_share_a_name() -> None:
    """A key path names an item by its list wherever it is nested."""
    names = [
        one.name
        for record in record_classes().values()
        for one in declared(record).values()
        if any(is_dataclass(kind) for kind in get_args(one.kind))
    ]
    assert len(names) == len(set(names))


def test_the_fullest_deal_fills_every_list() -> None:
    assert {name for name, _ in items(fullest())} == set(ID_LETTERS)


def test_schema_is_the_first() -> None:
    assert SCHEMA == 1
    assert Deal().schema == SCHEMA
