"""Random spaces with their leases: running, to come, with gaps, broken, expired, undated."""

from datetime import date, timedelta
from random import Random
from typing import Any

from tests.oracle.draw_rows import Ids, money, rate, some
from tests.oracle.months import add_months


def random_closing(random: Random) -> date | None:
    """A closing date, often late in its month; None where nothing is dated."""
    if some(random, 0.12):
        return None
    first = date(random.randint(2019, 2031), random.randint(1, 12), 1)
    day = random.choice([1, 1, 15, 28, 29, 30, 31, 31, random.randint(1, 31)])
    next_first = date.fromordinal(add_months(first.toordinal(), 1))
    return min(first + timedelta(days=day - 1), next_first - timedelta(days=1))


def random_rent(random: Random, area: float | None, yearly: float) -> dict[str, Any]:
    """A yearly rent of a unit, in one of the four terms."""
    rent: dict[str, Any] = {}
    if area is not None and some(random, 0.5):
        yearly /= area
        rent["of"] = "area"
    if some(random, 0.4):
        yearly /= 12
        rent["per"] = "month"
    return {"amount": money(yearly), **rent}


def random_steps(random: Random, ids: Ids, first: date, last: date, amount: float) -> list[Any]:
    """Steps after the start, by amount or change; some past the end."""
    span = (last - first).days + 150
    steps = []
    for days in random.sample(range(1, span), random.choice([0, 0, 1, 2, 3])):
        step: dict[str, Any] = {"id": ids("p"), "date": (first + timedelta(days)).isoformat()}
        if some(random, 0.5):
            step["amount"] = money(amount * random.uniform(0.8, 1.4))
        else:
            step["change"] = rate(random, -0.1, 0.15)
        steps.append(step)
    return steps


def random_lease(
    random: Random, ids: Ids, first: date, area: float | None, yearly: float
) -> dict[str, Any]:
    """A dated lease from a first day."""
    top = random.choice([24, 24, 120, 120, 500, 600])
    last = date.fromordinal(add_months(first.toordinal(), random.randint(1, top)) - 1)
    if some(random, 0.5):
        last += timedelta(days=random.randint(1, 40))
    rent = random_rent(random, area, yearly * random.uniform(0.7, 1.3))
    lease: dict[str, Any] = {
        "id": ids("e"),
        "start": first.isoformat(),
        "end": last.isoformat(),
        "rent": rent,
    }
    steps = random_steps(random, ids, first, last, rent["amount"])
    if steps:
        lease["steps"] = steps
    if some(random, 0.25):
        lease["free_months"] = random.choice([1, 2, 3, 6, 12, 30])
    return lease


def first_start(random: Random, closing: date) -> date:
    """Before, at or after closing, on the day of a month or inside one."""
    months = random.choice([0, -random.randint(1, 60), -random.randint(1, 60), 1, 7, 30])
    start = date.fromordinal(add_months(closing.toordinal(), months))
    if some(random, 0.4):
        start += timedelta(days=random.randint(1, 27))
    return start


def add_break(random: Random, lease: dict[str, Any], size: float) -> None:
    """Let the tenant break before the end."""
    first, last = date.fromisoformat(lease["start"]), date.fromisoformat(lease["end"])
    broken = first + timedelta(days=random.randint(0, (last - first).days - 1))
    lease["break_date"] = broken.isoformat()
    if some(random, 0.75):
        lease["break_penalty"] = money(size * random.uniform(0.05, 0.6))


def random_leases(
    random: Random, ids: Ids, closing: date, area: float | None, yearly: float
) -> list[dict[str, Any]]:
    """One to three dated leases one after the other, with or without gaps."""
    start = first_start(random, closing)
    if some(random, 0.12):
        start = date.fromordinal(add_months(closing.toordinal(), -random.randint(20, 200)))
    leases = []
    for _ in range(random.choice([1, 1, 1, 2, 2, 3])):
        leases.append(random_lease(random, ids, start, area, yearly))
        gap = 0 if some(random, 0.35) else random.randint(1, 400)
        start = date.fromisoformat(leases[-1]["end"]) + timedelta(days=1 + gap)
    if some(random, 0.3):
        add_break(random, leases[-1], yearly)
    if some(random, 0.2):
        random.shuffle(leases)
    return leases


def random_space(random: Random, ids: Ids, closing: date | None, measured: bool) -> dict[str, Any]:
    """A line of the rent roll."""
    space: dict[str, Any] = {"id": ids("s"), "count": 1}
    if some(random, 0.5):
        space["count"] = random.randint(2, 40)
    area = money(random.uniform(30, 900)) if measured or some(random, 0.4) else None
    if area is not None:
        space["area"] = area
    yearly = random.uniform(4000, 40000)
    space["market_rent"] = random_rent(random, area, 0.0 if some(random, 0.05) else yearly)
    kind = random.choice(["none", "undated", *(["dated"] * 4)])
    if closing is None and kind == "dated":
        kind = "undated"
    if kind == "undated":
        rent = random_rent(random, area, yearly * random.uniform(0.7, 1.2))
        space["leases"] = [{"id": ids("e"), "rent": rent}]
    if kind == "dated" and closing is not None:
        space["leases"] = random_leases(random, ids, closing, area, yearly)
    return space


def random_spaces(random: Random, ids: Ids, closing: date | None) -> list[dict[str, Any]]:
    """One to six spaces, all of them measured in most deals."""
    measured = some(random, 0.8)
    return [random_space(random, ids, closing, measured) for _ in range(random.randint(1, 6))]
