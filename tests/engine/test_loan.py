"""Level-payment loans: hand-worked cases, a month-by-month oracle, libraries, APR."""

import dataclasses
import math

import mpmath
import numpy as np
import numpy.typing as npt
import numpy_financial
import pytest
import pyxirr
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.engine.cash import irr
from workbench.engine.loan import Schedule, apr, balance_ratios, payment, schedule

Array = npt.NDArray[np.float64]

rates = st.one_of(st.just(0.0), st.floats(1e-9, 0.6), st.floats(-0.05, -1e-9))


def month_by_month(
    principal: float, annual: list[float], months: int, interest_only: int
) -> tuple[list[float], list[float], list[float]]:
    """Interest, principal and balance the slow way, in 40 digits."""
    with mpmath.workdps(40):
        owed, interest, repaid, balance = mpmath.mpf(principal), [], [], []
        for k, rate in enumerate(annual):
            i, left = mpmath.mpf(rate) / 12, interest_only + months - k
            due = owed * i
            if k < interest_only:
                back = mpmath.mpf(0)
            elif left < 1:
                back = owed
            else:
                level = owed / left if i == 0 else owed * i / (1 - (1 + i) ** -left)
                back = level - due
            owed -= back
            interest.append(float(due))
            repaid.append(float(back))
            balance.append(float(owed))
        return interest, repaid, balance


# Payment


def test_payment_by_hand() -> None:
    # Two payments at 12 %: 1000 = p/1.01 + p/1.0201, p = 1000·1.0201/2.01 = 507.512437…
    assert payment(1000.0, 0.12, 2) == pytest.approx(1000 * 1.0201 / 2.01, rel=1e-14)
    assert payment(1200.0, 0.0, 12) == 100.0
    assert payment(1000.0, 0.12, 1) == pytest.approx(1010.0, rel=1e-15)
    assert payment(0.0, 0.12, 12) == 0.0
    # At −12 % a month takes 1 % off: 1000 = p/0.99 + p/0.9801, p = 1000·0.9801/1.99
    assert payment(1000.0, -0.12, 2) == pytest.approx(1000 * 0.9801 / 1.99, rel=1e-14)


@settings(deadline=None)
@given(rates, st.integers(1, 480))
def test_payment_to_the_last_digits(rate: float, months: int) -> None:
    with mpmath.workdps(40):
        i = mpmath.mpf(rate) / 12
        level = mpmath.mpf(1e6) / months if i == 0 else 1e6 * i / (1 - (1 + i) ** -months)
    assert payment(1e6, rate, months) == pytest.approx(float(level), rel=2e-14)


@settings(deadline=None)
@given(st.floats(0.001, 0.6), st.integers(1, 480))
def test_payment_as_the_libraries_have_it(rate: float, months: int) -> None:
    level = payment(250_000.0, rate, months)
    assert level == pytest.approx(-numpy_financial.pmt(rate / 12, months, 250_000.0), rel=1e-11)
    theirs = pyxirr.pmt(rate / 12, months, 250_000.0)
    assert theirs is not None
    assert level == pytest.approx(-theirs, rel=1e-11)


@pytest.mark.parametrize("rate", [1e-12, 1e-17, 1e-300, 5e-324])
def test_a_rate_next_to_nothing(rate: float) -> None:
    assert payment(1200.0, rate, 12) == pytest.approx(100.0, rel=1e-11)


def test_a_rate_beyond_all_measure() -> None:
    assert payment(100.0, 120.0, 400) == pytest.approx(1000.0, rel=1e-15)
    assert schedule(100.0, 1e6, 400).balance[398] == pytest.approx(100.0, rel=1e-3)


@pytest.mark.parametrize("rate", [math.nan, math.inf, -12.0, -13.0])
def test_rates_that_mean_nothing(rate: float) -> None:
    with pytest.raises(ValueError, match="above −12"):
        payment(1.0, rate, 12)
    with pytest.raises(ValueError, match="above −12"):
        schedule(1.0, [0.05, rate], 2)
    with pytest.raises(ValueError, match="above −12"):
        balance_ratios([0.05, rate], 2, 0)


def test_at_least_one_payment() -> None:
    with pytest.raises(ValueError, match="at least one payment"):
        payment(1.0, 0.05, 0)
    with pytest.raises(ValueError, match="at least one payment"):
        schedule(1.0, 0.05, 0, interest_only=12)
    with pytest.raises(ValueError, match="at least one month"):
        schedule(1.0, 0.05, 12, term=0)


# Schedule


def test_schedule_by_hand() -> None:
    # 1,200 at 12 %: month 1 bears 12 and repays nothing; then two payments of p = 1200·1.0201/2.01.
    loan = schedule(1200.0, 0.12, 2, interest_only=1)
    level = 1200 * 1.0201 / 2.01  # 609.014925…
    assert loan.payment == pytest.approx([12.0, level, level], rel=1e-14)
    assert loan.interest == pytest.approx([12.0, 12.0, 0.01 * (1212 - level)], rel=1e-13)
    assert loan.balance == pytest.approx([1200.0, 1212 - level, 0.0], rel=1e-13)
    assert loan.balloon == 0.0


def test_a_balloon_is_what_is_left() -> None:
    loan = schedule(100_000.0, 0.06, 360, term=120)
    assert loan.balance.shape == (120,)
    left = payment(100_000.0, 0.06, 360) * (1 - 1.005**-240) / 0.005
    assert loan.balloon == pytest.approx(left, rel=1e-12)
    assert loan.balloon == loan.balance[-1]
    assert loan.payment[-1] == pytest.approx(payment(100_000.0, 0.06, 360), rel=1e-12)


def test_a_bullet_loan_bears_interest_alone() -> None:
    loan = schedule(1e6, 0.048, 360, interest_only=24, term=24)
    assert (loan.principal == 0).all()
    assert loan.payment == pytest.approx(np.full(24, 4000.0), rel=1e-14)
    assert loan.balloon == 1e6


def test_the_last_payment_clears_the_balance_to_the_last_digit() -> None:
    for rate in np.linspace(0.0, 0.3, 61):
        assert schedule(123_456.78, float(rate), 17).balloon == 0.0


def test_nothing_is_due_after_the_last_payment() -> None:
    loan = schedule(1000.0, 0.05, 3, interest_only=1, term=6)
    assert (loan.payment[4:] == 0).all()
    assert (loan.balance[3:] == 0).all()


def test_a_loan_without_interest_repays_evenly() -> None:
    loan = schedule(600.0, 0.0, 6)
    assert loan.balance == pytest.approx([500.0, 400.0, 300.0, 200.0, 100.0, 0.0], abs=1e-12)
    assert (loan.interest == 0).all()


def test_a_rate_row_recasts_the_payment() -> None:
    # Year 2 repays what year 1 left, over the 348 payments left, at the new rate.
    loan = schedule(100_000.0, [0.09] * 12 + [0.12] * 348, 360)
    assert loan.payment[:12] == pytest.approx(np.full(12, payment(1e5, 0.09, 360)), rel=1e-12)
    after = payment(float(loan.balance[11]), 0.12, 348)
    assert loan.payment[12:] == pytest.approx(np.full(348, after), rel=1e-10)


@settings(deadline=None)
@given(
    st.floats(1.0, 1e9),
    st.lists(rates, min_size=1, max_size=90),
    st.integers(1, 100),
    st.integers(0, 40),
)
def test_as_month_by_month(
    principal: float, annual: list[float], months: int, interest_only: int
) -> None:
    loan = schedule(principal, annual, months, interest_only, term=len(annual))
    interest, repaid, balance = month_by_month(principal, annual, months, interest_only)
    close = 1e-13 * principal * max(1.0, max(balance) / principal)
    assert loan.interest == pytest.approx(interest, rel=1e-12, abs=close)
    assert loan.principal == pytest.approx(repaid, rel=1e-12, abs=close)
    assert loan.balance == pytest.approx(balance, rel=1e-12, abs=close)
    assert loan.payment == pytest.approx(loan.interest + loan.principal, rel=1e-15)
    assert loan.principal.sum() + loan.balloon == pytest.approx(principal, rel=1e-12)


def test_as_numpy_financial_and_pyxirr_month_by_month() -> None:
    loan, periods = schedule(350_000.0, 0.0575, 300), np.arange(1, 301)
    interest = -numpy_financial.ipmt(0.0575 / 12, periods, 300, 350_000.0)
    repaid = -numpy_financial.ppmt(0.0575 / 12, periods, 300, 350_000.0)
    assert loan.interest == pytest.approx(interest, rel=1e-9)
    assert loan.principal == pytest.approx(repaid, rel=1e-9)
    total = pyxirr.cumprinc(0.0575 / 12, 300, 350_000.0, 13, 24)
    assert total is not None
    assert loan.principal[12:24].sum() == pytest.approx(-total, rel=1e-10)


def test_closed_form_of_the_balance() -> None:
    # A·expm1((k − n)·l)/expm1(−n·l), l = log1p(i)
    log, months = math.log1p(0.07 / 12), np.arange(1, 361)
    expected = 1e6 * np.expm1((months - 360) * log) / np.expm1(-360 * log)
    assert schedule(1e6, 0.07, 360).balance == pytest.approx(expected, rel=1e-11, abs=1e-8)


def test_a_schedule_returns_its_rate() -> None:
    loan = schedule(1e6, 0.0625, 300, interest_only=24, term=120)
    flows = np.concatenate(([-1e6], loan.payment))
    flows[-1] += loan.balloon
    rate = irr(flows).rate
    assert rate == pytest.approx(0.0625 / 12, rel=1e-12)


@pytest.mark.parametrize("annual", [[0.05] * 3, [0.05] * 25, [[0.05] * 24]])
def test_one_rate_or_one_per_month(annual: npt.ArrayLike) -> None:
    with pytest.raises(ValueError, match="one per month"):
        schedule(1.0, annual, 24)


@pytest.mark.parametrize("part", [field.name for field in dataclasses.fields(Schedule)])
def test_a_schedule_is_a_frozen_record(part: str) -> None:
    with pytest.raises(dataclasses.FrozenInstanceError):
        setattr(schedule(100.0, 0.05, 12), part, 1.0)


# Balance ratios


def test_ratios_by_hand() -> None:
    # At 12 % with 2 payments left, of 1: p = 1.0201/2.01, left is 1.01 − p = 1.01/2.01.
    ratios = balance_ratios([0.12, 0.12, 0.12, 0.12], 2, 1)
    assert ratios == pytest.approx([1.0, 1.01 / 2.01, 0.0, 0.0], rel=1e-14)
    assert ratios[2:].tolist() == [0.0, 0.0]


def test_ratios_without_interest() -> None:
    assert balance_ratios([0.0] * 5, 4, 1) == pytest.approx([1, 3 / 4, 2 / 3, 1 / 2, 0], rel=1e-15)


def test_ratios_of_many_trials() -> None:
    annual = np.random.default_rng(4).uniform(0.0, 0.12, (60, 7))
    annual[:, 3] = 0.0
    ratios = balance_ratios(annual, 40, 6)
    assert ratios.shape == (60, 7)
    for trial in range(7):
        assert np.array_equal(ratios[:, trial], balance_ratios(annual[:, trial], 40, 6))
        loan = schedule(1.0, annual[:, trial], 40, 6, term=60)
        assert np.cumprod(ratios[:, trial]) == pytest.approx(loan.balance, rel=1e-15)
    assert balance_ratios(annual[:, :1], 40, 6).shape == (60, 1)


# Annual percentage rate


def test_apr_by_hand() -> None:
    assert apr(100.0, [101.0]) == pytest.approx(0.12, rel=1e-13)
    # 1 + f·i: half a unit-period of simple interest
    assert apr(100.0, [101.0], [0.5]) == pytest.approx(0.24, rel=1e-13)
    # and (1 + i/2)(1 + i) = 1.015·1.03 for a period and a half
    assert apr(100.0, [104.545], [1.5], 1.0) == pytest.approx(0.03, rel=1e-13)
    assert apr(100.0, [50.0, 50.0]) == pytest.approx(0.0, abs=1e-14)
    assert apr(100.0, [50.0]) == pytest.approx(-6.0, rel=1e-13)


def test_a_prepaid_charge_raises_the_rate() -> None:
    level = payment(100_000.0, 0.06, 360)
    assert apr(100_000.0, [level] * 360) == pytest.approx(0.06, rel=1e-12)
    charged = apr(98_000.0, [level] * 360)
    assert charged == apr(100_000.0, [2000.0] + [level] * 360, range(361))
    assert charged is not None
    assert charged > 0.06


@settings(deadline=None)
@given(
    st.floats(1.0, 1e6),
    st.lists(st.floats(0.0, 1e5), min_size=1, max_size=80).filter(lambda paid: max(paid) > 1.0),
)
def test_apr_is_the_periodic_internal_rate(advance: float, paid: list[float]) -> None:
    rate, periodic = apr(advance, paid), irr([-advance, *paid]).rate
    assert rate is not None
    assert periodic is not None
    assert 1 + rate / 12 == pytest.approx(1 + periodic, rel=1e-11)


@settings(deadline=None)
@given(
    st.lists(st.floats(1.0, 100.0), min_size=1, max_size=40),
    st.floats(0.0, 0.99),
    st.floats(-0.02, 0.5),
)
def test_apr_solves_its_equation(paid: list[float], part: float, rate: float) -> None:
    whole = np.arange(1, len(paid) + 1)
    advance = float(np.sum(np.array(paid) / ((1 + part * rate) * (1 + rate) ** whole)))
    found = apr(advance, paid, whole + part, 1.0)
    assert found == pytest.approx(rate, rel=1e-9, abs=1e-12)


def test_apr_of_huge_sums() -> None:
    assert apr(1e300, [1.01e300]) == pytest.approx(0.12, rel=1e-12)
    assert apr(1.0, [1e200], [1.0], 1.0) == pytest.approx(1e200, rel=1e-9)
    # A hair's breadth of time: 1e-7 in a millionth of a period
    assert apr(1.0, [1.0000001], [1e-6], 1.0) == pytest.approx(0.1, rel=1e-8)


@pytest.mark.parametrize(
    ("advance", "paid", "times"),
    [
        (0.0, [1.0], None),
        (-1.0, [1.0], None),
        (math.nan, [1.0], None),
        (1.0, [], None),
        (1.0, [0.0], None),
        (1.0, [1.0], [0.0]),
        (1.0, [0.5], [0.0]),
        (1.0, [2.0, 1.0], [0.0, 1.0]),
        (1.0, [-1.0, 3.0], None),
        (1.0, [math.inf], None),
        (1.0, [1.0], [-1.0]),
        (1.0, [1.0], [math.nan]),
        (1.0, [1e-10], None),
        (1.0, [0.01], [0.5]),
    ],
)
def test_no_rate_answers(advance: float, paid: list[float], times: list[float] | None) -> None:
    assert apr(advance, paid, times) is None


@pytest.mark.parametrize(("paid", "times"), [([1.0, 2.0], [1.0]), ([[1.0]], None)])
def test_one_time_for_each_payment(paid: list[float], times: list[float] | None) -> None:
    with pytest.raises(ValueError, match="one time for each payment"):
        apr(1.0, paid, times)
