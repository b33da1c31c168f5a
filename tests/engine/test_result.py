"""Evaluating a plan: batches, drivers, reading what came out, and why a figure is missing."""

from dataclasses import replace
from random import Random
from typing import Any

import numpy as np
import numpy.typing as npt
import pytest

from tests.engine.deals import changed, deal, evaluated, lease, near, space, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, OtherIncome, Rent
from workbench.deal.inputs import leaves
from workbench.deal.leave import ExitPart
from workbench.deal.spend import Expense, Works
from workbench.engine.figures import read_figures
from workbench.engine.plan import Plan, compile_deal, expand
from workbench.engine.result import CHUNK, Reason, Result, evaluate
from workbench.files.deal_file import deal_from_raw

Array = npt.NDArray[np.float64]


def singly(plan: Plan, drivers: dict[str, Array], trial: int) -> Result:
    return evaluate(plan, {path: values[trial : trial + 1] for path, values in drivers.items()})


def assert_trial_is(batch: Result, trial: int, single: Result) -> None:
    for key, values in single.values.items():
        row = batch.values[key]
        column = row[..., trial if row.shape[-1] > 1 else 0]
        alone = values[..., 0]
        if alone.dtype == bool:
            assert np.array_equal(column, alone), key
            continue
        size = np.abs(alone[np.isfinite(alone)]).max(initial=0.0)
        np.testing.assert_allclose(column, alone, rtol=1e-12, atol=1e-13 * size, err_msg=key)


# Batches


def drivers_of(plan: Plan, trials: int, random: np.random.Generator) -> dict[str, Array]:
    """Every input of a plan moved at random in some trials, and left in others."""
    made = {}
    for path, values in plan.inputs.items():
        if random.random() < 0.3 or np.isnan(values).any():
            continue
        if path == "leave.hold":
            made[path] = random.integers(1, 41, (trials, 1)).astype(float)
        elif "months" in path:
            made[path] = random.integers(0 if "only" in path else 1, 400, (trials, 1)).astype(float)
        else:
            factor = random.uniform(0.5, 1.2, (trials, 1))
            made[path] = factor * (values.T if values.ndim == 2 else values[:, np.newaxis])
    return made


@pytest.mark.parametrize("seed", range(8))
def test_a_batch_equals_its_trials_one_by_one(seed: int) -> None:
    random = np.random.default_rng(seed)
    plan = compile_deal(deal_from_raw(drawn(8700 + seed, 1)[0]))
    drivers = drivers_of(plan, 7, random)
    batch = evaluate(plan, drivers)
    assert batch.trials == 7
    for trial in range(7):
        assert_trial_is(batch, trial, singly(plan, drivers, trial))


def test_a_driver_of_the_deals_own_value_changes_nothing() -> None:
    plan = compile_deal(deal_from_raw(drawn(8800, 1)[0]))
    own = {
        path: values.T if values.ndim == 2 else values[:, np.newaxis]
        for path, values in plan.inputs.items()
    }
    assert_trial_is(evaluate(plan, own), 0, evaluate(plan))


def test_a_driven_input_equals_a_deal_with_that_input() -> None:
    base = with_loan(deal(space(10.0, lease("2026-01-01", "2029-06-30", 12.0))))
    moves: list[tuple[str, Any, Array]] = [
        ("purchase.price", 900.0, np.array([[900.0]])),
        ("leave.hold", 12, np.array([[12.0]])),
        ("earn.growth", {1: 0.03, 4: 0.01}, np.array([[0.03, 0.03, 0.03, 0.01]])),
        ("earn.vacancy", {1: 0.07}, np.array([[0.07]])),
        ("loans@l1.rate", {1: 0.05, 2: 0.07}, np.array([[0.05, 0.07]])),
        ("loans@l1.amortisation_months", 180, np.array([[180.0]])),
        ("leave.exit_yield", 0.06, np.array([[0.06]])),
    ]
    plan = compile_deal(base)
    for path, value, driver in moves:
        assert_trial_is(evaluate(plan, {path: driver}), 0, evaluated(changed(base, {path: value})))
    together = evaluate(plan, {path: driver for path, _, driver in moves})
    assert_trial_is(
        together, 0, evaluated(changed(base, {path: value for path, value, _ in moves}))
    )


def test_more_trials_than_one_chunk() -> None:
    plan = compile_deal(with_loan(deal(space(10.0, lease("2026-01-01", "2029-06-30", 12.0)))))
    for trials in (CHUNK, CHUNK + 1, 2 * CHUNK + 3):
        yields = np.linspace(0.05, 0.09, trials)[:, np.newaxis]
        drivers = {"leave.exit_yield": yields, "earn.vacancy": np.array([[0.05]])}
        batch = evaluate(plan, drivers, wanted=["value", "irr_levered", "noi_of_year"])
        assert batch.trials == trials
        assert batch.line("value").shape == (trials, 1)
        # What no driver with trials moves is computed once.
        assert batch.line("noi_of_year").shape == (1, 41)
        for trial in (0, 1, CHUNK - 1, CHUNK % trials, trials - 1):
            own = {
                "leave.exit_yield": yields[trial : trial + 1],
                "earn.vacancy": np.array([[0.05]]),
            }
            single = evaluate(plan, own, wanted=["value", "irr_levered"])
            for key in ("value", "irr_levered"):
                assert batch.figure(key, trial=trial) == near(single.figure(key))


def test_rows_of_chunks_are_joined_in_order() -> None:
    plan = compile_deal(deal())
    price = np.arange(1.0, 2 * CHUNK + 2)[:, np.newaxis]
    batch = evaluate(plan, {"purchase.price": price}, wanted=["outlay", "unlevered_flows"])
    assert batch.line("outlay").tolist() == price.tolist()
    assert batch.line("unlevered_flows").shape == (2 * CHUNK + 1, 493)
    assert batch.line("unlevered_flows")[:, :1].tolist() == (-price).tolist()


def test_wanted_lines_and_no_others() -> None:
    plan = compile_deal(deal())
    some = evaluate(plan, wanted=["noi_of_year"])
    assert "value" not in some.values and some.figure("noi_of_year", 1) == near(120)


# Drivers that are wrong


def test_an_input_that_is_not_the_plans() -> None:
    plan = compile_deal(deal())
    for path in ("earn.vacancies", "leave.amount", "spaces@s1.count", "leave.method"):
        with pytest.raises(KeyError, match=path):
            evaluate(plan, {path: [[1.0]]})


@pytest.mark.parametrize("values", [1.0, [1.0, 2.0], [[[1.0]]], [[]], np.zeros((0, 1))])
def test_a_driver_has_two_axes(values: npt.ArrayLike) -> None:
    with pytest.raises(ValueError, match=r"earn\.vacancy: a driver has the axes trials and years"):
        evaluate(compile_deal(deal()), {"earn.vacancy": values})


def test_a_single_figure_has_no_years() -> None:
    with pytest.raises(ValueError, match=r"leave\.hold: a single figure has no years"):
        evaluate(compile_deal(deal()), {"leave.hold": [[1.0, 2.0]]})


def test_drivers_have_the_same_trials() -> None:
    plan = compile_deal(deal())
    three, two = np.ones((3, 1)), np.ones((2, 1))
    with pytest.raises(ValueError, match="same number of trials"):
        evaluate(plan, {"purchase.price": three, "leave.exit_yield": two})
    both = evaluate(plan, {"purchase.price": three, "leave.exit_yield": np.ones((1, 1))})
    assert both.trials == 3


# Reading


def test_lines_by_month_year_date_and_once() -> None:
    result = evaluated(with_loan(deal(space(10.0)), rate={1: 0.0}, amortisation_months=60))
    shapes = {"noi": 492, "noi_of_year": 41, "unlevered_flows": 493, "value": 1}
    assert {key: result.line(key).shape for key in shapes} == {
        key: (1, length) for key, length in shapes.items()
    }
    # Twelve months of 10; a balance of 600 less 10 a month stands at 480 after a year.
    assert result.figure("noi", 2) == result.figure("noi_of_year", 2) == near(120)
    assert result.figure("balance@l1", 1) == result.year_end("balance@l1", 1) == near(480)
    assert result.year("balance@l1")[0, :5].tolist() == near([480, 360, 240, 120, 0])
    assert result.year_end("interest@l1", 1) == 0.0
    assert result.year("noi").shape == result.year("noi_of_year").shape == (1, 41)


def test_figures_of_a_trial() -> None:
    plan = compile_deal(deal(space(10.0)))
    result = evaluate(
        plan, {"earn.vacancy": [[0.0], [0.5], [np.nan]], "leave.hold": [[5], [7], [5]]}
    )
    assert [result.figure("noi", 1, trial) for trial in range(3)] == [near(120), near(60), None]
    assert [result.year_end("noi", 1, trial) for trial in range(3)] == [near(10), near(5), None]
    # What no driver moves is the same in each trial.
    assert result.figure("rent_index", 3, trial=2) == 1.0
    assert result.year_end("rent_expected", 3, trial=2) == near(10)
    assert [result.given("leave.hold", trial) for trial in range(3)] == [5, 7, 5]
    assert [result.given("earn.vacancy", trial) for trial in range(3)] == [0, 0.5, None]
    assert result.given("purchase.price", trial=2) == 1000


def test_an_input_that_cannot_be_used() -> None:
    result = evaluated(changed(deal(), {"purchase.price": -3.0}))
    assert result.given("purchase.price") is None
    assert result.given("leave.hold") == 5
    why = result.why_not_given("purchase.price")
    assert why.code == "waits_for" and why.issue is not None
    assert (why.issue.path, why.issue.code) == ("purchase.price", "out_of_range")


# Reasons


def reason_of(base: Deal, key: str, year: int | None = None) -> Reason:
    result = evaluated(base)
    assert result.figure(key, year) is None
    return result.reason(key, year)


@pytest.mark.parametrize(
    ("changes", "key", "code"),
    [
        ({"purchase.price": 0.0}, "going_in_yield", "price_not_positive"),
        ({"purchase.price": 0.0}, "ground_share", "price_not_positive"),
        ({"purchase.price": 0.0}, "equity_multiple_unlevered", "nothing_put_in"),
        ({"purchase.price": 0.0}, "yield_on_cost", "nothing_put_in"),
        ({"purchase.price": 1e6}, "payback", "not_paid_back"),
        ({"purchase.price": 1.5e3}, "discounted_payback", "not_paid_back"),
        ({"spaces@s1.market_rent.amount": 0.0}, "exit_value_share", "value_not_positive"),
        ({"spaces@s1.market_rent.amount": 0.0}, "mirr_unlevered", "nothing_comes_back"),
        ({"spaces@s1.market_rent.amount": 0.0}, "reference_share", "no_lasting_income"),
        ({"spaces@s1.market_rent.amount": 0.0}, "gross_rent_multiple", "no_gross_income"),
        ({"spaces@s1.market_rent.amount": 0.0}, "break_even_with_reserves", "no_gross_income"),
        ({"spaces@s1.market_rent.amount": 0.0}, "expense_ratio", "no_gross_income"),
        ({"spaces@s1.market_rent.amount": 0.0}, "irr_unlevered", "no_rate"),
        ({"earn.growth.1": 0.1}, "reference_value", "return_not_above_growth"),
        ({"leave.method": "amount", "leave.amount": 0.0}, "exit_yield", "exit_price_not_positive"),
    ],
)
def test_a_figure_that_has_no_meaning(changes: dict[str, Any], key: str, code: str) -> None:
    found = reason_of(changed(deal(), changes), key)
    assert found.code == code and found.issue is None


@pytest.mark.parametrize(
    ("changes", "key", "year", "code"),
    [
        (
            {"loans@l1.rate.1": 0.0, "loans@l1.amortisation_months": None},
            "dscr_noi",
            1,
            "no_debt_service",
        ),
        ({"loans@l1.amount": 0.0}, "dscr_ncf", 3, "no_debt_service"),
        ({"loans@l1.term_months": 12}, "debt_yield", 2, "no_loan_balance"),
        ({"loans@l1.amount": 5000.0}, "cash_on_cash", 1, "no_equity"),
    ],
)
def test_a_figure_of_a_year_that_has_no_meaning(
    changes: dict[str, Any], key: str, year: int, code: str
) -> None:
    assert reason_of(changed(with_loan(deal()), changes), key, year).code == code


def test_a_year_has_its_own_reason() -> None:
    owing = changed(with_loan(deal()), {"loans@l1.term_months": 12})
    result = evaluated(owing)
    assert result.figure("debt_yield", 1) == near(120 / 600)
    assert result.figure("debt_yield", 2) is None


def test_the_reason_of_a_rate_is_in_words() -> None:
    losing = changed(deal(), {"spaces@s1.market_rent.amount": 0.0})
    found = reason_of(losing, "irr_unlevered")
    assert (found.code, found.line) == ("no_rate", "irr_unlevered")
    assert found.words == "The flows never change sign."


def costly(**more: Any) -> Deal:
    """Income 120 a year against 200 of cost."""
    return replace(deal(**more), expenses=(Expense("x1", amount=200.0),))


def test_a_reason_is_found_at_its_root() -> None:
    for key in (
        "value",
        "margin",
        "exit_price",
        "exit_net",
        "irr_unlevered",
        "profitability_index",
    ):
        found = reason_of(costly(), key)
        assert (found.code, found.line) == ("negative_exit_income", "forward_noi_price"), key
    # A perpetuity that is refused stands behind the reference share of any deal.
    for key in ("reference_share", "reference_value"):
        found = reason_of(costly(), key)
        assert (found.code, found.line) == ("no_lasting_income", "lasting_value"), key
    perpetual = changed(deal(), {"leave.method": "perpetuity", "earn.growth.1": 0.2})
    assert reason_of(perpetual, "value").line == "lasting_value"


def test_of_two_conditions_the_first_that_holds_is_named() -> None:
    both = changed(costly(), {"earn.growth.1": 0.2, "spend.growth.1": 0.2})
    assert reason_of(both, "reference_value").code == "return_not_above_growth"


@pytest.mark.parametrize(
    ("path", "value", "keys"),
    [
        ("earn.vacancy.1", None, ["noi_of_year", "value", "irr_unlevered", "reference_share"]),
        ("returns.required.1", None, ["value", "margin", "mirr_unlevered", "discounted_payback"]),
        ("leave.exit_yield", None, ["exit_yield", "exit_price", "value", "exit_value_share"]),
        ("leave.hold", 41, ["value", "exit_income", "payback", "worst_cash_year"]),
        ("purchase.price", None, ["margin", "going_in_yield", "irr_unlevered", "equity"]),
        ("spaces@s1.count", None, ["value", "noi", "gross_rent_of_year"]),
        ("purchase.closing_date", None, ["rent_in_hand", "value"]),
    ],
)
def test_what_a_figure_waits_for(path: str, value: Any, keys: list[str]) -> None:
    base = deal(space(10.0, lease("2026-01-01", "2029-12-31", 10.0)))
    result = evaluated(changed(base, {path: value}))
    for key in keys:
        year = None if result.declared[key].per == "once" else 1
        assert result.figure(key, year) is None
        found = result.reason(key, year)
        assert found.code == "waits_for" and found.issue is not None, key
        assert found.issue.path == path, key


def test_what_does_not_wait_is_given() -> None:
    result = evaluated(changed(deal(), {"returns.required.1": None, "leave.exit_yield": None}))
    assert result.figure("noi", 1) == near(120)
    assert result.figure("going_in_yield") == near(0.12)
    assert result.reason("exit_price").issue == result.plan.blocked["leave.exit_yield"]
    assert result.reason("value_expected").issue == result.plan.blocked["returns.required"]


def test_a_year_past_the_hold_is_not_the_reason() -> None:
    # Works never make net operating income negative, but an expense stated for year 20 does:
    # the sale after 5 years does not know of it.
    late = replace(deal(), expenses=(Expense("x1", amount=0.0, stated={1: 0.0, 20: 9e9, 21: 0.0}),))
    assert evaluated(late).figure("exit_price") == near(120 / 0.08)
    broken = changed(late, {"returns.extra_on_exit": -3.0})
    found = reason_of(broken, "exit_present_value")
    assert found.issue is not None and found.issue.path == "returns.extra_on_exit"
    works = replace(late, works=(Works("w1", year=2),))
    found = reason_of(works, "value")
    assert found.issue is not None and found.issue.path == "works@w1.amount"
    # In the year of the sale it is.
    at_sale = changed(late, {"leave.hold": 19})
    assert reason_of(at_sale, "exit_present_value").code == "negative_exit_income"


def test_an_unknown_year_past_the_hold_is_not_waited_for() -> None:
    late = changed(costly(), {"earn.vacancy": {1: 0.0, 30: 7.0}})
    assert reason_of(late, "value").code == "negative_exit_income"


def test_reasons_of_each_trial() -> None:
    drivers = {
        "leave.exit_yield": [[np.nan], [0.08], [0.08]],
        "purchase.price": [[1000.0], [1000.0], [0.0]],
    }
    result = evaluate(compile_deal(deal()), drivers)
    given = [result.figure("irr_unlevered", trial=n) is not None for n in range(3)]
    assert given == [False, True, False]
    assert result.reason("irr_unlevered", trial=2).words == "The flows never change sign."
    assert result.reason("equity_multiple_unlevered", trial=2).code == "nothing_put_in"


def test_a_driven_hold_is_the_year_that_is_looked_at() -> None:
    stated = {1: 0.0, 20: 9e9, 21: 0.0}
    late = replace(deal(), expenses=(Expense("x1", amount=0.0, stated=stated),))
    broken = changed(late, {"returns.extra_on_exit": -3.0})
    result = evaluate(compile_deal(broken), {"leave.hold": [[5.0], [19.0], [0.0]]})
    found = [result.reason("exit_present_value", trial=n) for n in range(3)]
    assert [one.code for one in found[:2]] == ["waits_for", "negative_exit_income"]


def test_a_driver_in_place_of_a_missing_input_is_not_waited_for() -> None:
    missing = changed(deal(), {"leave.exit_yield": None})
    driven = evaluate(
        compile_deal(missing), {"leave.exit_yield": [[0.08]], "purchase.price": [[0]]}
    )
    assert driven.figure("value") is not None
    assert driven.reason("irr_unlevered").code == "no_rate"


def test_a_price_equal_to_the_value_is_paid_back_or_is_not() -> None:
    """Discounted flows that sum to nothing but for rounding: one or the other, and a reason."""
    for raw in drawn(8900, 16):
        base = replace(deal_from_raw(raw), purchase=deal().purchase)
        base = changed(base, {"returns.extra_on_exit": 0.0})
        worth = evaluated(base).figure("value")
        if worth is None or worth <= 0:
            continue
        result = evaluated(changed(base, {"purchase.price": worth}))
        if result.figure("discounted_payback") is None:
            assert result.reason("discounted_payback").code == "not_paid_back"


def test_figures_beyond_what_a_number_holds() -> None:
    """Only drivers, which no check has seen, can be so large."""
    driven = evaluate(compile_deal(deal()), {"earn.growth": [[1e300]]})
    assert driven.figure("value") is None
    assert driven.reason("value").code == "too_large"


def missing_figures(result: Result) -> list[tuple[str, int | None, Reason]]:
    """Place, year and reason of each figure that is not given; fails where one has no reason."""
    found = []
    for read in read_figures(result):
        values = read.value if isinstance(read.value, list) else [read.value]
        reasons = dict(read.reasons)
        for year, value in enumerate(values, start=1):
            at = year if isinstance(read.value, list) else None
            assert (value is None) == (at in reasons), read.figure
            if value is None:
                found.append((".".join(read.figure.place), at, reasons[at]))
    return found


@pytest.mark.parametrize("seed", range(3))
def test_random_deals_give_a_reason_for_each_missing_figure(seed: int) -> None:
    for raw in drawn(9000 + seed, 12):
        for place, year, why in missing_figures(evaluated(deal_from_raw(raw))):
            assert why.code not in ("too_large", "waits_for"), (place, year)


def spoiled(base: Deal, random: Random) -> tuple[str, Deal]:
    """The deal with one number out of range or missing."""
    numbers = [
        leaf
        for leaf in leaves(base)
        if leaf.value is not None and leaf.input.low is not None and leaf.input.unit != "text"
    ]
    leaf = random.choice(numbers)
    wrong = leaf.input.low - 1 if leaf.input.low is not None else 0.0
    if leaf.field.is_row:
        path = f"{leaf.path}.{random.choice(list(leaf.value))}"
        return path, changed(base, {path: wrong})
    return leaf.path, changed(base, {leaf.path: int(wrong) if leaf.field.kind is int else wrong})


@pytest.mark.parametrize("seed", range(3))
def test_one_faulty_input_is_the_reason_of_all_it_takes_away(seed: int) -> None:
    random = Random(seed)
    for raw in drawn(9100 + seed, 7):
        base = deal_from_raw(raw)
        before = {(place, year) for place, year, _ in missing_figures(evaluated(base))}
        for _ in range(2):
            path, other = spoiled(base, random)
            for place, year, why in missing_figures(evaluated(other)):
                assert why.code != "too_large", (path, place, year)
                if (place, year) not in before:
                    assert why.code == "waits_for" and why.issue is not None, (path, place, year)
                    # A weight out of range also leaves the sum of weights wrong.
                    assert why.issue.path == path or why.issue.code == "weights", (path, place)


def test_reasons_of_a_batch_that_kept_only_what_was_wanted() -> None:
    drivers = {
        "leave.exit_yield": [[0.08], [0.08], [0.08]],
        "expenses@x1.amount": [[0.0], [200.0], [0.0]],
        "earn.growth": [[0.0, 0.0], [0.0, 0.0], [0.2, 0.2]],
        "returns.extra_on_exit": [[0.01]],
    }
    plan = compile_deal(costly())
    some = evaluate(plan, drivers, wanted=["value", "reference_value"])
    full = evaluate(plan, drivers)
    assert set(some.values) == {"value", "reference_value"}
    for trial in range(3):
        for key in ("value", "reference_value"):
            value = full.figure(key, trial=trial)
            assert some.figure(key, trial=trial) == (None if value is None else near(value))
            if value is None:
                assert some.reason(key, trial=trial) == full.reason(key, trial=trial)
    assert some.reason("value", trial=1).line == "forward_noi_price"
    assert some.reason("reference_value", trial=2).code == "return_not_above_growth"


def test_an_empty_deal_waits_for_what_it_needs() -> None:
    waited = {why.issue.path for *_, why in missing_figures(evaluated(Deal())) if why.issue}
    assert {"purchase.price", "leave.hold", "spaces"} <= waited
    assert waited <= {issue.path for issue in compile_deal(Deal()).issues}


def test_blended_weights_and_tied_leases_are_roots_too() -> None:
    parts = (ExitPart("b1", "amount", 1.0), ExitPart("b2", "perpetuity", None))
    base = changed(deal(), {"leave.amount": 5.0})
    blended = replace(base, leave=replace(base.leave, blend=parts))
    found = reason_of(blended, "exit_price")
    assert found.issue is not None and found.issue.path == "blend@b2.weight"
    tied = replace(
        deal(space(1.0, Lease("e1", rent=Rent(1.0, "month")))),
        other_income=(OtherIncome("i1", amount=1.0, lease="e1"),),
    )
    found = reason_of(tied, "ground_share")
    assert found.issue is not None and found.issue.path == "other_income@i1.lease"
    assert evaluated(tied).figure("net_cash_flow", 1) == near(13)


def test_expand_is_what_a_driver_of_years_does() -> None:
    plan = compile_deal(deal())
    driven = evaluate(plan, {"earn.growth": [[0.01, 0.02, 0.03]]}).inputs["earn.growth"]
    assert np.array_equal(driven, expand({1: 0.01, 2: 0.02, 3: 0.03}))
