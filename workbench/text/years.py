"""The calendar of deal years, counted from closing."""

from calendar import monthrange
from datetime import date, timedelta

from workbench.text.locale import MONTHS, Locale


def months_after(start: date, months: int) -> date:
    """The same day so many months later; a day past the month's end becomes its last day."""
    year, month = divmod(start.year * 12 + start.month - 1 + months, 12)
    return date(year, month + 1, min(start.day, monthrange(year, month + 1)[1]))


def year_span(closing: date, year: int) -> tuple[date, date]:
    """The first and the last day of a deal year."""
    first = months_after(closing, 12 * (year - 1))
    return first, months_after(closing, 12 * year) - timedelta(days=1)


def month_and_year(day: date, locale: Locale) -> str:
    """`Sep 2027`, or `2027 Sep` for readers whose dates begin with the year."""
    month = MONTHS[day.month - 1][:3]
    return f"{day.year} {month}" if locale.date_begins == "year" else f"{month} {day.year}"
