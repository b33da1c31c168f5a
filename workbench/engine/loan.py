"""Level-payment loans in closed form: payment, balance, schedule.

Interest is 30/360: a month bears a twelfth of the annual rate. Payments fall at the end of months
1, 2, … after closing.
"""

from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from workbench.engine.actuarial import apr

__all__ = ["Schedule", "apr", "balance_ratios", "payment", "schedule"]

Array = npt.NDArray[np.float64]


@dataclass(frozen=True, eq=False)
class Schedule:
    """A loan month by month; every array has the shape (term,), money, at the end of the month."""

    interest: Array
    principal: Array
    payment: Array  # interest + principal, without the balloon
    balance: Array  # after the payment, before the balloon is repaid
    balloon: float  # the last balance: what falls due at the end of the term


def payment(principal: float, rate_annual: float, months: int) -> float:
    """Level monthly payment that repays a loan in full.

    Parameters
    ----------
    principal : float
        Money lent.
    rate_annual : float
        Nominal; a twelfth of it is due each month. May be 0 or negative, above −12.
    months : int
        Number of payments, at least 1.

    Returns
    -------
    float
        Money per month, at the end of each.

    Raises
    ------
    ValueError
        For fewer than one month, or a rate of −12 or less or not finite.

    Examples
    --------
    >>> round(payment(100_000, 0.08, 360), 2)
    733.76
    """
    if months < 1:
        raise ValueError("a loan needs at least one payment")
    rate = _monthly(rate_annual)
    return principal * float(rate + repaid_share(rate, np.asarray(float(months))))


def balance_ratios(
    rate_annual_by_month: npt.ArrayLike, amortisation: int, interest_only: int
) -> Array:
    """What each month leaves of the balance: 1 while interest-only, 0 from the last payment on.

    With R payments left at monthly rate i, the level payment leaves ``1 − i/((1 + i)**R − 1)`` of
    the balance, or ``1 − 1/R`` where i is 0. The balance is the loan times the running product.

    Parameters
    ----------
    rate_annual_by_month : array_like, shape (months,) or (months, trials)
        Nominal annual rate that applies in each month; a change recasts the level payment over the
        payments left. The shape (months, 1) serves all trials.
    amortisation : int
        Payments from the end of interest-only to the last one, at least 1.
    interest_only : int
        Months before amortisation begins.

    Returns
    -------
    array
        Ratios, of the shape given.

    Raises
    ------
    ValueError
        As for `payment`.

    Examples
    --------
    >>> balance_ratios([0.0, 0.0, 0.0], 2, 1)
    array([1. , 0.5, 0. ])
    """
    return 1.0 - _shares(_monthly(rate_annual_by_month), amortisation, interest_only)


def schedule(
    principal: float,
    rate_annual: float | npt.ArrayLike,
    months: int,
    interest_only: int = 0,
    term: int | None = None,
) -> Schedule:
    """Interest, principal and balance of a level-payment loan.

    Parameters
    ----------
    principal : float
        Money lent at closing.
    rate_annual : float or array_like, shape (term,)
        Nominal; one rate per month recasts the payment as `balance_ratios` says.
    months : int
        Amortisation, counted from the end of interest-only, at least 1.
    interest_only : int
        Months of interest without repayment at the start.
    term : int, optional
        Months to maturity; ``interest_only + months`` if left out. What is left then is the
        balloon.

    Returns
    -------
    Schedule

    Raises
    ------
    ValueError
        As for `payment`; for a term below 1, or rates that are not one or one per month.

    Examples
    --------
    >>> loan = schedule(1200.0, 0.12, 12, interest_only=1, term=3)
    >>> loan.interest.round(2)
    array([12.  , 12.  , 11.05])
    >>> round(loan.balloon, 2)
    1009.82
    """
    length = interest_only + months if term is None else term
    if length < 1:
        raise ValueError("a loan needs a term of at least one month")
    rate = _monthly(rate_annual)
    if rate.shape not in ((), (length,)):
        raise ValueError("there must be one rate, or one per month of the term")
    rate = np.broadcast_to(rate, (length,))
    share = _shares(rate, months, interest_only)
    balance = np.asarray(principal * np.cumprod(1.0 - share), dtype=np.float64)
    before = np.concatenate(([principal], balance[:-1]))
    interest, repaid = before * rate, before * share
    return Schedule(interest, repaid, interest + repaid, balance, float(balance[-1]))


def _monthly(rate_annual: npt.ArrayLike) -> Array:
    rate: Array = np.asarray(rate_annual, dtype=np.float64) / 12
    if not (np.isfinite(rate).all() and (rate > -1).all()):
        raise ValueError("an annual rate must be finite and above −12")
    return rate


def _shares(rate: Array, amortisation: int, interest_only: int) -> Array:
    """Share of the balance that each month's payment repays; months lead."""
    if amortisation < 1:
        raise ValueError("a loan needs at least one payment")
    past = np.arange(len(rate)) - interest_only
    left = (amortisation - past).astype(np.float64).reshape((-1,) + (1,) * (rate.ndim - 1))
    return np.where(left > amortisation, 0.0, repaid_share(rate, left))


def repaid_share(rate: Array, left: Array) -> Array:
    """i/((1 + i)**R − 1): share of the balance that the next of R level payments repays."""
    growth = np.expm1(np.minimum(np.maximum(left, 1.0) * np.log1p(rate), 700.0))
    flat = growth == 0
    share = np.where(flat, 1.0 / np.maximum(left, 1.0), rate / np.where(flat, 1.0, growth))
    return np.where(left <= 1, 1.0, share)
