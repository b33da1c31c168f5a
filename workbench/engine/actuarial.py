"""The annual percentage rate of a loan by the actuarial method."""

import math

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]
LOWEST = -0.999999999  # of a rate per unit-period


def apr(
    advance: float,
    payments: npt.ArrayLike,
    times: npt.ArrayLike | None = None,
    periods_per_year: float = 12.0,
) -> float | None:
    """Nominal annual percentage rate by the actuarial method.

    The rate i per unit-period at which the payments, each divided by ``(1 + f·i)·(1 + i)**t``, are
    worth the advance, times the unit-periods in a year; t is the whole and f the fractional part of
    a payment's time.

    Parameters
    ----------
    advance : float
        Money had at time 0: the loan less prepaid finance charges.
    payments : array_like, shape (payments,)
        Money, none below 0.
    times : array_like, shape (payments,), optional
        Unit-periods from the advance, not below 0; 1, 2, 3, … if left out.
    periods_per_year : float
        Unit-periods in a year: 12 for months, 365/days for a single payment within a year.

    Returns
    -------
    float or None
        A fraction, such as 0.0969. None where no rate answers: nothing left of the advance after
        payments at time 0, no later payment, a payment or time below 0, a number that is not
        finite, or a loss of all but a billionth of the advance per unit-period.

    Raises
    ------
    ValueError
        Where there is not one time for each payment.

    References
    ----------
    12 CFR 1026 (Regulation Z), Appendix J, equation (b)(8).

    Examples
    --------
    >>> round(apr(1000.0, [33.61] * 36), 4)  # Appendix J (b)(9)(i)
    0.1283
    """
    paid = np.asarray(payments, dtype=np.float64)
    when = np.arange(1.0, paid.size + 1) if times is None else np.asarray(times, dtype=np.float64)
    if paid.ndim != 1 or when.shape != paid.shape:
        raise ValueError("there must be one time for each payment")
    later = (paid > 0) & (when > 0)
    lent = advance - float(paid[when == 0].sum())
    fit = bool(np.isfinite(paid).all() and np.isfinite(when).all() and math.isfinite(lent))
    if not (fit and lent > 0 and later.any() and (paid >= 0).all() and (when >= 0).all()):
        return None
    rate = _unit_rate(np.log(paid[later]) - math.log(lent), when[later])
    return None if rate is None else periods_per_year * rate


def _unit_rate(sizes: Array, when: Array) -> float | None:
    """Rate per unit-period at which payments, given as logarithms of their sizes, are worth 1.

    The logarithm of their worth is convex and falls with the rate, so that Newton's method comes
    to the root from one side without a bracket; the guard keeps a first step above −1.
    """
    whole = np.floor(when)
    part = when - whole
    rate = 0.0
    while True:
        powers = sizes - np.log1p(part * rate) - whole * math.log1p(rate)
        largest = float(powers.max())
        worth = np.exp(powers - largest)
        total = float(worth.sum())
        slope = float(worth @ (part / (1 + part * rate) + whole / (1 + rate))) / total
        following = max(rate + (largest + math.log(total)) / slope, (rate - 1) / 2)
        move, rate = abs(following - rate), following
        # The next step would be the square of this one, or the noise of the sums.
        if move <= 1e-10 * (0.01 + abs(rate)) + 1e-14 / slope:
            return rate if rate > LOWEST else None
