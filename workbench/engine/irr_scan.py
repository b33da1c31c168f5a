"""Every rate at which one row of flows is worth nothing, however often it changes sign.

A grid of trial rates can step over two roots that lie close together, or over one that only
touches zero. Here the extrema are found first, by the argument behind Descartes' rule of signs:
multiplied by ``exp(x·τ)``, with τ between two dates where the sign changes, the present value keeps
its roots, and its slope is again a sum of that kind with exactly one change of sign less. Going
down to one change (one root) and back up, each function is monotone between the roots of the one
below it, so that a change of sign between neighbours is one root, and a neighbour at zero is a root
that touches.
"""

import math
from dataclasses import dataclass

import numpy as np

from workbench.engine.irr_rows import HIGHEST, LOWEST
from workbench.engine.irr_worth import Array

EPS = float(np.finfo(np.float64).eps)
TOUCH = 12 * EPS  # of the log ratio; half of it is |NPV| ÷ Σ|PV|
NOTHING = 1e-300  # of the largest coefficient: left out


@dataclass(frozen=True, eq=False)
class Terms:
    """A sum of ``coefficient · exp(−x·time)`` without zero terms, ready to be evaluated."""

    coefficients: Array  # (terms,), the largest near 1
    times: Array  # (terms,), increasing
    sizes: Array  # logarithms of the coefficients' sizes
    table: Array  # (4, terms): gains, losses, and both times their times


def terms(coefficients: Array, times: Array) -> Terms:
    """The sum with zero terms left out and the rest scaled by an exact power of two."""
    scaled = np.ldexp(coefficients, -math.frexp(float(np.abs(coefficients).max()))[1])
    kept = np.abs(scaled) > NOTHING
    used, when = scaled[kept], times[kept]
    gains, losses = np.maximum(used, 0.0), np.maximum(-used, 0.0)
    table = np.array([gains, losses, gains * when, losses * when])
    return Terms(used, when, np.log(np.abs(used)), table)


def sign_changes(coefficients: Array) -> int:
    """How often the sign changes from one flow to the next, zeros left out."""
    signs = np.sign(coefficients[coefficients != 0])
    return int(np.count_nonzero(signs[1:] != signs[:-1]))


def all_roots(flows: Array, times: Array) -> tuple[float, ...]:
    """All continuous annual rates, ascending, at which finite flows are worth nothing.

    Rates from −99.9999999999 % to 1e300 a year are covered, in full and not by samples.
    """
    ladder = [terms(flows, times)]
    if sign_changes(ladder[0].coefficients) == 0:
        return ()
    low, high = _limits(ladder[0])
    while sign_changes(ladder[-1].coefficients) > 1:
        ladder.append(_slope(ladder[-1]))
    found: list[float] = []
    for rung in reversed(ladder):
        found = _roots_between(rung, [low, *found, high])
    return tuple(found)


def _slope(rung: Terms) -> Terms:
    """The slope of the sum times exp(x·τ), τ at its first change of sign: one change less."""
    signs = np.sign(rung.coefficients)
    change = int(np.argmax(signs[1:] != signs[:-1]))
    middle = 0.5 * (rung.times[change] + rung.times[change + 1])
    return terms(rung.coefficients * (middle - rung.times), rung.times)


def _limits(rung: Terms) -> tuple[float, float]:
    """Rates outside of which the first or the last flow outweighs all others together."""
    sizes = np.abs(rung.coefficients)
    first, last = -sizes, sizes.copy()
    first[0], last[-1] = sizes[0], -sizes[-1]
    span = [LOWEST, HIGHEST]
    high = _roots_between(terms(first, rung.times), span)
    low = _roots_between(terms(last, rung.times), span)
    # A little wider, so that a root on the limit itself stays inside.
    return (
        max(LOWEST, low[0] - 1e-6 * (1 + abs(low[0]))) if low else LOWEST,
        min(HIGHEST, high[0] + 1e-6 * (1 + abs(high[0]))) if high else HIGHEST,
    )


def _roots_between(rung: Terms, points: list[float]) -> list[float]:
    """Roots of a sum that is monotone between neighbouring points."""
    values = [log_ratio(rung, point)[0] for point in points]
    found: list[float] = []
    touching = False
    for k, (point, value) in enumerate(zip(points, values, strict=True)):
        if abs(value) <= TOUCH:
            if not touching:
                found.append(point)
            touching = True
            continue
        before = values[k - 1] if k else value
        if not touching and (value > 0) != (before > 0):
            found.append(_bracketed(rung, points[k - 1], point, before > 0))
        touching = False
    return found


def log_ratio(rung: Terms, rate: float) -> tuple[float, float]:
    """Logarithm of the present value of gains over that of losses, and its slope.

    It has the sign and the roots of the sum itself. Both values are taken relative to the largest
    term, so nothing overflows; where one underflows, the ratio is infinite and the slope 0.
    """
    powers = -rate * rung.times
    gains, losses, gains_when, losses_when = (
        rung.table @ np.exp(powers - float((powers + rung.sizes).max()))
    ).tolist()
    if min(gains, losses) < NOTHING:
        return (math.inf if gains > losses else -math.inf), 0.0
    ratio = gains / losses
    close = 0.5 < ratio < 2.0
    value = math.log1p((gains - losses) / losses) if close else math.log(ratio)
    return value, losses_when / losses - gains_when / gains


def _bracketed(rung: Terms, low: float, high: float, falling: bool) -> float:
    """The root between two rates of opposite sign: Newton steps, or halving where they fail.

    Every Newton step is less than half the move before it, and everything else halves the bracket,
    so the moves run out of digits.
    """
    rate, last = (0.0 if low < 0 < high else 0.5 * (low + high)), high - low
    while True:
        value, slope = log_ratio(rung, rate)
        if (value > 0) == falling:
            low = rate
        else:
            high = rate
        move = value / slope if slope else math.inf
        following = rate - move
        if not (low < following < high and abs(move) < 0.5 * last):
            following = 0.5 * (low + high)
        if abs(value) <= EPS or following in (low, high, rate):
            return rate
        last, rate = abs(following - rate), following
