"""Random growth, allowances, other income and stated lines."""

from random import Random
from typing import Any

from tests.oracle.draw_rows import Ids, bases, money, random_row, some, stated_row


def random_earn(random: Random) -> dict[str, Any]:
    """Growth, wear, vacancy and credit loss."""
    earn: dict[str, Any] = {"vacancy": random_row(random, 0.0, 0.15)}
    if some(random, 0.15):
        earn["vacancy"] = {"1": 0.0}
    if some(random, 0.8):
        earn["growth"] = random_row(random, -0.01, 0.04)
    if some(random, 0.5):
        earn["depreciation"] = random_row(random, 0.0, 0.02)
    if some(random, 0.35):
        earn["series"] = random.choice(["same_buildings", "same_buildings", "as_new"])
    if some(random, 0.5):
        earn["credit_loss"] = random_row(random, 0.0, 0.04)
    if some(random, 0.4):
        earn["count_empty_time_once"] = random.choice([False, False, True])
    return earn


def random_other(
    random: Random, ids: Ids, spaces: list[dict[str, Any]], rent: float
) -> list[dict[str, Any]]:
    """Lines of other income, some marked, some tied to a dated lease, some stated."""
    dated = [x["id"] for s in spaces for x in s.get("leases", []) if x.get("start")]
    sizes = bases(spaces, rent)
    lines = []
    for _ in range(random.choice([0, 0, 1, 1, 2, 3])):
        basis = random.choice(list(sizes))
        amount = money(sizes[basis] * random.uniform(0.005, 0.1))
        line: dict[str, Any] = {"id": ids("i"), "amount": amount, "basis": basis}
        if some(random, 0.5):
            line["growth"] = random_row(random, -0.02, 0.05)
        if some(random, 0.5):
            line["in_allowance"] = True
        if dated and some(random, 0.5):
            line["lease"] = random.choice(dated)
        if some(random, 0.25):
            line["stated"] = stated_row(random, rent * 0.03)
        lines.append(line)
    return lines


def random_stated(random: Random, rent: float) -> dict[str, Any]:
    """Typed totals in place of computed lines."""
    sizes = {
        "rent": 1.0,
        "empty_time": 0.03,
        "concessions": 0.02,
        "vacancy_allowance": 0.05,
        "credit_loss": 0.01,
    }
    return {
        name: stated_row(random, rent * size) for name, size in sizes.items() if some(random, 0.4)
    }
