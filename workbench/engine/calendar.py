"""Deal months on the calendar, and dates as positions along them.

Month m runs from closing plus m calendar months to the day before closing plus m+1; a day past a
month's end clips to its last day. A position is a month index plus the share of that month's days
that has passed, so that a day in mid-month divides the month pro rata by days.
"""

import datetime
from bisect import bisect_right
from functools import lru_cache

from workbench.deal.dates import add_months
from workbench.deal.inputs import YEARS

MONTHS = 12 * YEARS


@lru_cache(maxsize=16)
def month_starts(closing: datetime.date) -> list[int]:
    """First day of each deal month 0…492, as ordinals; the last one ends the horizon."""
    return [add_months(closing, month).toordinal() for month in range(MONTHS + 1)]


def position(starts: list[int], day: datetime.date) -> float:
    """Where a day begins along the deal months, held between 0 and the horizon (492).

    >>> starts = month_starts(datetime.date(2027, 1, 1))
    >>> position(starts, datetime.date(2027, 2, 15))
    1.5
    """
    ordinal = day.toordinal()
    if ordinal <= starts[0]:
        return 0.0
    if ordinal >= starts[-1]:
        return float(MONTHS)
    month = bisect_right(starts, ordinal) - 1
    first, following = starts[month], starts[month + 1]
    return month + (ordinal - first) / (following - first)
