"""Random valid deals that together use every option, and the names of what one uses."""

from itertools import count
from random import Random
from typing import Any

from tests.oracle.draw_costs import (
    random_expenses,
    random_purchase,
    random_spend,
    random_works,
)
from tests.oracle.draw_exit import random_leave, random_loans, random_returns
from tests.oracle.draw_income import random_earn, random_other, random_stated
from tests.oracle.draw_rent import random_closing, random_spaces
from tests.oracle.draw_rows import Ids, market_total, some
from tests.oracle.tally import tally

__all__ = ["random_deal", "tally"]

TIMINGS = ["month_end", "month_start", "year_end", "mid_year", "year_start"]
HOLDS = [1, 1, 1, *range(2, 13), 15, 20, 25, 30, 37, 40, 40, 40]


def random_deal(random: Random) -> dict[str, Any]:
    """A valid deal file of schema 1 as plain data."""
    ids = Ids(count(1))
    closing = random_closing(random)
    hold = random.choice(HOLDS)
    spaces = random_spaces(random, ids, closing)
    rent = market_total(spaces)
    deal: dict[str, Any] = {
        "schema": 1,
        "purchase": random_purchase(random, ids, rent),
        "spaces": spaces,
        "earn": random_earn(random),
        "spend": random_spend(random, spaces, rent),
        "expenses": random_expenses(random, ids, spaces, rent),
        "other_income": random_other(random, ids, spaces, rent),
        "works": random_works(random, ids, closing, hold, rent),
        "leave": random_leave(random, ids, hold, spaces, rent),
        "returns": random_returns(random),
        "loans": random_loans(random, ids, hold, rent),
    }
    if closing is not None:
        deal["purchase"]["closing_date"] = closing.isoformat()
    if some(random, 0.9):
        deal["conventions"] = {"timing": random.choice(TIMINGS)}
    if some(random, 0.4):
        deal["stated"] = random_stated(random, rent)
    kept = {key: value for key, value in deal.items() if value not in ([], {})}
    return {**kept, "next_id": ids.next_number()}
