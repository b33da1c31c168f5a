"""Present values of many rows of flows, each row at a rate of its own.

Arrays are turned: the shape is (flows, rows), so that a step in time is a vector operation. Rates
are continuous and annual.
"""

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]

FEW = 256  # below this many rows exponentials beat one vector operation per flow
REACH = 8.0  # exponents beyond which the discount factors' own rounding shows


def worth(flows: Array, times: Array, step: float | None, rates: Array) -> tuple[Array, Array]:
    """Present values of the rows and their slopes in the rate."""
    if step is None or len(rates) < FEW:
        part = flows * np.exp(-times[: len(flows), None] * rates)
        return np.add.reduce(part), -(times[: len(flows)] @ part)
    return _by_horner(flows, step, np.exp(-step * rates))


def held(step: float | None, rates: Array) -> Array:
    """The rates that `worth` in fact uses: Horner's rule has a rounded factor in their place."""
    if step is None or len(rates) < FEW:
        return rates
    return np.asarray(-np.log1p(np.exp(-step * rates) - 1) / step)


def _by_horner(flows: Array, step: float, factor: Array) -> tuple[Array, Array]:
    """The same for evenly spaced flows, by Horner's rule in the discount factor of one step."""
    value, slope = flows[-1].copy(), np.zeros_like(factor)
    for flow in flows[-2::-1]:
        slope *= factor
        slope += value
        value *= factor
        value += flow
    slope *= -step * factor
    return value, slope


def range_ahead(
    flows: Array, times: Array, step: float | None, rates: Array
) -> tuple[Array, Array]:
    """Least and greatest worth of what is still to come, at each row's rate, after each flow."""
    if step is None or len(rates) < FEW:
        ahead = np.add.accumulate((flows * np.exp(-times[:, None] * rates))[:0:-1])
        return np.minimum.reduce(ahead), np.maximum.reduce(ahead)
    factor = np.exp(-step * rates)
    value = flows[-1].copy()
    least, most = value.copy(), value.copy()
    for flow in flows[-2:0:-1]:
        value *= factor
        value += flow
        np.minimum(least, value, out=least)
        np.maximum(most, value, out=most)
    return least, most


def scaled(flows: Array, largest: Array) -> Array:
    """Rows too large or too small to multiply safely, brought near 1 by an exact power of two."""
    odd = ~((largest < 1e150) & (largest > 1e-150))
    if not odd.any():
        return flows
    flows = flows.copy()
    flows[:, odd] = np.ldexp(flows[:, odd], -np.frexp(largest[odd])[1])
    return flows


def annual(flows: Array, times: Array, rates: Array) -> Array:
    """Annual effective rates for continuous ones, exact also where the exponents are large.

    ``flows`` is (flows, rows) or, for several rates of one row, (flows, 1). The error of exp(−x·t)
    grows with x·t; that of a power of 1 + rate does not, once the rounding of 1 + rate is undone.
    """
    effective = np.expm1(rates)
    far = np.abs(rates) * times[-1] > REACH
    if not far.any():
        return effective
    part = flows if flows.shape[1] == 1 else flows[:, far]
    rate = effective[far]
    base = 1 + rate
    lost = (rate - (base - 1)) / base
    used = part != 0
    opening, closing = times[used.argmax(axis=0)], times[::-1][used[::-1].argmax(axis=0)]
    after, before = times[:, None] - opening, times[:, None] - closing
    since = np.where(rate < 0, np.minimum(before, 0.0), np.maximum(after, 0.0))
    with np.errstate(all="ignore"):
        pieces = scaled(part, np.abs(part).max(axis=0)) * base**-since * (1 - since * lost)
        move = base * np.add.reduce(pieces) / np.add.reduce(pieces * since)
    effective[far] = rate + np.where(np.abs(move) < 1e-9 * base, move, 0.0)
    return effective
