"""Many internal rates at once: Newton's method on the logarithm of inflow over outlay.

Let ``a(x)`` be the present value of a row's first run of flows of one sign, and ``p(x)`` that of
the whole row, at the continuous rate x. ``log(−(p − a)/a)`` is zero where p is zero and nearly a
straight line in x, so Newton's method reaches the root in a few steps from anywhere sensible. For a
row with one leading flow it is convex and falling, and the method cannot fail. Because the
logarithm is taken as ``log1p(−p/a)``, the last steps are ordinary exact Newton steps on p.

Arrays here are turned: the shape is (flows, rows), so that a step in time is a vector operation.
"""

import numpy as np

from workbench.engine.irr_worth import Array, held, range_ahead, scaled, worth

LOWEST = float(np.log(1e-12))  # continuous rate of −99.9999999999 % a year
HIGHEST = float(np.log(1e300))
CLOSE = 4e-8  # a last step this small, times the span, leaves an error near its square
STEPS = 24
DEEP = 600.0  # exponents at which discounted flows get near the smallest double


def even_step(times: Array) -> float | None:
    """The step in years of evenly spaced times, or None where they are not even."""
    step = float(times[-1] - times[0]) / (len(times) - 1)
    gap = np.abs(times - times[0] - step * np.arange(len(times)))
    return step if float(gap.max()) <= np.spacing(times[-1] - times[0]) else None


def settle(flows: Array, times: Array, step: float | None, start: float | None = None) -> Array:
    """Continuous annual rates of the rows whose only rate is certain; NaN for the others.

    ``flows`` has the shape (flows, rows), ``times`` (flows,) starts at 0. Certain: the row changes
    sign once, or its running balance at the rate found keeps one sign to the end. ``start`` is a
    rate known to be near those of most rows.
    """
    with np.errstate(all="ignore"):
        if not flows[0].any():  # dates before any row begins would only blur the certificate
            opened = min(int(np.argmax(flows.any(axis=1))), len(flows) - 2)
            flows, times = flows[opened:], times[opened:] - times[opened]
        first = flows[0]
        low, high = np.minimum.reduce(flows[1:]), np.maximum.reduce(flows[1:])
        flows = scaled(flows, np.maximum(np.maximum(high, -low), np.abs(first)))
        plain = ((first < 0) & (low >= 0)) | ((first > 0) & (high <= 0))
        if plain.all():
            rates = _roots(flows, flows[:1], times, step, start)
        elif not plain.any():
            rates = _certified(flows, times, step, start)
        else:
            rates = np.empty(len(first))
            part = flows[:, plain]
            rates[plain] = _roots(part, part[:1], times, step, start)
            rates[~plain] = _certified(flows[:, ~plain], times, step, start)
        rates[~((rates >= LOWEST) & (rates <= HIGHEST))] = np.nan
        return rates


def _certified(flows: Array, times: Array, step: float | None, start: float | None) -> Array:
    """Rates of rows with longer outlays or several changes of sign, where a certificate holds."""
    begun = np.argmax(flows != 0, axis=0)
    opening = np.sign(flows[begun, np.arange(flows.shape[1])])
    against = flows * opening < 0
    turned = np.maximum(np.argmax(against, axis=0), 1)
    depth = int(turned.max())
    lead = np.where(np.arange(depth)[:, None] < turned, flows[:depth], 0.0)
    rates = _roots(flows, lead, times, step, start)
    # What is still to come, seen from each date, is the running balance with its sign turned. One
    # change of sign needs no test of its own: what is still to come then never changes sign. Where
    # rounding hides that, or a late flow could vanish, the row is searched like any other.
    least, most = range_ahead(flows, times, step, rates)
    pure = np.where(opening < 0, least >= 0, most <= 0) & (np.abs(rates) * times[-1] < DEEP)
    return np.where(pure & np.logical_or.reduce(against), rates, np.nan)


def _roots(
    flows: Array, lead: Array, times: Array, step: float | None, start: float | None
) -> Array:
    """A root of each row, or NaN where Newton's method does not come to rest."""
    rates = np.full(flows.shape[1], start or 0.0)
    for _ in range(2 if start is None else 1):
        better = _from_common(flows, lead, times, middle(rates))
        rates = np.where(np.isfinite(better), better, rates)
    moving = np.arange(flows.shape[1])
    for _ in range(STEPS):
        at, move = _newton(flows, lead, times, step, rates[moving])
        rates[moving] = at - move
        still = np.abs(move) * times[-1] > CLOSE  # not so for NaN, which stays
        if not still.any():
            return rates
        if 4 * np.count_nonzero(still) < len(still):
            moving, flows, lead = moving[still], flows[:, still], lead[:, still]
            still = still[still]
    rates[moving[still]] = np.nan
    return rates


def middle(rates: Array) -> float:
    """The rate in the middle of the batch, where a common step serves most rows."""
    half = len(rates) // 2
    return float(np.partition(rates, half)[half])


def _from_common(flows: Array, lead: Array, times: Array, rate: float) -> Array:
    """Third-order step of every row from one rate: for all rows it is a single matrix product."""
    weights = np.empty((4, len(times)))
    weights[0] = np.exp(-rate * times)
    for power in (1, 2, 3):
        np.multiply(weights[power - 1], times, out=weights[power])
    whole = weights @ flows
    early = weights[:, : len(lead)] @ lead
    # In the move u the logarithm is log(ratio) − length·u + spread·u²/2 − skew·u³/6.
    length, spread, skew = _cumulants(whole - early) - _cumulants(early)
    move: Array = np.log1p(-whole[0] / early[0]) / length
    bend = spread / (2 * length) * move
    twist: Array = 2 * bend**2 - skew / (6 * length) * move**2
    return rate + move * np.where(np.abs(bend) < 0.4, 1 + bend + twist, 1.0)


def _cumulants(moments: Array) -> Array:
    """Mean, variance and third cumulant of the flows' times, weighted by what they are worth."""
    mean, second, third = moments[1:] / moments[0]
    return np.stack((mean, second - mean**2, third - 3 * mean * second + 2 * mean**3))


def _newton(
    flows: Array, lead: Array, times: Array, step: float | None, rates: Array
) -> tuple[Array, Array]:
    """The rates in fact used, and what Newton's method takes off them."""
    whole, whole_slope = worth(flows, times, step, rates)
    early, early_slope = worth(lead, times, step, rates)
    slope = (whole_slope - early_slope) / (whole - early) - early_slope / early
    return held(step, rates), np.log1p(-whole / early) / slope
