"""The columns of a year grid: how many there are and what calendar years they are."""

from datetime import MAXYEAR, date

from workbench.deal.deal import Deal
from workbench.session.typed import locale_of
from workbench.text.numbers import day
from workbench.text.years import year_span

USUAL_YEARS = 10
"""Columns where the hold is not known."""
LONGEST_HOLD = 40


def hold_of(deal: Deal) -> int:
    """How many years the grid shows."""
    hold = deal.leave.hold
    return USUAL_YEARS if hold is None else min(max(hold, 1), LONGEST_HOLD)


def span(deal: Deal, year: int) -> tuple[date, date] | None:
    """The first and the last day of a year, where closing is dated."""
    closing = deal.purchase.closing_date
    if closing is None or closing.year + year >= MAXYEAR:
        return None
    return year_span(closing, year)


def heading(deal: Deal, year: int) -> str:
    """The number of a year and, where closing is dated, the calendar year or years it is."""
    days = span(deal, year)
    if days is None:
        return str(year)
    first, last = days
    also = "" if first.year == last.year else f"/{last.year % 100:02d}"
    return f"{year}\n{first.year}{also}"


def heading_in_words(deal: Deal, year: int) -> str:
    """A year with its first and last day."""
    days = span(deal, year)
    if days is None:
        return f"Year {year}"
    first, last = (day(one, locale_of(deal)) for one in days)
    return f"Year {year}: {first} to {last}"
