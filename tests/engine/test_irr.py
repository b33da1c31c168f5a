"""Internal rates: known roots, an exact count of roots, 40 digits, libraries, batches."""

import math
from fractions import Fraction
from itertools import pairwise

import mpmath
import numpy as np
import numpy.typing as npt
import numpy_financial
import pytest
import pyxirr
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.engine import irr_rows, irr_worth
from workbench.engine.irr import STATUSES, Irr, irr, irr_batch
from workbench.engine.irr_rows import even_step, settle
from workbench.engine.irr_scan import all_roots, log_ratio, sign_changes, terms

Array = npt.NDArray[np.float64]
ULP = float(np.finfo(np.float64).eps)


def residual(flows: Array, times: Array, rate: float) -> float:
    """|NPV| ÷ Σ|PV| in units of 2**−52, beyond what the rounding of the rate itself explains."""
    with mpmath.workdps(40):
        base = 1 + mpmath.mpf(rate)
        worth = [
            mpmath.mpf(float(flow)) * base ** -mpmath.mpf(float(time))
            for flow, time in zip(flows, times, strict=True)
        ]
        size = mpmath.fsum(worth, absolute=True)
        slope = mpmath.fsum(p * mpmath.mpf(float(t)) for p, t in zip(worth, times, strict=True))
        rounding = abs(slope / base) * float(np.spacing(abs(rate)))
        return float((abs(mpmath.fsum(worth)) - rounding) / size) / ULP


def flows_with_roots(*rates: float) -> Array:
    """A million paid out first, and worth nothing at each of the annual rates given."""
    return np.asarray(-1e6 * np.poly([1 + rate for rate in rates]), dtype=np.float64)


def positive_roots(flows: list[int]) -> int:
    """Number of distinct rates above −1 of whole flows, by Sturm's theorem in exact fractions."""
    falling = [Fraction(flow) for flow in flows]
    while falling and falling[0] == 0:
        falling.pop(0)
    while falling and falling[-1] == 0:  # a root at 1 + rate = 0
        falling.pop()
    degree = len(falling) - 1
    chain = [falling, [c * (degree - k) for k, c in enumerate(falling[:-1])]]
    while any(chain[-1]):
        rest = list(chain[-2])
        while len(rest) >= len(chain[-1]):
            factor = rest[0] / chain[-1][0]
            padded = chain[-1] + [Fraction(0)] * (len(rest) - len(chain[-1]))
            rest = [a - factor * b for a, b in zip(rest, padded, strict=True)][1:]
        while rest and rest[0] == 0:
            rest.pop(0)
        chain.append([-c for c in rest])
    used = [row for row in chain if row]
    at_zero = [row[-1] for row in used]
    at_infinity = [row[0] for row in used]
    return variations(at_zero) - variations(at_infinity)


def variations(values: list[Fraction]) -> int:
    signs = [value > 0 for value in values if value != 0]
    return sum(a != b for a, b in pairwise(signs))


# Hand-worked


def test_one_year() -> None:
    assert irr([-100.0, 110.0]) == Irr("unique", 0.1, (0.1,), "")  # 110/1.1 = 100


def test_two_years_by_hand() -> None:
    # 10/1.1 + 110/1.21 = 9.0909… + 90.9090… = 100
    answer = irr([-100.0, 10.0, 110.0])
    assert answer.status == "unique"
    assert answer.rate == pytest.approx(0.10, rel=1e-14)
    # x = 1 + r: 100x² − 60x − 60 = 0, x = 0.3 + √0.69
    answer = irr([-100.0, 60.0, 60.0])
    assert answer.rate == pytest.approx(0.3 + math.sqrt(0.69) - 1, rel=1e-14)


def test_times_are_years() -> None:
    # 10 % in half a year is 21 % a year.
    assert irr([-100.0, 110.0], [0.0, 0.5]).rate == pytest.approx(0.21, rel=1e-14)
    # It does not matter when the first flow falls.
    assert irr([-100.0, 110.0], [1e6, 1e6 + 0.5]).rate == pytest.approx(0.21, rel=1e-14)


def test_months_compound_to_a_year() -> None:
    flows = np.array([-1000.0] + [9.0] * 119 + [1100.0])
    monthly, annual = irr(flows).rate, irr(flows, np.arange(121) / 12).rate
    assert monthly is not None
    assert annual == pytest.approx((1 + monthly) ** 12 - 1, rel=1e-13)


def test_a_loss_and_a_rate_of_nothing() -> None:
    assert irr([-100.0, 50.0]).rate == -0.5
    assert irr([-100.0, 60.0, 40.0]).rate == pytest.approx(0.0, abs=1e-16)


def test_a_borrowing_has_the_rate_of_the_loan() -> None:
    flows = np.array([-1000.0, 80.0, 80.0, 1080.0])
    assert irr(-flows).rate == pytest.approx(0.08, rel=1e-14)
    assert irr(-flows).roots == irr(flows).roots


# Statuses and reasons


@pytest.mark.parametrize(
    ("flows", "times", "reason"),
    [
        ([1.0], None, "At least two flows are needed."),
        ([], None, "At least two flows are needed."),
        ([-1.0, math.nan], None, "A flow is not a finite number."),
        ([-math.inf, 1.0], None, "A flow is not a finite number."),
        ([-1.0, 2.0], [0.0], "There must be one time for each flow."),
        ([-1.0, 2.0], [0.0, 0.0], "The times must increase from each flow to the next."),
        ([-1.0, 2.0], [1.0, 0.0], "The times must increase from each flow to the next."),
        ([-1.0, 2.0], [0.0, math.nan], "The times must increase from each flow to the next."),
        ([-1.0, 2.0], [0.0, math.inf], "The times must increase from each flow to the next."),
        ([[-1.0, 2.0]], None, "The flows must be a single series."),
    ],
)
def test_bad(flows: list[float], times: list[float] | None, reason: str) -> None:
    assert irr(flows, times) == Irr("bad", None, (), reason)


@pytest.mark.parametrize("flows", [[1.0, 2.0], [-1.0, -2.0], [0.0, 0.0], [-1.0, 0.0, 0.0]])
def test_none_without_a_change_of_sign(flows: list[float]) -> None:
    assert irr(flows) == Irr("none", None, (), "The flows never change sign.")


def test_none_without_a_crossing() -> None:
    # −1 + 3v − 2.5v²: 9 − 4·2.5 < 0, no real root
    answer = irr([-1.0, 3.0, -2.5])
    assert (answer.status, answer.rate, answer.roots) == ("none", None, ())
    assert answer.reason == (
        "The flows change sign twice, but no rate above −99.9999999999 % makes them worth nothing."
    )


def test_none_where_next_to_all_is_lost() -> None:
    answer = irr([-1.0, 1e-13])
    assert answer.status == "none"
    assert "change sign once" in answer.reason
    assert irr([-1.0, 1e-11]).rate == pytest.approx(-1 + 1e-11, rel=1e-15)


def test_the_wide_range_of_rates() -> None:
    assert irr([-1.0, 1e6 + 1]).rate == pytest.approx(1e6, rel=1e-14)
    assert irr([-1.0, 1e299]).rate == pytest.approx(1e299, rel=1e-12)
    assert irr([-1.0, 1.5e300]).status == "none"
    assert irr([-1.0, 1e-6]).rate == pytest.approx(-0.999999, rel=1e-15)
    long_loss = irr([-1.0] + [0.0] * 479 + [1e-290])
    assert long_loss.rate == pytest.approx(1e-290 ** (1 / 480) - 1, rel=1e-14)


# Several roots


def test_two_roots_by_hand() -> None:
    # −100x² + 230x − 132 = −100(x − 1.1)(x − 1.2), x = 1 + r
    answer = irr([-100.0, 230.0, -132.0])
    assert (answer.status, answer.rate) == ("several", None)
    assert answer.roots == pytest.approx((0.10, 0.20), rel=1e-12)
    assert answer.reason == "The flows change sign twice and are worth nothing at 2 rates."


def test_three_roots_of_which_libraries_pick_different_ones() -> None:
    flows = flows_with_roots(0.0186, 0.1435, 0.30)
    answer = irr(flows)
    assert answer.status == "several"
    assert answer.roots == pytest.approx((0.0186, 0.1435, 0.30), rel=1e-10)
    assert answer.reason == "The flows change sign 3 times and are worth nothing at 3 rates."
    assert pyxirr.irr(flows) == pytest.approx(0.1435, rel=1e-10)
    assert numpy_financial.irr(flows) == pytest.approx(0.0186, rel=1e-10)


def test_six_roots_of_both_signs() -> None:
    rates = (-0.9, -0.5, 0.0, 0.25, 1.0, 4.0)
    answer = irr(flows_with_roots(*rates))
    assert answer.roots == pytest.approx(rates, rel=1e-9, abs=1e-12)


def test_a_pair_closer_than_any_grid() -> None:
    # 1e-5 apart: (x − 1.1)(x − 1.10001); between the two the flows are worth 2e-11 of their size.
    answer = irr(flows_with_roots(0.10, 0.10001))
    assert answer.status == "several"
    assert answer.roots == pytest.approx((0.10, 0.10001), rel=0, abs=1e-9)


def test_a_pair_far_from_a_third() -> None:
    answer = irr(flows_with_roots(0.10, 0.1001, 30.0))
    assert answer.roots == pytest.approx((0.10, 0.1001, 30.0), rel=1e-8)


@pytest.mark.parametrize("rate", [-0.3, 0.05, 0.1, 0.37, 2.0])
def test_a_root_that_only_touches(rate: float) -> None:
    # −(x − 1 − r)²: never worth more than nothing, and nothing at r alone
    answer = irr(flows_with_roots(rate, rate))
    assert answer.status == "unique"
    assert answer.rate == pytest.approx(rate, rel=1e-12, abs=1e-12)


def test_a_root_that_touches_beside_one_that_crosses() -> None:
    answer = irr(flows_with_roots(0.05, 0.05, 0.4))
    assert answer.status == "several"
    assert answer.roots == pytest.approx((0.05, 0.4), rel=1e-9)


def test_roots_by_the_square_root() -> None:
    # −100x² + 300x − 150 = 0: x = (3 ± √3)/2, so r = (1 ± √3)/2
    answer = irr([-100.0, 300.0, -150.0])
    assert answer.roots == pytest.approx(((1 - math.sqrt(3)) / 2, (1 + math.sqrt(3)) / 2))


@pytest.mark.parametrize("order", [2, 3, 4, 5, 6, 7])
@pytest.mark.parametrize("rate", [0.0, 0.1, -0.25])
def test_a_root_of_high_order_is_one(order: int, rate: float) -> None:
    answer = irr(flows_with_roots(*[rate] * order))
    assert answer.status == "unique"
    assert answer.rate == pytest.approx(rate, abs=1e-5)


def test_roots_that_no_double_tells_apart_count_once() -> None:
    # (x − 1)³ − d²(x − 1) is zero at 1 and 1 ± d; in between it stays below 0.4·d³ = 3e-19.
    gap = 2.0**-40  # d²
    answer = irr([-1.0, 3.0, gap - 3.0, 1.0 - gap])
    assert answer.status == "unique"
    assert answer.rate == pytest.approx(0.0, abs=1e-6)


def test_a_leveraged_deal_with_a_closing_bill() -> None:
    months = np.full(121, 1.2)
    months[0], months[-1] = -60.0, -60.0
    answer = irr(months, np.arange(121) / 12)
    assert answer.status == "several"
    assert len(answer.roots) == 2
    for root in answer.roots:
        assert residual(months, np.arange(121) / 12, root) <= 8


@given(st.lists(st.integers(-9, 9), min_size=2, max_size=7))
@settings(max_examples=400, deadline=None)
def test_as_many_roots_as_sturm_counts(flows: list[int]) -> None:
    if not any(flows) or sign_changes(np.array(flows, dtype=np.float64)) == 0:
        assert irr(flows).status == "none"
        return
    answer = irr(flows)
    count = positive_roots(flows)
    assert len(answer.roots) == count
    assert answer.status == {0: "none", 1: "unique"}.get(count, "several")


def test_sturm_counts_what_was_planted() -> None:
    assert positive_roots([-100, 230, -132]) == 2
    assert positive_roots([1, -2, 1, 0]) == 1
    assert positive_roots([0, 1, -1]) == 1
    assert positive_roots([2, -6, 5]) == 0


money = st.one_of(st.just(0.0), st.floats(1e-9, 1e6), st.floats(-1e6, -1e-9))


@settings(deadline=None)
@given(st.lists(money, min_size=2, max_size=30))
def test_every_root_is_one(flows: list[float]) -> None:
    row, times = np.array(flows), np.arange(len(flows)) / 2.0
    answer = irr(row, times)
    assert list(answer.roots) == sorted(answer.roots)
    assert (answer.rate is None) == (answer.status != "unique")
    assert (answer.reason == "") == (answer.status == "unique")
    for root in answer.roots:
        assert residual(row, times, root) <= (8 if answer.rate is not None else 64)


def test_480_changes_of_sign() -> None:
    flows = np.random.default_rng(3).uniform(0.1, 1.0, 480) * np.tile([1.0, -1.0], 240)
    times = np.arange(480) / 12
    answer = irr(flows, times)
    assert "479 times" in answer.reason
    # A fine grid, an independent look: at least its changes of sign are all there.
    rates = np.linspace(-8.0, 3.0, 20001)
    values = np.array([flows @ np.exp(-rate * times - max(0.0, -rate * 40)) for rate in rates])
    crossings = rates[1:][np.sign(values[1:]) != np.sign(values[:-1])]
    assert np.log1p(answer.roots) == pytest.approx(crossings, abs=6e-4)


# Certainty


def test_repairs_in_the_middle_leave_one_rate() -> None:
    flows = np.array([-1000.0, 80.0, 80.0, -150.0, 90.0, 90.0, -20.0, 1200.0])
    times = np.arange(8.0)
    sure = settle(flows[:, None], times, 1.0)
    assert np.isfinite(sure[0])  # by the running balance, without a search
    assert irr(flows).roots == pytest.approx((math.expm1(all_roots(flows, times)[0]),), rel=1e-13)
    assert irr(-flows).roots == irr(flows).roots


def test_one_root_found_by_the_search_alone() -> None:
    # The 300 of year 1 repays more than is owed at any rate near the root, yet there is one root.
    single = np.array([-100.0, 300.0, -150.0, 1.0, -1.0, 120.0])
    assert np.isnan(settle(single[:, None], np.arange(6.0), 1.0)[0])
    answer = irr(single)
    assert (answer.status, len(answer.roots), answer.reason) == ("unique", 1, "")


@given(
    st.lists(st.integers(-9, 9), min_size=3, max_size=9),
    st.sampled_from([1.0, 1 / 12]),
)
@settings(max_examples=300, deadline=None)
def test_certain_means_no_other_root(flows: list[int], step: float) -> None:
    row, times = np.array(flows, dtype=np.float64), step * np.arange(float(len(flows)))
    rate = settle(row[:, None], times, step)[0]
    if np.isfinite(rate):
        assert all_roots(row, times) == pytest.approx((rate,), rel=1e-9, abs=1e-9)


@settings(deadline=None)
@given(st.lists(st.floats(5.0, 100.0), min_size=1, max_size=24), st.integers(1, 4))
def test_one_change_of_sign_is_settled_without_a_search(later: list[float], outlays: int) -> None:
    row = np.array([-50.0] * outlays + later)
    assert np.isfinite(settle(row[:, None], np.arange(float(row.size)), 1.0)[0])
    assert np.isfinite(settle(-row[:, None], np.arange(float(row.size)), 1.0)[0])


def test_nothing_before_the_start_and_after_the_end() -> None:
    bare = irr([-100.0, 20.0, -5.0, 130.0])
    padded = irr([0.0, 0.0, -100.0, 20.0, -5.0, 130.0, 0.0, 0.0])
    assert padded.roots == pytest.approx(bare.roots, rel=1e-14)
    assert irr([0.0, 0.0, 0.0, 5.0]).status == "none"
    late = np.array([[0.0, 0.0, -100.0, 20.0, -5.0, 130.0]]).T
    assert np.isfinite(settle(late, np.arange(6.0), 1.0)[0])


def test_outlays_of_different_length_side_by_side() -> None:
    # Row 1 gets more back after a year than it paid; row 2 pays for three years.
    rows = np.array([[-10.0, 15.0, -5.0, 8.0, 0.0], [-10.0, -10.0, -1.0, 15.0, 30.0]])
    assert np.isfinite(settle(rows.T, np.arange(5.0), 1.0)).all()
    check_batch(rows)


# Accuracy


@settings(deadline=None)
@given(
    st.floats(0.05, 20.0),
    st.lists(st.floats(0.0, 10.0, allow_subnormal=False), min_size=1, max_size=120),
    st.sampled_from([1.0, 0.25, 1 / 12]),
)
def test_unique_rates_are_exact(share: float, later: list[float], step: float) -> None:
    row = np.array([-share * max(sum(later), 1.0), *later])
    times = step * np.arange(float(row.size))
    answer = irr(row, times)
    if answer.rate is None:
        assert answer.status == "none"
        return
    assert residual(row, times, answer.rate) <= 8


@pytest.mark.parametrize("years", [20.0, 30.0, 60.0])
@pytest.mark.parametrize("rate", [-0.95, -0.2, 0.2, 0.3, 0.7, 1.3, 5.0, 1e3])
def test_a_single_receipt_long_after(rate: float, years: float) -> None:
    row, times = np.array([-1.0, (1 + rate) ** years]), np.array([0.0, years])
    answer = irr(row, times)
    assert answer.rate is not None
    assert residual(row, times, answer.rate) <= 2
    assert 1 + answer.rate == pytest.approx(1 + rate, rel=1e-14)


@pytest.mark.parametrize("gain", [3e4, 7e5, 2e8])
def test_small_rates_over_a_thousand_periods(gain: float) -> None:
    row, times = np.array([-1.0, gain]), np.array([0.0, 1500.0])
    answer = irr(row, times)
    assert answer.rate is not None
    assert residual(row, times, answer.rate) <= 2


@pytest.mark.parametrize("gain", [7e11, 1e12, 3e12, 5e13, 1e15])
def test_a_huge_rate_long_after_the_first_date(gain: float) -> None:
    row, times = np.array([0.0] * 30 + [-1.0, gain]), np.arange(32.0)
    answer = irr(row)
    assert answer.rate is not None
    assert residual(row, times, answer.rate) <= 2


@pytest.mark.parametrize("size", [1e300, 1e-300, 1e-310, 7e305])
def test_any_size_of_money(size: float) -> None:
    flows = np.array([-1.0, 0.2, -0.1, 0.5, 0.75])
    assert irr(flows * size).rate == pytest.approx(irr(flows).rate, rel=1e-12)
    assert irr(np.array([-100.0, 230.0, -132.0]) * size).roots == pytest.approx(
        (0.1, 0.2), rel=1e-10
    )


def test_sums_beyond_a_double() -> None:
    row = np.array([-1.5e308, 1e308, 1e308, 1e308])
    assert np.isfinite(settle(row[:, None], np.arange(4.0), 1.0)[0])
    assert irr(row).rate == pytest.approx(irr(row / 1e300).rate, rel=1e-13)


def test_flows_of_very_different_size() -> None:
    tiny_first = irr([1e-310, -1.0, 2.2, -1.21], [0.0, 2.0, 3.0, 4.0])
    assert tiny_first.rate == pytest.approx(0.1, rel=1e-9)
    assert irr([-1e-300, 1.0, -1e300]).status == "none"
    assert irr([-1e300, 1.0, 1e300]).rate == pytest.approx(0.0, abs=1e-15)
    row = np.array([-1e-100, 1e-75, 1e100])
    answer = irr(row)
    assert answer.rate is not None
    assert residual(row, np.arange(3.0), answer.rate) <= 8


@settings(deadline=None)
@given(
    st.floats(10.0, 1000.0),
    st.lists(st.floats(1.0, 20.0), min_size=2, max_size=60),
)
def test_as_pyxirr_and_numpy_financial_have_it(outlay: float, later: list[float]) -> None:
    flows = [-outlay, *later, outlay]
    rate = irr(flows).rate
    assert rate == pytest.approx(pyxirr.irr(flows), rel=1e-9, abs=1e-9)
    assert rate == pytest.approx(numpy_financial.irr(flows), rel=1e-7, abs=1e-7)


# Many rows


def deals(trials: int, periods: int, seed: int = 1) -> Array:
    rng = np.random.default_rng(seed)
    table = rng.uniform(0.0, 2.0, (trials, periods))
    table[:, 0] = -rng.uniform(0.3, 1.2, trials) * periods
    table[:, -1] += 0.5 * periods
    return table


def check_batch(table: Array, times: Array | None = None) -> None:
    """Every row of a batch as by itself."""
    batch = irr_batch(table, times)
    for row, status, rate in zip(table, batch.status, batch.rate, strict=True):
        single = irr(row, times)
        assert STATUSES[status] == single.status
        if single.rate is None:
            assert np.isnan(rate)
        else:
            assert rate == pytest.approx(single.rate, rel=1e-12, abs=1e-14)


def test_a_large_batch_of_ordinary_rows() -> None:
    table, times = deals(5000, 121), np.arange(121) / 12
    batch = irr_batch(table, times)
    turned = irr_batch(np.asfortranarray(table), times)
    assert (batch.status == 0).all()
    assert np.array_equal(batch.rate, turned.rate)
    for trial in range(0, 5000, 50):
        assert residual(table[trial], times, batch.rate[trial]) <= 8
        assert batch.rate[trial] == pytest.approx(irr(table[trial], times).rate, rel=1e-12)


def test_a_batch_of_long_outlays_and_later_works() -> None:
    table = deals(600, 61)
    table[:, :9] = -3.0
    table[::2, 30] = -4.0
    table[::7, 45] = -6.0
    table[::5] *= -1
    assert even_step(np.arange(61) / 12) is not None
    check_batch(table, np.arange(61) / 12)


def test_a_batch_of_every_status() -> None:
    kinds = np.array(
        [
            [-100.0, 60.0, 60.0, 0.0],
            [-100.0, 230.0, -132.0, 0.0],
            [100.0, -230.0, 132.0, 0.0],
            [-1.0, 3.0, -2.5, 0.0],
            [1.0, 2.0, 3.0, 4.0],
            [0.0, 0.0, 0.0, 0.0],
            [-100.0, np.nan, 1.0, 1.0],
            [-100.0, np.inf, 1.0, 1.0],
            [-1e300, 5e299, 5e299, 5e299],
            [-1e-305, 5e-306, 5e-306, 5e-306],
            [0.0, -100.0, 0.0, 110.0],
            [100.0, -30.0, -40.0, -50.0],
            [-1.0, 0.0, 0.0, 1e30],
            [-1.0, 0.0, 0.0, 1e-30],
        ]
    )
    check_batch(kinds)
    many = np.tile(kinds, (60, 1))
    check_batch(many)
    expected = [0, 1, 1, 2, 2, 2, 3, 3, 0, 0, 0, 0, 0, 0]
    assert irr_batch(many).status.tolist() == expected * 60


def test_a_batch_without_one_certain_rate() -> None:
    batch = irr_batch(np.tile([-100.0, 230.0, -132.0], (300, 1)))
    assert (batch.status == STATUSES.index("several")).all()
    assert np.isnan(batch.rate).all()


def test_a_batch_at_uneven_times() -> None:
    times = np.concatenate(([0.0], np.cumsum(np.random.default_rng(2).uniform(0.02, 0.2, 40))))
    assert even_step(times) is None
    check_batch(deals(400, 41), times)


def test_a_batch_of_very_different_rates() -> None:
    table = np.zeros((900, 31))
    table[:, 0] = -1.0
    table[:, -1] = 10.0 ** np.linspace(-12, 40, 900)
    table[:, 5] = 1e-3
    batch = irr_batch(table)
    assert (batch.status == 0).all()
    for trial in range(0, 900, 9):
        assert residual(table[trial], np.arange(31.0), batch.rate[trial]) <= 8


def test_pieces_of_work_leave_no_seam(monkeypatch: pytest.MonkeyPatch) -> None:
    table = deals(900, 25)
    whole = irr_batch(table)
    monkeypatch.setattr("workbench.engine.irr.CELLS", 25 * 300)
    monkeypatch.setattr("workbench.engine.irr.STRIP", 7)
    pieces = irr_batch(table)
    assert np.array_equal(whole.status, pieces.status)
    assert pieces.rate == pytest.approx(whole.rate, rel=1e-12)


def test_a_row_that_does_not_come_to_rest_is_searched(monkeypatch: pytest.MonkeyPatch) -> None:
    table = deals(5, 25)
    expected = irr_batch(table).rate
    monkeypatch.setattr(irr_rows, "STEPS", 1)
    monkeypatch.setattr(irr_rows, "CLOSE", 0.0)
    assert np.isnan(settle(table.T, np.arange(25.0), 1.0)).all()
    assert irr_batch(table).rate == pytest.approx(expected, rel=1e-12)


def test_horner_and_powers_agree(monkeypatch: pytest.MonkeyPatch) -> None:
    table, times = deals(50, 121), np.arange(121) / 12
    table[:, 60] = -5.0
    powers = irr_batch(table, times)
    monkeypatch.setattr(irr_worth, "FEW", 0)
    horner = irr_batch(table, times)
    assert horner.rate == pytest.approx(powers.rate, rel=1e-13)
    assert (horner.status == 0).all()
    for row, rate in zip(table, horner.rate, strict=True):
        assert residual(row, times, rate) <= 8


def test_batches_of_nothing_and_bad_batches() -> None:
    assert irr_batch(np.empty((0, 5))).rate.shape == (0,)
    assert irr_batch([[1.0], [2.0]]).status.tolist() == [3, 3]
    bad = irr_batch([[-1.0, 2.0]], [1.0, 0.0])
    assert bad.status.tolist() == [3]
    assert np.isnan(bad.rate).all()
    with pytest.raises(ValueError, match="trials, periods"):
        irr_batch([-1.0, 2.0])


# Parts


def test_even_steps() -> None:
    for periods in (2, 13, 121, 361, 481):
        assert even_step(np.arange(periods) / 12) == pytest.approx(1 / 12, rel=1e-15)
    assert even_step(np.array([0.0, 1.0, 2.0000001])) is None


def test_sign_changes_leave_zeros_out() -> None:
    assert sign_changes(np.array([-1.0, 0.0, -1.0, 0.0, 2.0, 0.0, 3.0])) == 1
    assert sign_changes(np.array([0.0, 0.0])) == 0
    assert sign_changes(np.array([1.0, -1.0, 0.0, 1.0])) == 2


def test_log_ratio_by_hand() -> None:
    # At 10 %: gains 22/1.1 + 121/1.21 = 120 over losses of 100; times weigh 20·1 + 100·2 = 220.
    value, slope = log_ratio(terms(np.array([-100.0, 22.0, 121.0]), np.arange(3.0)), math.log(1.1))
    assert value == pytest.approx(math.log(1.2), rel=1e-14)
    assert slope == pytest.approx(-220 / 120, rel=1e-14)
    far = terms(np.array([-1.0, 1.0]), np.array([0.0, 40.0]))
    assert log_ratio(far, 600.0) == (-math.inf, 0.0)
    assert log_ratio(far, -600.0) == (math.inf, 0.0)
