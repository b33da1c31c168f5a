"""The calendar of deal years, counted from closing."""

from calendar import monthrange
from datetime import date, timedelta


def months_after(start: date, months: int) -> date:
    """The same day so many months later; a day past the month's end becomes its last day."""
    year, month = divmod(start.year * 12 + start.month - 1 + months, 12)
    return date(year, month + 1, min(start.day, monthrange(year, month + 1)[1]))


def year_span(closing: date, year: int) -> tuple[date, date]:
    """The first and the last day of a deal year."""
    first = months_after(closing, 12 * (year - 1))
    return first, months_after(closing, 12 * year) - timedelta(days=1)
