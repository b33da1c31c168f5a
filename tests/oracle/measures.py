"""Measures of flows dated in months after closing; flows of one date are netted first."""

from math import exp, log

# Rates are looked for from −99 % to 1000 %, on an even grid of log(1 + rate).
LOWEST, HIGHEST, GRID = log(0.01), log(11.0), 2500


def npv_at(flows: list[float], log_rate: float) -> float:
    """Σ f_k (1+i)^(−k/12), summed from the last month inwards."""
    factor = exp(-log_rate / 12)
    total = 0.0
    for flow in reversed(flows):
        total = total * factor + flow
    return total


def bisect(flows: list[float], low: float, high: float) -> float:
    """The log rate between two at which the net present value changes its sign."""
    rising = npv_at(flows, low) < 0
    while high - low > 1e-15 * max(1.0, abs(low)):
        middle = (low + high) / 2
        if middle in (low, high):
            break
        if (npv_at(flows, middle) < 0) == rising:
            low = middle
        else:
            high = middle
    return (low + high) / 2


def irr(flows: list[float]) -> float | None:
    """The internal rate of return, None unless exactly one is found."""
    roots: list[float] = []
    step = (HIGHEST - LOWEST) / GRID
    low, before = LOWEST, npv_at(flows, LOWEST)
    for i in range(1, GRID + 1):
        high = LOWEST + step * i
        after = npv_at(flows, high)
        if (before < 0) != (after < 0):
            roots.append(bisect(flows, low, high))
        low, before = high, after
    signs = any(f > 0 for f in flows) and any(f < 0 for f in flows)
    return exp(roots[0]) - 1 if signs and len(roots) == 1 else None


def mirr(flows: list[float], hold: int, finance: float, reinvest: float) -> float | None:
    """(future value of receipts / present value of payments)^(1/N) − 1."""
    paid = sum(-f * (1 + finance) ** (-k / 12) for k, f in enumerate(flows) if f < 0)
    received = sum(f * (1 + reinvest) ** (hold - k / 12) for k, f in enumerate(flows) if f > 0)
    if paid <= 0 or received <= 0:
        return None
    return float((received / paid) ** (1 / hold)) - 1


def multiple(flows: list[float]) -> float | None:
    """All receipts over all payments."""
    paid = sum(-f for f in flows if f < 0)
    return sum(f for f in flows if f > 0) / paid if paid > 0 else None


def npv(flows: list[float], table: list[float]) -> float:
    """Flows by the discount factors of their months."""
    return sum(flow * table[k] for k, flow in enumerate(flows))


def ratio(above: float, below: float) -> float | None:
    """A quotient, None where there is nothing to divide by."""
    return above / below if below != 0 else None
