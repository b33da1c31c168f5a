"""The interpreter gives what the generated function gives, for every line and condition."""

import numpy as np
import pytest

from tests.engine.deals import changed, deal, evaluated, fullest, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.deal.deal import Deal
from workbench.engine import formula as f
from workbench.engine.calendar import MONTHS
from workbench.engine.formula import Fact, Given, Line, Number
from workbench.engine.interpreter import Values
from workbench.engine.lines import Output
from workbench.engine.plan import compile_deal
from workbench.engine.printer import condition_key
from workbench.engine.result import evaluate
from workbench.files.deal_file import deal_from_raw


def assert_agrees(base: Deal) -> None:
    result = evaluated(base)
    values = Values(result)
    for key, line in result.declared.items():
        if isinstance(line.body, Output):
            continue
        made, refused = values.of(line.body), np.array([False])
        for position, (condition, _) in enumerate(line.unless):
            met = values.of(condition)
            assert np.array_equal(met, result.values[condition_key(key, position)]), key
            refused = np.logical_or(refused, met)
        expected = np.where(refused, np.nan, made) + 0.0 * result.values[key]
        assert np.array_equal(expected, result.values[key], equal_nan=True), key


@pytest.mark.parametrize("seed", range(4))
def test_as_the_generated_function(seed: int) -> None:
    for raw in drawn(9800 + seed, 4):
        assert_agrees(deal_from_raw(raw))


@pytest.mark.parametrize(
    "timing", ["month_end", "month_start", "year_end", "mid_year", "year_start"]
)
def test_at_each_timing(timing: str) -> None:
    assert_agrees(with_loan(changed(fullest(), {"conventions.timing": timing})))


def test_formulas_that_no_line_holds() -> None:
    values = Values(evaluated(deal()))
    # Five years of 120 are more than a price of 500.
    years = f.at_hold(f.running_sum(Line("noi_of_year")))
    assert values.of(years).tolist() == pytest.approx([600])
    assert values.of(f.where(years > 500, 1, Number(2.0))).tolist() == [1]
    assert values.of(f.greatest(years, 700)).tolist() == [700]
    assert values.of(Given("leave.hold")).tolist() == [5]
    assert values.of(Fact("market"))[:, 0].tolist() == [10.0] * MONTHS
    assert values.of(f.FirstDate(Line("unlevered_flows"))).tolist() == pytest.approx([1 / 12])


def test_of_a_batch_the_first_trial() -> None:
    drivers = {"earn.vacancy": [[0.5], [0.1]], "leave.hold": [[5.0], [7.0]]}
    values = Values(evaluate(compile_deal(deal()), drivers))
    assert values.of(Line("noi"))[:, 0] == pytest.approx(np.full(MONTHS, 5.0))
