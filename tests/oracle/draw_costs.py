"""Random purchase, expenses, reserves and works."""

from datetime import date, timedelta
from random import Random
from typing import Any

from tests.oracle.draw_rows import Ids, bases, money, random_row, rate, some, stated_row


def random_purchase(random: Random, ids: Ids, rent: float) -> dict[str, Any]:
    """Price in some relation to the rent, costs and what else is paid at closing."""
    worth = rent * random.uniform(7, 22)
    purchase: dict[str, Any] = {"price": 0.0 if some(random, 0.08) else money(worth)}
    costs: list[dict[str, Any]] = []
    if some(random, 0.4):
        costs.append({"id": ids("c"), "amount": rate(random, 0.001, 0.07), "basis": "price"})
    if some(random, 0.4):
        costs.append({"id": ids("c"), "amount": money(worth * random.uniform(0, 0.03))})
    if costs:
        purchase["costs"] = costs
    for key in ("initial_works", "escrows", "working_capital", "deposits"):
        if some(random, 0.25):
            purchase[key] = money(worth * random.uniform(0.001, 0.05))
    return purchase


def random_expenses(
    random: Random, ids: Ids, spaces: list[dict[str, Any]], rent: float
) -> list[dict[str, Any]]:
    """Expenses on every basis; now and then far above the rent."""
    sizes = bases(spaces, rent)
    lines = []
    for _ in range(random.choice([0, 1, 2, 2, 3])):
        basis = random.choice([*sizes, "egi"])
        share = rate(random, 0.01, 0.12)
        amount = share if basis == "egi" else money(share * sizes[basis])
        line: dict[str, Any] = {"id": ids("x"), "amount": amount, "basis": basis}
        if some(random, 0.4):
            line["growth"] = random_row(random, -0.01, 0.04)
        if some(random, 0.2):
            line["stated"] = stated_row(random, rent * share)
        lines.append(line)
    if some(random, 0.09):
        lines.append({"id": ids("x"), "amount": money(rent * random.uniform(1.1, 2))})
    return lines


def random_spend(random: Random, spaces: list[dict[str, Any]], rent: float) -> dict[str, Any]:
    """Growth of costs, and reserves in their four ways."""
    spend: dict[str, Any] = {}
    if some(random, 0.6):
        spend["growth"] = random_row(random, 0.0, 0.035)
    if some(random, 0.5):
        spend["works_growth"] = random_row(random, -0.01, 0.04)
    if some(random, 0.25):
        return spend
    sizes = bases(spaces, rent)
    basis = spend["reserves_basis"] = random.choice([*sizes, "egi"])
    share = rate(random, 0.005, 0.06)
    spend["reserves"] = share if basis == "egi" else money(share * sizes[basis])
    if some(random, 0.4):
        spend["reserves_growth"] = random_row(random, 0.0, 0.04)
    spend["reserves_place"] = random.choice(["below", "above"])
    spend["reserves_use"] = random.choice(["spent", "account", "account"])
    if some(random, 0.4):
        spend["reserves_opening"] = money(rent * random.uniform(0.01, 0.3))
    return spend


def random_works(
    random: Random, ids: Ids, closing: date | None, hold: int, rent: float
) -> list[dict[str, Any]]:
    """Works on a date or in a month of a year, mostly within the hold."""
    works = []
    for _ in range(random.choice([0, 0, 1, 2, 3, 4])):
        last = hold if some(random, 0.7) else 41
        work: dict[str, Any] = {"id": ids("w"), "amount": money(rent * random.uniform(0.02, 0.5))}
        if closing is not None and some(random, 0.5):
            days = random.randint(0, 365 * last)
            work["date"] = (closing + timedelta(days=days)).isoformat()
        else:
            work["year"] = random.randint(1, last)
            work["month"] = random.randint(1, 12)
        if some(random, 0.5):
            work["todays_money"] = True
        works.append(work)
    return works
