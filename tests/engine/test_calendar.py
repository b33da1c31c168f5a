"""Deal months on the calendar, by hand."""

from datetime import date, timedelta
from itertools import pairwise
from math import floor

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.engine.deals import near
from workbench.deal.dates import add_months
from workbench.engine.calendar import MONTHS, month_starts, position

closings = st.dates(date(1990, 1, 1), date(2060, 12, 31))


@pytest.mark.parametrize(
    ("day", "months", "later"),
    [
        (date(2027, 1, 15), 0, date(2027, 1, 15)),
        (date(2027, 1, 31), 1, date(2027, 2, 28)),
        (date(2028, 1, 31), 1, date(2028, 2, 29)),
        # Counted from the first day each time: a short month does not shorten those after it.
        (date(2027, 1, 31), 2, date(2027, 3, 31)),
        (date(2028, 2, 29), 12, date(2029, 2, 28)),
        (date(2028, 2, 29), 48, date(2032, 2, 29)),
        (date(2027, 12, 5), 1, date(2028, 1, 5)),
        (date(2027, 3, 31), -1, date(2027, 2, 28)),
    ],
)
def test_add_months(day: date, months: int, later: date) -> None:
    assert add_months(day, months) == later


def test_months_run_for_41_years() -> None:
    starts = month_starts(date(2027, 1, 31))
    assert MONTHS == 41 * 12 == len(starts) - 1
    assert starts[0] == date(2027, 1, 31).toordinal()
    assert starts[-1] == date(2068, 1, 31).toordinal()
    # 31 January to 27 February, 28 February to 30 March, 31 March to 29 April.
    assert [after - first for first, after in pairwise(starts[:4])] == [28, 31, 30]


def test_position_divides_a_month_by_its_days() -> None:
    starts = month_starts(date(2027, 1, 1))
    assert position(starts, date(2027, 1, 1)) == 0.0
    assert position(starts, date(2027, 3, 1)) == 2.0
    assert position(starts, date(2027, 1, 17)) == near(16 / 31)
    assert position(starts, date(2028, 2, 15)) == near(13 + 14 / 29)
    # The deal month of a closing on the 31st: 14 of its 28 days have passed on 14 February.
    assert position(month_starts(date(2027, 1, 31)), date(2027, 2, 14)) == 0.5


def test_position_stays_within_the_horizon() -> None:
    starts = month_starts(date(2027, 1, 1))
    assert position(starts, date(2026, 12, 31)) == position(starts, date.min) == 0.0
    assert position(starts, date(2067, 12, 31)) == near(491 + 30 / 31)
    assert position(starts, date(2068, 1, 1)) == position(starts, date.max) == 492.0


@settings(deadline=None)
@given(closings, st.integers(0, 14_900))
def test_each_day_lies_in_its_month(closing: date, days: int) -> None:
    starts, day = month_starts(closing), closing + timedelta(days)
    at = position(starts, day)
    month = min(floor(at), MONTHS - 1)
    assert starts[month] <= day.toordinal() < starts[month + 1]
    assert position(starts, day + timedelta(1)) == near(
        at + 1 / (starts[month + 1] - starts[month])
    )
