"""Present value and modified internal rate: hand-worked cases, libraries, 40 digits."""

import math

import mpmath
import numpy as np
import numpy.typing as npt
import numpy_financial
import pytest
import pyxirr
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.engine import cash
from workbench.engine.cash import mirr, npv

money = st.floats(-1e9, 1e9, allow_subnormal=False)
rates = st.floats(-0.5, 3.0)


def exact_npv(rate: float, flows: list[float], times: list[float]) -> tuple[float, float]:
    """Present value and the sum of its parts' sizes, from 40 digits."""
    with mpmath.workdps(40):
        parts = [
            mpmath.mpf(flow) * (1 + mpmath.mpf(rate)) ** -mpmath.mpf(time)
            for flow, time in zip(flows, times, strict=True)
        ]
        return float(mpmath.fsum(parts)), float(mpmath.fsum(parts, absolute=True))


def test_present_value_by_hand() -> None:
    # −100 + 60/1.1 + 60/1.21 = −100 + 54.545454… + 49.586776… = 500/121
    assert npv(0.10, [-100.0, 60.0, 60.0]) == pytest.approx(500 / 121, rel=1e-14)
    # From the end of the first year on: one more year of discounting.
    assert npv(0.10, [-100.0, 60.0, 60.0], [1, 2, 3]) == pytest.approx(500 / 121 / 1.1, rel=1e-14)
    # 121 after two years at 10 %, 110 after one: 100 each; half a year at 21 % takes off 1.1.
    assert npv(0.10, [110, 121], [1, 2]) == pytest.approx(200, rel=1e-15)
    assert npv(0.21, [110.0], [0.5]) == pytest.approx(100, rel=1e-15)


def test_nothing_is_worth_nothing() -> None:
    assert npv(0.05, []) == 0.0
    assert npv(0.05, [0.0, 0.0]) == 0.0
    assert npv(0.0, [-1.0, 1.0]) == 0.0


@settings(deadline=None)
@given(rates, st.lists(money, min_size=1, max_size=60), st.sampled_from([1.0, 1 / 12]))
def test_present_value_to_the_last_digits(rate: float, flows: list[float], step: float) -> None:
    times = [step * k for k in range(len(flows))]
    value, size = exact_npv(rate, flows, times)
    reach = 1 + abs(math.log1p(rate)) * times[-1]  # rounding of an exponent grows with it
    assert npv(rate, flows, times) == pytest.approx(value, rel=0, abs=4e-16 * (4 + reach) * size)


@settings(deadline=None)
@given(rates, st.lists(money, min_size=2, max_size=40))
def test_present_value_as_pyxirr_has_it(rate: float, flows: list[float]) -> None:
    size = npv(rate, [abs(flow) for flow in flows])
    assert npv(rate, flows) == pytest.approx(
        pyxirr.npv(rate, flows), rel=0, abs=1e-12 * size + 1e-12
    )


def test_480_months_lose_no_digits() -> None:
    rate, flows = 0.0712345, np.full(480, 1234.5)
    times = np.arange(1, 481) / 12
    value, _ = exact_npv(rate, flows.tolist(), times.tolist())
    assert npv(rate, flows, times) == pytest.approx(value, rel=4e-16)


def test_huge_and_tiny_money() -> None:
    assert npv(0.10, [-1e300, 1.1e300, 1.21e300]) == pytest.approx(1e300, rel=1e-15)
    assert npv(0.0, [1e308, 1e308, -1e308, -1e308, 1.0]) == pytest.approx(0.0, abs=1e292)
    assert npv(1.0, [-5e-324, 2e-323]) == 5e-324
    assert npv(0.0, [1.7e308, 1.7e308]) == math.inf
    assert npv(0.0, [-1.7e308, -1.7e308]) == -math.inf


def test_exponents_beyond_a_double() -> None:
    # (1e-6) ** −480 = 1e2880 is no double.
    assert npv(-0.999999, [1.0], [480]) == math.inf
    assert npv(-0.999999, [-1.0, 1.0], [0, 480]) == math.inf
    assert npv(-0.999999, [0.0, -1.0], [0, 480]) == -math.inf
    assert npv(1e6, [0.0, 1.0], [0, 480]) == 0.0
    assert npv(-0.9, [1e-300], [350]) == pytest.approx(1e50, rel=1e-12)
    assert npv(-0.9, [1.0, -1.0], [650, 650.0]) == 0.0
    assert npv(9.0, [5.0, 1e300], [0, 300]) == pytest.approx(6.0, rel=1e-12)


@pytest.mark.parametrize("rate", [-1.0, -2.0, math.nan, math.inf])
def test_a_rate_at_which_nothing_can_be_discounted(rate: float) -> None:
    with pytest.raises(ValueError, match="above −1"):
        npv(rate, [1.0, 2.0])


@pytest.mark.parametrize(
    ("flows", "times", "words"),
    [
        ([1.0, 2.0], [0.0], "one time each"),
        ([[1.0, 2.0]], None, "one series"),
        ([1.0, math.nan], None, "finite"),
        ([1.0, 2.0], [0.0, math.inf], "finite"),
    ],
)
def test_series_that_do_not_fit(
    flows: npt.ArrayLike, times: npt.ArrayLike | None, words: str
) -> None:
    with pytest.raises(ValueError, match=words):
        npv(0.1, flows, times)


def test_modified_rate_by_hand() -> None:
    # Outlays −100 and −50/1.08; receipts 90·1.05² + 95·1.05, at the end of year 3, n = 3.
    outlay = 100 + 50 / 1.08
    value = 90 * 1.05**1 + 95
    expected = (value / outlay) ** (1 / 3) - 1
    assert mirr([-100, -50, 90, 95], 0.08, 0.05) == pytest.approx(expected, rel=1e-13)


@settings(deadline=None)
@given(
    st.lists(st.floats(1.0, 1e6), min_size=1, max_size=20),
    st.lists(st.floats(1.0, 1e6), min_size=1, max_size=20),
    st.floats(0.0, 0.5),
    st.floats(0.0, 0.5),
)
def test_modified_rate_as_the_libraries_have_it(
    paid: list[float], received: list[float], finance: float, reinvest: float
) -> None:
    flows = [-flow for flow in paid] + received
    ours = mirr(flows, finance, reinvest)
    assert ours is not None
    theirs = pyxirr.mirr(flows, finance, reinvest)
    assert theirs is not None
    assert 1 + ours == pytest.approx(1 + theirs, rel=1e-12)
    assert 1 + ours == pytest.approx(1 + numpy_financial.mirr(flows, finance, reinvest), rel=1e-12)


def test_modified_rate_of_months() -> None:
    flows = np.concatenate(([-1000.0], np.full(60, 10.0)))
    flows[-1] += 900
    times = np.arange(61) / 12
    monthly = 1.06 ** (1 / 12)
    value = sum(10 * monthly**k for k in range(60)) + 900
    assert mirr(flows, 0.08, 0.06, times) == pytest.approx((value / 1000) ** 0.2 - 1, rel=1e-12)


def test_years_are_the_end_receipts_are_carried_to() -> None:
    # Rent in advance: the last flow falls at year 1, the deal ends with year 2.
    flows, times = [-100.0, 121.0], [0.0, 1.0]
    assert mirr(flows, 0.0, 0.10, times) == pytest.approx(0.21, rel=1e-14)
    expected = math.sqrt(1.21 * 1.10) - 1
    assert mirr(flows, 0.0, 0.10, times, years=2) == pytest.approx(expected, rel=1e-14)


def test_at_the_internal_rate_both_rates_agree() -> None:
    flows = [-100.0, 30.0, -10.0, 60.0, 80.0]
    rate = cash.irr(flows).rate
    assert rate is not None
    assert mirr(flows, rate, rate) == pytest.approx(rate, rel=1e-12)


def test_modified_rate_of_huge_money() -> None:
    small, huge = mirr([-1, 2, 3], 0.1, 0.1), mirr([-1e300, 2e300, 3e300], 0.1, 0.1)
    assert small is not None
    assert huge == pytest.approx(small, rel=1e-12)


def test_no_modified_rate_without_two_sides() -> None:
    assert mirr([10.0, 20.0], 0.1, 0.1) is None
    assert mirr([-10.0, -20.0], 0.1, 0.1) is None
    assert mirr([], 0.1, 0.1) is None


@pytest.mark.parametrize("years", [0.0, -1.0, math.nan])
def test_no_time_between_start_and_end(years: float) -> None:
    with pytest.raises(ValueError, match="later than the start"):
        mirr([-1.0, 2.0], 0.1, 0.1, years=years)
