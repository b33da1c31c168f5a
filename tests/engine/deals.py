"""Small deals as records, and how near is near, for the tests of the engine."""

from collections.abc import Mapping
from dataclasses import replace
from datetime import date
from typing import Any

import numpy as np
import pytest

from workbench.deal.borrow import Loan
from workbench.deal.changes import set_value
from workbench.deal.deal import Deal
from workbench.deal.earn import Earn, Lease, OtherIncome, Rent, Space, Step
from workbench.deal.leave import Leave, Returns
from workbench.deal.purchase import Purchase
from workbench.deal.spend import Expense, Works
from workbench.engine.plan import Plan, compile_deal
from workbench.engine.result import Result, evaluate

CLOSING = date(2027, 1, 1)


def near(value: Any) -> Any:
    return pytest.approx(value, rel=1e-12, abs=1e-9)


def day(text: str) -> date:
    return date.fromisoformat(text)


def space(rent: float, *leases: Lease, identity: str = "s1", **more: Any) -> Space:
    """One unit at a market rent a month."""
    return Space(identity, market_rent=Rent(rent, "month"), leases=leases, **{"count": 1, **more})


def lease(start: str, end: str, rent: float, identity: str = "e1", **more: Any) -> Lease:
    """A dated lease at a rent a month."""
    if "break_date" in more:
        more["break_date"] = day(more["break_date"])
    return Lease(identity, start=day(start), end=day(end), rent=Rent(rent, "month"), **more)


def deal(*spaces: Space, **sections: Any) -> Deal:
    """A deal without cost or growth: price 1,000, held 5 years, exit at 8 %, return 10 %."""
    plain: dict[str, Any] = {
        "purchase": Purchase(price=1000.0, closing_date=CLOSING),
        "earn": Earn(vacancy={1: 0.0}),
        "leave": Leave(hold=5, exit_yield=0.08),
        "returns": Returns(required={1: 0.1}),
        "next_id": 100,
    }
    return Deal(spaces=spaces or (space(10.0),), **{**plain, **sections})


def changed(base: Deal, changes: Mapping[str, Any]) -> Deal:
    """The deal with other inputs, by key path."""
    for path, value in changes.items():
        base = set_value(base, path, value)
    return base


def with_loan(base: Deal, **more: Any) -> Deal:
    terms: dict[str, Any] = {"amount": 600.0, "rate": {1: 0.06}, "amortisation_months": 360}
    return replace(base, loans=(Loan("l1", **{**terms, **more}),))


def evaluated(base: Deal) -> Result:
    return evaluate(compile_deal(base))


def fullest() -> Deal:
    """A deal that reads every fact."""
    steps = (Step("p1", day("2028-01-01"), change=0.1),)
    let = lease("2026-01-01", "2029-12-31", 100.0, steps=steps)
    return replace(
        deal(space(120.0, let, area=50.0), space(30.0, identity="s2", area=20.0, count=3)),
        other_income=(
            OtherIncome("i1", amount=24.0, lease="e1"),
            OtherIncome("i2", amount=1.0, basis="unit"),
        ),
        expenses=(Expense("x1", amount=2.0, basis="area"), Expense("x2", amount=3.0)),
        works=(
            Works("w1", amount=500.0, date=day("2028-03-15")),
            Works("w2", amount=70.0, year=2, month=5, todays_money=True),
        ),
    )


def unknown_facts(plan: Plan) -> set[str]:
    return {name for name, fact in plan.facts.items() if np.isnan(fact).any()}


def unknown_inputs(plan: Plan) -> set[str]:
    return {path for path, given in plan.inputs.items() if np.isnan(given).any()}
