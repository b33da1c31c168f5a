"""Calendar arithmetic that every room agrees on."""

import datetime
from calendar import monthrange


def add_months(day: datetime.date, months: int) -> datetime.date:
    """The same day so many months later, clipped to the month's last day.

    >>> add_months(datetime.date(2027, 1, 31), 1)
    datetime.date(2027, 2, 28)
    """
    year, month = divmod(day.year * 12 + day.month - 1 + months, 12)
    return datetime.date(year, month + 1, min(day.day, monthrange(year, month + 1)[1]))
