"""Looks along the row, in numpy: rows first, trials last."""

from collections.abc import Callable, Mapping

import numpy as np

from workbench.engine.calendar import MONTHS
from workbench.engine.roll import Floats


def _later_sum(row: Floats) -> Floats:
    """All cells after this one, summed from the far end so that early cells lose nothing."""
    whole = np.add.accumulate(row[::-1])[::-1]
    return np.concatenate([whole[1:], np.zeros_like(whole[:1])])


def _following(row: Floats) -> Floats:
    return np.concatenate([row[1:], np.zeros_like(row[:1])])


def _year_sum(months: Floats) -> Floats:
    summed: Floats = months.reshape(-1, 12, months.shape[1]).sum(axis=1)
    return summed


def _year_end(months: Floats) -> Floats:
    return months[11::12]


def _of_year(years: Floats) -> Floats:
    return np.repeat(years, 12, axis=0)


def _month_starts(months: Floats) -> Floats:
    return np.concatenate([months, np.zeros_like(months[:1])])


def _over_dates(dates: Floats) -> Floats:
    """Summed in the order of a running sum, so that no rounding parts the two."""
    summed: Floats = np.add.accumulate(dates)[-1]
    return summed


LOOKS: Mapping[str, Callable[[Floats], Floats]] = {
    "running_sum": lambda row: np.add.accumulate(row),
    "running_product": lambda row: np.multiply.accumulate(row),
    "running_least": lambda row: np.minimum.accumulate(row),
    "later_sum": _later_sum,
    "following": _following,
    "year_sum": _year_sum,
    "year_end": _year_end,
    "of_year": _of_year,
    "month_starts": _month_starts,
    "over_dates": _over_dates,
}


def wide(figure: Floats | float, count: int) -> Floats:
    """A single figure in each cell of a row of so many; of none, as one axis of trials."""
    cells = np.atleast_1d(np.asarray(figure, dtype=np.float64))
    return np.broadcast_to(cells, (count, len(cells))) if count else cells


def before(row: Floats, first: Floats | float) -> Floats:
    """The cell before; the first cell has `first`."""
    return on_dates(row[:-1], first)


def on_dates(months: Floats, first: Floats | float) -> Floats:
    """`first` at closing, then each month's figure at its end."""
    trials = months.shape[1]
    if not isinstance(first, float | int):
        trials = max(trials, len(first))
    out = np.empty((len(months) + 1, trials))
    out[0] = first
    out[1:] = months
    return out


def at_year(row: Floats, year: Floats | float) -> Floats:
    """The cell of a year, 1 the first; not a number where the year is not one of the row."""
    if isinstance(year, float | int) or len(year) == 1:
        one = float(year if isinstance(year, float | int) else year[0])
        cell: Floats = row[int(one) - 1] if 1 <= one <= len(row) else np.full(row.shape[1], np.nan)
        return cell
    valid = (year >= 1) & (year <= len(row))
    position = np.where(valid, year, 1).astype(np.int64) - 1
    wide_row = np.broadcast_to(row, (len(row), len(year)))
    cells: Floats = np.take_along_axis(wide_row, position[np.newaxis], axis=0)[0]
    return np.where(valid, cells, np.nan)


def on_date(figure: Floats, month: Floats | float) -> Floats:
    """One figure on one date, 0 elsewhere; not a number throughout where the date is not known."""
    dates = np.arange(MONTHS + 1, dtype=np.float64)[:, np.newaxis]
    when = np.asarray(month, dtype=np.float64)
    placed = np.where(dates == when, figure, 0.0)
    return np.where(np.isnan(when), np.nan, placed)


def first_date(row: Floats) -> Floats:
    """Years to the first date that is not negative; not a number where there is none."""
    reached = row >= 0
    years = np.argmax(reached, axis=0) / 12
    return np.where(reached.any(axis=0) & ~np.isnan(row).any(axis=0), years, np.nan)
