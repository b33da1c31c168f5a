"""Deals of a given size for the benchmarks: every lease different."""

import datetime
from random import Random
from typing import Any

from workbench.deal.deal import Deal
from workbench.files.deal_file import deal_from_raw


def deal_of(spaces: int, seed: int = 1) -> Deal:
    """A deal with so many different leases, ten expense lines and two loans."""
    return deal_from_raw(raw_deal(spaces, seed))


def raw_deal(spaces: int, seed: int = 1) -> dict[str, Any]:
    random = Random(seed)
    numbers = iter(range(1, 10_000_000))
    roll = [_space(random, numbers) for _ in range(spaces)]
    price = sum(space["market_rent"]["amount"] for space in roll) * 12.0
    expenses = [
        {"id": f"x{next(numbers)}", "amount": price * 0.002, "growth": {"1": 0.02, "4": 0.025}}
        for _ in range(9)
    ]
    expenses.append({"id": f"x{next(numbers)}", "amount": 0.03, "basis": "egi"})
    loans = [
        {
            "id": f"l{next(numbers)}",
            "amount": price * share,
            "rate": {"1": 0.05, "6": 0.055},
            "amortisation_months": 360,
            "interest_only_months": months,
            "term_months": 180,
        }
        for share, months in ((0.5, 0), (0.1, 24))
    ]
    return {
        "schema": 1,
        "purchase": {"price": price, "closing_date": "2027-01-15"},
        "spaces": roll,
        "earn": {
            "growth": {"1": 0.02, "3": 0.025},
            "depreciation": {"1": 0.005},
            "vacancy": {"1": 0.05, "4": 0.06},
            "credit_loss": {"1": 0.01},
        },
        "expenses": expenses,
        "spend": {"reserves": price * 0.003, "reserves_use": "account"},
        "works": [{"id": f"w{next(numbers)}", "amount": price * 0.01, "year": 5}],
        "loans": loans,
        "leave": {"hold": 10, "exit_yield": 0.065, "selling_cost": 0.02},
        "returns": {"required": {"1": 0.08}},
        "next_id": next(numbers),
    }


def _space(random: Random, numbers: Any) -> dict[str, Any]:
    start = datetime.date(2027, 1, 15) - datetime.timedelta(days=random.randrange(1, 1200))
    end = start + datetime.timedelta(days=random.randrange(1400, 5000))
    step = start + (end - start) / 2
    rent = random.uniform(9_000, 60_000)
    lease = {
        "id": f"e{next(numbers)}",
        "start": start.isoformat(),
        "end": end.isoformat(),
        "rent": {"amount": rent * random.uniform(0.8, 1.1)},
        "steps": [{"id": f"p{next(numbers)}", "date": step.isoformat(), "change": 0.05}],
    }
    return {
        "id": f"s{next(numbers)}",
        "count": 1,
        "area": random.uniform(50, 300),
        "market_rent": {"amount": rent},
        "leases": [lease],
    }
