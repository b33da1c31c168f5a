"""What must hold of any deal: closed forms, a flat reference line, sums that close.

No source but algebra; where a formula has a name it stands beside the test. What is expected is
worked out here in plain Python from the inputs and the flows alone.
"""

import math
from dataclasses import replace
from itertools import accumulate
from typing import Any, get_args

import mpmath
import numpy as np
import numpy.typing as npt
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.engine.deals import changed, deal, evaluated, space, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.deal.deal import Deal
from workbench.deal.earn import Stated
from workbench.deal.inputs import at_year
from workbench.deal.leave import ExitMethod, Leave, Returns
from workbench.deal.property import Conventions, Timing
from workbench.deal.purchase import Purchase
from workbench.deal.spend import Expense, Spend
from workbench.engine.cash import mirr, npv
from workbench.engine.loan import schedule
from workbench.engine.plan import compile_deal
from workbench.engine.result import Result, evaluate
from workbench.files.deal_file import deal_from_raw

Array = npt.NDArray[np.float64]

TIMINGS: tuple[Timing, ...] = get_args(Timing)
ULP = float(np.finfo(np.float64).eps)

rents = st.floats(1.0, 1e7)
growths = st.floats(-0.2, 0.3)
wears = st.floats(-0.05, 0.2)
returns = st.floats(-0.1, 0.4)
holds = st.integers(1, 40)


def figure(result: Result, key: str) -> float:
    value = result.figure(key)
    assert value is not None, result.reason(key)
    return value


def plain(rent: float, growth: float, required: float, timing: Timing, **changes: Any) -> Deal:
    """One space without leases, vacancy or cost; rent of year 1."""
    made = {"conventions.timing": timing, "earn.growth.1": growth, "returns.required.1": required}
    return changed(deal(space(rent / 12)), {**made, **changes})


def random_deals(seed: int, count: int) -> list[Deal]:
    return [deal_from_raw(raw) for raw in drawn(seed, count)]


# Closed form


@settings(deadline=None)
@given(rents, growths, wears, returns, holds, st.floats(1.0, 1e8), st.floats(-0.1, 0.15))
def test_closed_form_of_the_value(
    rent: float, growth: float, wear: float, required: float, hold: int, price: float, rise: float
) -> None:
    """P = Σ R_k((1−δ)/(1+r))^k, k < N, + P_N((1−δ)/(1+r))^N: rent in advance, P_N as new."""
    keep = (1 - wear) / (1 + required)
    income = [rent * (1 + growth) ** k * keep**k for k in range(hold)]
    base = plain(rent, growth, required, "year_start", **{"earn.depreciation.1": wear})
    as_new = changed(
        base,
        {
            "leave.hold": hold,
            "leave.method": "purchase_price",
            "leave.price_growth.1": rise,
            "purchase.price": price,
        },
    )
    expected = math.fsum([*income, price * (1 + rise) ** hold * keep**hold])
    assert figure(evaluated(as_new), "value") == pytest.approx(expected, rel=1e-12)
    # A typed amount is the property as it will then stand: worn.
    typed = {"leave.method": "amount", "leave.amount": price * (1 - wear) ** hold}
    expected = math.fsum([*income, price * keep**hold])
    assert figure(evaluated(changed(as_new, typed)), "value") == pytest.approx(expected, rel=1e-12)


def year_factor(required: float, timing: Timing) -> float:
    """A year's rent of 1, at the end of that year."""
    one = 1 + required
    factors: dict[Timing, float] = {
        "year_end": 1.0,
        "mid_year": math.sqrt(one),
        "year_start": one,
        "month_end": math.fsum(one ** (1 - j / 12) / 12 for j in range(1, 13)),
        "month_start": math.fsum(one ** (1 - j / 12) / 12 for j in range(12)),
    }
    return factors[timing]


@settings(deadline=None)
@given(rents, st.floats(-0.05, 0.05), st.floats(0.06, 0.3), holds, st.sampled_from(TIMINGS))
def test_growing_perpetuity(
    rent: float, growth: float, required: float, hold: int, timing: Timing
) -> None:
    """Gordon: V = NOI of year 1 ÷ (r − g), at whatever hold and by the timing's factor."""
    base = plain(rent, growth, required, timing)
    result = evaluated(changed(base, {"leave.method": "perpetuity", "leave.hold": hold}))
    expected = rent * year_factor(required, timing) / (required - growth)
    assert figure(result, "value") == pytest.approx(expected, rel=1e-11)
    assert figure(result, "reference_value") == pytest.approx(expected, rel=1e-11)
    share = ((1 + growth) / (1 + required)) ** hold
    assert figure(result, "exit_value_share") == pytest.approx(share, rel=1e-11)
    assert figure(result, "reference_share") == pytest.approx(share, rel=1e-11)


@pytest.mark.parametrize("timing", TIMINGS)
@pytest.mark.parametrize(("hold", "percent"), [(5, 75.1), (10, 56.5), (20, 31.9)])
def test_reference_shares(hold: int, percent: float, timing: Timing) -> None:
    """((1+g)/(1+r))^N at r 8 %, g 2 %, whatever the exit of the deal itself."""
    base = plain(1200.0, 0.02, 0.08, timing, **{"leave.hold": hold, "leave.selling_cost": 0.03})
    share = figure(evaluated(base), "reference_share")
    assert share == pytest.approx((1.02 / 1.08) ** hold, rel=1e-12)
    assert round(100 * share, 1) == percent


# The reference line


def lasting(base: Deal, timing: Timing) -> Deal:
    """The deal with a perpetuity as its exit, no selling cost and no extra return."""
    base = replace(base, leave=Leave(hold=10, method="perpetuity"))
    return changed(base, {"conventions.timing": timing, "returns.extra_on_exit": 0.0})


@pytest.mark.parametrize("timing", TIMINGS)
def test_the_reference_line_is_flat(timing: Timing) -> None:
    flat = 0
    for base in random_deals(9300, 14):
        plan = compile_deal(lasting(base, timing))
        swept = evaluate(plan, {"leave.hold": np.arange(1.0, 41.0)[:, np.newaxis]})
        reference = swept.figure("reference_value")
        if reference is None:
            assert np.isnan(swept.line("value")).all()
            continue
        flat += 1
        size = np.abs(swept.line("plain_value_of_year")).sum() + abs(figure(swept, "lasting_value"))
        assert swept.line("value").shape == (40, 1)
        assert swept.line("value") == pytest.approx(reference, rel=0, abs=1e-10 * size)
        if reference > 0:
            shares = swept.line("exit_value_share")[:, 0]
            assert shares == pytest.approx(swept.line("reference_share")[:, 0], rel=1e-9, abs=1e-9)
    assert flat >= 4


def test_selling_cost_is_what_bends_it() -> None:
    base = plain(1200.0, 0.02, 0.08, "month_end", **{"leave.method": "perpetuity"})
    plan = compile_deal(changed(base, {"leave.selling_cost": 0.03}))
    values = evaluate(plan, {"leave.hold": [[5.0], [10.0], [20.0]]}).line("value")[:, 0]
    whole = figure(evaluated(base), "value")
    # 3 % of what is then left, ((1+g)/(1+r))^N of the whole.
    left = [(1.02 / 1.08) ** hold for hold in (5, 10, 20)]
    assert values == pytest.approx([whole * (1 - 0.03 * part) for part in left], rel=1e-12)


# Sums that close


def discounts(base: Deal) -> tuple[list[float], list[float]]:
    """By month at the deal's timing, and by year of the exit, in plain Python."""
    required = [at_year(base.returns.required, year) or 0.0 for year in range(1, 42)]
    ends = list(accumulate((1 / (1 + r) for r in required), lambda a, b: a * b, initial=1.0))
    extra = base.returns.extra_on_exit
    later = list(accumulate((1 / (1 + r + extra) for r in required), lambda a, b: a * b))
    passed = {"month_end": 1, "month_start": 0, "year_end": 12, "mid_year": 6, "year_start": 0}
    first, moving = passed[base.conventions.timing], base.conventions.timing.startswith("month")
    months = [
        ends[month // 12]
        * (1 + required[month // 12]) ** (-(first + (month % 12 if moving else 0)) / 12)
        for month in range(492)
    ]
    return months, later


@pytest.mark.parametrize("seed", range(3))
def test_tiers_sum_to_the_value(seed: int) -> None:
    """Σ PV(net cash flow) + PV(net exit), though it is computed tier by tier."""
    valued = 0
    for base in random_deals(9400 + seed, 10):
        result, hold = evaluated(base), base.leave.hold or 0
        if result.figure("value") is None:
            continue
        valued += 1
        months, later = discounts(base)
        flows = result.line("net_cash_flow")[0, : 12 * hold].tolist()
        parts = [flow * factor for flow, factor in zip(flows, months, strict=False)]
        leaving = figure(result, "exit_net") * later[hold - 1]
        tiers = {key: figure(result, f"value_{key}") for key in ("in_hand", "expected")}
        size = math.fsum(map(abs, parts)) + abs(leaving)
        for key, tier in tiers.items():
            stack = result.year(f"value_{key}_of_year")[0, :hold].tolist()
            assert math.fsum(stack) == pytest.approx(tier, rel=1e-12, abs=1e-12 * size)
        expected = pytest.approx(math.fsum([*parts, leaving]), rel=0, abs=1e-12 * size)
        assert figure(result, "value") == expected
        assert tiers["in_hand"] + tiers["expected"] + leaving == expected
    assert valued >= 6


@pytest.mark.parametrize("seed", range(2))
def test_the_margin_is_the_present_value_of_the_flows(seed: int) -> None:
    for base in random_deals(9500 + seed, 15):
        rate = base.returns.required[1]
        base = replace(base, returns=replace(base.returns, required={1: rate}, extra_on_exit=0.0))
        result = evaluated(base)
        if result.figure("margin") is None:
            continue
        flows = result.line("unlevered_flows")[0]
        worth = npv(rate, flows, np.arange(493) / 12)
        size = npv(rate, np.abs(flows), np.arange(493) / 12)
        assert figure(result, "margin") == pytest.approx(worth, rel=0, abs=1e-12 * size)


def test_the_modified_rate_is_that_of_the_flows() -> None:
    """(receipts at the end ÷ outlays at the start)^(1/N) − 1, each at its own rate."""
    for base in random_deals(9550, 12):
        base = changed(base, {"returns.finance": 0.07, "returns.reinvest": 0.04})
        result, hold = evaluated(base), base.leave.hold
        rate = result.figure("mirr_unlevered")
        if rate is not None and hold is not None:
            flows = result.line("unlevered_flows")[0]
            expected = mirr(flows, 0.07, 0.04, np.arange(493) / 12, hold)
            assert rate == pytest.approx(expected, rel=1e-11, abs=1e-12)


def residual(flows: Array, rate: float) -> float:
    """|NPV| ÷ Σ|PV| in ulp, beyond what the rounding of the rate itself explains; 40 digits."""
    with mpmath.workdps(40):
        base = 1 + mpmath.mpf(rate)
        step = base ** (-mpmath.mpf(1) / 12)
        factors = accumulate([step] * (len(flows) - 1), lambda a, b: a * b, initial=mpmath.mpf(1))
        worth = [
            mpmath.mpf(float(flow)) * factor for flow, factor in zip(flows, factors, strict=True)
        ]
        slope = mpmath.fsum(part * month / 12 for month, part in enumerate(worth))
        rounding = abs(slope / base) * float(np.spacing(abs(rate)))
        total, size = mpmath.fsum(worth), mpmath.fsum(worth, absolute=True)
        return float((abs(total) - rounding) / size) / ULP


@pytest.mark.parametrize("side", ["unlevered", "levered"])
def test_flows_are_worth_nothing_at_their_internal_rate(side: str) -> None:
    found = 0
    for base in random_deals(9600, 36):
        result = evaluated(base)
        if side == "levered" and not base.loans:
            continue
        rate = result.figure(f"irr_{side}")
        if rate is None:
            continue
        found += 1
        assert residual(result.line(f"{side}_flows")[0], rate) <= 8
    assert found >= 12


def test_a_rate_that_is_off_is_noticed() -> None:
    flows = evaluated(plain(1200.0, 0.02, 0.08, "month_end")).line("unlevered_flows")[0]
    rate = figure(evaluated(plain(1200.0, 0.02, 0.08, "month_end")), "irr_unlevered")
    assert residual(flows, rate) <= 8 < residual(flows, rate * (1 + 1e-13))


@settings(deadline=None)
@given(
    st.floats(1.0, 1e7),
    st.lists(st.floats(0.0, 0.3), min_size=1, max_size=6),
    st.integers(1, 480),
    st.integers(0, 60),
    st.one_of(st.none(), st.integers(60, 480)),
    holds,
)
def test_principal_sums_to_the_loan(
    amount: float, rates: list[float], months: int, free: int, term: int | None, hold: int
) -> None:
    rate = dict(enumerate(rates, start=1))
    terms: dict[str, Any] = {"amortisation_months": months, "interest_only_months": free}
    base = with_loan(deal(), amount=amount, rate=rate, term_months=term, **terms)
    result = evaluated(changed(base, {"leave.hold": hold, "purchase.price": 2e7}))
    held = slice(0, 12 * hold)
    principal = math.fsum(result.line("principal@l1")[0, held])
    repaid = math.fsum(result.line("repayment@l1")[0, held])
    owed = result.year_end("balance@l1", hold)
    assert owed is not None
    assert principal + repaid + owed == pytest.approx(amount, rel=1e-11)
    # It ends at its balloon: out of cash before the sale, else out of the sale.
    end = min(free + months if term is None else term, 12 * hold)
    monthly = [at_year(rate, 1 + month // 12) or 0.0 for month in range(end)]
    balloon = schedule(amount, monthly, months, free, end).balloon
    assert repaid + owed == pytest.approx(balloon, rel=1e-9, abs=1e-11 * amount)
    assert (owed == 0) or (end == 12 * hold)
    left = figure(result, "exit_net") - figure(result, "exit_to_equity")
    assert left == pytest.approx(owed, rel=1e-9, abs=1e-7)


def test_sources_are_uses() -> None:
    for base in random_deals(9700, 20):
        result, closing = evaluated(base), base.purchase
        price = closing.price or 0.0
        costs = [
            (cost.amount or 0.0) * (price if cost.basis == "price" else 1) for cost in closing.costs
        ]
        loans = [loan.amount or 0.0 for loan in base.loans]
        fees = [(loan.amount or 0.0) * loan.fee + loan.fee_amount for loan in base.loans]
        others = [closing.initial_works, closing.escrows, closing.working_capital]
        uses = math.fsum([price, *costs, *fees, *others])
        assert figure(result, "uses") == pytest.approx(uses, rel=1e-12)
        assert figure(result, "sources") == pytest.approx(uses, rel=1e-12, abs=1e-9)
        equity = uses - math.fsum(loans) - closing.deposits
        assert figure(result, "equity") == pytest.approx(equity, rel=1e-12, abs=1e-12 * uses)


def test_the_value_does_not_know_the_loan() -> None:
    for base in random_deals(9800, 12):
        with_debt, without = evaluated(base), evaluated(replace(base, loans=()))
        for key in ("value", "margin", "exit_value_share", "irr_unlevered", "value_in_hand"):
            assert with_debt.figure(key) == without.figure(key)


# Additivity


def separable(base: Deal, method: ExitMethod) -> Deal:
    """What follows the spaces one by one: no amounts for the whole, allowance on each rent."""
    made = replace(
        base,
        other_income=(),
        works=(),
        loans=(),
        expenses=(Expense("x1", amount=0.3, basis="egi"),),
        spend=Spend(reserves=0.03, reserves_basis="egi"),
        stated=Stated(),
        conventions=Conventions(),
        returns=Returns(required=base.returns.required),
        purchase=Purchase(price=1.0, closing_date=base.purchase.closing_date),
        leave=Leave(
            hold=base.leave.hold,
            method=method,
            exit_yield=0.06,
            price_per=5e4,
            rent_multiple=12.0,
            selling_cost=0.02,
        ),
    )
    return changed(made, {"earn.count_empty_time_once": False})


@pytest.mark.parametrize(
    "method", ["forward_noi", "trailing_noi", "perpetuity", "price_per", "rent_multiple"]
)
def test_values_of_parts_add_up(method: ExitMethod) -> None:
    """Two spaces are worth what each is worth alone."""
    added = 0
    for base in random_deals(9900, 24):
        if len(base.spaces) < 2:
            continue
        whole = separable(base, method)
        parts = [evaluated(replace(whole, spaces=(one,))).figure("value") for one in whole.spaces]
        if None in parts:
            continue
        added += 1
        total = math.fsum(part for part in parts if part is not None)
        assert figure(evaluated(whole), "value") == pytest.approx(total, rel=1e-11)
    assert added >= 5
