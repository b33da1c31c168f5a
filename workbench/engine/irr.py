"""The internal rate of return: all of its values, and how sure it is that there is one."""

from dataclasses import dataclass
from typing import Literal

import numpy as np
import numpy.typing as npt

from workbench.engine.irr_rows import even_step, middle, settle
from workbench.engine.irr_scan import all_roots, sign_changes
from workbench.engine.irr_worth import Array, annual

Status = Literal["unique", "several", "none", "bad"]
STATUSES: tuple[Status, ...] = ("unique", "several", "none", "bad")
UNIQUE, SEVERAL, NONE, BAD = range(4)
CELLS = 2**19  # flows in one piece of work, small enough to stay in a cache
FLOOR = "−99.9999999999 %"  # the lowest rate looked at, in words
STRIP = 512  # rows turned at a time


@dataclass(frozen=True)
class Irr:
    """An internal rate of return as a value with its reason.

    ``rate`` is an annual effective rate where ``status`` is "unique" and None elsewhere; ``roots``
    are all rates at which the flows are worth nothing, ascending; ``reason`` is a sentence, empty
    where the rate is unique.
    """

    status: Status
    rate: float | None
    roots: tuple[float, ...]
    reason: str


@dataclass(frozen=True, eq=False)
class IrrBatch:
    """Internal rates of many rows: ``status`` indexes STATUSES, ``rate`` is NaN if not unique."""

    status: npt.NDArray[np.int8]  # (trials,)
    rate: Array  # (trials,), annual effective


def irr(flows: npt.ArrayLike, times: npt.ArrayLike | None = None) -> Irr:
    """Internal rate of return of one series of flows.

    Parameters
    ----------
    flows : array_like, shape (periods,)
        Money, signed: what is paid out is negative.
    times : array_like, shape (periods,), optional
        When each flow falls, in years, increasing; 0, 1, 2, … if left out. Months are m/12.

    Returns
    -------
    Irr
        With an annual effective rate. *bad*: fewer than two flows, one that is not finite, or
        times that do not fit. *none*: the flows never change sign, or their present value is zero
        at no rate. *unique*: they change sign once; or, at the rate found, the running balance
        never turns positive before the end (for a borrowing: never negative), which excludes any
        other rate; or the search for all roots finds a single one, be it one that only touches
        zero. *several*: the search finds more, all of them in ``roots``.

        The search covers every rate from −99.9999999999 % to 1e300 a year, in full and not by
        samples. It leaves out flows smaller than 1e-300 of the largest.

    Notes
    -----
    If the balance is never positive at rate r, each balance is lower still at a higher rate and
    higher at a lower one, so the last one is zero at r alone (Teichroew, Robichek and Montalbano,
    *Management Science* 11, 1965, cited from memory: pure investments).

    Examples
    --------
    >>> irr([-100.0, 110.0])
    Irr(status='unique', rate=0.1, roots=(0.1,), reason='')
    >>> [round(root, 9) for root in irr([-100.0, 230.0, -132.0]).roots]
    [0.1, 0.2]
    """
    row = np.asarray(flows, dtype=np.float64)
    when = _times(times, row.size)
    fault = _fault(row, when)
    if fault:
        return Irr("bad", None, (), fault)
    since = when - when[0]
    rate = float(settle(row[:, None], since, even_step(since))[0])
    roots = all_roots(row, since) if np.isnan(rate) else (rate,)
    found = annual(row[:, None], since, np.array(roots))
    return _answer(tuple(found.tolist()), sign_changes(row))


def irr_batch(flows: npt.ArrayLike, times: npt.ArrayLike | None = None) -> IrrBatch:
    """Internal rates of many series at once; each row as by `irr`.

    Parameters
    ----------
    flows : array_like, shape (trials, periods)
        Money. Fastest with contiguous trials (Fortran order).
    times : array_like, shape (periods,), optional
        In years, as for `irr`; the same for all rows.

    Returns
    -------
    IrrBatch

    Examples
    --------
    >>> batch = irr_batch([[-100.0, 110.0], [100.0, 110.0]])
    >>> [STATUSES[code] for code in batch.status]
    ['unique', 'none']
    """
    table = np.asarray(flows, dtype=np.float64)
    if table.ndim != 2:
        raise ValueError("flows must have the shape (trials, periods)")
    trials, periods = table.shape
    when = _times(times, periods)
    if _misfit(periods, when):
        return IrrBatch(np.full(trials, BAD, np.int8), np.full(trials, np.nan))
    since = when - when[0]
    step = even_step(since)
    rates = np.empty(trials)
    piece = max(1, CELLS // periods)
    space = np.empty((periods, min(piece, trials)))
    near: float | None = None
    for start in range(0, trials, piece):
        part = _turned(table[start : start + piece], space)
        found = settle(part, since, step, near)
        rates[start : start + piece] = annual(part, since, found)
        known = found[~np.isnan(found)]
        near = middle(known) if len(known) else None
    status = np.full(trials, UNIQUE, np.int8)
    for trial in _unsettled(table, rates, status):
        answer = irr(table[trial], when)
        status[trial] = STATUSES.index(answer.status)
        rates[trial] = np.nan if answer.rate is None else answer.rate
    return IrrBatch(status, rates)


def _turned(rows: Array, space: Array) -> Array:
    """Rows as (periods, rows) with contiguous rows, copied in strips only where they are not."""
    if rows.strides[0] == rows.itemsize:
        return rows.T
    for start in range(0, len(rows), STRIP):
        space[:, start : min(start + STRIP, len(rows))] = rows[start : start + STRIP].T
    return space[:, : len(rows)]


def _unsettled(table: Array, rates: Array, status: npt.NDArray[np.int8]) -> npt.NDArray[np.intp]:
    """Rows to be searched one by one; those plainly bad or of one sign are marked here."""
    rows = np.flatnonzero(np.isnan(rates))
    part = table[rows]
    finite = np.isfinite(part).all(axis=1)
    level = (part >= 0).all(axis=1) | (part <= 0).all(axis=1)
    status[rows[level]] = NONE
    status[rows[~finite]] = BAD
    return rows[finite & ~level]


def _times(times: npt.ArrayLike | None, periods: int) -> Array:
    if times is None:
        return np.arange(periods, dtype=np.float64)
    return np.asarray(times, dtype=np.float64)


def _misfit(periods: int, when: Array) -> str:
    """What is wrong with the number of flows or their times, or nothing."""
    if periods < 2:
        return "At least two flows are needed."
    if when.shape != (periods,):
        return "There must be one time for each flow."
    if not (np.isfinite(when).all() and (when[1:] > when[:-1]).all()):
        return "The times must increase from each flow to the next."
    return ""


def _fault(row: Array, when: Array) -> str:
    if row.ndim != 1:
        return "The flows must be a single series."
    return _misfit(row.size, when) or (
        "" if np.isfinite(row).all() else "A flow is not a finite number."
    )


def _answer(roots: tuple[float, ...], changes: int) -> Irr:
    if len(roots) == 1:
        return Irr("unique", roots[0], roots, "")
    turns = {1: "once", 2: "twice"}.get(changes, f"{changes} times")
    if roots:
        reason = f"The flows change sign {turns} and are worth nothing at {len(roots)} rates."
        return Irr("several", None, roots, reason)
    if changes == 0:
        return Irr("none", None, (), "The flows never change sign.")
    reason = f"The flows change sign {turns}, but no rate above {FLOOR} makes them worth nothing."
    return Irr("none", None, (), reason)
