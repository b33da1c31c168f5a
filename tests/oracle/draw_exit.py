"""Random exits, returns and loans."""

from random import Random
from typing import Any

from tests.oracle.draw_rows import Ids, money, random_row, rate, some

METHODS = {
    "forward_noi": 4,
    "trailing_noi": 4,
    "perpetuity": 9,
    "price_per": 7,
    "rent_multiple": 4,
    "purchase_price": 5,
    "amount": 7,
}
WEIGHTS = ([0.5, 0.5], [0.25, 0.75], [0.9, 0.1], [0.2, 0.3, 0.5], [0.25, 0.25, 0.5])


def random_blend(random: Random, ids: Ids) -> list[dict[str, Any]]:
    """Two or three methods, a perpetuity often among them."""
    weights = random.choice(WEIGHTS)
    methods = random.sample(list(METHODS), len(weights))
    if some(random, 0.5) and "perpetuity" not in methods:
        methods[0] = "perpetuity"
    return [
        {"id": ids("b"), "method": method, "weight": weight}
        for method, weight in zip(methods, weights, strict=True)
    ]


def random_price_terms(
    random: Random, leave: dict[str, Any], spaces: list[dict[str, Any]], rent: float
) -> None:
    """Terms of the methods that grow a price of today or take one as typed."""
    units = sum(s["count"] for s in spaces)
    leave["price_per"] = money(rent * random.uniform(6, 20) / units)
    if all("area" in s for s in spaces) and some(random, 0.6):
        area = sum(s["count"] * s["area"] for s in spaces)
        leave["price_per"] = money(rent * random.uniform(6, 20) / area)
        leave["price_per_of"] = "area"
    if some(random, 0.7):
        leave["price_growth"] = random_row(random, -0.01, 0.04)
    if some(random, 0.5):
        leave["price_series"] = random.choice(["as_new", "same_buildings"])
    leave["amount"] = 0.0 if some(random, 0.5) else money(rent * random.uniform(6, 20))


def random_leave(
    random: Random, ids: Ids, hold: int, spaces: list[dict[str, Any]], rent: float
) -> dict[str, Any]:
    """An exit by one method or a blend, with the terms that any of them needs."""
    leave: dict[str, Any] = {"hold": hold, "exit_yield": rate(random, 0.035, 0.1)}
    if some(random, 0.25):
        leave["blend"] = random_blend(random, ids)
    else:
        leave["method"] = random.choices(list(METHODS), list(METHODS.values()))[0]
    if some(random, 0.5):
        leave["exit_income"] = "stabilised"
        leave["stabilised_vacancy"] = rate(random, 0.0, 0.15)
    random_price_terms(random, leave, spaces, rent)
    leave["rent_multiple"] = rate(random, 5, 20)
    if some(random, 0.6):
        leave["selling_cost"] = rate(random, 0.005, 0.05)
    return leave


def random_returns(random: Random) -> dict[str, Any]:
    """Required returns, mostly above any growth."""
    low, high = (-0.01, 0.03) if some(random, 0.15) else (0.05, 0.12)
    returns: dict[str, Any] = {"required": random_row(random, low, high)}
    if some(random, 0.35):
        returns["extra_on_exit"] = rate(random, -0.01, 0.03)
    if some(random, 0.35):
        returns["equity"] = random_row(random, 0.06, 0.16)
    if some(random, 0.3):
        returns["finance"] = rate(random, 0.02, 0.08)
    if some(random, 0.3):
        returns["reinvest"] = rate(random, 0.01, 0.07)
    return returns


def random_loan(random: Random, ids: Ids, hold: int, rent: float) -> dict[str, Any]:
    """A loan that amortises or not, that matures before, at or after the sale."""
    rates = {"1": 0.0} if some(random, 0.12) else random_row(random, 0.02, 0.09)
    loan: dict[str, Any] = {"id": ids("l"), "amount": money(rent * random.uniform(1.5, 8))}
    loan["rate"] = rates
    if some(random, 0.75):
        loan["amortisation_months"] = random.choice([1, 60, 120, 240, 300, 360, 600])
    if some(random, 0.45):
        loan["interest_only_months"] = random.choice([1, 7, 12, 24, 60])
    if some(random, 0.65):
        early, late = random.randint(1, 12 * hold), random.choice([84, 120, 360, 600])
        loan["term_months"] = random.choice([early, early, 12 * hold, late])
    if some(random, 0.4):
        loan["fee"] = rate(random, 0.001, 0.02)
    if some(random, 0.3):
        loan["fee_amount"] = money(rent * random.uniform(0.001, 0.02))
    return loan


def random_loans(random: Random, ids: Ids, hold: int, rent: float) -> list[dict[str, Any]]:
    """None, one or two loans."""
    return [random_loan(random, ids, hold, rent) for _ in range(random.choice([0, 0, 1, 1, 2]))]
