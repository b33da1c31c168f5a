"""What a series of dated flows is worth, and what it returns."""

import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from workbench.engine.irr import STATUSES, Irr, IrrBatch, irr, irr_batch

__all__ = ["STATUSES", "Irr", "IrrBatch", "irr", "irr_batch", "mirr", "npv"]

Array = npt.NDArray[np.float64]
SAFE = 600.0  # exponents of discount factors that can be summed as they are
LARGEST = 709.78  # logarithm of the largest double


def npv(rate: float, flows: npt.ArrayLike, times: npt.ArrayLike | None = None) -> float:
    """Present value of dated flows at one rate.

    Parameters
    ----------
    rate : float
        Annual effective, above −1.
    flows : array_like, shape (periods,)
        Money, signed.
    times : array_like, shape (periods,), optional
        Years from the date of valuation; 0, 1, 2, … if left out, so that the first flow counts in
        full (a spreadsheet's NPV starts at 1).

    Returns
    -------
    float
        Money; infinite where it is too large for a double.

    Raises
    ------
    ValueError
        For a rate of −1 or less, a number that is not finite, or times that do not fit.

    Examples
    --------
    >>> round(npv(0.10, [-100.0, 60.0, 60.0]), 6)  # −100 + 60/1.1 + 60/1.21
    4.132231
    """
    money, when = _dated(flows, times)
    worth = _worth(rate, money, when)
    return 0.0 if worth is None else worth.money()


def mirr(
    flows: npt.ArrayLike,
    finance: float,
    reinvest: float,
    times: npt.ArrayLike | None = None,
    years: float | None = None,
) -> float | None:
    """Modified internal rate: outlays financed at one rate, receipts reinvested at another.

    ``(value of the receipts at the end ÷ present value of the outlays) ** (1/n) − 1``.

    Parameters
    ----------
    flows : array_like, shape (periods,)
        Money, signed.
    finance, reinvest : float
        Annual effective rates, above −1.
    times : array_like, shape (periods,), optional
        Years from the start; 0, 1, 2, … if left out.
    years : float, optional
        The n of the formula and the end receipts are carried to; the last time if left out.

    Returns
    -------
    float or None
        Annual effective rate; None without receipts or without outlays.

    Raises
    ------
    ValueError
        As for `npv`, and where there is no time between start and end.

    Examples
    --------
    >>> round(mirr([-100.0, 60.0, 60.0], 0.08, 0.05), 6)  # (60·1.05 + 60) / 100 = 1.23
    0.109054
    """
    money, when = _dated(flows, times)
    paid = _worth(finance, np.minimum(money, 0.0), when)
    received = _worth(reinvest, np.maximum(money, 0.0), when)
    if paid is None or received is None:
        return None
    end = float(when[-1]) if years is None else years
    if not end > 0:
        raise ValueError("the end must be later than the start")
    return math.expm1((received.log() - paid.log()) / end + math.log1p(reinvest))


def _dated(flows: npt.ArrayLike, times: npt.ArrayLike | None) -> tuple[Array, Array]:
    money = np.asarray(flows, dtype=np.float64)
    when = np.arange(money.size) if times is None else np.asarray(times, dtype=np.float64)
    if money.ndim != 1 or when.shape != money.shape:
        raise ValueError("flows must be one series with one time each")
    if not (np.isfinite(money).all() and np.isfinite(when).all()):
        raise ValueError("flows and times must be finite")
    return money, when.astype(np.float64)


@dataclass(frozen=True)
class Worth:
    """total · 2**twos · e**shift, kept apart so that nothing overflows on the way."""

    total: float
    twos: int
    shift: float

    def log(self) -> float:
        return math.log(abs(self.total)) + self.twos * math.log(2) + self.shift

    def money(self) -> float:
        if self.total == 0.0:
            return 0.0
        if self.log() > LARGEST:
            return math.copysign(math.inf, self.total)
        if self.shift:
            return math.copysign(math.exp(self.log()), self.total)
        return math.ldexp(self.total, self.twos)


def _worth(rate: float, money: Array, when: Array) -> Worth | None:
    """Present value, or None where there are no flows.

    Discount factors come from log1p: 1 + rate, once rounded, would be wrong 480 times over.
    """
    if not (math.isfinite(rate) and rate > -1):
        raise ValueError("the rate must be above −1")
    kept = money != 0
    if not kept.any():
        return None
    twos = math.frexp(float(np.abs(money).max()))[1]
    scaled = np.ldexp(money[kept], -twos)
    powers = -math.log1p(rate) * when[kept]
    if float(np.abs(powers).max()) <= SAFE:
        return Worth(float(scaled @ np.exp(powers)), twos, 0.0)
    sizes = powers + np.log(np.abs(scaled))
    shift = float(sizes.max())
    return Worth(float(np.sign(scaled) @ np.exp(sizes - shift)), twos, shift)
