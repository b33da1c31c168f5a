"""The calendar of deal years, counted from closing."""

from datetime import date, timedelta

from workbench.deal.dates import add_months
from workbench.text.locale import MONTHS, Locale


def year_span(closing: date, year: int) -> tuple[date, date]:
    """The first and the last day of a deal year."""
    first = add_months(closing, 12 * (year - 1))
    return first, add_months(closing, 12 * year) - timedelta(days=1)


def month_and_year(day: date, locale: Locale) -> str:
    """`Sep 2027`, or `2027 Sep` for readers whose dates begin with the year."""
    month = MONTHS[day.month - 1][:3]
    return f"{day.year} {month}" if locale.date_begins == "year" else f"{month} {day.year}"
