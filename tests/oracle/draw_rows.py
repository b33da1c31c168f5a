"""Small draws that the random deals are made of."""

from collections.abc import Iterator
from random import Random
from typing import Any


class Ids:
    """Ids of one deal: a letter and a number never given before."""

    def __init__(self, numbers: Iterator[int]) -> None:
        self._numbers = numbers

    def __call__(self, letter: str) -> str:
        return f"{letter}{next(self._numbers)}"

    def next_number(self) -> int:
        """A number above all given so far."""
        return next(self._numbers)


def some(random: Random, share: float) -> bool:
    """True in a share of all draws."""
    return random.random() < share


def money(value: float) -> float:
    """To the cent, as a file would hold it."""
    return round(value, 2)


def rate(random: Random, low: float, high: float) -> float:
    """A fraction with few digits."""
    return round(random.uniform(low, high), 4)


def random_row(random: Random, low: float, high: float) -> dict[str, float]:
    """A year row: one value for ever, or up to three later changes."""
    row = {"1": rate(random, low, high)}
    if some(random, 0.45):
        for _ in range(random.randint(1, 3)):
            last = random.choice([6, 15, 41])
            row[str(random.randint(2, last))] = rate(random, low, high)
    return row


def stated_row(random: Random, size: float) -> dict[str, float]:
    """A row of typed amounts around a size."""
    row = random_row(random, 0.5, 1.5)
    return {year: money(value * size) for year, value in row.items()}


def bases(spaces: list[dict[str, Any]], rent: float) -> dict[str, float]:
    """What an amount as large as all rent is on each basis that the spaces allow."""
    sizes = {"year": rent, "unit": rent / sum(s["count"] for s in spaces)}
    if all("area" in s for s in spaces):
        sizes["area"] = rent / sum(s["count"] * s["area"] for s in spaces)
    return sizes


def market_total(spaces: list[dict[str, Any]]) -> float:
    """Market rent a year, and at least a little, to scale other amounts by."""
    total = 0.0
    for space in spaces:
        rent = space["market_rent"]
        times = 12 if rent.get("per", "year") == "month" else 1
        area = space["area"] if rent.get("of", "unit") == "area" else 1
        total += rent["amount"] * times * area * space["count"]
    return max(total, 5000.0)
